package nightlag.stages.acceptance;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.OptionalDouble;
import java.util.Random;
import java.util.stream.IntStream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/**
 * The decision rule against JCGM 106:2012. A verdict with a guard band of k u says that a single limit is met with a
 * probability of at least Φ(k), so its verdicts change where the examples' conformance probabilities say.
 */
class GuardBandValidationTest {
    private static Verdict verdict(double value, double u, Limits limits, double coverage) {
        return GuardBand.verdict(value, OptionalDouble.of(u), limits.guarded(coverage));
    }

    @ParameterizedTest(name = "coverage {0}: {1}")
    @CsvSource({"0, CONFORMING", "1, CONFORMING", "1.39, CONFORMING", "1.41, UNDECIDED", "2, UNDECIDED"})
    void aVoltageBelowItsUpperLimit(double coverage, Verdict expected) {
        // JCGM 106:2012, 7.3: -5.47 V, u = 0.05 V, limit -5.40 V; conformance probability Φ(1.4) = 0.92 (from memory)
        assertThat(verdict(-5.47, 0.05, Limits.on("x").to(-5.40), coverage)).isEqualTo(expected);
    }

    @ParameterizedTest(name = "coverage {0}: {1}")
    @CsvSource({"0, CONFORMING", "0.61, CONFORMING", "0.62, UNDECIDED", "1.6, UNDECIDED"})
    void aValueInsideAnInterval(double coverage, Verdict expected) {
        // JCGM 106:2012, 7.4: 13.6, u = 1.8, limits 12.5 and 16.3; conformance probability Φ(1.5) − Φ(−0.611) = 0.66,
        // so
        // the nearer limit is 0.611 u away
        assertThat(verdict(13.6, 1.8, Limits.on("x").from(12.5).to(16.3), coverage))
                .isEqualTo(expected);
    }

    @Test
    void atTheEdgeOfAcceptanceTheRiskIsTwoPerCent() {
        // exact: of lots that lie on the limit, Φ(−2) = 2.275 % are accepted with a guard band of 2 u
        Random random = new Random(106);
        int draws = 200_000;
        LimitPlan limit = Limits.on("x").to(10).guarded(2);
        long accepted = IntStream.range(0, draws)
                .filter(i -> GuardBand.verdict(10 + 0.3 * random.nextGaussian(), OptionalDouble.of(0.3), limit)
                        == Verdict.CONFORMING)
                .count();
        // three standard deviations of such a count
        assertThat(accepted / (double) draws).isCloseTo(0.02275, within(3 * Math.sqrt(0.02275 * 0.97725 / draws)));
    }

    @ParameterizedTest(name = "{0}: {1}")
    @CsvSource({"1, NONCONFORMING", "2, CONFORMING", "3, CONFORMING", "4, CONFORMING", "5, NONCONFORMING"})
    void withoutAGuardBandNothingIsUndecidedAndALimitIsInside(double value, Verdict expected) {
        assertThat(verdict(value, 100, Limits.on("x").from(2).to(4), 0)).isEqualTo(expected);
    }

    @Test
    void withoutAnUncertaintyThereIsNoGuardBand() {
        LimitPlan limit = Limits.on("x").from(2).guarded(2);
        assertThat(GuardBand.verdict(2.001, OptionalDouble.empty(), limit)).isEqualTo(Verdict.CONFORMING);
        assertThat(GuardBand.verdict(1.999, OptionalDouble.empty(), limit)).isEqualTo(Verdict.NONCONFORMING);
    }

    @Test
    void limitsCloserThanTheGuardBandsLeaveEveryValueOpenOrOutside() {
        Limits narrow = Limits.on("x").from(2).to(2.1);
        assertThat(verdict(2.05, 0.1, narrow, 2)).isEqualTo(Verdict.UNDECIDED);
        assertThat(verdict(2.31, 0.1, narrow, 2)).isEqualTo(Verdict.NONCONFORMING);
    }
}

package nightlag.stages.acceptance;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class IndividualsChartValidationTest {
    private static final LimitPlan LIMIT = Limits.on("tan_delta").in("1").to(2).guarded(2);

    /** The trend of the last value among those before it. */
    private static Optional<Trend> last(double... values) {
        IndividualsChart chart = new IndividualsChart(LIMIT);
        Optional<Trend> trend = Optional.empty();
        for (int i = 0; i < values.length; i++) {
            trend = chart.next("L" + (i + 1), values[i]);
        }
        return trend;
    }

    @Test
    void theFactorIsThreeOverTheMeanRangeOfTwo() {
        // exact: the mean range of two normal values is 2/√π σ = 1.128 σ, and 3/1.128 = 2.660 (ISO 7870-2, table of
        // factors)
        double meanRangeOfTwo = 2 / Math.sqrt(Math.PI);
        assertThat(meanRangeOfTwo).isCloseTo(1.128, within(5e-4));
        assertThat(IndividualsChart.FACTOR).isEqualTo(Math.round(3 / 1.128 * 1000) / 1000.0);
    }

    @Test
    void limitsOfATextbooksViscosities() {
        // Viscosity of 15 batches of a paint, D. C. Montgomery, Introduction to Statistical Quality Control, chapter on
        // charts for individual measurements: mean 33.52, mean moving range 0.48, limits 34.80 and 32.24 (from memory)
        double[] batches = {
            33.75, 33.05, 34.00, 33.81, 33.46, 34.02, 33.68, 33.27, 33.49, 33.20, 33.62, 33.00, 33.54, 33.12, 33.84,
            34.9
        };
        Trend trend = last(batches).orElseThrow();
        assertThat(trend.lots()).isEqualTo(15);
        assertThat(trend.mean()).isCloseTo(33.52, within(0.005));
        assertThat(trend.upper()).isCloseTo(34.80, within(0.006));
        assertThat(trend.lower()).isCloseTo(32.24, within(0.006));
        assertThat(trend.verdict()).isEqualTo(Verdict.NONCONFORMING);
        assertThat(trend.note()).startsWith("trend: above its 15 earlier lots; mean 33.52");
    }

    @Test
    void eightEarlierLotsAreNeeded() {
        assertThat(last(1, 2, 1, 2, 1, 2, 1, 2)).isEmpty();
        Trend trend = last(1, 2, 1, 2, 1, 2, 1, 2, 3).orElseThrow();
        assertThat(trend.lots()).isEqualTo(8);
        assertThat(trend.mean()).isEqualTo(1.5);
        // every moving range is 1
        assertThat(trend.lower()).isCloseTo(1.5 - 2.66, within(1e-12));
        assertThat(trend.upper()).isCloseTo(1.5 + 2.66, within(1e-12));
        assertThat(trend.verdict()).isEqualTo(Verdict.CONFORMING);
        assertThat(trend.earlier())
                .extracting(Trend.LotValue::lot)
                .containsExactly("L1", "L2", "L3", "L4", "L5", "L6", "L7", "L8");
    }

    @Test
    void lotsThatAreAllAlikeLeaveNoRoom() {
        assertThat(last(2, 2, 2, 2, 2, 2, 2, 2, 2).orElseThrow().verdict()).isEqualTo(Verdict.CONFORMING);
        assertThat(last(2, 2, 2, 2, 2, 2, 2, 2, 2.001).orElseThrow().verdict()).isEqualTo(Verdict.NONCONFORMING);
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5})
    void aCommonShiftAndAnotherUnitChangeNothingButTheNumbers(long seed) {
        Random random = new Random(seed);
        double[] values = random.doubles(20, 1, 3).toArray();
        double shift = random.nextDouble(-5, 5);
        double unit = Math.pow(10, random.nextInt(-6, 7));
        double[] others = new double[values.length];
        for (int i = 0; i < values.length; i++) {
            others[i] = unit * (values[i] + shift);
        }
        Trend trend = last(values).orElseThrow();
        Trend other = last(others).orElseThrow();
        assertThat(other.mean()).isCloseTo(unit * (trend.mean() + shift), within(1e-9 * unit));
        assertThat(other.lower()).isCloseTo(unit * (trend.lower() + shift), within(1e-9 * unit));
        assertThat(other.upper()).isCloseTo(unit * (trend.upper() + shift), within(1e-9 * unit));
        assertThat(other.verdict()).isEqualTo(trend.verdict());
    }

    @Test
    void ofLotsThatAreAllOfOneKindFewAreCalledUnusual() {
        // exact for limits that are known: 0.27 % beyond 3 σ; limits from 30 values are themselves uncertain
        Random random = new Random(7870);
        int called = 0;
        int runs = 400;
        List<Integer> counts = new ArrayList<>();
        for (int run = 0; run < runs; run++) {
            double[] values =
                    random.doubles(31).map(any -> random.nextGaussian()).toArray();
            counts.add(last(values).orElseThrow().lots());
            if (last(values).orElseThrow().verdict() == Verdict.NONCONFORMING) {
                called++;
            }
        }
        assertThat(counts).containsOnly(30);
        assertThat(called / (double) runs).isLessThan(0.02);
    }
}

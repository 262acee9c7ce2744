package nightlag.stages.sweep;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.numeric.Complex;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class RepeatsTest {
    /**
     * Exact: C1⁻¹ + C2⁻¹ with C1 = [4 2; 2 4], C2 = [4 −2; −2 4] is [2/3 0; 0 2/3]; the weighted sum of (0, 0) and (6, 0) is
     * C2⁻¹ (6, 0) = (2, 1), and so the mean is (3, 1.5).
     */
    @Test
    void theWeightsAreTheInverseCovariances() {
        Moduli mean = WeightedMean.of(List.of(
                new Moduli(100, 50, Optional.of(new ModuliCovariance(4, 4, 2))),
                new Moduli(106, 50, Optional.of(new ModuliCovariance(4, 4, -2)))));

        assertThat(mean.storagePa()).isCloseTo(103, within(1e-12));
        assertThat(mean.lossPa()).isCloseTo(51.5, within(1e-12));
        assertThat(mean.covariance().orElseThrow().storageVariance()).isCloseTo(1.5, within(1e-12));
        assertThat(mean.covariance().orElseThrow().covariance()).isCloseTo(0, within(1e-12));
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4})
    void scatterBeyondTheUncertaintiesEntersThem(long seed) {
        // repeats scatter by 3 % where their own noise says 0.1 %
        Repeats repeats = Repeats.of(sweep(seed, 0.03, 0.001));

        List<ModulusPoint> averaged = repeats.averaged().points();
        assertThat(averaged).hasSize(40);
        assertThat(averaged)
                .allSatisfy(point -> assertThat(point.moduli()
                                        .orElseThrow()
                                        .covariance()
                                        .orElseThrow()
                                        .storageU()
                                / 1000)
                        .isBetween(0.8 * 0.03 / Math.sqrt(2), 1.25 * 0.03 / Math.sqrt(2)));
        assertThat(repeats.note().orElseThrow().sentence()).startsWith("specimen 1, sweep 1: 80 points");
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4})
    void withoutUncertaintiesTheScatterIsTheUncertainty(long seed) {
        List<ModulusPoint> averaged =
                Repeats.of(sweep(seed, 0.02, 0)).averaged().points();

        assertThat(averaged)
                .allSatisfy(point -> assertThat(point.moduli()
                                        .orElseThrow()
                                        .covariance()
                                        .orElseThrow()
                                        .lossU()
                                / 2000)
                        .isBetween(0.8 * 0.02 / Math.sqrt(2), 1.25 * 0.02 / Math.sqrt(2)));
    }

    @Test
    void frequencySweepsAtTwoStrainsAreNoRepeats() {
        List<ModulusPoint> points = new ArrayList<>();
        for (int i = 0; i < 10; i++) {
            points.add(SeriesPoint.of(i, 300, 1 + i / 2)
                    .strained(i % 2 == 0 ? 0.01 : 0.1)
                    .build());
        }
        Sweep sweep = frequencySweep(points);

        assertThat(Repeats.of(sweep).averaged()).isEqualTo(sweep);
        assertThat(Repeats.of(sweep).note()).isEmpty();
    }

    @Test
    void neighboursInARampAreNoRepeats() {
        List<ModulusPoint> points = new ArrayList<>();
        for (int i = 0; i < 10; i++) {
            points.add(SeriesPoint.of(i, 300 + 0.1 * i, 1).build());
        }
        Sweep sweep = new Sweep(
                new SweepName("1", "1"),
                SweepPlan.Kind.TEMPERATURE,
                OptionalDouble.empty(),
                OptionalDouble.of(1),
                points);

        assertThat(Repeats.of(sweep).averaged()).isEqualTo(sweep);
    }

    /** Forty frequencies measured twice. */
    private static Sweep sweep(long seed, double scatter, double relativeU) {
        Random random = new Random(seed);
        List<ModulusPoint> points = new ArrayList<>();
        for (int i = 0; i < 80; i++) {
            int frequency = i / 2;
            Complex modulus = new Complex(
                    1000 * (1 + scatter * random.nextGaussian()), 2000 * (1 + scatter * random.nextGaussian()));
            points.add(SeriesPoint.of(i, 300, Math.pow(1.1, frequency))
                    .modulus(modulus, relativeU)
                    .build());
        }
        return frequencySweep(points);
    }

    private static Sweep frequencySweep(List<ModulusPoint> points) {
        return new Sweep(
                new SweepName("1", "1"),
                SweepPlan.Kind.FREQUENCY,
                OptionalDouble.of(300),
                OptionalDouble.empty(),
                points);
    }
}

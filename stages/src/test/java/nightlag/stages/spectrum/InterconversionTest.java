package nightlag.stages.spectrum;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatIllegalArgumentException;
import static org.assertj.core.api.Assertions.within;

import java.util.Arrays;
import java.util.Random;
import java.util.stream.IntStream;
import nightlag.stages.numeric.Complex;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** A relaxation spectrum and its retardation spectrum are one material, whatever the spectrum looks like. */
class InterconversionTest {
    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12})
    void theTwoSetsAreEachOthersInverseOver24Decades(long seed) {
        RelaxationModes relaxation = anyMaterial(new Random(seed));

        assertInverse(relaxation, relaxation.retardation());
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {21, 22, 23, 24, 25, 26, 27, 28, 29, 30, 31, 32})
    void thereAndBackReturnsEveryModeHoweverWeak(long seed) {
        RelaxationModes relaxation = anyMaterial(new Random(seed));

        RelaxationModes back = relaxation.retardation().relaxation();

        assertSame(back, relaxation);
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {41, 42, 43, 44, 45, 46})
    void timesThatNearlyCoincideLoseNothing(long seed) {
        Random random = new Random(seed);
        int count = 60;
        double[] times = new double[count];
        double[] strengths = new double[count];
        times[0] = 1;
        for (int i = 0; i < count; i++) {
            times[i] = i == 0 ? 1e-3 : times[i - 1] * (1 + Math.pow(10, -14 * random.nextDouble()));
            strengths[i] = Math.pow(10, 12 * random.nextDouble());
        }
        RelaxationModes relaxation = RelaxationModes.of(random.nextBoolean() ? 0 : 1e3, times, strengths);

        RetardationModes retardation = relaxation.retardation();

        assertInverse(relaxation, retardation);
        assertSame(retardation.relaxation(), relaxation);
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {51, 52, 53, 54, 55, 56})
    void aSetOfComplianceModesComesBackToo(long seed) {
        Random random = new Random(seed);
        int count = 1 + random.nextInt(60);
        double[] times =
                random.doubles(count, -12, 12).map(e -> Math.pow(10, e)).toArray();
        double[] strengths =
                random.doubles(count, -12, 0).map(e -> Math.pow(10, e)).toArray();
        RetardationModes retardation = RetardationModes.of(
                1e-9, random.nextBoolean() ? 0 : Math.pow(10, -random.nextInt(12)), times, strengths);

        RelaxationModes relaxation = retardation.relaxation();
        RetardationModes back = relaxation.retardation();

        assertInverse(relaxation, retardation);
        assertThat(back.count()).isEqualTo(retardation.count());
        for (int k = 0; k < count; k++) {
            assertThat(back.timesS()[k] / retardation.timesS()[k]).isCloseTo(1, within(1e-15));
            assertThat(back.strengthsPerPa()[k] / retardation.strengthsPerPa()[k])
                    .isCloseTo(1, within(1e-12));
        }
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {61, 62, 63, 64, 65, 66})
    void retardationTimesLieBetweenRelaxationTimes(long seed) {
        RelaxationModes relaxation = anyMaterial(new Random(seed));
        double[] relaxationTimes = relaxation.timesS();

        double[] retardationTimes = relaxation.retardation().timesS();

        assertThat(retardationTimes).hasSize(relaxation.isLiquid() ? relaxation.count() - 1 : relaxation.count());
        for (int k = 0; k < retardationTimes.length; k++) {
            // a weak mode's two times can round to the same double
            assertThat(retardationTimes[k]).isGreaterThanOrEqualTo(relaxationTimes[k]);
            if (k + 1 < relaxationTimes.length) {
                assertThat(retardationTimes[k]).isLessThanOrEqualTo(relaxationTimes[k + 1]);
            }
        }
        assertThat(Arrays.stream(relaxation.retardation().strengthsPerPa()).allMatch(j -> j > 0))
                .isTrue();
    }

    /** 0 &lt; G(t)J(t) ≤ 1: a consequence of Boltzmann superposition for a fading memory. */
    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {71, 72, 73, 74, 75, 76})
    void relaxationTimesCreepNeverExceedsOne(long seed) {
        RelaxationModes relaxation = anyMaterial(new Random(seed));
        RetardationModes retardation = relaxation.retardation();

        for (double logTime = -12; logTime <= 12; logTime += 0.25) {
            double time = Math.pow(10, logTime);
            double product = relaxation.relaxationPa(time) * retardation.creepPerPa(time);
            assertThat(product).isLessThanOrEqualTo(1 + 1e-13).isGreaterThanOrEqualTo(0);
        }
    }

    @Test
    void equilibriumThatIsAllButNothingOrAllButEverythingIsNoSpecialCase() {
        for (double equilibrium : new double[] {1e-30, 1e-12, 1, 1e12, 1e30}) {
            RelaxationModes relaxation =
                    RelaxationModes.of(equilibrium, new double[] {1e-2, 1, 3}, new double[] {100, 10, 1});

            RetardationModes retardation = relaxation.retardation();

            assertInverse(relaxation, retardation);
            assertSame(retardation.relaxation(), relaxation);
            assertThat(retardation.recoverablePerPa() * equilibrium).isCloseTo(1, within(1e-14));
        }
    }

    @Test
    void aSpringAloneIsASpring() {
        RetardationModes retardation =
                RelaxationModes.of(4, new double[0], new double[0]).retardation();

        assertThat(retardation.instantaneousPerPa()).isEqualTo(0.25);
        assertThat(retardation.count()).isZero();
        assertThat(retardation.isLiquid()).isFalse();
        assertThat(retardation.relaxation().equilibriumPa()).isEqualTo(4);
    }

    @Test
    void oneLiquidModeIsASpringAndADashpotInSeries() {
        RetardationModes retardation =
                RelaxationModes.of(0, new double[] {0.5}, new double[] {8}).retardation();

        assertThat(retardation.instantaneousPerPa()).isEqualTo(0.125);
        assertThat(retardation.fluidityPerPaS()).isEqualTo(0.25);
        assertThat(retardation.count()).isZero();
        RelaxationModes back = retardation.relaxation();
        assertThat(back.timesS()).containsExactly(0.5);
        assertThat(back.strengthsPa()).containsExactly(8);
    }

    @Test
    void equalTimesAreOneModeAndModesOfNoStrengthAreNone() {
        RelaxationModes modes = RelaxationModes.of(0, new double[] {3, 1, 3, 7}, new double[] {2, 1, 5, 0});

        assertThat(modes.timesS()).containsExactly(1, 3);
        assertThat(modes.strengthsPa()).containsExactly(1, 7);
    }

    @Test
    void whatIsNoMaterialIsRefused() {
        double[] none = {};
        assertThatIllegalArgumentException().isThrownBy(() -> RelaxationModes.of(0, none, none));
        assertThatIllegalArgumentException().isThrownBy(() -> RelaxationModes.of(-1, none, none));
        assertThatIllegalArgumentException().isThrownBy(() -> RelaxationModes.of(Double.NaN, none, none));
        assertThatIllegalArgumentException().isThrownBy(() -> RetardationModes.of(0, 1, none, none));
        assertThatIllegalArgumentException()
                .isThrownBy(() -> RelaxationModes.of(1, new double[] {0}, new double[] {1}));
        assertThatIllegalArgumentException()
                .isThrownBy(() -> RelaxationModes.of(1, new double[] {1}, new double[] {-1}));
        assertThatIllegalArgumentException().isThrownBy(() -> RelaxationModes.of(1, new double[] {1}, none));
    }

    /** Up to 60 modes over 20 decades of time, strengths over 12 decades, liquid or solid. */
    private static RelaxationModes anyMaterial(Random random) {
        int count = 1 + random.nextInt(60);
        double[] times =
                random.doubles(count, -10, 10).map(e -> Math.pow(10, e)).toArray();
        double[] strengths =
                random.doubles(count, 0, 12).map(e -> Math.pow(10, e)).toArray();
        double equilibrium = random.nextBoolean() ? 0 : Math.pow(10, 12 * random.nextDouble());
        return RelaxationModes.of(equilibrium, times, strengths);
    }

    /** The bound is 1e-10; what a table holds, plain doubles, is all that goes in. */
    private static void assertInverse(RelaxationModes relaxation, RetardationModes retardation) {
        RelaxationModes writtenModuli =
                RelaxationModes.of(relaxation.equilibriumPa(), relaxation.timesS(), relaxation.strengthsPa());
        double fluidity = relaxation.isLiquid() ? 1 / relaxation.viscosityPaS() : 0;
        RetardationModes writtenCompliances = RetardationModes.of(
                retardation.instantaneousPerPa(), fluidity, retardation.timesS(), retardation.strengthsPerPa());
        double worst = IntStream.rangeClosed(-480, 480)
                .mapToDouble(i -> Math.pow(10, i / 40.0))
                .map(s -> Math.max(
                        Math.abs(
                                writtenModuli.operationalModulusPa(s) * writtenCompliances.operationalCompliancePerPa(s)
                                        - 1),
                        writtenModuli
                                .modulusPa(s)
                                .times(writtenCompliances.compliancePerPa(s))
                                .minus(Complex.ONE)
                                .abs()))
                .max()
                .orElseThrow();
        assertThat(worst).isLessThanOrEqualTo(1e-13);
    }

    private static void assertSame(RelaxationModes back, RelaxationModes relaxation) {
        assertThat(back.count()).isEqualTo(relaxation.count());
        double worstTime = worst(back.timesS(), relaxation.timesS());
        double worstStrength = worst(back.strengthsPa(), relaxation.strengthsPa());
        assertThat(worstTime).as("times").isLessThanOrEqualTo(1e-15);
        assertThat(worstStrength).as("strengths").isLessThanOrEqualTo(1e-12);
        if (!relaxation.isLiquid()) {
            assertThat(back.equilibriumPa() / relaxation.equilibriumPa()).isCloseTo(1, within(1e-14));
        }
    }

    private static double worst(double[] found, double[] truth) {
        return IntStream.range(0, truth.length)
                .mapToDouble(i -> Math.abs(found[i] / truth[i] - 1))
                .max()
                .orElse(0);
    }
}

package nightlag.stages.moduli;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;
import static org.assertj.core.api.Assertions.within;

import java.util.Arrays;
import java.util.List;
import java.util.OptionalDouble;
import java.util.Random;
import java.util.function.DoubleUnaryOperator;
import java.util.stream.IntStream;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.waveform.Waveform;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

/** Creep records of known compliances: where the steps are found, what is read after them, and what is refused. */
class CreepAnalysisTest {
    /** Burgers (exact): J0 = 1e-6, flow 1e-7 t, one mode of 5e-7 at 2 s, in 1/Pa. */
    private static double burgers(double t) {
        return 1e-6 + 1e-7 * t + 5e-7 * -Math.expm1(-t / 2);
    }

    /** A standard linear solid (exact): J0 = 1e-6, one mode of 9e-6 at 10 s. */
    private static double solid(double t) {
        return 1e-6 + 9e-6 * -Math.expm1(-t / 10);
    }

    /** A power law (exact): J = 1e-6 t^0.3. */
    private static double power(double t) {
        return 1e-6 * Math.pow(t, 0.3);
    }

    private static final double[] LOAD_AND_UNLOAD = {0, 100};

    private static CreepRecording loadAndUnload(DoubleUnaryOperator compliance) {
        return CreepRecording.of(compliance, CreepRecording.even(-5.003, 200, 0.02))
                .steps(LOAD_AND_UNLOAD, 1000, 0);
    }

    private static void requireCompliance(List<CreepReading> readings, DoubleUnaryOperator model, double error) {
        assertThat(readings).hasSizeGreaterThan(20);
        for (CreepReading reading : readings) {
            double truth = model.applyAsDouble(reading.sinceStepS());
            // the instant of a step lies somewhere between two samples, which u says
            assertThat(reading.compliancePerPa())
                    .as("at %s s, u %s", reading.sinceStepS(), reading.complianceUPerPa())
                    .isCloseTo(truth, within(2 * reading.complianceUPerPa() + error * truth));
        }
    }

    @Test
    void creepOfABurgersBodyIsReadToAThousandth() throws ReductionFault {
        CreepCurve curve = loadAndUnload(CreepAnalysisTest::burgers).curve();
        assertThat(curve.fromRest()).isTrue();
        assertThat(curve.quality()).isEqualTo(Quality.SOUND);
        assertThat(curve.steps()).extracting(CreepStep::part).containsExactly(CreepPart.LOAD, CreepPart.RECOVERY);
        assertThat(curve.steps().get(0).changePa()).isCloseTo(1000, within(1e-9));
        assertThat(curve.steps().get(1).changePa()).isCloseTo(-1000, within(1e-9));
        requireCompliance(CreepRecording.after(curve, 1), CreepAnalysisTest::burgers, 1e-3);
    }

    @Test
    void whatComesBackIsTheRecoverableCompliance() throws ReductionFault {
        CreepCurve curve = loadAndUnload(CreepAnalysisTest::burgers).curve();
        // after fifty retardation times of load all but the flow comes back: J0 and the mode
        requireCompliance(CreepRecording.after(curve, 2), t -> 1e-6 + 5e-7 * -Math.expm1(-t / 2), 2e-3);
    }

    /** The mean over a stretch of a decaying strain lies above its value at the mean time; left in, that is 3 % here at 8 λ. */
    @Test
    void whatAModeStillHasToGoIsReadWellAfterManyOfItsTimes() throws ReductionFault {
        List<CreepReading> readings =
                CreepRecording.after(loadAndUnload(CreepAnalysisTest::solid).curve(), 1);
        List<CreepReading> late = readings.stream()
                .filter(reading -> reading.sinceStepS() > 30 && reading.sinceStepS() < 85)
                .toList();

        assertThat(late).hasSizeGreaterThan(5);
        for (CreepReading reading : late) {
            double toGo = 1e-5 - solid(reading.sinceStepS());
            assertThat((1e-5 - reading.compliancePerPa()) / toGo)
                    .as("at %s s", reading.sinceStepS())
                    .isCloseTo(1, within(5e-3));
        }
    }

    @Test
    void standardLinearSolidAndPowerLaw() throws ReductionFault {
        requireCompliance(
                CreepRecording.after(loadAndUnload(CreepAnalysisTest::solid).curve(), 1),
                CreepAnalysisTest::solid,
                5e-3);
        requireCompliance(
                CreepRecording.after(loadAndUnload(CreepAnalysisTest::power).curve(), 1),
                CreepAnalysisTest::power,
                1e-3);
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5, 6})
    void stepsAreFoundToASample(long seed) throws ReductionFault {
        double[] at = {0.5 + 0.1 * seed, 40.17, 80.3, 120.9};
        CreepCurve curve = CreepRecording.of(CreepAnalysisTest::burgers, CreepRecording.even(0, 200, 0.1))
                .steps(at, 500, 1000, 300, 0)
                .noise(2e-6, 5, seed)
                .curve();
        assertThat(curve.steps())
                .extracting(CreepStep::part)
                .containsExactly(CreepPart.LOAD, CreepPart.LOAD, CreepPart.RECOVERY, CreepPart.RECOVERY);
        double[] found =
                curve.steps().stream().mapToDouble(step -> at[0] + step.atS()).toArray();
        for (int k = 0; k < at.length; k++) {
            // counted from the first step: one sample for either
            assertThat(found[k]).isCloseTo(at[k], within(0.1001));
        }
    }

    @ParameterizedTest(name = "rise over {0} s, sampled every {1} s")
    @CsvSource({"0.3, 0.02", "1, 0.02", "2, 0.005", "0.05, 0.1"})
    void aSlowRiseIsLeftOutAndTimeIsCountedFromItsCentre(double rise, double interval) throws ReductionFault {
        CreepCurve curve = CreepRecording.of(CreepAnalysisTest::power, CreepRecording.even(-5.003, 300, interval))
                .rise(rise)
                .curve();
        assertThat(curve.steps()).hasSize(1);
        List<CreepReading> readings = curve.readings();
        assertThat(readings.get(0).sinceStepS()).isGreaterThanOrEqualTo(2 * rise * 0.9);
        for (CreepReading reading : readings) {
            double truth = power(reading.sinceStepS());
            // n (1 − n)/96 of it is 2e-3 at the first reading
            assertThat(Math.abs(reading.compliancePerPa() - truth))
                    .isLessThan(2 * reading.complianceUPerPa() + 3e-3 * truth);
        }
    }

    @Test
    void uncertaintyCoversTheNoise() throws ReductionFault {
        int readings = 0;
        int inside = 0;
        for (long seed = 1; seed <= 8; seed++) {
            CreepCurve curve = loadAndUnload(CreepAnalysisTest::burgers)
                    .noise(5e-6, 2, seed)
                    .curve();
            List<CreepReading> creep = CreepRecording.after(curve, 1);
            for (CreepReading reading : creep) {
                readings++;
                double error = reading.compliancePerPa() - burgers(reading.sinceStepS());
                inside += Math.abs(error) < 2 * reading.complianceUPerPa() ? 1 : 0;
            }
            // hundreds of samples in a reading: their mean is that much better
            assertThat(creep.get(creep.size() - 1).strainU()).isLessThan(5e-6 / 10);
        }
        // 95 of 100 of normal noise; readings of one record share the error of its zero
        assertThat((double) inside / readings).isBetween(0.9, 0.99);
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4})
    void correlatedNoiseIsWorthFewerSamples(long seed) throws ReductionFault {
        CreepCurve curve = loadAndUnload(CreepAnalysisTest::burgers)
                .noise(5e-6, 2, seed)
                .correlated(0.8)
                .curve();
        assertThat(curve.reasons()).extracting(reason -> reason.code()).contains("CREEP_NOISE_CORRELATED");
        List<CreepReading> late = CreepRecording.after(curve, 1).stream()
                .filter(reading -> reading.sinceStepS() > 5)
                .toList();
        double chiSquared = late.stream()
                .mapToDouble(reading ->
                        (reading.compliancePerPa() - burgers(reading.sinceStepS())) / reading.complianceUPerPa())
                .map(z -> z * z)
                .sum();
        assertThat(chiSquared / late.size()).isBetween(0.3, 2.5);
    }

    @Test
    void recordsSampledEvenlyInTheLogarithmOfTime() throws ReductionFault {
        CreepCurve curve = CreepRecording.of(CreepAnalysisTest::power, CreepRecording.logarithmic(0.01, 1e4, 30))
                .noise(1e-8, 0.5, 1)
                .curve();
        assertThat(curve.quality()).isEqualTo(Quality.SOUND);
        assertThat(curve.readings()).hasSizeBetween(80, 121);
        for (CreepReading reading : curve.readings()) {
            double truth = power(reading.sinceStepS());
            assertThat(Math.abs(reading.compliancePerPa() - truth))
                    .isLessThan(3 * reading.complianceUPerPa() + 2e-3 * truth);
        }
    }

    @Test
    void noMoreThanTwentyReadingsToADecade() throws ReductionFault {
        List<CreepReading> readings =
                CreepRecording.after(loadAndUnload(CreepAnalysisTest::burgers).curve(), 1);
        double decades = Math.log10(
                readings.get(readings.size() - 1).sinceStepS() / readings.get(0).sinceStepS());
        assertThat(readings.size()).isLessThanOrEqualTo((int) (20 * decades) + 2);
    }

    @Test
    void aLoadOnlyRecordAndOneThatBeginsUnderLoad() throws ReductionFault {
        CreepCurve loaded = CreepRecording.of(CreepAnalysisTest::solid, CreepRecording.even(-1, 50, 0.05))
                .curve();
        assertThat(loaded.steps()).hasSize(1);
        CreepCurve under = CreepRecording.of(CreepAnalysisTest::solid, CreepRecording.even(20, 200, 0.05))
                .steps(LOAD_AND_UNLOAD, 1000, 0)
                .curve();
        assertThat(under.fromRest()).isFalse();
        assertThat(under.steps()).extracting(CreepStep::part).containsExactly(CreepPart.RECOVERY);
        assertThat(under.reasons()).extracting(reason -> reason.code()).contains("CREEP_BEGINS_UNDER_LOAD");
    }

    @Test
    void oneRowBeforeTheLoadIsEnough() throws ReductionFault {
        double[] time = CreepRecording.even(-0.05, 50, 0.05);
        CreepCurve curve = CreepRecording.of(CreepAnalysisTest::solid, time).curve();
        assertThat(curve.fromRest()).isTrue();
        requireCompliance(curve.readings(), CreepAnalysisTest::solid, 1e-3);
    }

    @Test
    void theZeroOfTheStrainIsTakenFromBeforeTheLoad() throws ReductionFault {
        Waveform plain = loadAndUnload(CreepAnalysisTest::burgers).waveform();
        double[] moved =
                Arrays.stream(plain.deformation()).map(strain -> strain + 0.3).toArray();
        CreepCurve curve = CreepRecording.curve(
                new Waveform(plain.timeS(), moved, plain.load(), new double[0], OptionalDouble.empty(), 0));
        requireCompliance(CreepRecording.after(curve, 1), CreepAnalysisTest::burgers, 1e-3);
    }

    private static void requireRefused(Waveform waveform, CreepReason reason) {
        assertThatThrownBy(() -> CreepRecording.curve(waveform))
                .isInstanceOfSatisfying(
                        ReductionFault.class,
                        fault -> assertThat(fault.reason().code()).isEqualTo(reason.name()));
    }

    private static Waveform withStress(DoubleUnaryOperator stress) {
        double[] time = CreepRecording.even(0, 100, 0.1);
        return new Waveform(
                time,
                Arrays.stream(time).map(t -> 1e-3 * t).toArray(),
                Arrays.stream(time).map(stress).toArray(),
                new double[0],
                OptionalDouble.empty(),
                0);
    }

    @Test
    void recordsWithoutAStepAreRefused() {
        requireRefused(withStress(t -> 7), CreepReason.CREEP_NO_STEP);
        Random random = new Random(1);
        requireRefused(withStress(t -> 7 + random.nextGaussian()), CreepReason.CREEP_NO_STEP);
        requireRefused(withStress(t -> 10 * t), CreepReason.CREEP_NEVER_SETTLES);
        requireRefused(withStress(t -> Math.sin(t)), CreepReason.CREEP_NEVER_SETTLES);
    }

    @Test
    void faultyNumbersAreRefused() {
        requireRefused(withStress(t -> t > 50 ? Double.NaN : 1), CreepReason.CREEP_NOT_FINITE);
        requireRefused(
                new Waveform(new double[3], new double[3], new double[3], new double[0], OptionalDouble.empty(), 0),
                CreepReason.CREEP_TOO_FEW_SAMPLES);
        requireRefused(
                new Waveform(new double[9], new double[9], new double[9], new double[0], OptionalDouble.empty(), 0),
                CreepReason.CREEP_TIME_NOT_RISING);
    }

    private static Waveform changed(DoubleUnaryOperator strain, DoubleUnaryOperator stress) {
        Waveform plain =
                loadAndUnload(CreepAnalysisTest::burgers).noise(1e-7, 0.1, 1).waveform();
        double[] gamma = plain.deformation().clone();
        double[] sigma = plain.load().clone();
        for (int i = 0; i < gamma.length; i++) {
            gamma[i] += strain.applyAsDouble(plain.timeS()[i]);
            sigma[i] += stress.applyAsDouble(plain.timeS()[i]);
        }
        return new Waveform(plain.timeS(), gamma, sigma, new double[0], OptionalDouble.empty(), 0);
    }

    @Test
    void whatIsWrongWithARecordIsFlagged() throws ReductionFault {
        CreepCurve sagging = CreepRecording.curve(changed(t -> 0, t -> t > 0 && t < 100 ? -0.4 * t : 0));
        assertThat(sagging.flags()).containsExactly(Flag.UNSETTLED);
        assertThat(sagging.quality()).isEqualTo(Quality.DOUBTFUL);
        CreepCurve drifting = CreepRecording.curve(changed(t -> 1e-5 * t, t -> 0));
        assertThat(drifting.flags()).containsExactly(Flag.DRIFTING);
        CreepCurve weak =
                loadAndUnload(CreepAnalysisTest::burgers).noise(3e-4, 0.1, 1).curve();
        assertThat(weak.flags()).contains(Flag.WEAK_SIGNAL);
        Waveform plain = changed(t -> 0, t -> 0);
        double[] stuck = Arrays.stream(plain.deformation())
                .map(strain -> Math.min(strain, 6e-3))
                .toArray();
        CreepCurve clipped = CreepRecording.curve(
                new Waveform(plain.timeS(), stuck, plain.load(), new double[0], OptionalDouble.empty(), 0));
        assertThat(clipped.flags()).contains(Flag.CLIPPED);
        assertThat(clipped.quality()).isEqualTo(Quality.UNUSABLE);
    }

    @Test
    void aGapAndAWanderingTemperatureAreFlagged() throws ReductionFault {
        Waveform plain = changed(t -> 0, t -> 0);
        int[] kept = IntStream.range(0, plain.size())
                .filter(i -> plain.timeS()[i] < 5 || plain.timeS()[i] > 40)
                .toArray();
        Waveform gapped = new Waveform(
                Arrays.stream(kept).mapToDouble(i -> plain.timeS()[i]).toArray(),
                Arrays.stream(kept).mapToDouble(i -> plain.deformation()[i]).toArray(),
                Arrays.stream(kept).mapToDouble(i -> plain.load()[i]).toArray(),
                Arrays.stream(kept)
                        .mapToDouble(i -> 298 + 0.01 * plain.timeS()[i])
                        .toArray(),
                OptionalDouble.empty(),
                0);
        CreepCurve curve = CreepRecording.curve(gapped);
        assertThat(curve.flags()).containsExactly(Flag.GAPS, Flag.TEMPERATURE_WANDER);
        assertThat(curve.temperatureK().getAsDouble()).isCloseTo(299, within(0.3));
    }

    @Test
    void isolatedSpikesAreLeftOut() throws ReductionFault {
        Waveform plain = changed(t -> 0, t -> 0);
        double[] spiked = plain.deformation().clone();
        spiked[2000] += 1;
        spiked[7000] -= 1;
        CreepCurve curve = CreepRecording.curve(
                new Waveform(plain.timeS(), spiked, plain.load(), new double[0], OptionalDouble.empty(), 0));
        requireCompliance(CreepRecording.after(curve, 1), CreepAnalysisTest::burgers, 2e-3);
        assertThat(curve.reasons()).extracting(reason -> reason.code()).contains("CREEP_SPIKES_LEFT_OUT");
    }
}

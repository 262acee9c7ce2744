package nightlag.stages.waveform;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;
import static org.assertj.core.api.Assertions.within;

import java.util.Arrays;
import java.util.OptionalDouble;
import java.util.Random;
import nightlag.stages.fault.Reason;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.numeric.Complex;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class HarmonicAnalysisTest {
    private static final double EXACT = 1e-9;

    private static Complex ratio(SignalFit fit) {
        return fit.load()[0].over(fit.deformation()[0]);
    }

    private static double error(SignalFit fit, Complex truth) {
        return ratio(fit).minus(truth).abs() / truth.abs();
    }

    /** A rich record: seven orders in both channels, drift up to the degree, offsets larger than the amplitude. */
    private static Recording rich(long seed, Drift drift, double frequency, double cycles, double perCycle) {
        Random random = new Random(seed);
        Complex[] deformation = new Complex[7];
        Complex[] load = new Complex[7];
        for (int n = 1; n <= 7; n++) {
            double strength = n == 1 ? 1 : 0.01 * random.nextDouble();
            deformation[n - 1] = Complex.polar(2e-3 * strength, 2 * Math.PI * random.nextDouble());
            strength = n == 1 ? 1 : (n % 2 == 1 ? 0.3 : 0.02) * random.nextDouble() / n;
            load[n - 1] = Complex.polar(40 * strength, 2 * Math.PI * random.nextDouble());
        }
        double[] ofDeformation = new double[drift.degree() + 1];
        double[] ofLoad = new double[drift.degree() + 1];
        for (int p = 0; p <= drift.degree(); p++) {
            ofDeformation[p] = 2e-3 * (p == 0 ? 20 : 1) * random.nextGaussian();
            ofLoad[p] = 40 * (p == 0 ? 20 : 1) * random.nextGaussian();
        }
        return Recording.of(frequency, cycles, perCycle)
                .deformation(deformation)
                .load(load)
                .drifts(ofDeformation, ofLoad)
                .seed(seed);
    }

    /** G* of a rich record. */
    private static Complex truth(long seed) {
        Random random = new Random(seed);
        double ofDeformation = random.nextDouble();
        double ofLoad = random.nextDouble();
        return Complex.polar(40 / 2e-3, 2 * Math.PI * (ofLoad - ofDeformation));
    }

    @ParameterizedTest(name = "{0} cycles, {1} samples a cycle, drift {2}")
    @CsvSource({
        "1.2, 16, LINEAR",
        "1.2, 40, QUADRATIC",
        "1.2, 4000, LINEAR",
        "1.27, 17.3, NONE",
        "1.35, 64, QUADRATIC",
        "1.5, 16, LINEAR",
        "1.73, 200, LINEAR",
        "2, 16, QUADRATIC",
        "2.2, 1000, LINEAR",
        "2.77, 23, NONE",
        "3, 64, LINEAR",
        "5, 100, NONE",
        "5.5, 33.3, QUADRATIC",
        "12.34, 128, LINEAR",
        "50, 16, QUADRATIC",
        "50, 400, LINEAR",
    })
    void noiseFreeRecordsGiveWhatTheyWereBuiltFrom(double cycles, double perCycle, Drift drift) throws Exception {
        for (int seed = 0; seed < 4; seed++) {
            double frequency = 0.37 * Math.pow(10, seed % 3);
            Recording recording = rich(seed, drift, frequency, cycles, perCycle);
            SignalFit fit = HarmonicAnalysis.analyse(
                    recording.build(), new ExtractionPlan(0, 7, drift, FrequencySource.SIGNAL));
            assertThat(error(fit, truth(seed))).as("seed %d", seed).isLessThan(EXACT);
            assertThat(fit.frequencyHz()).isCloseTo(frequency, within(EXACT * frequency));
            assertThat(fit.harmonics()).isEqualTo(7);
            assertThat(fit.cyclesUsed()).isCloseTo(cycles, within(0.51 / perCycle));
        }
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {0, 1, 2, 3, 4, 5, 6, 7})
    void unevenClocksAndMissingRowsNeedNoResampling(long seed) throws Exception {
        Drift drift = seed % 3 == 0 ? Drift.NONE : seed % 3 == 1 ? Drift.LINEAR : Drift.QUADRATIC;
        SignalFit fit = HarmonicAnalysis.analyse(
                rich(seed, drift, 3, 4.3, 50)
                        .jitter(0.1)
                        .missing(0.05)
                        .startingAt(512)
                        .build(),
                new ExtractionPlan(0, 7, drift, FrequencySource.SIGNAL));
        // times near 512 s are known to 1e-13 s, so phases to 2e-12
        assertThat(error(fit, truth(seed))).isLessThan(EXACT);
        assertThat(fit.frequencyHz()).isCloseTo(3, within(3 * EXACT));
    }

    @Test
    void anOffsetATenThousandTimesTheAmplitudeDoesNoHarm() throws Exception {
        Complex strain = Complex.polar(1e-4, 0.3);
        Complex stress = Complex.polar(1, -0.4);
        Waveform waveform = Recording.of(2, 3.3, 60)
                .deformation(strain)
                .load(stress)
                .drifts(new double[] {1, 1e-5}, new double[] {1e4, 0.1})
                .build();
        SignalFit fit = HarmonicAnalysis.analyse(waveform, ExtractionPlan.withDefaults());
        assertThat(error(fit, stress.over(strain))).isLessThan(EXACT);
    }

    @Test
    void wholeCyclesAtAnExactTagAreTakenFromTheBins() throws Exception {
        Recording recording = rich(3, Drift.NONE, 2, 6, 50).tagged(2);
        ExtractionPlan plan = new ExtractionPlan(0, 7, Drift.NONE, FrequencySource.TAG);
        SignalFit fit = HarmonicAnalysis.analyse(recording.build(), plan);
        assertThat(error(fit, truth(3))).isLessThan(EXACT);
        assertThat(fit.frequencyHz()).isEqualTo(2);
        assertThat(fit.frequencyUHz()).isZero();
        assertThat(fit.cyclesUsed()).isEqualTo(6);
        // odd numbers of samples and of cycles do as well
        SignalFit odd =
                HarmonicAnalysis.analyse(rich(5, Drift.NONE, 2, 7, 47).tagged(2).build(), plan);
        assertThat(error(odd, truth(5))).isLessThan(EXACT);
    }

    @Test
    void anExactTagIsKeptWhereBinsDoNotServe() throws Exception {
        ExtractionPlan plan = new ExtractionPlan(0, 7, Drift.LINEAR, FrequencySource.TAG);
        SignalFit fit = HarmonicAnalysis.analyse(
                rich(4, Drift.LINEAR, 2, 4.4, 50).tagged(2).missing(0.03).build(), plan);
        assertThat(error(fit, truth(4))).isLessThan(EXACT);
        assertThat(fit.frequencyHz()).isEqualTo(2);
    }

    @Test
    void driftNeverPassesForModulusOnWholeCycles() throws Exception {
        // over whole cycles a ramp is not orthogonal to a sine: bins alone are per cents off here
        Complex strain = Complex.polar(0.01, 0.1);
        Complex stress = Complex.polar(500, 0.7);
        Waveform waveform = Recording.of(1, 4, 64)
                .deformation(strain)
                .load(stress)
                .drifts(new double[] {0, 0.01}, new double[] {0, 500})
                .tagged(1)
                .build();
        SignalFit fit = HarmonicAnalysis.analyse(waveform, ExtractionPlan.withDefaults());
        assertThat(error(fit, stress.over(strain))).isLessThan(EXACT);
        SignalFit blind = HarmonicAnalysis.analyse(waveform, new ExtractionPlan(0, 7, Drift.NONE, FrequencySource.TAG));
        assertThat(error(blind, stress.over(strain))).isGreaterThan(0.01);
        // but it is seen: the mean moves by one amplitude
        assertThat(blind.screening().baseline().value()).isCloseTo(1, within(0.05));
    }

    @Test
    void theTagIsOnlyAStartUnlessItIsExact() throws Exception {
        SignalFit fit = HarmonicAnalysis.analyse(
                rich(2, Drift.LINEAR, 1, 20, 32).tagged(1.02).build(), ExtractionPlan.withDefaults());
        assertThat(fit.frequencyHz()).isCloseTo(1, within(EXACT));
        assertThat(fit.screening().frequencyMismatch().orElseThrow().value()).isCloseTo(0.02 / 1.02, within(1e-9));
    }

    @Test
    void anExactTagThatIsWrongIsSeen() throws Exception {
        SignalFit fit = HarmonicAnalysis.analyse(
                Recording.of(1, 10, 32).tagged(1.004).build(),
                new ExtractionPlan(0, 3, Drift.NONE, FrequencySource.TAG));
        assertThat(fit.screening().frequencyMismatch().orElseThrow().value()).isCloseTo(0.004, within(5e-4));
        assertThat(fit.screening().frequencyMismatch().orElseThrow().significant())
                .isTrue();
    }

    @Test
    void startUpCyclesAreLeftOutAtTheFront() throws Exception {
        Waveform clean = rich(1, Drift.LINEAR, 2, 6, 40).build();
        double[] load = clean.load().clone();
        for (int i = 0; i < 40; i++) {
            load[i] *= 1 + Math.exp(-i / 5.0);
        }
        Waveform waveform =
                new Waveform(clean.timeS(), clean.deformation(), load, new double[0], OptionalDouble.empty(), 0);
        SignalFit fit =
                HarmonicAnalysis.analyse(waveform, new ExtractionPlan(1, 7, Drift.LINEAR, FrequencySource.SIGNAL));
        assertThat(error(fit, truth(1))).isLessThan(EXACT);
        assertThat(fit.cyclesUsed()).isCloseTo(5, within(EXACT));
        assertThat(fit.firstSample()).isEqualTo(40);
        assertThat(fit.samplesUsed()).isEqualTo(200);
        assertThat(fit.samplesLeftOut()).isEqualTo(40);
    }

    @Test
    void ordersAtOrAboveHalfTheSamplesACycleAreLeftOutAndSaid() throws Exception {
        Waveform waveform = Recording.of(1, 6, 10).build();
        SignalFit fit = HarmonicAnalysis.analyse(waveform, ExtractionPlan.withDefaults());
        assertThat(fit.harmonics()).isEqualTo(4);
        assertThat(fit.notes()).extracting(Reason::code).contains(WaveformReason.WAVEFORM_ORDERS_ABOVE_SAMPLING.name());
    }

    @Test
    void fewSamplesCarryFewOrders() throws Exception {
        Waveform waveform = Recording.of(1, 1.2, 12).build();
        SignalFit fit = HarmonicAnalysis.analyse(waveform, ExtractionPlan.withDefaults());
        assertThat(fit.harmonics()).isEqualTo(5);
        assertThat(fit.notes()).extracting(Reason::code).contains(WaveformReason.WAVEFORM_ORDERS_ABOVE_SAMPLING.name());
        SignalFit single = HarmonicAnalysis.analyse(Recording.of(1, 0.9, 50).build(), ExtractionPlan.withDefaults());
        assertThat(single.harmonics()).isEqualTo(1);
        assertThat(single.notes())
                .extracting(Reason::code)
                .contains(WaveformReason.WAVEFORM_ORDERS_NOT_SEPARABLE.name());
    }

    @Test
    void temperatureIsTheMeanOfTheSamplesUsed() throws Exception {
        Waveform waveform = Recording.of(1, 5, 40)
                .temperature(t -> 463.15 + 0.3 * t + 0.2 * Math.sin(2 * Math.PI * t))
                .build();
        SignalFit fit = HarmonicAnalysis.analyse(waveform, ExtractionPlan.withDefaults());
        double mean = Arrays.stream(waveform.temperatureK()).average().orElseThrow();
        assertThat(fit.meanTemperatureK().orElseThrow()).isCloseTo(mean, within(1e-9));
        // smoothed over a cycle the swing is gone; the ramp from mean to mean of the first and the last cycle stays
        assertThat(fit.screening().temperatureWanderK().orElseThrow()).isCloseTo(0.3 * 4, within(1e-6));
    }

    @Test
    void spikesAreLeftOut() throws Exception {
        for (long seed = 0; seed < 5; seed++) {
            Waveform clean =
                    rich(seed, Drift.LINEAR, 1, 5, 200).noise(2e-5, 0.4).build();
            double[] load = clean.load().clone();
            double[] deformation = clean.deformation().clone();
            Random random = new Random(seed);
            for (int k = 0; k < 5; k++) {
                load[100 + 170 * k + random.nextInt(50)] += 400 * random.nextGaussian();
            }
            deformation[333] += 0.02;
            SignalFit fit = HarmonicAnalysis.analyse(
                    new Waveform(clean.timeS(), deformation, load, new double[0], OptionalDouble.empty(), 0),
                    ExtractionPlan.withDefaults());
            SignalFit reference = HarmonicAnalysis.analyse(clean, ExtractionPlan.withDefaults());
            assertThat(fit.samplesLeftOut()).isBetween(4, 6);
            assertThat(fit.screening().spikeShare()).isEqualTo(fit.samplesLeftOut() / 1000.0);
            // a hundredth of a noise standard deviation of the load's amplitude
            assertThat(fit.load()[0].minus(reference.load()[0]).abs()).isLessThan(0.4 * 0.01);
        }
    }

    /** As many as a window of 300 samples gets by chance once in a thousand, where one sample in two hundred is a spike. */
    @Test
    void aShortRecordMayHoldMoreThanItsShareOfSpikes() throws Exception {
        for (long seed = 0; seed < 5; seed++) {
            Waveform clean = rich(seed, Drift.LINEAR, 1, 6, 50).noise(2e-5, 0.4).build();
            double[] load = clean.load().clone();
            Random random = new Random(seed);
            for (int k = 0; k < 6; k++) {
                load[20 + 45 * k + random.nextInt(30)] += random.nextBoolean() ? 4000 : -4000;
            }

            SignalFit fit = HarmonicAnalysis.analyse(
                    new Waveform(clean.timeS(), clean.deformation(), load, new double[0], OptionalDouble.empty(), 0),
                    ExtractionPlan.withDefaults());

            SignalFit reference = HarmonicAnalysis.analyse(clean, ExtractionPlan.withDefaults());
            assertThat(fit.samplesLeftOut()).isEqualTo(6);
            assertThat(fit.load()[0].minus(reference.load()[0]).abs()).isLessThan(0.4 * 0.05);
        }
    }

    @Test
    void noiseIsNotMistakenForSpikes() throws Exception {
        for (long seed = 0; seed < 200; seed++) {
            Waveform waveform =
                    Recording.of(1, 3, 100).noise(1e-4, 5).seed(seed).build();
            SignalFit fit = HarmonicAnalysis.analyse(waveform, ExtractionPlan.withDefaults());
            assertThat(fit.samplesLeftOut()).as("seed %d", seed).isZero();
        }
    }

    @Test
    void clippedSamplesAndTheirNeighboursAreLeftOut() throws Exception {
        Complex stress = Complex.polar(500, 0.9);
        Waveform clean = Recording.of(1, 5, 200).load(stress).build();
        double limit = 495;
        double[] load = Arrays.stream(clean.load()).map(v -> Math.min(v, limit)).toArray();
        long clipped = Arrays.stream(load).filter(v -> v == limit).count();
        SignalFit fit = HarmonicAnalysis.analyse(
                new Waveform(clean.timeS(), clean.deformation(), load, new double[0], OptionalDouble.empty(), 0),
                ExtractionPlan.withDefaults());
        assertThat(error(fit, stress.over(Complex.polar(0.01, 0.3)))).isLessThan(EXACT);
        assertThat(fit.screening().clippedShare()).isEqualTo(clipped / 1000.0);
        assertThat(fit.samplesLeftOut()).isEqualTo((int) clipped + 2 * 5);
    }

    @ParameterizedTest(name = "steps of {0} amplitudes")
    @ValueSource(doubles = {0.1, 0.03, 0.01, 1e-3, 1e-4})
    void coarseStepsAreNotClipping(double step) throws Exception {
        for (double perCycle : new double[] {40, 200, 1000}) {
            Waveform fine = Recording.of(1, 4, perCycle).build();
            double[] load = Arrays.stream(fine.load())
                    .map(v -> Math.rint(v / (500 * step)) * 500 * step)
                    .toArray();
            SignalFit fit = HarmonicAnalysis.analyse(
                    new Waveform(fine.timeS(), fine.deformation(), load, new double[0], OptionalDouble.empty(), 0),
                    ExtractionPlan.withDefaults());
            assertThat(fit.screening().clippedShare())
                    .as("%s samples a cycle", perCycle)
                    .isZero();
        }
    }

    @Test
    void badRecordsAreFaultsWithTheirReason() {
        double[] t = {0, 1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11};
        double[] wave = {0, 1, 0, -1, 0, 1, 0, -1, 0, 1, 0, -1};
        double[] still = new double[12];
        double[] broken = wave.clone();
        broken[3] = Double.NaN;
        double[] back = t.clone();
        back[5] = 3.5;
        assertFault(t, wave, still, "WAVEFORM_CONSTANT_CHANNEL");
        assertFault(t, broken, wave, "WAVEFORM_NOT_FINITE");
        assertFault(back, wave, wave, "WAVEFORM_TIME_NOT_RISING");
        assertFault(Arrays.copyOf(t, 4), Arrays.copyOf(wave, 4), Arrays.copyOf(wave, 4), "WAVEFORM_TOO_FEW_SAMPLES");
        assertFault(new double[0], new double[0], new double[0], "WAVEFORM_NO_SAMPLES");
        assertThatThrownBy(() -> HarmonicAnalysis.analyse(
                        new Waveform(t, wave, wave, new double[0], OptionalDouble.empty(), 0),
                        new ExtractionPlan(30, 7, Drift.LINEAR, FrequencySource.SIGNAL)))
                .isInstanceOfSatisfying(
                        ReductionFault.class,
                        fault -> assertThat(fault.reason().code()).isEqualTo("WAVEFORM_ALL_START_UP"));
    }

    private static void assertFault(double[] t, double[] deformation, double[] load, String code) {
        assertThatThrownBy(() -> HarmonicAnalysis.analyse(
                        new Waveform(t, deformation, load, new double[0], OptionalDouble.empty(), 0),
                        ExtractionPlan.withDefaults()))
                .isInstanceOfSatisfying(
                        ReductionFault.class,
                        fault -> assertThat(fault.reason().code()).isEqualTo(code));
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5})
    void scalingTheLoadScalesTheModulusAndNothingElse(long seed) throws Exception {
        Waveform waveform =
                rich(seed, Drift.LINEAR, 1, 5.3, 40).noise(1e-5, 0.2).build();
        double factor = Math.pow(10, seed - 3.0) * 1.7;
        Waveform scaled = new Waveform(
                waveform.timeS(),
                waveform.deformation(),
                Arrays.stream(waveform.load()).map(v -> factor * v).toArray(),
                new double[0],
                OptionalDouble.empty(),
                0);
        SignalFit first = HarmonicAnalysis.analyse(waveform, ExtractionPlan.withDefaults());
        SignalFit second = HarmonicAnalysis.analyse(scaled, ExtractionPlan.withDefaults());
        assertThat(error(second, ratio(first).times(factor))).isLessThan(1e-12);
        assertThat(second.loadNoise()).isCloseTo(factor * first.loadNoise(), within(1e-9 * second.loadNoise()));
        assertThat(second.degreesOfFreedom()).isCloseTo(first.degreesOfFreedom(), within(1e-6));
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5})
    void shiftingTimeChangesNothing(long seed) throws Exception {
        Waveform waveform =
                rich(seed, Drift.LINEAR, 1, 5.3, 40).noise(1e-5, 0.2).build();
        Waveform later = new Waveform(
                Arrays.stream(waveform.timeS()).map(t -> t + 64).toArray(),
                waveform.deformation(),
                waveform.load(),
                new double[0],
                OptionalDouble.empty(),
                0);
        SignalFit first = HarmonicAnalysis.analyse(waveform, ExtractionPlan.withDefaults());
        SignalFit second = HarmonicAnalysis.analyse(later, ExtractionPlan.withDefaults());
        assertThat(error(second, ratio(first))).isLessThan(1e-10);
        assertThat(second.originS()).isCloseTo(first.originS() + 64, within(1e-9));
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5})
    void swappingTheChannelsInvertsTheModulus(long seed) throws Exception {
        Waveform waveform =
                rich(seed, Drift.LINEAR, 1, 5.3, 40).noise(1e-5, 0.2).build();
        Waveform swapped = new Waveform(
                waveform.timeS(),
                /* deformation= */ waveform.load(),
                /* load= */ waveform.deformation(),
                new double[0],
                OptionalDouble.empty(),
                0);
        SignalFit first = HarmonicAnalysis.analyse(waveform, ExtractionPlan.withDefaults());
        SignalFit second = HarmonicAnalysis.analyse(swapped, ExtractionPlan.withDefaults());
        assertThat(error(second, Complex.ONE.over(ratio(first)))).isLessThan(1e-10);
    }
}

package nightlag.stages.waveform;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;
import static org.assertj.core.api.Assertions.within;

import java.util.List;
import java.util.OptionalDouble;
import java.util.Random;
import java.util.function.DoubleUnaryOperator;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.numeric.Complex;
import org.apache.commons.math3.distribution.TDistribution;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class MultisineAnalysisTest {
    private static final List<Double> OCTAVES = List.of(0.5, 1.0, 2.0, 4.0, 8.0);

    /** A liquid of one mode, 10 kPa and 0.1 s. */
    private static Complex modulus(double hz) {
        Complex x = new Complex(0, 2 * Math.PI * hz * 0.1);
        return x.over(Complex.ONE.plus(x)).times(1e4);
    }

    /** What a record is made of. */
    private record Made(List<Double> hz, double seconds, double rateHz, double clock, double noise, double jitter) {
        Waveform build(long seed) {
            Random random = new Random(seed);
            int count = (int) Math.round(seconds * rateHz);
            double[] time = new double[count];
            double[] strain = new double[count];
            double[] stress = new double[count];
            for (int i = 0; i < count; i++) {
                double t = (i + jitter * random.nextGaussian()) / rateHz;
                time[i] = t;
                strain[i] = 1e-3 + 2e-5 * t + noise * 0.01 * random.nextGaussian();
                stress[i] = -4 + 0.3 * t + noise * 50 * random.nextGaussian();
                for (int k = 0; k < hz.size(); k++) {
                    double omega = 2 * Math.PI * hz.get(k) * clock;
                    Complex amplitude = Complex.polar(0.01 / (1 + k), 0.7 * k * k);
                    Complex turn = Complex.polar(1, omega * t);
                    strain[i] += amplitude.times(turn).re();
                    stress[i] += amplitude.times(modulus(hz.get(k))).times(turn).re();
                }
            }
            return new Waveform(time, strain, stress, new double[0], OptionalDouble.empty(), 0);
        }
    }

    private static Complex found(SignalFit fit) {
        return fit.load()[0].over(fit.deformation()[0]);
    }

    private static ExtractionPlan plan(FrequencySource source) {
        return new ExtractionPlan(0, 7, Drift.LINEAR, source);
    }

    private static void requireModuli(List<SignalFit> fits, List<Double> hz, double error) {
        assertThat(fits).hasSize(hz.size());
        for (int k = 0; k < fits.size(); k++) {
            Complex truth = modulus(hz.get(k));
            assertThat(found(fits.get(k)).minus(truth).abs() / truth.abs())
                    .as("%s Hz", hz.get(k))
                    .isLessThan(error);
        }
    }

    @ParameterizedTest(name = "{0} s")
    @ValueSource(doubles = {2, 4, 7.3, 20})
    void givenTonesComeBackExactly(double seconds) throws Exception {
        Waveform waveform = new Made(OCTAVES, seconds, 100, 1, 0, 0).build(1);
        requireModuli(MultisineAnalysis.analyse(waveform, OCTAVES, plan(FrequencySource.TAG)), OCTAVES, 1e-9);
        requireModuli(MultisineAnalysis.analyse(waveform, OCTAVES, plan(FrequencySource.SIGNAL)), OCTAVES, 1e-9);
    }

    @Test
    void tonesThatAreNotGivenAreFound() throws Exception {
        List<Double> hz = List.of(0.4, 0.9, 2.17, 5.3, 11.0);
        List<SignalFit> fits = MultisineAnalysis.analyse(
                new Made(hz, 25, 100, 1, 0, 0).build(1), List.of(), ExtractionPlan.withDefaults());
        requireModuli(fits, hz, 1e-9);
        for (int k = 0; k < hz.size(); k++) {
            assertThat(fits.get(k).frequencyHz()).isCloseTo(hz.get(k), within(1e-9));
        }
    }

    @Test
    void tonesThatAreNotGivenAreFoundInNoise() throws Exception {
        List<Double> hz = List.of(0.4, 0.9, 2.17, 5.3, 11.0);
        List<SignalFit> fits = MultisineAnalysis.analyse(
                new Made(hz, 25, 100, 1, 0.01, 0.01).build(3), List.of(), ExtractionPlan.withDefaults());
        requireModuli(fits, hz, 0.01);
    }

    @ParameterizedTest(name = "clock {0}")
    @ValueSource(doubles = {0.99, 0.9995, 1.0001, 1.003, 1.01})
    void aRecordersClockMayRunDifferentlyFromTheDrives(double clock) throws Exception {
        List<SignalFit> fits = MultisineAnalysis.analyse(
                new Made(OCTAVES, 60, 100, clock, 0, 0).build(1), OCTAVES, plan(FrequencySource.SIGNAL));
        requireModuli(fits, OCTAVES, 1e-9);
        for (int k = 0; k < OCTAVES.size(); k++) {
            assertThat(fits.get(k).frequencyHz()).isCloseTo(clock * OCTAVES.get(k), within(1e-8));
            assertThat(fits.get(k).screening().frequencyMismatch().orElseThrow().value())
                    .isCloseTo(Math.abs(clock - 1), within(1e-9));
        }
    }

    @Test
    void aHeldFrequencyThatIsOffIsSaid() throws Exception {
        List<SignalFit> fits = MultisineAnalysis.analyse(
                new Made(OCTAVES, 20, 100, 1.0002, 0, 0).build(1), OCTAVES, plan(FrequencySource.TAG));
        assertThat(fits.get(4).frequencyHz()).isEqualTo(8);
        assertThat(fits.get(4).screening().frequencyMismatch().orElseThrow().value())
                .isCloseTo(2e-4, within(2e-5));
    }

    @Test
    void jitteredStampsAreTakenAsTheyAre() throws Exception {
        Waveform waveform = new Made(OCTAVES, 8.2, 100, 1, 0, 0.05).build(5);
        requireModuli(MultisineAnalysis.analyse(waveform, OCTAVES, plan(FrequencySource.SIGNAL)), OCTAVES, 1e-9);
    }

    @Test
    void isolatedSpikesAreLeftOut() throws Exception {
        Waveform clean = new Made(OCTAVES, 10, 100, 1, 1e-3, 0).build(7);
        double[] load = clean.load().clone();
        load[123] += 700;
        load[801] -= 900;
        Waveform waveform =
                new Waveform(clean.timeS(), clean.deformation(), load, new double[0], OptionalDouble.empty(), 0);
        List<SignalFit> fits = MultisineAnalysis.analyse(waveform, OCTAVES, plan(FrequencySource.SIGNAL));
        assertThat(fits.get(0).samplesLeftOut()).isEqualTo(2);
        requireModuli(fits, OCTAVES, 2e-3);
    }

    @Test
    void anOvertoneThatFallsOnATonesFrequencyIsSaid() throws Exception {
        List<Double> hz = List.of(1.0, 3.0, 7.3);
        List<SignalFit> fits =
                MultisineAnalysis.analyse(new Made(hz, 10, 100, 1, 0, 0).build(1), hz, plan(FrequencySource.SIGNAL));
        assertThat(fits.get(0).notes()).noneMatch(note -> note.code().equals("MULTISINE_OVERTONE"));
        assertThat(fits.get(1).notes())
                .anyMatch(note -> note.code().equals("MULTISINE_OVERTONE")
                        && note.sentence().startsWith("the overtone of order 3 of 1 Hz falls on this frequency"));
        assertThat(fits.get(2).notes()).noneMatch(note -> note.code().equals("MULTISINE_OVERTONE"));
    }

    private static void refused(Waveform waveform, List<Double> hz, String code) {
        assertThatThrownBy(() -> MultisineAnalysis.analyse(waveform, hz, ExtractionPlan.withDefaults()))
                .isInstanceOfSatisfying(
                        ReductionFault.class,
                        fault -> assertThat(fault.reason().code()).isEqualTo(code));
    }

    @Test
    void whatIsNoMultisineIsRefused() {
        refused(new Made(List.of(1.0), 10, 100, 1, 1e-3, 0).build(1), List.of(), "MULTISINE_ONE_TONE");
        refused(new Made(List.of(), 10, 100, 1, 0.1, 0).build(1), List.of(), "MULTISINE_NO_TONES");
        refused(new Made(OCTAVES, 10, 100, 1, 1e-3, 0).build(1), List.of(1.3, 2.7), "MULTISINE_OTHER_TONES");
        refused(new Made(OCTAVES, 10, 100, 1, 1e-3, 0).build(1), List.of(0.5, 2.0), "MULTISINE_OTHER_TONES");
        refused(new Made(OCTAVES, 1.5, 100, 1, 1e-3, 0).build(1), OCTAVES, "MULTISINE_TOO_SHORT");
        refused(new Made(OCTAVES, 10, 12, 1, 1e-3, 0).build(1), OCTAVES, "MULTISINE_TOO_COARSE");
        refused(new Made(OCTAVES, 10, 100, 1, 1e-3, 0).build(1), List.of(1.0, 1.05), "MULTISINE_TOO_NEAR");
    }

    /** Both channels follow a shape of period 1 in the phase; the load is ahead by a tenth. */
    private static Waveform shape(double hz, DoubleUnaryOperator shape) {
        Random random = new Random(9);
        int count = 2000;
        double[] time = new double[count];
        double[] strain = new double[count];
        double[] stress = new double[count];
        for (int i = 0; i < count; i++) {
            time[i] = i / 100.0;
            strain[i] = 0.01 * shape.applyAsDouble(hz * time[i] + 0.13) + 1e-5 * random.nextGaussian();
            stress[i] = 100 * shape.applyAsDouble(hz * time[i] + 0.23) + 0.1 * random.nextGaussian();
        }
        return new Waveform(time, strain, stress, new double[0], OptionalDouble.empty(), 0);
    }

    private static double square(double turns) {
        return turns - Math.floor(turns) < 0.5 ? 1 : -1;
    }

    private static double triangle(double turns) {
        return 1 - 4 * Math.abs(turns - Math.floor(turns) - 0.5);
    }

    /** The first odd orders of a square wave, of these heights and phases. */
    private static double series(double turns, DoubleUnaryOperator height, DoubleUnaryOperator phase) {
        double sum = 0;
        for (int n = 1; n < 12; n += 2) {
            sum += height.applyAsDouble(n) * Math.sin(2 * Math.PI * n * turns + phase.applyAsDouble(n));
        }
        return sum;
    }

    @ParameterizedTest(name = "{0} Hz")
    @ValueSource(doubles = {1, 1.013, 0.3})
    void aSquareWaveIsNoMultisine(double hz) {
        Waveform waveform = shape(hz, MultisineAnalysisTest::square);
        assertThatThrownBy(() -> MultisineAnalysis.analyse(waveform, List.of(), ExtractionPlan.withDefaults()))
                .hasMessageStartingWith("layout multisine: the deformation is one square wave of ")
                .hasMessageContaining("layout single reads such a record");
        refused(shape(hz, turns -> series(turns, n -> 1 / n, n -> 0)), List.of(), "MULTISINE_ONE_WAVE");
    }

    @Test
    void aTriangleIsNoMultisineEither() {
        assertThatThrownBy(() -> MultisineAnalysis.analyse(
                        shape(0.7, MultisineAnalysisTest::triangle), List.of(), ExtractionPlan.withDefaults()))
                .hasMessageContaining("one triangle wave of 0.7");
    }

    @Test
    void oddMultiplesOfOtherHeightsOrPhasesAreAMultisine() throws Exception {
        Waveform even = shape(0.5, turns -> series(turns, n -> 1, n -> 0));
        assertThat(MultisineAnalysis.analyse(even, List.of(), ExtractionPlan.withDefaults()))
                .hasSize(6);
        Waveform turned = shape(0.5, turns -> series(turns, n -> 1 / n, n -> n * n));
        assertThat(MultisineAnalysis.analyse(turned, List.of(), ExtractionPlan.withDefaults()))
                .hasSize(6);
    }

    @Test
    void theFrequenciesOfASquareWaveMayBeGiven() throws Exception {
        Waveform waveform = shape(0.5, turns -> series(turns, n -> 1 / n, n -> 0));
        List<Double> hz = List.of(0.5, 1.5, 2.5, 3.5, 4.5, 5.5);
        assertThat(MultisineAnalysis.analyse(waveform, hz, plan(FrequencySource.SIGNAL)))
                .hasSize(6);
    }

    @Test
    void givenFrequenciesThatAreNotTheRecordsAreToldFromThoseFound() {
        Waveform waveform = new Made(OCTAVES, 20, 100, 1, 1e-3, 0).build(1);
        for (FrequencySource source : FrequencySource.values()) {
            assertThatThrownBy(() -> MultisineAnalysis.analyse(waveform, List.of(1.3, 2.7), plan(source)))
                    .hasMessageStartingWith("layout multisine: the given frequencies (2) explain ")
                    .hasMessageContaining("the lines found in it: 0.5000 Hz, 1.000 Hz, 2.000 Hz, 4.000 Hz, 8.000 Hz.");
        }
    }

    @Test
    void aGivenFrequencyThatIsAbsentAmongOthersIsSaid() throws Exception {
        Waveform waveform = new Made(OCTAVES, 20, 100, 1, 1e-3, 0).build(1);
        List<Double> hz = List.of(0.5, 1.0, 2.0, 4.0, 6.0, 8.0);
        List<SignalFit> fits = MultisineAnalysis.analyse(waveform, hz, plan(FrequencySource.SIGNAL));
        for (SignalFit fit : fits) {
            assertThat(fit.notes().stream().anyMatch(note -> note.code().equals("MULTISINE_TONE_ABSENT")))
                    .isEqualTo(Math.abs(fit.frequencyHz() - 6) < 0.1);
        }
    }

    @Test
    void frequenciesTooNearToBeFoundAreNamed() throws Exception {
        // two cycles of the record apart, with a third and alone
        List<Double> three = List.of(1.0, 1.1, 3.3);
        Waveform waveform = new Made(three, 20, 100, 1, 1e-3, 0).build(1);
        assertThatThrownBy(() -> MultisineAnalysis.analyse(waveform, List.of(), ExtractionPlan.withDefaults()))
                .hasMessageStartingWith("layout multisine: within 0.3 Hz of 0.99")
                .hasMessageEndingWith("Give the frequencies, or record for longer");
        requireModuli(MultisineAnalysis.analyse(waveform, three, plan(FrequencySource.SIGNAL)), three, 1e-3);
        refused(new Made(List.of(1.0, 1.1), 20, 100, 1, 1e-3, 0).build(1), List.of(), "MULTISINE_NEAR_ANOTHER");
    }

    /** A chirp shows as a ridge of lines that no fit tells apart. */
    @Test
    void linesThatRunIntoOneAnotherAreNamed() {
        Waveform sweep = shape(1, turns -> Math.sin(2 * Math.PI * Math.expm1(0.1 * turns) / 0.1));
        assertThatThrownBy(() -> MultisineAnalysis.analyse(sweep, List.of(), ExtractionPlan.withDefaults()))
                .hasMessageNotContaining("drift")
                .hasMessageStartingWith("layout multisine: ");
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {11, 12})
    void theTruthLiesWithinItsIntervalAsOftenAsSaid(long seed) throws Exception {
        int draws = 100;
        int[] held = new int[2];
        int all = 0;
        for (int draw = 0; draw < draws; draw++) {
            Waveform waveform = new Made(OCTAVES, 12.3, 60, 1, 0.02, 0.01).build(1000 * seed + draw);
            List<SignalFit> fits = MultisineAnalysis.analyse(waveform, OCTAVES, plan(FrequencySource.SIGNAL));
            for (int k = 0; k < fits.size(); k++) {
                SignalFit fit = fits.get(k);
                Complex error = found(fit).minus(modulus(OCTAVES.get(k)));
                double[] u = uncertainties(fit);
                double t = new TDistribution(null, fit.degreesOfFreedom()).inverseCumulativeProbability(0.975);
                held[0] += Math.abs(error.re()) <= t * u[0] ? 1 : 0;
                held[1] += Math.abs(error.im()) <= t * u[1] ? 1 : 0;
                all++;
            }
        }
        // 500 tones: 95 % within three standard deviations of a binomial share, 1 %
        assertThat(held[0] / (double) all).isBetween(0.92, 0.98);
        assertThat(held[1] / (double) all).isBetween(0.92, 0.98);
    }

    /** u of G' and G'' by G = σ/γ. */
    static double[] uncertainties(SignalFit fit) {
        Complex strain = fit.deformation()[0];
        Complex modulus = found(fit);
        Complex[] gradient = {
            modulus.times(-1).over(strain),
            modulus.times(-1).times(Complex.I).over(strain),
            Complex.ONE.over(strain),
            Complex.I.over(strain),
        };
        double[] variance = new double[2];
        for (int i = 0; i < 4; i++) {
            for (int j = 0; j < 4; j++) {
                variance[0] += gradient[i].re() * fit.covariance()[i][j] * gradient[j].re();
                variance[1] += gradient[i].im() * fit.covariance()[i][j] * gradient[j].im();
            }
        }
        return new double[] {Math.sqrt(variance[0]), Math.sqrt(variance[1])};
    }
}

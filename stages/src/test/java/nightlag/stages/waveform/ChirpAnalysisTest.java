package nightlag.stages.waveform;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;
import static org.assertj.core.api.Assertions.within;

import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;
import java.util.function.DoubleUnaryOperator;
import java.util.stream.Stream;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.numeric.Complex;
import org.apache.commons.math3.distribution.TDistribution;
import org.junit.jupiter.api.Named;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;
import org.junit.jupiter.params.provider.ValueSource;

/** Responses out of chirps against the materials whose exact stress was integrated. */
class ChirpAnalysisTest {
    private static final double[] ONE_STRENGTH = {1e4};
    private static final double[] ONE_TIME = {0.1};
    private static final double[] STRENGTHS = {1e4, 3e3, 1e3};
    private static final double[] TIMES = {0.01, 0.3, 10};

    private static Chirp liquid(double seconds) {
        return Chirp.of(0.1, 10, seconds, STRENGTHS, TIMES);
    }

    private static double error(SignalFit fit, Chirp chirp) {
        Complex truth = chirp.modulus(fit.frequencyHz());
        return found(fit).minus(truth).abs() / truth.abs();
    }

    private static Complex found(SignalFit fit) {
        return fit.load()[0].over(fit.deformation()[0]);
    }

    /** The largest relative error among frequencies of which the record holds at least so many cycles. */
    private static double worst(Chirp chirp, double fromCycles) throws Exception {
        return ChirpAnalysis.analyse(chirp.build(), 10, Drift.LINEAR).stream()
                .filter(fit -> fit.cyclesUsed() >= fromCycles)
                .mapToDouble(fit -> error(fit, chirp))
                .max()
                .orElseThrow();
    }

    static Stream<Arguments> chirps() {
        return Stream.of(
                Arguments.of(Named.of("Maxwell", Chirp.of(0.1, 10, 60, ONE_STRENGTH, ONE_TIME))),
                Arguments.of(Named.of(
                        "standard linear solid",
                        Chirp.of(0.1, 10, 60, ONE_STRENGTH, ONE_TIME).equilibrium(5e3))),
                Arguments.of(Named.of("three modes, cut off at its end", liquid(60))),
                Arguments.of(Named.of(
                        "three modes at rest before and after", liquid(60).rest(1, 3))),
                Arguments.of(Named.of("short", liquid(20))),
                Arguments.of(Named.of(
                        "from fast to slow",
                        Chirp.of(10, 0.1, 60, STRENGTHS, TIMES).rest(1, 3))),
                Arguments.of(Named.of("drift of a tenth", liquid(60).rest(1, 3).drift(0.1))),
                Arguments.of(Named.of("jittered clock", liquid(60).rest(1, 3).jitter(0.01))),
                Arguments.of(
                        Named.of("tapered throughout", liquid(60).rest(1, 3).taper(1))),
                Arguments.of(Named.of("hardly tapered", liquid(60).rest(1, 3).taper(0.02))),
                Arguments.of(Named.of("three decades", Chirp.of(0.02, 20, 300, STRENGTHS, TIMES))));
    }

    /** Bounds as the documentation gives them. */
    @ParameterizedTest
    @MethodSource("chirps")
    void theResponseIsThatOfTheMaterial(Chirp chirp) throws Exception {
        assertThat(worst(chirp, 0)).isLessThan(1e-2);
        assertThat(worst(chirp, 12)).isLessThan(2e-3);
        assertThat(worst(chirp, 24)).isLessThan(5e-4);
        assertThat(ChirpAnalysis.analyse(chirp.build(), 10, Drift.LINEAR))
                .extracting(fit -> fit.screening().sweepStart())
                .containsOnly(Optional.empty());
    }

    static Stream<Arguments> chirpsInMotion() {
        return Stream.of(
                Arguments.of(Named.of("begins inside the sweep", liquid(60).startedLate(12))),
                Arguments.of(Named.of(
                        "begins at a turning point", liquid(60).rest(1, 3).startedLate(9.1))),
                Arguments.of(Named.of("no taper", liquid(60).taper(1e-6).rest(0, 3))),
                Arguments.of(Named.of(
                        "from fast to slow",
                        Chirp.of(10, 0.1, 60, STRENGTHS, TIMES).startedLate(12))));
    }

    /** The specimen remembers a deformation that the record does not show; the slowest points are in doubt by it, the rest is not. */
    @ParameterizedTest
    @MethodSource("chirpsInMotion")
    void aRecordThatBeginsInMotionPutsItsSlowestPointsInDoubt(Chirp chirp) throws Exception {
        List<SignalFit> fits = ChirpAnalysis.analyse(chirp.build(), 10, Drift.LINEAR);
        double slowest = fits.get(0).frequencyHz();
        assertThat(fits).hasSizeGreaterThan(8).allSatisfy(fit -> {
            assertThat(fit.screening().sweepStart().isPresent()).isEqualTo(fit.frequencyHz() < 2 * slowest);
            if (fit.screening().sweepStart().isPresent()) {
                assertThat(fit.screening().sweepStart().get().value()).isBetween(0.7, 1.15);
            } else {
                assertThat(error(fit, chirp)).isLessThan(5e-3);
            }
        });
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {21, 22, 23, 24, 25, 26, 27, 28})
    void noiseAndDriftAreNoMotion(long seed) throws Exception {
        Chirp chirp = liquid(60).rest(1, 3).noise(0.05).drift(0.2).seed(seed);
        assertThat(ChirpAnalysis.analyse(chirp.build(), 10, Drift.LINEAR))
                .extracting(fit -> fit.screening().sweepStart())
                .containsOnly(Optional.empty());
    }

    @Test
    void pointsAreEvenlySpacedAndCarryTheSweepsAmplitude() throws Exception {
        List<SignalFit> fits = ChirpAnalysis.analyse(liquid(60).rest(1, 3).build(), 5, Drift.LINEAR);
        assertThat(fits).hasSize(10);
        for (int k = 0; k < fits.size(); k++) {
            assertThat(fits.get(k).frequencyHz())
                    .isCloseTo(fits.get(0).frequencyHz() * Math.pow(10, k / 5.0), within(1e-9));
            assertThat(fits.get(k).cyclesUsed()).isCloseTo(64 * fits.get(k).frequencyHz(), within(1e-9));
        }
        assertThat(fits.get(4).deformation()[0].abs()).isCloseTo(0.01, within(1e-5));
        assertThat(fits.get(0).notes()).anyMatch(note -> note.code().equals("CHIRP_BAND"));
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3})
    void missingRowsAreNoHarm(long seed) throws Exception {
        Chirp chirp = liquid(60).rest(1, 3);
        Waveform whole = chirp.build();
        Random random = new Random(seed);
        boolean[] missing = new boolean[whole.size()];
        for (int i = 0; i < missing.length; i++) {
            missing[i] = random.nextDouble() < 0.02;
        }
        Samples rest = Samples.of(whole, 0, missing);
        double[] time = new double[rest.size()];
        double[] strain = new double[rest.size()];
        double[] stress = new double[rest.size()];
        for (int i = 0; i < time.length; i++) {
            int index = rest.indices()[i];
            time[i] = whole.timeS()[index];
            strain[i] = whole.deformation()[index];
            stress[i] = whole.load()[index];
        }
        Waveform waveform =
                new Waveform(time, strain, stress, new double[0], OptionalDouble.empty(), whole.size() - time.length);
        List<SignalFit> fits = ChirpAnalysis.analyse(waveform, 10, Drift.LINEAR);
        assertThat(fits).hasSizeGreaterThan(15);
        for (SignalFit fit : fits) {
            assertThat(error(fit, chirp)).isLessThan(fit.cyclesUsed() < 24 ? 1e-2 : 1e-3);
        }
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {11, 12})
    void theTruthLiesWithinItsIntervalAsOftenAsSaid(long seed) throws Exception {
        int held = 0;
        int all = 0;
        for (int draw = 0; draw < 12; draw++) {
            Chirp chirp = liquid(60).rest(1, 3).noise(0.01).seed(1000 * seed + draw);
            for (SignalFit fit : ChirpAnalysis.analyse(chirp.build(), 10, Drift.LINEAR)) {
                Complex off = found(fit).minus(chirp.modulus(fit.frequencyHz()));
                double[] u = MultisineAnalysisTest.uncertainties(fit);
                double t = new TDistribution(null, fit.degreesOfFreedom()).inverseCumulativeProbability(0.975);
                held += Math.abs(off.re()) <= t * u[0] ? 1 : 0;
                held += Math.abs(off.im()) <= t * u[1] ? 1 : 0;
                all += 2;
            }
        }
        assertThat(held / (double) all).isBetween(0.92, 0.98);
    }

    @Test
    void theSignalToNoiseRatioIsThatOfTheRecord() throws Exception {
        List<SignalFit> fits =
                ChirpAnalysis.analyse(liquid(60).rest(1, 3).noise(0.01).build(), 10, Drift.LINEAR);
        // 20 log10(1/(√2 · 0.01)) = 37 dB
        assertThat(fits.get(9).screening().deformationSnrDb()).isCloseTo(37, within(0.5));
        assertThat(fits.get(9).screening().loadSnrDb()).isBetween(32.0, 38.0);
    }

    private static Waveform wave(DoubleUnaryOperator strain, double noise) {
        Random random = new Random(4);
        int count = 6000;
        double[] time = new double[count];
        double[] deformation = new double[count];
        double[] load = new double[count];
        for (int i = 0; i < count; i++) {
            time[i] = i / 200.0;
            deformation[i] = strain.applyAsDouble(time[i]) + noise * random.nextGaussian();
            load[i] = 100 * deformation[i];
        }
        return new Waveform(time, deformation, load, new double[0], OptionalDouble.empty(), 0);
    }

    private static void refused(Waveform waveform, String code) {
        assertThatThrownBy(() -> ChirpAnalysis.analyse(waveform, 10, Drift.LINEAR))
                .isInstanceOfSatisfying(
                        ReductionFault.class,
                        fault -> assertThat(fault.reason().code()).isEqualTo(code));
    }

    @Test
    void whatIsNoExponentialSweepIsRefused() {
        refused(wave(t -> Math.sin(2 * Math.PI * t), 0.01), "CHIRP_ONE_FREQUENCY");
        // from 0.5 to 9.5 Hz, linear in time
        refused(wave(t -> Math.sin(2 * Math.PI * (0.5 * t + 0.15 * t * t)), 0.01), "CHIRP_NOT_EXPONENTIAL");
        refused(wave(t -> Math.sin(2 * Math.PI * t) + Math.sin(2 * Math.PI * 3.3 * t), 0.01), "CHIRP_NOT_EXPONENTIAL");
        refused(wave(t -> 0, 1), "CHIRP_NOT_EXPONENTIAL");
        refused(wave(t -> Math.sin(2 * Math.PI * 0.05 * t), 0.01), "CHIRP_TOO_FEW_WAVES");
    }

    @Test
    void theSweepsLawIsFound() throws Exception {
        Waveform waveform = liquid(60).noise(0.02).build();
        SweepLaw law = SweepLaw.of(Samples.of(waveform, 0, new boolean[waveform.size()]));
        assertThat(law.rate()).isCloseTo(Math.log(100) / 60, within(1e-3));
        assertThat(law.frequencyHz(0)).isCloseTo(1, within(0.01));
        assertThat(law.passes(1)).isCloseTo(0, within(0.1));
    }
}

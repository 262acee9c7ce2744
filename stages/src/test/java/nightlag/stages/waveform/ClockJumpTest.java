package nightlag.stages.waveform;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.OptionalDouble;
import java.util.stream.IntStream;
import nightlag.stages.numeric.Complex;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

/** Time stamps that jump while the oscillation goes on, and gaps of the same length in which rows are missing. */
class ClockJumpTest {
    private static final Complex STRAIN = Complex.polar(2e-3, 0.7);
    private static final Complex STRESS = Complex.polar(40, 1.2);
    private static final int PER_CYCLE = 50;

    private static Recording recording(double cycles) {
        return Recording.of(1, cycles, PER_CYCLE)
                .deformation(STRAIN)
                .load(STRESS, Complex.ZERO, STRESS.times(0.05))
                .drifts(new double[] {0.01, 0.001}, new double[] {100, -20})
                .tagged(1);
    }

    /** The stamps from a sample on are later by some seconds. */
    private static Waveform jumped(Waveform steady, int sample, double seconds) {
        double[] timeS = steady.timeS().clone();
        for (int i = sample; i < timeS.length; i++) {
            timeS[i] += seconds;
        }
        return new Waveform(timeS, steady.deformation(), steady.load(), new double[0], steady.nominalFrequencyHz(), 0);
    }

    /** Rows are missing. */
    private static Waveform gapped(Waveform steady, int sample, int rows) {
        int[] kept = IntStream.range(0, steady.size())
                .filter(i -> i < sample || i >= sample + rows)
                .toArray();
        return new Waveform(
                IntStream.of(kept).mapToDouble(i -> steady.timeS()[i]).toArray(),
                IntStream.of(kept).mapToDouble(i -> steady.deformation()[i]).toArray(),
                IntStream.of(kept).mapToDouble(i -> steady.load()[i]).toArray(),
                new double[0],
                steady.nominalFrequencyHz(),
                0);
    }

    private static double error(SignalFit fit) {
        Complex truth = STRESS.over(STRAIN);
        return fit.load()[0].over(fit.deformation()[0]).minus(truth).abs() / truth.abs();
    }

    @ParameterizedTest(name = "by {1} s after sample {0} of 500")
    @CsvSource({
        "300, 0.3",
        "300, 0.02",
        "300, 0.5",
        "300, 1.25",
        "300, 7.7",
        "180, 0.3",
        "180, 2.6",
        "440, 0.3",
        "60, 0.4"
    })
    void theLongestStretchGivesTheModulus(int sample, double seconds) throws Exception {
        SignalFit fit =
                HarmonicAnalysis.analyse(jumped(recording(10).build(), sample, seconds), ExtractionPlan.withDefaults());
        assertThat(error(fit)).isLessThan(1e-9);
        assertThat(fit.frequencyHz()).isCloseTo(1, within(1e-9));
        ClockJump jump = fit.screening().clockJump().orElseThrow();
        assertThat(jump.seconds()).isCloseTo(seconds, within(1e-6));
        assertThat(jump.atS()).isCloseTo((sample - 1) / 50.0, within(1e-9));
        int stretch = Math.max(sample, 500 - sample);
        assertThat(fit.samplesUsed()).isEqualTo(stretch);
        assertThat(fit.samplesLeftOut()).isEqualTo(500 - stretch);
        assertThat(fit.firstSample()).isEqualTo(sample < 250 ? sample : 0);
        assertThat(fit.screening().gapShare()).isZero();
    }

    @ParameterizedTest(name = "{1} rows after sample {0} of 500")
    @CsvSource({"300, 15", "300, 1", "300, 25", "300, 62", "180, 15", "180, 130", "440, 15", "60, 20", "20, 15"})
    void rowsThatAreMissingAreNoJump(int sample, int rows) throws Exception {
        SignalFit fit =
                HarmonicAnalysis.analyse(gapped(recording(10).build(), sample, rows), ExtractionPlan.withDefaults());
        assertThat(fit.screening().clockJump()).isEmpty();
        assertThat(fit.samplesUsed()).isEqualTo(500 - rows);
        assertThat(error(fit)).isLessThan(1e-9);
    }

    @Test
    void twoJumpsLeaveTheStretchBetweenThem() throws Exception {
        Waveform waveform = jumped(jumped(recording(10).build(), 100, 0.4), 420, 0.7);
        SignalFit fit = HarmonicAnalysis.analyse(waveform, ExtractionPlan.withDefaults());
        assertThat(error(fit)).isLessThan(1e-9);
        assertThat(fit.firstSample()).isEqualTo(100);
        assertThat(fit.samplesUsed()).isEqualTo(320);
        assertThat(fit.samplesLeftOut()).isEqualTo(180);
        assertThat(fit.screening().clockJump().orElseThrow().seconds()).isCloseTo(0.7, within(1e-6));
    }

    @Test
    void aGapBesideAJumpStaysInTheStretch() throws Exception {
        Waveform waveform = gapped(jumped(recording(10).build(), 400, 0.4), 150, 20);
        SignalFit fit = HarmonicAnalysis.analyse(waveform, ExtractionPlan.withDefaults());
        assertThat(error(fit)).isLessThan(1e-9);
        assertThat(fit.samplesUsed()).isEqualTo(380);
        assertThat(fit.screening().gapShare()).isCloseTo(20 / 400.0, within(2e-3));
    }

    @Test
    void startUpCyclesCountFromTheRecordsBegin() throws Exception {
        ExtractionPlan plan = new ExtractionPlan(3, 7, Drift.LINEAR, FrequencySource.SIGNAL);
        SignalFit late = HarmonicAnalysis.analyse(jumped(recording(10).build(), 100, 0.4), plan);
        assertThat(late.firstSample()).isEqualTo(150);
        assertThat(late.samplesUsed()).isEqualTo(350);
        SignalFit early = HarmonicAnalysis.analyse(jumped(recording(10).build(), 400, 0.4), plan);
        assertThat(early.firstSample()).isEqualTo(150);
        assertThat(early.samplesUsed() + early.samplesLeftOut()).isEqualTo(500);
    }

    /** A jump by whole cycles leaves no trace in either channel and does the modulus no harm. */
    @Test
    void aJumpByWholeCyclesIsAGap() throws Exception {
        SignalFit fit = HarmonicAnalysis.analyse(jumped(recording(10).build(), 300, 2), ExtractionPlan.withDefaults());
        assertThat(fit.screening().clockJump()).isEmpty();
        assertThat(fit.screening().gapShare()).isGreaterThan(0.1);
    }

    /** The load of a specimen that softened in the gap is behind, the deformation is not. */
    @Test
    void aSpecimenThatChangedInTheGapIsNoJump() throws Exception {
        Waveform before = recording(10).build();
        Waveform after =
                recording(10).load(STRESS.times(Complex.polar(0.8, 0.4))).build();
        double[] load = before.load().clone();
        System.arraycopy(after.load(), 300, load, 300, 200);
        Waveform waveform =
                new Waveform(before.timeS(), before.deformation(), load, new double[0], OptionalDouble.empty(), 0);
        SignalFit fit = HarmonicAnalysis.analyse(gapped(waveform, 290, 20), ExtractionPlan.withDefaults());
        assertThat(fit.screening().clockJump()).isEmpty();
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {0, 1, 2, 3, 4, 5, 6, 7, 8, 9})
    void noiseFeignsNoJumpAndHidesNone(long seed) throws Exception {
        for (double memory : new double[] {0, 0.7}) {
            Waveform noisy = recording(10)
                    .noise(0.02 * STRAIN.abs(), 0.02 * STRESS.abs())
                    .noiseMemory(memory)
                    .seed(seed)
                    .build();
            SignalFit rows = HarmonicAnalysis.analyse(gapped(noisy, 150, 15), ExtractionPlan.withDefaults());
            assertThat(rows.screening().clockJump()).as("memory %s", memory).isEmpty();
            SignalFit jump = HarmonicAnalysis.analyse(jumped(noisy, 150, 0.3), ExtractionPlan.withDefaults());
            assertThat(jump.screening().clockJump().orElseThrow().seconds()).isCloseTo(0.3, within(0.01));
            assertThat(error(jump)).isLessThan(0.02);
        }
        Waveform random = recording(8).missing(0.3).seed(seed).build();
        assertThat(HarmonicAnalysis.analyse(random, ExtractionPlan.withDefaults())
                        .screening()
                        .clockJump())
                .isEmpty();
    }
}

package nightlag.stages.waveform;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;
import static org.assertj.core.api.Assertions.within;

import java.util.Arrays;
import java.util.OptionalDouble;
import java.util.Random;
import java.util.function.DoublePredicate;
import java.util.stream.IntStream;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.numeric.Complex;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

/** Records with long gaps, with too few samples a cycle, with none at all, and in impossible units. */
class DamagedRecordsTest {
    private static final double EXACT = 1e-9;
    private static final Complex STRAIN = Complex.polar(2e-3, 0.7);
    private static final Complex STRESS = Complex.polar(40, 1.2);

    /** Where rows are missing. */
    private enum Missing {
        MIDDLE,
        NEAR_THE_START,
        ANYWHERE,
        TWICE,
        A_THIRD_OF_THE_ROWS,
        A_THIRD_AND_A_GAP
    }

    private static Waveform without(Waveform whole, DoublePredicate missingAtS) {
        int[] kept = IntStream.range(0, whole.size())
                .filter(i -> !missingAtS.test(whole.timeS()[i]))
                .toArray();
        return new Waveform(
                picked(whole.timeS(), kept),
                picked(whole.deformation(), kept),
                picked(whole.load(), kept),
                new double[0],
                whole.nominalFrequencyHz(),
                0);
    }

    private static double[] picked(double[] values, int[] kept) {
        return Arrays.stream(kept).mapToDouble(i -> values[i]).toArray();
    }

    private static DoublePredicate gap(double fromS, double lengthS) {
        return t -> t >= fromS && t < fromS + lengthS;
    }

    private static DoublePredicate missing(Missing kind, Random random, double durationS, double gapS) {
        double place = random.nextDouble();
        DoublePredicate row = t -> random.nextDouble() < 0.3;
        return switch (kind) {
            case MIDDLE -> gap((durationS - gapS) / 2, gapS);
            case NEAR_THE_START -> gap(0.05 * durationS, gapS);
            case ANYWHERE -> gap(place * (durationS - gapS), gapS);
            case TWICE -> gap(0.3 * durationS - gapS / 4, gapS / 2).or(gap(0.7 * durationS - gapS / 4, gapS / 2));
            case A_THIRD_OF_THE_ROWS -> row;
            case A_THIRD_AND_A_GAP -> gap(place * (durationS - gapS), gapS).or(row);
        };
    }

    @ParameterizedTest(name = "{0} cycles, {1} of them missing in the middle")
    @CsvSource({"20, 1", "20, 1.5", "6, 0.6", "6, 1", "6, 1.5", "20, 0.1", "50, 3"})
    void aGapInTheMiddleDoesNotMisleadTheSearch(double cycles, double missing) throws Exception {
        Waveform whole = Recording.of(1, cycles, 50)
                .deformation(Complex.polar(1, 0))
                .load(Complex.polar(30, 0.4))
                .tagged(1)
                .build();
        Waveform gapped = without(whole, gap((cycles - missing) / 2, missing));
        SignalFit fit = HarmonicAnalysis.analyse(gapped, ExtractionPlan.withDefaults());
        Complex modulus = fit.load()[0].over(fit.deformation()[0]);
        assertThat(modulus.re()).isCloseTo(30 * Math.cos(0.4), within(30 * EXACT));
        assertThat(modulus.im()).isCloseTo(30 * Math.sin(0.4), within(30 * EXACT));
        assertThat(fit.screening().gapShare()).isCloseTo(missing / cycles, within(0.03));
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {0, 1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12, 13, 14, 15})
    void gapsAnywhereCostNoDigits(long seed) throws Exception {
        for (Missing kind : Missing.values()) {
            Random random = new Random(31 * seed + kind.name().hashCode());
            double frequency = 0.37 * Math.pow(10, random.nextInt(3));
            double cycles = 3 * Math.pow(50 / 3.0, random.nextDouble());
            double gapCycles = Math.min(cycles - 2, 0.1 * Math.pow(30, random.nextDouble()));
            Drift drift = seed % 3 == 0 ? Drift.NONE : seed % 3 == 1 ? Drift.LINEAR : Drift.QUADRATIC;
            double[] strainDrift = new double[drift.degree() + 1];
            double[] stressDrift = new double[drift.degree() + 1];
            for (int p = 0; p <= drift.degree(); p++) {
                strainDrift[p] = STRAIN.abs() * random.nextGaussian();
                stressDrift[p] = STRESS.abs() * random.nextGaussian();
            }
            Recording recording = Recording.of(frequency, cycles, 16 + random.nextInt(60))
                    .deformation(STRAIN, Complex.ZERO, STRAIN.times(0.01))
                    .load(STRESS, STRESS.times(0.01), STRESS.times(Complex.polar(0.1, 2)))
                    .drifts(strainDrift, stressDrift);
            if (seed % 2 == 0) {
                recording.tagged(frequency * (1 + 0.02 * (2 * random.nextDouble() - 1)));
            }
            Waveform gapped =
                    without(recording.build(), missing(kind, random, recording.durationS(), gapCycles / frequency));
            SignalFit fit = HarmonicAnalysis.analyse(gapped, new ExtractionPlan(0, 7, drift, FrequencySource.SIGNAL));
            Complex truth = STRESS.over(STRAIN);
            Complex error = fit.load()[0].over(fit.deformation()[0]).minus(truth);
            assertThat(error.abs() / truth.abs())
                    .as("%s, %s of %s cycles, drift %s", kind, gapCycles, cycles, drift)
                    .isLessThan(EXACT);
            assertThat(fit.frequencyHz()).isCloseTo(frequency, within(EXACT * frequency));
        }
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {0, 1, 2, 3, 4, 5, 6, 7})
    void noiseDoesNotLeadIntoASideMinimum(long seed) throws Exception {
        Waveform whole = Recording.of(1, 8, 50)
                .deformation(STRAIN)
                .load(STRESS)
                .noise(0.01 * STRAIN.abs(), 0.01 * STRESS.abs())
                .seed(seed)
                .build();
        SignalFit fit = HarmonicAnalysis.analyse(without(whole, gap(2.3, 2.5)), ExtractionPlan.withDefaults());
        // the nearest side minimum is hundreds of uncertainties away
        assertThat(fit.frequencyHz()).isCloseTo(1, within(5 * fit.frequencyUHz()));
        assertThat(fit.frequencyUHz()).isLessThan(1e-3);
    }

    @Test
    void aCleanRecordIsNotSearchedForGaps() {
        Waveform clean = Recording.of(1, 8, 50).jitter(0.1).build();
        assertThat(GappedSearch.wanted(Samples.of(clean, 0, new boolean[clean.size()])))
                .isFalse();
        Waveform gapped = without(clean, gap(3, 0.1));
        assertThat(GappedSearch.wanted(Samples.of(gapped, 0, new boolean[gapped.size()])))
                .isTrue();
    }

    private static void assertFault(Waveform waveform, ExtractionPlan plan, WaveformReason reason, String... words) {
        assertThatThrownBy(() -> HarmonicAnalysis.analyse(waveform, plan))
                .isInstanceOfSatisfying(ReductionFault.class, fault -> {
                    assertThat(fault.reason().code()).isEqualTo(reason.name());
                    assertThat(fault.reason().sentence()).contains(words);
                });
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {0, 1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11})
    void twoSamplesACycleTellNothing(long seed) {
        Waveform waveform = Recording.of(1, 200, 2)
                .deformation(STRAIN)
                .load(STRESS)
                .noise(1e-3 * STRAIN.abs(), 1e-3 * STRESS.abs())
                .tagged(1)
                .seed(seed)
                .build();
        for (FrequencySource source : FrequencySource.values()) {
            assertFault(
                    waveform,
                    new ExtractionPlan(0, 7, Drift.LINEAR, source),
                    WaveformReason.WAVEFORM_TOO_FEW_A_CYCLE,
                    "samples a cycle");
        }
    }

    @Test
    void aLittleMoreThanTwoSamplesACycleAreEnough() throws Exception {
        Waveform waveform = Recording.of(1, 400 / 2.05, 2.05)
                .deformation(STRAIN)
                .load(STRESS)
                .noise(1e-3 * STRAIN.abs(), 1e-3 * STRESS.abs())
                .build();
        SignalFit fit = HarmonicAnalysis.analyse(waveform, ExtractionPlan.withDefaults());
        assertThat(fit.harmonics()).isEqualTo(1);
        Complex truth = STRESS.over(STRAIN);
        // 0.1 % of noise on 400 samples of either channel: 1e-4 of the modulus is one standard deviation
        assertThat(fit.load()[0].over(fit.deformation()[0]).minus(truth).abs() / truth.abs())
                .isLessThan(4e-4);
    }

    @Test
    void aRecordWithoutSamplesSaysSo() {
        double[] none = new double[0];
        assertFault(
                new Waveform(none, none, none, none, OptionalDouble.of(1), 0),
                ExtractionPlan.withDefaults(),
                WaveformReason.WAVEFORM_NO_SAMPLES,
                "no samples");
        for (int count = 1; count < 6; count++) {
            Waveform few = Recording.of(1, 1, count).build();
            assertThatThrownBy(() -> HarmonicAnalysis.analyse(few, ExtractionPlan.withDefaults()))
                    .isInstanceOf(ReductionFault.class);
        }
        assertThat(Damage.markTowering(none, new boolean[0])).isZero();
    }

    @ParameterizedTest(name = "amplitude {0}")
    @ValueSource(doubles = {1e300, 1e-300, 1e70, 1e-70, Double.MAX_VALUE})
    void impossibleUnitsAreNamed(double amplitude) {
        double[] load = Arrays.stream(Recording.of(1, 6, 50).build().load())
                .map(v -> v / 500 * amplitude)
                .toArray();
        Waveform usual = Recording.of(1, 6, 50).build();
        Waveform waveform =
                new Waveform(usual.timeS(), usual.deformation(), load, new double[0], OptionalDouble.empty(), 0);
        for (double startUp : new double[] {0, 1}) {
            assertFault(
                    waveform,
                    new ExtractionPlan(startUp, 7, Drift.LINEAR, FrequencySource.SIGNAL),
                    WaveformReason.WAVEFORM_OUT_OF_BOUNDS,
                    "load");
        }
    }

    @ParameterizedTest(name = "amplitude {0}")
    @ValueSource(doubles = {1e50, 1e-50})
    void farFromUsualUnitsNothingIsLost(double amplitude) throws Exception {
        Complex stress = Complex.polar(amplitude, 1.2);
        Waveform waveform =
                Recording.of(1, 6, 50).deformation(STRAIN).load(stress).build();
        SignalFit fit = HarmonicAnalysis.analyse(waveform, ExtractionPlan.withDefaults());
        Complex truth = stress.over(STRAIN);
        assertThat(fit.load()[0].over(fit.deformation()[0]).minus(truth).abs() / truth.abs())
                .isLessThan(EXACT);
    }
}

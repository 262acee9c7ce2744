package nightlag.stages.moduli;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.Arrays;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.IntPredicate;
import java.util.stream.IntStream;
import java.util.stream.Stream;
import nightlag.stages.geometry.Corrections;
import nightlag.stages.geometry.DeformationSignal;
import nightlag.stages.geometry.Dimension;
import nightlag.stages.geometry.GeometryKind;
import nightlag.stages.geometry.GeometrySpec;
import nightlag.stages.geometry.LoadSignal;
import nightlag.stages.geometry.MeasuringWall;
import nightlag.stages.geometry.SignalCorrection;
import nightlag.stages.moduli.ModulusPoints.Origin;
import nightlag.stages.moduli.ModulusPoints.Ranges;
import nightlag.stages.numeric.Complex;
import nightlag.stages.waveform.ExtractionPlan;
import nightlag.stages.waveform.HarmonicAnalysis;
import nightlag.stages.waveform.Recording;
import nightlag.stages.waveform.Waveform;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;

/** Each flag has a record that raises it and nothing else, and a near miss that raises nothing. */
class ScreeningTest {
    private static final Complex STRAIN = Complex.polar(0.01, 0.3);
    private static final Complex STRESS = Complex.polar(500, 0.9);

    /** A record with what belongs to it. */
    record Setting(Waveform waveform, Corrections corrections, Optional<SignalRange> loadRange) {
        static Setting plain(Waveform waveform) {
            return new Setting(waveform, Corrections.none(), Optional.empty());
        }
    }

    private static ModulusPoint point(Setting setting) throws Exception {
        boolean turning = !setting.corrections().equals(Corrections.none());
        GeometrySpec plates = new GeometrySpec(
                GeometryKind.PARALLEL_PLATE,
                Map.of(Dimension.DIAMETER, 0.025, Dimension.GAP, 1e-3),
                1,
                1,
                OptionalDouble.empty(),
                Optional.empty());
        SignalCorrection correction = SignalCorrection.of(
                turning ? plates : GeometrySpec.none(),
                setting.corrections(),
                DeformationSignal.STRAIN,
                LoadSignal.STRESS);
        return ModulusPoints.of(
                new Origin(
                        new PointKey("Heron 3", "L1", "1", "1", "p", "bench/p.csv"),
                        Optional.empty(),
                        OptionalDouble.empty(),
                        OptionalDouble.empty()),
                setting.waveform(),
                HarmonicAnalysis.analyse(setting.waveform(), ExtractionPlan.withDefaults()),
                correction,
                new Ranges(Optional.empty(), setting.loadRange()),
                ScreeningPlan.withDefaults());
    }

    private static Recording recording(double cycles, double perCycle) {
        return Recording.of(1, cycles, perCycle).deformation(STRAIN).load(STRESS);
    }

    private static Setting cycles(double cycles) {
        return Setting.plain(recording(cycles, 50).build());
    }

    private static Setting clipped(double limit) {
        Waveform clean = recording(5, 400).build();
        double top = limit * STRESS.abs();
        return Setting.plain(withLoad(
                clean, Arrays.stream(clean.load()).map(v -> Math.min(v, top)).toArray()));
    }

    private static Waveform withLoad(Waveform waveform, double[] load) {
        return new Waveform(
                waveform.timeS(),
                waveform.deformation(),
                load,
                waveform.temperatureK(),
                waveform.nominalFrequencyHz(),
                0);
    }

    private static Setting withGap(int rows) {
        Waveform whole = recording(10, 100).build();
        IntPredicate kept = i -> i < 430 || i >= 430 + rows;
        return Setting.plain(new Waveform(
                kept(whole.timeS(), kept),
                kept(whole.deformation(), kept),
                kept(whole.load(), kept),
                new double[0],
                OptionalDouble.empty(),
                0));
    }

    private static double[] kept(double[] values, IntPredicate kept) {
        return IntStream.range(0, values.length)
                .filter(kept)
                .mapToDouble(i -> values[i])
                .toArray();
    }

    private static Setting snr(double decibel) {
        double part = Math.pow(10, -decibel / 20) / Math.sqrt(2);
        return Setting.plain(recording(8, 100)
                .noise(0.1 * part * STRAIN.abs(), part * STRESS.abs())
                .build());
    }

    private static Setting drift(double amplitudes) {
        return Setting.plain(recording(6, 64)
                .drifts(new double[] {0}, new double[] {0, amplitudes * STRESS.abs()})
                .build());
    }

    /** A parabola under a record taken for straight: from the middle to either end it rises by this many amplitudes. */
    private static Setting curvedDrift(double amplitudes) {
        double rise = 4 * amplitudes * STRESS.abs();
        return Setting.plain(recording(6, 64)
                .drifts(new double[] {0}, new double[] {0, -rise, rise})
                .build());
    }

    /** Stick and slip in turns: every other cycle is stiffer by this part on either side of the mean. */
    private static Setting everyOtherCycle(double change) {
        Waveform steady = recording(20, 64)
                .noise(1e-3 * STRAIN.abs(), 1e-3 * STRESS.abs())
                .build();
        double[] load = steady.load().clone();
        for (int i = 0; i < load.length; i++) {
            load[i] *= 1 + (i / 64 % 2 == 0 ? change : -change);
        }
        return Setting.plain(withLoad(steady, load));
    }

    /** A load that is short by this part at first and settles over half a cycle. */
    private static Setting startUp(double shortBy) {
        Waveform steady = recording(8, 64).noise(1e-7, 5e-3).build();
        double[] load = steady.load().clone();
        for (int i = 0; i < load.length; i++) {
            load[i] *= 1 - shortBy * Math.exp(-i / 32.0);
        }
        return Setting.plain(withLoad(steady, load));
    }

    /** The stamps jump by 0.3 cycles; the waves go on. */
    private static Setting clockJump() {
        Waveform steady = recording(10, 64).build();
        double[] timeS = steady.timeS().clone();
        for (int i = 400; i < timeS.length; i++) {
            timeS[i] += 0.3;
        }
        return Setting.plain(
                new Waveform(timeS, steady.deformation(), steady.load(), new double[0], OptionalDouble.empty(), 0));
    }

    private static Setting trend(double change) {
        Waveform steady = recording(8, 64).noise(1e-7, 5e-3).build();
        double[] load = steady.load().clone();
        for (int i = 0; i < load.length; i++) {
            load[i] *= 1 + change * i / load.length;
        }
        return Setting.plain(withLoad(steady, load));
    }

    private static Setting order(int order, double intensity) {
        Complex[] load = new Complex[order];
        Arrays.fill(load, Complex.ZERO);
        load[0] = STRESS;
        load[order - 1] = Complex.polar(intensity * STRESS.abs(), 2);
        return Setting.plain(recording(6, 64).load(load).build());
    }

    private static Setting inertia(double ratio) {
        // M = σ πR³/2 of the specimen, θ = γ h/R; what inertia takes is Iω²θ, seen as load less by that much
        double torque = STRESS.abs() * Math.PI * Math.pow(0.0125, 3) / 2;
        double angle = STRAIN.abs() * 1e-3 / 0.0125;
        double inertia = ratio * torque / (4 * Math.PI * Math.PI * angle);
        Complex seen = STRESS.minus(STRAIN.times(ratio * STRESS.abs() / STRAIN.abs()));
        return new Setting(
                recording(6, 64).load(seen).build(),
                new Corrections(0, 0, inertia, 0, 0, 0, 0, 0, MeasuringWall.FIXED),
                Optional.empty());
    }

    private static Setting compliance(double share) {
        double torque = STRESS.abs() * Math.PI * Math.pow(0.0125, 3) / 2;
        double angle = STRAIN.abs() * 1e-3 / 0.0125;
        return new Setting(
                recording(6, 64).build(),
                new Corrections(0, 0, 0, 0, 0, 0, share * angle / torque, 0, MeasuringWall.FIXED),
                Optional.empty());
    }

    private static Setting range(double low, double high) {
        return new Setting(recording(6, 64).build(), Corrections.none(), Optional.of(new SignalRange(low, high)));
    }

    private static Setting temperature(double perCycleK) {
        return Setting.plain(
                recording(6, 64).temperature(t -> 400 + perCycleK * t).build());
    }

    private static Setting tag(double hz) {
        return Setting.plain(recording(6, 64).tagged(hz).build());
    }

    static Stream<Arguments> flags() {
        return Stream.of(
                Arguments.of(Flag.FEW_CYCLES, cycles(2.9), cycles(3)),
                Arguments.of(Flag.CLIPPED, clipped(0.998), clipped(1.001)),
                Arguments.of(Flag.GAPS, withGap(22), withGap(18)),
                Arguments.of(
                        Flag.UNEVEN_CLOCK,
                        Setting.plain(recording(6, 64).jitter(0.042).build()),
                        Setting.plain(recording(6, 64).jitter(0.03).build())),
                Arguments.of(Flag.UNEVEN_CLOCK, clockJump(), withGap(1)),
                Arguments.of(Flag.WEAK_SIGNAL, snr(38), snr(42)),
                Arguments.of(Flag.WEAK_SIGNAL, order(9, 0.011), order(9, 0.009)),
                Arguments.of(Flag.DRIFTING, drift(0.105), drift(0.095)),
                Arguments.of(Flag.DRIFTING, curvedDrift(0.105), curvedDrift(0.095)),
                Arguments.of(Flag.UNSETTLED, trend(0.022), trend(0.018)),
                Arguments.of(Flag.UNSETTLED, trend(-0.06), trend(-0.019)),
                Arguments.of(Flag.UNSETTLED, startUp(0.15), startUp(0.03)),
                Arguments.of(Flag.UNSETTLED, everyOtherCycle(1e-3), everyOtherCycle(5e-4)),
                Arguments.of(Flag.NONLINEAR, order(3, 0.0105), order(3, 0.0095)),
                Arguments.of(Flag.EVEN_HARMONICS, order(4, 0.0105), order(4, 0.0095)),
                Arguments.of(Flag.INERTIA_HEAVY, inertia(1.05), inertia(0.95)),
                Arguments.of(Flag.COMPLIANCE_HEAVY, compliance(0.52), compliance(0.48)),
                Arguments.of(Flag.OUT_OF_RANGE, range(501, 1000), range(499, 1000)),
                Arguments.of(Flag.OUT_OF_RANGE, range(1, 499), range(1, 501)),
                Arguments.of(Flag.TEMPERATURE_WANDER, temperature(0.105), temperature(0.095)),
                Arguments.of(Flag.FREQUENCY_MISMATCH, tag(1.0011), tag(1.0009)));
    }

    @ParameterizedTest(name = "{0}")
    @MethodSource("flags")
    void aFlagIsRaisedAloneAndANearMissRaisesNone(Flag flag, Setting raising, Setting nearMiss) throws Exception {
        ModulusPoint raised = point(raising);
        assertThat(raised.flags()).containsExactly(flag);
        assertThat(raised.quality()).isEqualTo(Quality.DOUBTFUL);
        assertThat(raised.reasons()).anySatisfy(reason -> {
            assertThat(reason.code()).startsWith("SCREENING_");
            assertThat(reason.sentence()).startsWith(flag.word() + ": ").endsWith("(doubtful)");
        });
        assertThat(raised.loop()).isNotEmpty().hasSizeLessThanOrEqualTo(256);
        ModulusPoint missed = point(nearMiss);
        assertThat(missed.flags()).isEmpty();
        assertThat(missed.quality()).isEqualTo(Quality.SOUND);
        assertThat(missed.loop()).isEmpty();
    }

    static Stream<Arguments> unusable() {
        return Stream.of(
                Arguments.of(Flag.FEW_CYCLES, cycles(0.9)),
                Arguments.of(Flag.CLIPPED, clipped(0.9)),
                Arguments.of(Flag.GAPS, withGap(320)),
                Arguments.of(Flag.WEAK_SIGNAL, snr(13)),
                Arguments.of(Flag.DRIFTING, drift(1.1)),
                Arguments.of(Flag.UNSETTLED, trend(0.25)),
                Arguments.of(Flag.NONLINEAR, order(3, 0.21)),
                Arguments.of(Flag.EVEN_HARMONICS, order(4, 0.21)),
                Arguments.of(Flag.INERTIA_HEAVY, inertia(11)),
                Arguments.of(Flag.COMPLIANCE_HEAVY, compliance(0.95)),
                Arguments.of(Flag.TEMPERATURE_WANDER, temperature(0.7)),
                Arguments.of(Flag.FREQUENCY_MISMATCH, tag(1.06)));
    }

    @ParameterizedTest(name = "{0}")
    @MethodSource("unusable")
    void beyondTheSecondLimitAPointIsUnusable(Flag flag, Setting setting) throws Exception {
        ModulusPoint point = point(setting);
        assertThat(point.flags()).contains(flag);
        assertThat(point.quality()).isEqualTo(Quality.UNUSABLE);
        assertThat(point.moduli()).isPresent();
    }

    @Test
    void anUnevenClockAndAnAmplitudeOutOfRangeAreNeverUnusable() throws Exception {
        assertThat(point(Setting.plain(recording(6, 64).jitter(0.15).build())).quality())
                .isEqualTo(Quality.DOUBTFUL);
        assertThat(point(range(1e6, 1e7)).quality()).isEqualTo(Quality.DOUBTFUL);
    }

    @Test
    void aThirdHarmonicThatNoiseCouldFeignIsNoFlag() throws Exception {
        for (long seed = 0; seed < 40; seed++) {
            // 20 dB over 3 cycles of 16 samples: harmonics of one per cent and more come from noise alone
            Waveform waveform = recording(3, 16).noise(7e-4, 35).seed(seed).build();
            List<Flag> flags = point(Setting.plain(waveform)).flags();
            assertThat(flags).as("seed %d", seed).contains(Flag.WEAK_SIGNAL);
            if (seed < 10) {
                assertThat(flags).as("seed %d", seed).doesNotContain(Flag.NONLINEAR);
            }
        }
    }

    @Test
    void flagsStandInTheirOrder() throws Exception {
        Waveform waveform = recording(2.5, 64)
                .load(STRESS, Complex.ZERO, STRESS.times(0.05))
                .drifts(new double[] {0}, new double[] {0, 250})
                .tagged(1.01)
                .build();
        assertThat(point(Setting.plain(waveform)).flags())
                .containsExactly(Flag.FEW_CYCLES, Flag.DRIFTING, Flag.NONLINEAR, Flag.FREQUENCY_MISMATCH);
    }

    @Test
    void spikesMakeAPointDoubtful() throws Exception {
        Waveform clean = recording(5, 200).noise(1e-5, 0.5).build();
        double[] load = clean.load().clone();
        load[400] += 5000;
        ModulusPoint point = point(Setting.plain(withLoad(clean, load)));
        assertThat(point.flags()).containsExactly(Flag.CLIPPED);
        assertThat(point.reasons()).anyMatch(reason -> reason.code().equals("WAVEFORM_SPIKES_LEFT_OUT"));
    }

    @Test
    void cyclesThatDisagreeWithTheNoiseAreNamedWithBothFigures() throws Exception {
        assertThat(point(everyOtherCycle(1e-3)).reasons()).anySatisfy(reason -> {
            assertThat(reason.code()).isEqualTo("SCREENING_CYCLES_DISAGREE");
            assertThat(reason.sentence()).contains("from the cycles").contains("from the noise");
        });
    }

    @Test
    void aTrueGapOfTheSameLengthIsOnlyAGap() throws Exception {
        assertThat(point(withGap(30)).flags()).containsExactly(Flag.GAPS);
        assertThat(point(clockJump()).reasons()).anySatisfy(reason -> {
            assertThat(reason.code()).isEqualTo("SCREENING_CLOCK_JUMPED");
            assertThat(reason.sentence()).contains("the clock jumped by 0.3").contains("240 samples are left out");
        });
    }

    @Test
    void aWeakSignalThatIsTheWavesShapeIsToldFromNoise() throws Exception {
        assertThat(point(order(9, 0.05)).reasons()).anySatisfy(reason -> {
            assertThat(reason.code()).isEqualTo("SCREENING_OVERTONES_LEFT");
            assertThat(reason.sentence())
                    .startsWith("weak-signal: 25.7")
                    .contains("40 dB wanted; 100 % of what is left lies at orders above the 7 fitted");
        });
        assertThat(point(snr(26)).reasons()).noneMatch(reason -> reason.code().equals("SCREENING_OVERTONES_LEFT"));
        assertThat(point(snr(26)).reasons()).anyMatch(reason -> reason.code().equals("SCREENING_WEAK_SIGNAL"));
    }
}

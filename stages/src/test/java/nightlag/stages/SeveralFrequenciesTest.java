package nightlag.stages;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;
import nightlag.stages.geometry.Corrections;
import nightlag.stages.geometry.DeformationSignal;
import nightlag.stages.geometry.Dimension;
import nightlag.stages.geometry.GeometryKind;
import nightlag.stages.geometry.GeometrySpec;
import nightlag.stages.geometry.LoadSignal;
import nightlag.stages.geometry.MeasuringWall;
import nightlag.stages.moduli.Flag;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.PointKey;
import nightlag.stages.moduli.Quality;
import nightlag.stages.moduli.ScreeningPlan;
import nightlag.stages.numeric.Complex;
import nightlag.stages.waveform.Chirp;
import nightlag.stages.waveform.Drift;
import nightlag.stages.waveform.ExtractionPlan;
import nightlag.stages.waveform.FrequencySource;
import nightlag.stages.waveform.Waveform;
import org.junit.jupiter.api.Test;

/** One record, many points: each frequency is corrected and screened by itself. */
class SeveralFrequenciesTest {
    private static final List<Double> HZ = List.of(1.0, 2.5, 6.0, 15.0);
    private static final double RADIUS = 4e-3;
    private static final double GAP = 1e-3;
    private static final double INERTIA = 1.2e-5;
    private static final double FRICTION = 2e-6;
    private static final double COMPLIANCE = 3e-3;
    private static final double DELAY = 85e-6;

    private static RecordTags tags(OptionalDouble elapsed) {
        PointKey key = new PointKey("Heron 3", "L1", "1", "1", "p", "bench/p.csv");
        return new RecordTags(key, Optional.empty(), OptionalDouble.of(453.15), elapsed, Map.of());
    }

    private static Complex modulus(double hz) {
        Complex x = new Complex(0, 2 * Math.PI * hz * 0.05);
        return x.over(Complex.ONE.plus(x)).times(3e4).plus(new Complex(2e3, 0));
    }

    /** Torque and angle with frame, inertia, friction and delay of each frequency in them. */
    private static Waveform torqueAndAngle(double amplitude, double noise) {
        int count = 4000;
        Random random = new Random(3);
        double[] time = new double[count];
        double[] angle = new double[count];
        double[] torque = new double[count];
        for (int i = 0; i < count; i++) {
            time[i] = i / 1000.0;
            angle[i] = noise * random.nextGaussian();
        }
        for (double hz : HZ) {
            double omega = 2 * Math.PI * hz;
            Complex strain = Complex.polar(amplitude / hz, hz);
            Complex own = modulus(hz).times(strain).times(Math.PI * Math.pow(RADIUS, 3) / 2);
            Complex turned = strain.times(GAP / RADIUS).plus(own.times(COMPLIANCE));
            Complex drag = new Complex(INERTIA * omega * omega, -FRICTION * omega);
            Complex measured = own.minus(drag.times(turned)).times(Complex.polar(1, -omega * DELAY));
            for (int i = 0; i < count; i++) {
                Complex turn = Complex.polar(1, omega * time[i]);
                angle[i] += turned.times(turn).re();
                torque[i] += measured.times(turn).re();
            }
        }
        return new Waveform(time, angle, torque, new double[0], OptionalDouble.empty(), 0);
    }

    private static ReductionPlan plan() {
        GeometrySpec plates = new GeometrySpec(
                GeometryKind.PARALLEL_PLATE,
                Map.of(Dimension.DIAMETER, 2 * RADIUS, Dimension.GAP, GAP),
                1,
                1,
                OptionalDouble.empty(),
                Optional.empty());
        return new ReductionPlan(
                new Corrections(0, DELAY, INERTIA, FRICTION, 0, 0, COMPLIANCE, 0, MeasuringWall.FIXED),
                Map.of(),
                Map.of(),
                Optional.of(plates),
                new ExtractionPlan(0, 7, Drift.LINEAR, FrequencySource.TAG),
                ScreeningPlan.withDefaults());
    }

    private static List<ModulusPoint> points(Waveform waveform, RecordKind kind) {
        return Reduce.reduce(
                        new WaveformRecord(
                                tags(OptionalDouble.empty()),
                                DeformationSignal.ANGLE,
                                LoadSignal.TORQUE,
                                waveform,
                                kind),
                        plan())
                .points();
    }

    @Test
    void correctionsActAtEachFrequency() {
        List<ModulusPoint> points = points(torqueAndAngle(0.01, 0), new RecordKind.Multisine(HZ));
        assertThat(points).extracting(point -> point.key().point()).containsExactly("p-01", "p-02", "p-03", "p-04");
        for (int k = 0; k < HZ.size(); k++) {
            ModulusPoint point = points.get(k);
            Complex truth = modulus(HZ.get(k));
            assertThat(point.moduli().orElseThrow().complex().minus(truth).abs() / truth.abs())
                    .isLessThan(1e-9);
            assertThat(point.frequencyHz()).hasValue(HZ.get(k));
            assertThat(point.strainAmplitude().orElseThrow()).isCloseTo(0.01 / HZ.get(k), within(1e-11));
            assertThat(point.cyclesUsed().orElseThrow()).isCloseTo(4 * HZ.get(k), within(1e-9));
            assertThat(point.harmonics()).isEmpty();
            assertThat(point.loop()).isEmpty();
            // untagged, the record's middle
            assertThat(point.elapsedS().orElseThrow()).isCloseTo(1.9995, within(1e-9));
        }
    }

    @Test
    void flagsAreThoseOfEachFrequency() {
        // four cycles of 1 Hz and sixty of 15 Hz; noise of 1 % of the slowest tone's angle drowns the fastest
        List<ModulusPoint> points = points(torqueAndAngle(0.01, 2.5e-5), new RecordKind.Multisine(HZ));
        assertThat(points.get(0).flags()).doesNotContain(Flag.FEW_CYCLES);
        assertThat(points.get(3).flags()).contains(Flag.WEAK_SIGNAL);
        assertThat(points.get(3).strainSnrDb().orElseThrow())
                .isLessThan(points.get(0).strainSnrDb().orElseThrow());
        assertThat(points.get(0).flags()).doesNotContain(Flag.INERTIA_HEAVY);
    }

    @Test
    void aTaggedTimeIsKept() {
        ModulusPoint point = Reduce.reduce(
                        new WaveformRecord(
                                tags(OptionalDouble.of(600)),
                                DeformationSignal.ANGLE,
                                LoadSignal.TORQUE,
                                torqueAndAngle(0.01, 0),
                                new RecordKind.Multisine(HZ)),
                        plan())
                .points()
                .get(2);
        assertThat(point.elapsedS()).hasValue(600);
    }

    private static Chirp chirp() {
        return Chirp.of(0.1, 10, 60, new double[] {1e4}, new double[] {0.1})
                .rest(1, 3)
                .noise(3e-4);
    }

    private static List<ModulusPoint> points(Chirp chirp) {
        return Reduce.reduce(
                        new WaveformRecord(
                                tags(OptionalDouble.empty()),
                                DeformationSignal.STRAIN,
                                LoadSignal.STRESS,
                                chirp.build(),
                                new RecordKind.Chirp(5)),
                        new ReductionPlan(
                                Corrections.none(),
                                Map.of(),
                                Map.of(),
                                Optional.empty(),
                                ExtractionPlan.withDefaults(),
                                ScreeningPlan.withDefaults()))
                .points();
    }

    @Test
    void aChirpGivesPointsOfStrainAndStress() {
        assertThat(points(chirp())).hasSize(10).allSatisfy(point -> {
            Complex truth = chirp().modulus(point.frequencyHz().orElseThrow());
            assertThat(point.quality()).isEqualTo(Quality.SOUND);
            assertThat(point.moduli().orElseThrow().complex().minus(truth).abs() / truth.abs())
                    .isLessThan(0.01);
        });
    }

    /** The recorder starts while the sweep is under way: the points below twice the slowest are unsettled, and nothing else. */
    @Test
    void aChirpThatBeginsInMotionIsUnsettledAtItsSlowEnd() {
        List<ModulusPoint> points = points(chirp().startedLate(15));
        double slowest = points.get(0).frequencyHz().orElseThrow();
        assertThat(points).hasSizeGreaterThan(5).allSatisfy(point -> {
            boolean slow = point.frequencyHz().orElseThrow() < 2 * slowest;
            assertThat(point.flags()).isEqualTo(slow ? List.of(Flag.UNSETTLED) : List.of());
            assertThat(point.quality()).isEqualTo(slow ? Quality.DOUBTFUL : Quality.SOUND);
        });
        assertThat(points.get(0).reasons()).anySatisfy(reason -> {
            assertThat(reason.code()).isEqualTo("SCREENING_SWEEP_IN_MOTION");
            assertThat(reason.sentence())
                    .startsWith("unsettled: the record begins in motion, ")
                    .contains("the limit is 0.1")
                    .endsWith("(doubtful)");
        });
    }

    @Test
    void aRecordOfSomethingElseIsOneUnusablePoint() {
        List<ModulusPoint> points = points(torqueAndAngle(0.01, 0), new RecordKind.Multisine(List.of(1.3, 4.1)));
        assertThat(points).hasSize(1);
        assertThat(points.get(0).key().point()).isEqualTo("p");
        assertThat(points.get(0).quality()).isEqualTo(Quality.UNUSABLE);
        assertThat(points.get(0).reasons())
                .extracting(reason -> reason.code())
                .containsExactly("MULTISINE_OTHER_TONES");
    }
}

package nightlag.stages;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.stages.fault.Reason;
import nightlag.stages.geometry.Corrections;
import nightlag.stages.geometry.DeformationMode;
import nightlag.stages.geometry.DeformationSignal;
import nightlag.stages.geometry.Dimension;
import nightlag.stages.geometry.GeometryKind;
import nightlag.stages.geometry.GeometrySpec;
import nightlag.stages.geometry.LoadSignal;
import nightlag.stages.geometry.MeasuringWall;
import nightlag.stages.moduli.Flag;
import nightlag.stages.moduli.Harmonic;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.PointKey;
import nightlag.stages.moduli.Quality;
import nightlag.stages.moduli.ScreeningPlan;
import nightlag.stages.moduli.ScreeningReason;
import nightlag.stages.numeric.Complex;
import nightlag.stages.sweep.SweepPlan;
import nightlag.stages.waveform.ExtractionPlan;
import nightlag.stages.waveform.Recording;
import nightlag.stages.waveform.Waveform;
import org.junit.jupiter.api.Test;

class ReduceTest {
    private static final PointKey KEY = new PointKey("Heron 3", "L1", "1", "1", "p", "bench/p.csv");

    private static RecordTags tags(Map<Dimension, Double> dimensions) {
        return new RecordTags(KEY, Optional.empty(), OptionalDouble.of(453.15), OptionalDouble.of(60), dimensions);
    }

    private static ReductionPlan plan(Optional<GeometrySpec> geometry, Corrections corrections) {
        return new ReductionPlan(
                corrections, Map.of(), Map.of(), geometry, ExtractionPlan.withDefaults(), ScreeningPlan.withDefaults());
    }

    private static ModulusPoint only(Reduction reduction) {
        assertThat(reduction.points()).hasSize(1);
        return reduction.points().get(0);
    }

    @Test
    void platesOfARecordsOwnGapGiveTheModulusTheyWereBuiltFrom() {
        // torque and angle of G* = 8 kPa + 3 kPa i in plates of 25 mm and 0.9 mm: M = G* θ π R⁴/(2 h)
        Complex modulus = new Complex(8000, 3000);
        Complex angle = Complex.polar(2e-3, 0.4);
        double radius = 12.5e-3;
        double gap = 0.9e-3;
        Complex torque = modulus.times(angle).times(Math.PI * Math.pow(radius, 4) / (2 * gap));
        Waveform waveform = Recording.of(1.7, 4.3, 90)
                .deformation(angle)
                .load(torque)
                .temperature(t -> 453.15 + 0.01 * t)
                .build();
        GeometrySpec plates = new GeometrySpec(
                GeometryKind.PARALLEL_PLATE,
                Map.of(Dimension.DIAMETER, 2 * radius, Dimension.GAP, 1e-3),
                1,
                1,
                OptionalDouble.empty(),
                Optional.empty());
        ModulusPoint point = only(Reduce.reduce(
                new WaveformRecord(
                        tags(Map.of(Dimension.GAP, gap)), DeformationSignal.ANGLE, LoadSignal.TORQUE, waveform),
                plan(Optional.of(plates), Corrections.none())));
        assertThat(point.quality()).isEqualTo(Quality.SOUND);
        assertThat(point.flags()).isEmpty();
        assertThat(point.loop()).isEmpty();
        assertThat(point.torqueGeometry()).hasValue(GeometryKind.PARALLEL_PLATE);
        assertThat(point.unusableOnlyBy()).isEmpty();
        assertThat(point.moduli().orElseThrow().complex().minus(modulus).abs() / modulus.abs())
                .isLessThan(1e-9);
        assertThat(point.frequencyHz().orElseThrow()).isCloseTo(1.7, within(1.7e-9));
        assertThat(point.strainAmplitude().orElseThrow()).isCloseTo(radius * 2e-3 / gap, within(1e-10));
        // the mean of the samples, 387 of them, the last at (387 − 1)/(1.7·90) s
        assertThat(point.temperatureK().orElseThrow()).isCloseTo(453.15 + 0.01 * 386 / 153 / 2, within(1e-9));
        assertThat(point.taggedTemperatureK()).hasValue(453.15);
    }

    /** From records to published points: the torque of a cubic material between plates, built ring by ring (exact). */
    @Test
    void anAmplitudeSweepBetweenPlatesEndsAtTheRim() {
        double radius = 12.5e-3;
        double gap = 1e-3;
        double stiffening = 0.5;
        double toStress = 2 / (Math.PI * radius * radius * radius);
        GeometrySpec plates = new GeometrySpec(
                GeometryKind.PARALLEL_PLATE,
                Map.of(Dimension.DIAMETER, 2 * radius, Dimension.GAP, gap),
                1,
                1,
                OptionalDouble.empty(),
                Optional.empty());
        List<Reduction> reductions = new ArrayList<>();
        List<Double> strains = new ArrayList<>();
        for (double strain = 0.05; strain < 4; strain *= 1.25) {
            // σ = G(γ + k γ³): the plates show 2/3 of what is cubic; sin³ = ¾ sin − ¼ sin 3
            double cubic = 1000 * stiffening * Math.pow(strain, 3) * 2 / 3;
            Complex first = new Complex(1000 * strain + 0.75 * cubic, 0).times(1 / toStress);
            Complex third = new Complex(-cubic / 4, 0).times(1 / toStress);
            // a sine: Re(−i A e^{iωt})
            Complex sine = new Complex(0, -1);
            Waveform waveform = Recording.of(1, 5, 64)
                    .deformation(sine.times(strain * gap / radius))
                    .load(sine.times(first), Complex.ZERO, sine.times(third))
                    .noise(1e-7 * strain, 1e-5 * strain / toStress)
                    .build();
            reductions.add(Reduce.reduce(
                    new WaveformRecord(tags(Map.of()), DeformationSignal.ANGLE, LoadSignal.TORQUE, waveform),
                    plan(Optional.of(plates), Corrections.none())));
            strains.add(strain);
        }
        ModulusPoint strongest = only(reductions.get(reductions.size() - 1));
        assertThat(strongest.quality()).isEqualTo(Quality.UNUSABLE);
        assertThat(strongest.unusableOnlyBy()).hasValue(Flag.NONLINEAR);
        List<ModulusPoint> published = Conclude.conclude(
                        reductions,
                        new ConclusionPlan(
                                SweepPlan.withDefaults(),
                                Optional.empty(),
                                Optional.empty(),
                                List.of(),
                                List.of(),
                                Map.of()))
                .points()
                .stream()
                .sorted(Comparator.comparingDouble(
                        point -> point.strainAmplitude().orElseThrow()))
                .toList();
        assertThat(published).hasSameSizeAs(strains);
        assertThat(reductions.stream().filter(reduction -> only(reduction).quality() == Quality.SOUND))
                .as("some are flagged at the rim only")
                .hasSizeGreaterThan((int) published.stream()
                        .filter(point -> point.quality() == Quality.SOUND)
                        .count());
        for (int i = 0; i < strains.size(); i++) {
            double square = stiffening * strains.get(i) * strains.get(i);
            ModulusPoint point = published.get(i);
            assertThat(point.quality()).isNotEqualTo(Quality.UNUSABLE);
            assertFlagsAgreeWithThirdHarmonic(point);
            double truth = 1000 * (1 + 0.75 * square);
            assertThat(point.moduli().orElseThrow().storagePa()).isCloseTo(truth, within(2e-2 * truth));
            if (i > 3 && i < strains.size() - 3) {
                assertThat(point.moduli().orElseThrow().storagePa()).isCloseTo(truth, within(5e-4 * truth));
                assertThat(point.harmonics().get(2).relativeIntensity())
                        .isCloseTo(square / 4 / (1 + 0.75 * square), within(2e-3 * square));
            }
        }
    }

    /** Flag, quality, reasons and the figure published say the same. */
    private static void assertFlagsAgreeWithThirdHarmonic(ModulusPoint point) {
        Harmonic third = point.harmonics().get(2);
        boolean nonlinear = third.relativeIntensity()
                > Math.max(0.01, 3 * third.relativeIntensityU().orElseThrow());
        assertThat(point.flags()).isEqualTo(nonlinear ? List.of(Flag.NONLINEAR) : List.of());
        assertThat(point.quality()).isEqualTo(nonlinear ? Quality.DOUBTFUL : Quality.SOUND);
        assertThat(point.reasons())
                .filteredOn(reason -> reason.code().equals("SCREENING_NONLINEAR"))
                .extracting(Reason::sentence)
                .isEqualTo(
                        nonlinear
                                ? List.of(ScreeningReason.SCREENING_NONLINEAR
                                        .with(third.relativeIntensity(), 0.01, "doubtful")
                                        .sentence())
                                : List.of());
    }

    @Test
    void allCorrectionsOfATurningDriveAreUndone() {
        // what is measured is built backwards: specimen, frame, inertia and friction, delay
        double omega = 2 * Math.PI * 8;
        Complex modulus = new Complex(2.0e4, 1.1e4);
        double radius = 4e-3;
        double gap = 1e-3;
        double density = 1000;
        double perStrain = gap / radius;
        Complex strain = Complex.polar(5e-3, 0.2);
        Complex k = new Complex(density, 0).over(modulus).sqrt().times(omega);
        Complex kh = k.times(gap);
        Complex sine = sin(kh);
        // stress at the fixed wall: G* kh/sin kh (Schrag 1977)
        Complex stress = modulus.times(kh).over(sine).times(strain);
        Complex own = stress.times(Math.PI * Math.pow(radius, 3) / 2);
        double compliance = 3e-3;
        Complex angle = strain.times(perStrain).plus(own.times(compliance));
        double inertia = 1.2e-5;
        double friction = 2e-6;
        Complex drag = new Complex(inertia * omega * omega, -friction * omega);
        Complex measured = own.minus(drag.times(angle)).times(Complex.polar(1, -omega * 85e-6));
        Waveform waveform =
                Recording.of(8, 6, 60).deformation(angle).load(measured).build();
        GeometrySpec plates = new GeometrySpec(
                GeometryKind.PARALLEL_PLATE,
                Map.of(Dimension.DIAMETER, 2 * radius, Dimension.GAP, gap, Dimension.DENSITY, density),
                1,
                1,
                OptionalDouble.empty(),
                Optional.empty());
        Corrections corrections =
                new Corrections(0, 85e-6, inertia, friction, 0, 0, compliance, 0, MeasuringWall.FIXED);
        ModulusPoint point = only(Reduce.reduce(
                new WaveformRecord(tags(Map.of()), DeformationSignal.ANGLE, LoadSignal.TORQUE, waveform),
                plan(Optional.of(plates), corrections)));
        assertThat(point.moduli().orElseThrow().complex().minus(modulus).abs() / modulus.abs())
                .isLessThan(1e-9);
        assertThat(point.harmonics().get(0).stressInPhasePa())
                .isCloseTo(modulus.re() * 5e-3, within(1e-9 * modulus.abs()));
        assertThat(point.harmonics().get(0).stressOutOfPhasePa())
                .isCloseTo(modulus.im() * 5e-3, within(1e-9 * modulus.abs()));
    }

    private static Complex sin(Complex z) {
        return new Complex(Math.sin(z.re()) * Math.cosh(z.im()), Math.cos(z.re()) * Math.sinh(z.im()));
    }

    @Test
    void aRecordOfStressAndStrainNeedsNoGeometry() {
        Waveform waveform = Recording.of(1, 5, 64).build();
        ModulusPoint point = only(Reduce.reduce(
                new WaveformRecord(tags(Map.of()), DeformationSignal.STRAIN, LoadSignal.STRESS, waveform),
                plan(Optional.empty(), Corrections.none())));
        Complex modulus = Complex.polar(500 / 0.01, 0.6);
        assertThat(point.moduli().orElseThrow().complex().minus(modulus).abs() / modulus.abs())
                .isLessThan(1e-9);
        assertThat(point.deformation()).isEqualTo(DeformationMode.SHEAR);
        assertThat(point.temperatureK()).hasValue(453.15);
    }

    @Test
    void aRecordWithoutSamplesIsAnUnusablePointWithItsReason() {
        double[] none = new double[0];
        ModulusPoint point = only(Reduce.reduce(
                new WaveformRecord(
                        tags(Map.of()),
                        DeformationSignal.STRAIN,
                        LoadSignal.STRESS,
                        new Waveform(none, none, none, none, OptionalDouble.of(1), 0)),
                plan(Optional.empty(), Corrections.none())));
        assertThat(point.quality()).isEqualTo(Quality.UNUSABLE);
        assertThat(point.moduli()).isEmpty();
        assertThat(point.reasons()).extracting(Reason::sentence).containsExactly("the record holds no samples");
    }

    @Test
    void torqueWithoutAGeometryIsAnUnusablePointWithItsReason() {
        Waveform waveform = Recording.of(1, 5, 64).tagged(1).build();
        ModulusPoint point = only(Reduce.reduce(
                new WaveformRecord(tags(Map.of()), DeformationSignal.ANGLE, LoadSignal.TORQUE, waveform),
                plan(Optional.empty(), Corrections.none())));
        assertThat(point.quality()).isEqualTo(Quality.UNUSABLE);
        assertThat(point.moduli()).isEmpty();
        assertThat(point.frequencyHz()).hasValue(1);
        assertThat(point.reasons()).extracting(Reason::code).containsExactly("GEOMETRY_SIGNAL_DOES_NOT_FIT");
    }

    @Test
    void aMissingDimensionIsAnUnusablePointWithItsReason() {
        GeometrySpec plates = new GeometrySpec(
                GeometryKind.PARALLEL_PLATE,
                Map.of(Dimension.DIAMETER, 0.025),
                1,
                1,
                OptionalDouble.empty(),
                Optional.empty());
        ModulusPoint point = only(Reduce.reduce(
                new WaveformRecord(
                        tags(Map.of()),
                        DeformationSignal.ANGLE,
                        LoadSignal.TORQUE,
                        Recording.of(1, 5, 64).build()),
                plan(Optional.of(plates), Corrections.none())));
        assertThat(point.reasons()).extracting(Reason::code).containsExactly("GEOMETRY_DIMENSION_MISSING");
        assertThat(point.frequencyHz()).isEmpty();
    }

    @Test
    void aRecordThatDoesNotMoveIsAnUnusablePointWithItsReason() {
        Waveform waveform = new Waveform(
                new double[] {0, 1, 2, 3, 4, 5, 6, 7, 8, 9},
                new double[] {0, 1, 0, -1, 0, 1, 0, -1, 0, 1},
                new double[10],
                new double[0],
                OptionalDouble.empty(),
                0);
        ModulusPoint point = only(Reduce.reduce(
                new WaveformRecord(tags(Map.of()), DeformationSignal.STRAIN, LoadSignal.STRESS, waveform),
                plan(Optional.empty(), Corrections.none())));
        assertThat(point.quality()).isEqualTo(Quality.UNUSABLE);
        assertThat(point.reasons()).extracting(Reason::code).containsExactly("WAVEFORM_CONSTANT_CHANNEL");
    }

    @Test
    void givenModuliPassThroughWithTheirUncertainties() {
        ModulusPoint point = only(Reduce.reduce(
                new GivenModuli(
                        tags(Map.of()),
                        2,
                        3e5,
                        4e5,
                        OptionalDouble.of(30),
                        OptionalDouble.of(50),
                        OptionalDouble.of(0.01)),
                plan(Optional.empty(), Corrections.none())));
        assertThat(point.quality()).isEqualTo(Quality.SOUND);
        assertThat(point.stressAmplitudePa().orElseThrow()).isCloseTo(5e3, within(1e-9));
        assertThat(point.moduli().orElseThrow().covariance().orElseThrow().storageU())
                .isEqualTo(30);
        assertThat(point.moduli().orElseThrow().covariance().orElseThrow().covariance())
                .isZero();
        assertThat(point.harmonics()).isEmpty();
        assertThat(point.cyclesUsed()).isEmpty();
        assertThat(point.temperatureK()).hasValue(453.15);
    }

    @Test
    void aNegativeGivenLossModulusIsKeptAndSaid() {
        ModulusPoint point = only(Reduce.reduce(
                new GivenModuli(
                        tags(Map.of()),
                        2,
                        3e5,
                        -4,
                        OptionalDouble.empty(),
                        OptionalDouble.empty(),
                        OptionalDouble.empty()),
                plan(Optional.empty(), Corrections.none())));
        assertThat(point.quality()).isEqualTo(Quality.SOUND);
        assertThat(point.moduli().orElseThrow().covariance()).isEmpty();
        assertThat(point.reasons()).extracting(Reason::code).containsExactly("MODULI_LOSS_NEGATIVE");
    }

    @Test
    void aSpecimenThatPullsWhereItIsPushedIsAnInvertedChannel() {
        ModulusPoint point = only(Reduce.reduce(
                new GivenModuli(
                        tags(Map.of()),
                        2,
                        -2e4,
                        -2.5e4,
                        OptionalDouble.of(10),
                        OptionalDouble.of(10),
                        OptionalDouble.empty()),
                plan(Optional.empty(), Corrections.none())));
        assertThat(point.quality()).isEqualTo(Quality.UNUSABLE);
        assertThat(point.moduli()).isPresent();
        assertThat(point.flags()).containsExactly(Flag.SIGN_OR_DELAY);
        assertThat(point.reasons())
                .extracting(Reason::sentence)
                .containsExactly(
                        "sign-or-delay: both moduli are below zero, -20000 Pa and -25000 Pa: the polarity of one of the"
                                + " channels is wrong (unusable)");
    }

    @Test
    void aLossModulusBelowZeroByItsNoiseIsNotWorthAWord() {
        for (double loss : new double[] {-29, -31}) {
            ModulusPoint point = only(Reduce.reduce(
                    new GivenModuli(
                            tags(Map.of()),
                            2,
                            3e5,
                            loss,
                            OptionalDouble.of(10),
                            OptionalDouble.of(10),
                            OptionalDouble.empty()),
                    plan(Optional.empty(), Corrections.none())));
            assertThat(point.reasons())
                    .extracting(Reason::code)
                    .isEqualTo(loss < -30 ? List.of("MODULI_LOSS_NEGATIVE") : List.of());
        }
    }

    @Test
    void givenModuliOfNothingAreUnusable() {
        for (double[] pair : new double[][] {{0, 0}, {Double.NaN, 1}, {1, Double.POSITIVE_INFINITY}}) {
            ModulusPoint point = only(Reduce.reduce(
                    new GivenModuli(
                            tags(Map.of()),
                            2,
                            pair[0],
                            pair[1],
                            OptionalDouble.empty(),
                            OptionalDouble.empty(),
                            OptionalDouble.empty()),
                    plan(Optional.empty(), Corrections.none())));
            assertThat(point.quality()).isEqualTo(Quality.UNUSABLE);
            assertThat(point.moduli()).isEmpty();
            assertThat(point.reasons()).hasSize(1);
        }
    }
}

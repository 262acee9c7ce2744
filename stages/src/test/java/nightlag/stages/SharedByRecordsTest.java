package nightlag.stages;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.stages.geometry.Corrections;
import nightlag.stages.geometry.DeformationSignal;
import nightlag.stages.geometry.Dimension;
import nightlag.stages.geometry.GeometryKind;
import nightlag.stages.geometry.GeometrySpec;
import nightlag.stages.geometry.LoadSignal;
import nightlag.stages.geometry.MeasuringWall;
import nightlag.stages.moduli.PointKey;
import nightlag.stages.moduli.ScreeningPlan;
import nightlag.stages.moduli.SharedEffect;
import nightlag.stages.moduli.SharedInfluences;
import nightlag.stages.moduli.SignalUncertainty;
import nightlag.stages.numeric.Complex;
import nightlag.stages.waveform.ExtractionPlan;
import nightlag.stages.waveform.Recording;
import org.junit.jupiter.api.Test;

/** How points move with dimensions and with the scale of signals, against derivatives worked out by hand. */
class SharedByRecordsTest {
    private static final double DIAMETER = 25e-3;
    private static final double GAP = 1e-3;
    private static final Complex MODULUS = new Complex(8000, 3000);

    private static GeometrySpec spec(GeometryKind kind, Map<Dimension, Double> dimensions) {
        return new GeometrySpec(kind, dimensions, 1, 1, OptionalDouble.empty(), Optional.empty());
    }

    private static final GeometrySpec PLATES =
            spec(GeometryKind.PARALLEL_PLATE, Map.of(Dimension.DIAMETER, DIAMETER, Dimension.GAP, GAP));

    private static Corrections inertia(double kgM2) {
        return new Corrections(0, 0, kgM2, 0, 0, 0, 0, 0, MeasuringWall.FIXED);
    }

    /** The influences on a record whose specimen has that modulus, torque and angle known to 1 % and 0.5 %. */
    private static SharedInfluences of(GeometrySpec spec, Corrections corrections, double frequencyHz) {
        Complex angle = Complex.polar(2e-3, 0.4);
        double omega = 2 * Math.PI * frequencyHz;
        double stiffness = Math.PI * Math.pow(DIAMETER / 2, 4) / (2 * GAP);
        Complex torque = MODULUS.times(stiffness)
                .minus(new Complex(corrections.inertiaKgM2() * omega * omega, 0))
                .times(angle);
        WaveformRecord record = new WaveformRecord(
                new RecordTags(
                        new PointKey("Heron 3", "L1", "1", "1", "p", "bench/p.csv"),
                        Optional.empty(),
                        OptionalDouble.of(453.15),
                        OptionalDouble.empty(),
                        Map.of()),
                DeformationSignal.ANGLE,
                LoadSignal.TORQUE,
                Recording.of(frequencyHz, 4.3, 90)
                        .deformation(angle)
                        .load(torque)
                        .build());
        ReductionPlan plan = new ReductionPlan(
                corrections,
                Map.of(),
                Map.of(),
                Optional.of(spec),
                ExtractionPlan.withDefaults(),
                ScreeningPlan.withDefaults(),
                new SignalUncertainty(
                        Map.of(DeformationSignal.ANGLE, 0.005),
                        Map.of(LoadSignal.TORQUE, 0.01),
                        OptionalDouble.of(0.3)));
        return Reduce.reduce(record, plan).points().get(0).shared().orElseThrow();
    }

    private static void assertEffect(SharedEffect effect, double lnModulus, double phaseRad, double lnStrain) {
        assertThat(effect.lnModulus()).isCloseTo(lnModulus, within(1e-6 * Math.max(1, Math.abs(lnModulus))));
        assertThat(effect.phaseRad()).isCloseTo(phaseRad, within(1e-6 * Math.max(1, Math.abs(phaseRad))));
        assertThat(effect.lnStrain()).isCloseTo(lnStrain, within(1e-6 * Math.max(1, Math.abs(lnStrain))));
    }

    @Test
    void betweenParallelPlates() {
        // exact: G* = M h/(θ π R⁴/2), γ = R θ/h
        SharedInfluences shared = of(PLATES, Corrections.none(), 1.7);
        assertEffect(shared.signals().get("torque"), 0.01, 0, 0);
        assertEffect(shared.signals().get("angle"), -0.005, 0, 0.005);
        assertEffect(shared.dimensions().get(Dimension.GAP), 1 / GAP, 0, -1 / GAP);
        assertEffect(shared.dimensions().get(Dimension.DIAMETER), -4 / DIAMETER, 0, 1 / DIAMETER);
        assertThat(shared.temperatureUK()).hasValue(0.3);
    }

    @Test
    void ofARodInTorsion() {
        // exact: G* = M 32 L/(θ π D⁴), γ = D θ/(2 L)
        SharedInfluences shared = of(
                spec(GeometryKind.ROD_TORSION, Map.of(Dimension.DIAMETER, 4e-3, Dimension.LENGTH, 0.05)),
                Corrections.none(),
                1.7);
        assertEffect(shared.dimensions().get(Dimension.DIAMETER), -4 / 4e-3, 0, 1 / 4e-3);
        assertEffect(shared.dimensions().get(Dimension.LENGTH), 1 / 0.05, 0, -1 / 0.05);
    }

    @Test
    void whereInertiaIsTakenOffAnErrorOfTheTorqueTurnsThePhase() {
        // exact: G* = (M + Iω²θ)/(K θ), so d ln G*/d ln M = M/(M + Iω²θ) = 1 − Iω²/(K G*), K = π R⁴/(2 h)
        double inertia = 5e-6;
        double hertz = 5;
        double stiffness = Math.PI * Math.pow(DIAMETER / 2, 4) / (2 * GAP);
        double omega = 2 * Math.PI * hertz;
        Complex share = new Complex(inertia * omega * omega / stiffness, 0).over(MODULUS);
        SharedInfluences shared = of(PLATES, inertia(inertia), hertz);
        assertThat(share.abs()).isGreaterThan(0.005);
        assertEffect(shared.signals().get("torque"), 0.01 * (1 - share.re()), -0.01 * share.im(), 0);
    }

    @Test
    void aBarAsThickAsWideIsChangedToTheSideThatIsABar() {
        SharedInfluences square = of(
                spec(
                        GeometryKind.BAR_TORSION,
                        Map.of(Dimension.LENGTH, 0.04, Dimension.WIDTH, 5e-3, Dimension.THICKNESS, 5e-3)),
                Corrections.none(),
                1.7);
        SharedInfluences nearly = of(
                spec(
                        GeometryKind.BAR_TORSION,
                        Map.of(Dimension.LENGTH, 0.04, Dimension.WIDTH, 5.0001e-3, Dimension.THICKNESS, 5e-3)),
                Corrections.none(),
                1.7);
        for (Dimension dimension : new Dimension[] {Dimension.WIDTH, Dimension.THICKNESS}) {
            double expected = nearly.dimensions().get(dimension).lnModulus();
            assertThat(square.dimensions().get(dimension).lnModulus())
                    .isCloseTo(expected, within(1e-3 * Math.abs(expected)));
        }
    }
}

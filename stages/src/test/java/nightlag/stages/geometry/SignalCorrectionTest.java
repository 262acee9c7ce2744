package nightlag.stages.geometry;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.catchThrowableOfType;
import static org.assertj.core.api.Assertions.within;

import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.stages.fault.Reason;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.numeric.Complex;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** Each correction alone, against figures worked by hand, and what is refused. */
class SignalCorrectionTest {
    private static final double OMEGA = 20;
    private static final Complex ANGLE = new Complex(0.003, -0.001);
    private static final Complex TORQUE = new Complex(0.02, 0.015);

    /** 25 mm plates at 1 mm: γ/θ = 12.5 and σ/M = 2/(πR³). */
    private static final GeometrySpec PLATES =
            spec(GeometryKind.PARALLEL_PLATE, Map.of(Dimension.DIAMETER, 0.025, Dimension.GAP, 0.001));

    private static final double PER_ANGLE = 12.5;
    private static final double PER_TORQUE = 325_949.323452202;

    @Test
    void withNothingToCorrectOnlyTheGeometryActs() throws ReductionFault {
        CorrectedAmplitudes result = raw(Corrections.none()).correct(OMEGA, ANGLE, TORQUE);

        close(result.strain(), 0.0375, -0.0125);
        close(result.stressPa(), 0.02 * PER_TORQUE, 0.015 * PER_TORQUE);
        assertThat(result.inertiaRatio()).isZero();
        assertThat(result.complianceRatio()).isZero();
    }

    /** A load that comes 10 ms late at 20 rad/s lags by 0.2 rad; cos 0.2 = 0.980066577841242, sin 0.2 = 0.198669330795061. */
    @Test
    void aLateLoadIsTurnedForward() throws ReductionFault {
        CorrectedAmplitudes result = raw(new Corrections(0, 0.01, 0, 0, 0, 0, 0, 0, MeasuringWall.FIXED))
                .correct(OMEGA, ANGLE, TORQUE);

        close(
                result.stressPa(),
                PER_TORQUE * (0.02 * 0.980066577841242 - 0.015 * 0.198669330795061),
                PER_TORQUE * (0.02 * 0.198669330795061 + 0.015 * 0.980066577841242));
        close(result.strain(), 0.0375, -0.0125);
    }

    @Test
    void aLateDeformationIsTurnedForwardToo() throws ReductionFault {
        CorrectedAmplitudes result = raw(new Corrections(0.01, 0, 0, 0, 0, 0, 0, 0, MeasuringWall.FIXED))
                .correct(OMEGA, ANGLE, TORQUE);

        close(
                result.strain(),
                12.5 * (0.003 * 0.980066577841242 + 0.001 * 0.198669330795061),
                12.5 * (0.003 * 0.198669330795061 - 0.001 * 0.980066577841242));
    }

    /** I = 1e-2 kg·m²: Iω² = 4 N·m/rad, so M + 4θ = 0.032 + 0.011i. |4θ| = 0.004 √10. */
    @Test
    void inertiaIsAddedBackToTheTorque() throws ReductionFault {
        CorrectedAmplitudes result = raw(new Corrections(0, 0, 1e-2, 0, 0, 0, 0, 0, MeasuringWall.FIXED))
                .correct(OMEGA, ANGLE, TORQUE);

        close(result.stressPa(), PER_TORQUE * 0.032, PER_TORQUE * 0.011);
        assertThat(result.inertiaRatio())
                .isCloseTo(0.004 * Math.sqrt(10) / Math.sqrt(0.032 * 0.032 + 0.011 * 0.011), within(1e-14));
    }

    /** b = 0.1 N·m·s: −ibω = −2i N·m/rad, so M − 2iθ = (0.02 − 0.002) + (0.015 − 0.006)i. */
    @Test
    void frictionIsTakenOutOfTheTorque() throws ReductionFault {
        CorrectedAmplitudes result = raw(new Corrections(0, 0, 0, 0.1, 0, 0, 0, 0, MeasuringWall.FIXED))
                .correct(OMEGA, ANGLE, TORQUE);

        close(result.stressPa(), PER_TORQUE * 0.018, PER_TORQUE * 0.009);
        assertThat(result.inertiaRatio()).as("friction is no inertia").isZero();
    }

    /** C = 0.02 rad/(N·m): θ − CM = 0.0026 − 0.0013i; |CM| = 0.0005 of |θ| = 0.001 √10. */
    @Test
    void theFramesOwnTwistIsTakenOutOfTheAngle() throws ReductionFault {
        CorrectedAmplitudes result = raw(new Corrections(0, 0, 0, 0, 0, 0, 0.02, 0, MeasuringWall.FIXED))
                .correct(OMEGA, ANGLE, TORQUE);

        close(result.strain(), 12.5 * 0.0026, 12.5 * -0.0013);
        assertThat(result.complianceRatio()).isCloseTo(0.5 / Math.sqrt(10), within(1e-14));
    }

    /** The torque that twists the frame is the one just freed of inertia: θ − C(M + 4θ) = 0.00236 − 0.00122i. */
    @Test
    void complianceComesAfterInertia() throws ReductionFault {
        CorrectedAmplitudes result = raw(new Corrections(0, 0, 1e-2, 0, 0, 0, 0.02, 0, MeasuringWall.FIXED))
                .correct(OMEGA, ANGLE, TORQUE);

        close(result.strain(), 12.5 * 0.00236, 12.5 * -0.00122);
    }

    /** The same three on a strip, L = 20 mm, A = 2.5 mm²: m = 0.5 kg, mω² = 200 N/m; c = 2 N·s/m, cω = 40 N/m; 1e-6 m/N. */
    @Test
    void movingMassDampingAndComplianceActOnForceAndDisplacement() throws ReductionFault {
        GeometrySpec strip = spec(
                GeometryKind.TENSION,
                Map.of(Dimension.LENGTH, 0.02, Dimension.WIDTH, 0.005, Dimension.THICKNESS, 0.0005));
        SignalCorrection correction = SignalCorrection.of(
                strip,
                new Corrections(0, 0, 0, 0, 0.5, 2, 0, 1e-6, MeasuringWall.FIXED),
                DeformationSignal.DISPLACEMENT,
                LoadSignal.FORCE);

        CorrectedAmplitudes result = correction.correct(OMEGA, new Complex(1e-4, 0), new Complex(0.5, 0.1));

        close(result.stressPa(), 0.52 * 400_000, 0.096 * 400_000);
        close(result.strain(), (1e-4 - 0.52e-6) * 50, -0.096e-6 * 50);
        assertThat(correction.deformationMode()).isEqualTo(DeformationMode.EXTENSION);
    }

    /**
     * Exact: 8 mm plates at 1 mm (M/θ = 4.0212386e-7 m³ · G) on a frame of 200 N·m/rad, apparent moduli in series with the
     * specimen; taken back they are the true ones. The printed apparent figures carry six digits.
     */
    @ParameterizedTest(name = "{0} Pa at {1}°")
    @CsvSource({
        "1e6, 0,  997993,    0",
        "1e7, 0,  9.8029e6,  0",
        "1e8, 0,  8.32597e7, 0",
        "1e9, 0,  3.32158e8, 0",
        "1e7, 45, 9.85885e6, 44.197",
        "1e8, 45, 8.6882e7,  37.905",
        "1e9, 45, 3.56099e8, 14.584"
    })
    void complianceTable(double modulus, double phase, double apparent, double apparentPhase) throws ReductionFault {
        GeometrySpec plates =
                spec(GeometryKind.PARALLEL_PLATE, Map.of(Dimension.DIAMETER, 0.008, Dimension.GAP, 0.001));
        Complex torque = Complex.polar(apparent * 4.02123859659494e-7, Math.toRadians(apparentPhase));

        CorrectedAmplitudes result = SignalCorrection.of(
                        plates,
                        new Corrections(0, 0, 0, 0, 0, 0, 1.0 / 200, 0, MeasuringWall.FIXED),
                        DeformationSignal.ANGLE,
                        LoadSignal.TORQUE)
                .correct(OMEGA, Complex.ONE, torque);

        // the last printed digit grows by (true/apparent)²
        double magnified = modulus / apparent * (modulus / apparent);
        assertThat(result.modulusPa().abs()).isCloseTo(modulus, within(2e-5 * magnified * apparent));
        assertThat(Math.toDegrees(result.modulusPa().argument())).isCloseTo(phase, within(1e-3 * magnified));
    }

    /** A file of strain and stress was made with the same factors, so the result is that of the raw signals. */
    @Test
    void stressAndStrainAreTakenBackToTheMachineWhereItMatters() throws ReductionFault {
        Corrections all = new Corrections(1e-3, 2e-3, 1e-2, 0.1, 0.5, 2, 0.02, 1e-6, MeasuringWall.FIXED);
        CorrectedAmplitudes fromRaw = raw(all).correct(OMEGA, ANGLE, TORQUE);

        CorrectedAmplitudes fromGiven = SignalCorrection.of(PLATES, all, DeformationSignal.STRAIN, LoadSignal.STRESS)
                .correct(OMEGA, ANGLE.times(PER_ANGLE), TORQUE.times(PER_TORQUE));

        close(fromGiven.strain(), fromRaw.strain().re(), fromRaw.strain().im());
        close(fromGiven.stressPa(), fromRaw.stressPa().re(), fromRaw.stressPa().im());
        assertThat(fromGiven.complianceRatio()).isCloseTo(fromRaw.complianceRatio(), within(1e-14));
    }

    @Test
    void whereNothingRestsOnTheDimensionsTheyNeedNotBeThere() throws ReductionFault {
        GeometrySpec bare = spec(GeometryKind.TENSION, Map.of());

        SignalCorrection correction =
                SignalCorrection.of(bare, Corrections.none(), DeformationSignal.STRAIN, LoadSignal.STRESS);

        assertThat(correction.deformationMode()).isEqualTo(DeformationMode.EXTENSION);
        assertThat(correction.correct(OMEGA, ANGLE, TORQUE).stressPa()).isEqualTo(TORQUE);
    }

    @Test
    void whatBelongsToTheOtherDriveIsLeftAlone() throws ReductionFault {
        CorrectedAmplitudes result = raw(new Corrections(0, 0, 0, 0, 0.5, 2, 0, 1e-6, MeasuringWall.FIXED))
                .correct(OMEGA, ANGLE, TORQUE);

        assertThat(result).isEqualTo(raw(Corrections.none()).correct(OMEGA, ANGLE, TORQUE));
    }

    @Test
    void withoutAGeometryInertiaAndComplianceHaveNothingToActOn() {
        Reason reason = catchThrowableOfType(
                        ReductionFault.class,
                        () -> SignalCorrection.of(
                                GeometrySpec.none(),
                                new Corrections(0, 1e-4, 1e-5, 0, 0, 0, 0.02, 0, MeasuringWall.FIXED),
                                DeformationSignal.STRAIN,
                                LoadSignal.STRESS))
                .reason();

        assertThat(reason.code()).isEqualTo("GEOMETRY_CORRECTION_NEEDS_KIND");
        assertThat(reason.sentence()).startsWith("inertia and compliance cannot be corrected in stress and strain");
    }

    @Test
    void aDelayNeedsNoGeometry() throws ReductionFault {
        SignalCorrection correction = SignalCorrection.of(
                GeometrySpec.none(),
                new Corrections(0, Math.PI / 2 / OMEGA, 0, 0, 0, 0, 0, 0, MeasuringWall.FIXED),
                DeformationSignal.STRAIN,
                LoadSignal.STRESS);

        close(correction.correct(OMEGA, Complex.ONE, Complex.ONE).stressPa(), 0, 1);
    }

    @Test
    void aRecordOfTheWrongDriveIsRefused() {
        Reason reason = catchThrowableOfType(
                        ReductionFault.class,
                        () -> SignalCorrection.of(
                                PLATES, Corrections.none(), DeformationSignal.ANGLE, LoadSignal.FORCE))
                .reason();

        assertThat(reason.code()).isEqualTo("GEOMETRY_SIGNAL_DOES_NOT_FIT");
        assertThat(reason.sentence())
                .isEqualTo("the geometry parallel-plate takes torque and angle, or stress and strain,"
                        + " but the record holds force");
    }

    private static SignalCorrection raw(Corrections corrections) throws ReductionFault {
        return SignalCorrection.of(PLATES, corrections, DeformationSignal.ANGLE, LoadSignal.TORQUE);
    }

    private static GeometrySpec spec(GeometryKind kind, Map<Dimension, Double> sizes) {
        return new GeometrySpec(kind, sizes, 1, 1, OptionalDouble.empty(), Optional.empty());
    }

    private static void close(Complex found, double re, double im) {
        assertThat(found.minus(new Complex(re, im)).abs()).isLessThanOrEqualTo(1e-12 * Math.hypot(re, im));
    }
}

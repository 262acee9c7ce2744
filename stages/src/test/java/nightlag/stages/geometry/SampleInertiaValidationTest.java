package nightlag.stages.geometry;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.catchThrowableOfType;
import static org.assertj.core.api.Assertions.within;

import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.numeric.Complex;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** The shear wave in the gap (Schrag 1977): closed forms evaluated to 40 digits, and the way back. */
class SampleInertiaValidationTest {
    /** Exact: G* kh cot kh and G* kh/sin kh to 40 digits; density 1000 kg/m³ throughout. */
    @ParameterizedTest(name = "{0} + {1}i Pa, {2} Hz, {3} mm, {4} wall")
    @CsvSource({
        "0,   62.83185307179586,  10,  1, FIXED,  0.65794167374702564, 62.8270300788250585",
        "0,   62.83185307179586,  10,  1, MOVING, -1.31591426970485315, 62.8373650915181871",
        "100, 10,                 50,  2, FIXED,  215.81147494042425, 1.56187912816541272",
        "100, 10,                 50,  2, MOVING, -86.3320038834245816, 18.9599380097801597",
        "0,   0.6283185307179586, 100, 1, MOVING, -11.1366559936634166, 11.1366559936634027"
    })
    void closedFormsAndTheWayBack(
            double storage,
            double loss,
            double frequency,
            double gapMm,
            MeasuringWall wall,
            double apparentStorage,
            double apparentLoss)
            throws ReductionFault {
        SampleInertia inertia = plates(gapMm * 1e-3, wall);
        double omega = 2 * Math.PI * frequency;
        Complex modulus = new Complex(storage, loss);
        Complex apparent = new Complex(apparentStorage, apparentLoss);

        assertThat(share(inertia.apparent(modulus, omega), apparent)).isLessThan(1e-12);
        assertThat(share(inertia.correct(apparent, omega), modulus)).isLessThan(1e-10);
    }

    /** Exact: an elastic layer of λ/40, λ/20 and λ/10 shows 0.99176, 0.96688, 0.86481 (moving), 1.00412, 1.01664, 1.06896 (fixed). */
    @ParameterizedTest(name = "wavelength/{0}")
    @CsvSource({"40, 0.99176, 1.00412", "20, 0.96688, 1.01664", "10, 0.86481, 1.06896"})
    void anElasticLayer(double part, double moving, double fixed) throws ReductionFault {
        // k h = 2π/part: with G = 1 Pa, ρ = 1000 kg/m³ and ω = 1 rad/s
        double gap = 2 * Math.PI / part / Math.sqrt(1000);

        assertThat(plates(gap, MeasuringWall.MOVING).apparent(Complex.ONE, 1).re())
                .isCloseTo(moving, within(5e-6));
        assertThat(plates(gap, MeasuringWall.FIXED).apparent(Complex.ONE, 1).re())
                .isCloseTo(fixed, within(5e-6));
        assertThat(share(
                        plates(gap, MeasuringWall.MOVING)
                                .correct(plates(gap, MeasuringWall.MOVING).apparent(Complex.ONE, 1), 1),
                        Complex.ONE))
                .isLessThan(1e-12);
    }

    /** Exact first order: G* − ρω²h²/3 at the moving wall and G* + ρω²h²/6 at the fixed one. */
    @Test
    void aThinLayerIsOffByItsFirstOrder() throws ReductionFault {
        Complex modulus = new Complex(1e6, 5e5);
        double inertialStress = 1000 * 100 * 1e-6;

        Complex moving = plates(1e-3, MeasuringWall.MOVING).correct(modulus, 10).minus(modulus);
        Complex fixed = plates(1e-3, MeasuringWall.FIXED).correct(modulus, 10).minus(modulus);

        assertThat(share(moving, new Complex(inertialStress / 3, 0))).isLessThan(1e-6);
        assertThat(share(fixed, new Complex(-inertialStress / 6, 0))).isLessThan(1e-6);
    }

    /** Exact, locally parallel cone: −ρω²α²R²/5 and +ρω²α²R²/10, the latter the familiar published form. */
    @Test
    void aConeIsOffByAFifthAndATenth() throws ReductionFault {
        GeometrySpec cone = new GeometrySpec(
                GeometryKind.CONE_PLATE,
                Map.of(Dimension.DIAMETER, 0.05, Dimension.CONE_ANGLE, 0.02, Dimension.DENSITY, 1000.0),
                1,
                1,
                OptionalDouble.empty(),
                Optional.empty());
        Complex modulus = new Complex(1e6, 5e5);
        double inertialStress = 1000 * 100 * 0.02 * 0.02 * 0.025 * 0.025;

        Complex moving = SampleInertia.of(cone, MeasuringWall.MOVING)
                .apparent(modulus, 10)
                .minus(modulus);
        Complex fixed = SampleInertia.of(cone, MeasuringWall.FIXED)
                .apparent(modulus, 10)
                .minus(modulus);

        assertThat(share(moving, new Complex(-inertialStress / 5, 0))).isLessThan(1e-5);
        assertThat(share(fixed, new Complex(inertialStress / 10, 0))).isLessThan(1e-5);
    }

    /** Over all passive phases, up to where the layer is a quarter of a wave (moving) or close to it (fixed). */
    @ParameterizedTest(name = "phase {0}°")
    @CsvSource({"0", "5", "20", "45", "70", "90"})
    void thereAndBackUpToAQuarterWave(double phase) throws ReductionFault {
        Complex modulus = Complex.polar(100, Math.toRadians(phase));
        for (MeasuringWall wall : MeasuringWall.values()) {
            SampleInertia inertia = plates(1e-3, wall);
            for (double waves = 0.001; waves < 0.25; waves *= 1.3) {
                double omega = 2 * Math.PI * waves / 1e-3 * Math.sqrt(0.1);

                assertThat(share(inertia.correct(inertia.apparent(modulus, omega), omega), modulus))
                        .as("%s wall, %s of a wave", wall, waves)
                        .isLessThan(1e-11);
            }
        }
    }

    @Test
    void theSensitivityIsTheSlopeOfTheCorrection() throws ReductionFault {
        SampleInertia inertia = plates(2e-3, MeasuringWall.MOVING);
        Complex apparent = inertia.apparent(new Complex(300, 80), 200);
        Complex step = new Complex(1e-3, 2e-3);

        Complex change = inertia.correct(apparent.plus(step), 200)
                .minus(inertia.correct(apparent.minus(step), 200))
                .over(step.times(2));

        assertThat(share(inertia.sensitivity(new Complex(300, 80), 200), change))
                .isLessThan(1e-7);
    }

    /** At the fixed wall a lossless layer can show no less than ρω²h²/1.8197 (exact: z sin z is largest at tan z = −z). */
    @Test
    void aLosslessLayerPastItsTurningPointIsRefused() {
        double inertialStress = 1000 * 1e-6;

        ReductionFault fault = catchThrowableOfType(
                ReductionFault.class,
                () -> plates(1e-3, MeasuringWall.FIXED).correct(new Complex(inertialStress / 1.82, 0), 1));

        assertThat(fault.reason().code()).isEqualTo("GEOMETRY_SAMPLE_INERTIA_NO_ROOT");
    }

    private static SampleInertia plates(double gap, MeasuringWall wall) throws ReductionFault {
        return SampleInertia.of(
                new GeometrySpec(
                        GeometryKind.PARALLEL_PLATE,
                        Map.of(Dimension.GAP, gap, Dimension.DENSITY, 1000.0),
                        1,
                        1,
                        OptionalDouble.empty(),
                        Optional.empty()),
                wall);
    }

    private static double share(Complex found, Complex expected) {
        return found.minus(expected).abs() / expected.abs();
    }
}

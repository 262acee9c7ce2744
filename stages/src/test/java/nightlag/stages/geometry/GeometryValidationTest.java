package nightlag.stages.geometry;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.stages.fault.ReductionFault;
import org.junit.jupiter.api.Test;

/** Every kind against numbers worked by hand from the standards' formulas; where a literature constant is known, that too. */
class GeometryValidationTest {
    private static final double BOUND = 1e-12;
    private static final double MM = 1e-3;
    private static final double DEGREE = Math.PI / 180;

    /** Exact: R = 12.5 mm, h = 1 mm, σ/M = 2/(πR³), γ/θ = R/h (ISO 6721-10). */
    @Test
    void parallelPlates() throws ReductionFault {
        Geometry plates = of(GeometryKind.PARALLEL_PLATE, Map.of(Dimension.DIAMETER, 25 * MM, Dimension.GAP, 1 * MM));

        expect(plates, 12.5, 325_949.323452202, DeformationMode.SHEAR);
        assertThat(modulus(plates)).isCloseTo(26_075.94588, within(5e-6));
    }

    /** Exact: R = 20 mm, α = 2°, σ/M = 3/(2πR³), γ/θ = 1/α (ISO 3219). */
    @Test
    void coneAndPlate() throws ReductionFault {
        Geometry cone =
                of(GeometryKind.CONE_PLATE, Map.of(Dimension.DIAMETER, 40 * MM, Dimension.CONE_ANGLE, 2 * DEGREE));

        expect(cone, 28.6478897565412, 59_683.1036594608, DeformationMode.SHEAR);
    }

    /**
     * The standard cylinder shape of DIN 53019 / ISO 3219 (radius ratio 1.0847, L/Ri = 3, c_L = 1.10). Published constants
     * 1.291 per rpm and 0.0446 Ri⁻³ (from memory); the further digits are exact.
     */
    @Test
    void coaxialCylindersOfTheStandardShape() throws ReductionFault {
        double innerRadius = 12.5 * MM;
        Geometry cylinders = Geometry.of(spec(
                GeometryKind.COAXIAL_CYLINDERS,
                Map.of(
                        Dimension.INNER_DIAMETER,
                        2 * innerRadius,
                        Dimension.OUTER_DIAMETER,
                        2 * innerRadius * 1.0847,
                        Dimension.LENGTH,
                        3 * innerRadius),
                1,
                1.10,
                OptionalDouble.empty()));

        double perRpm = cylinders.strainPerDeformation() * 2 * Math.PI / 60;
        double perTorque = cylinders.stressPerLoad() * innerRadius * innerRadius * innerRadius;
        assertThat(perRpm).isCloseTo(1.291, within(0.0005));
        assertThat(perTorque).isCloseTo(0.0446, within(0.00005));
        assertThat(perRpm).isCloseTo(1.29084797041625, within(BOUND * 1.3));
        assertThat(perTorque).isCloseTo(0.0446098097206595, within(BOUND * 0.045));
    }

    /** Exact: D = 6 mm, L = 50 mm, M/θ = GπD⁴/(32L): 1 GPa twists at 2.54469004940773 N·m/rad. */
    @Test
    void roundRodInTorsion() throws ReductionFault {
        Geometry rod = of(GeometryKind.ROD_TORSION, Map.of(Dimension.DIAMETER, 6 * MM, Dimension.LENGTH, 50 * MM));

        expect(rod, 0.06, 23_578_510.0876882, DeformationMode.SHEAR);
        assertThat(1e9 / modulus(rod)).isCloseTo(2.54469004940773, within(2.5 * BOUND));
    }

    /** Exact: 10 x 4 x 40 mm of 1 GPa, β = 0.249365075, M/θ = 3.9898412 N·m/rad. */
    @Test
    void rectangularBarInTorsion() throws ReductionFault {
        Geometry bar = of(
                GeometryKind.BAR_TORSION,
                Map.of(Dimension.LENGTH, 40 * MM, Dimension.WIDTH, 10 * MM, Dimension.THICKNESS, 4 * MM));

        double beta = 0.249365074708186;
        double stressFactor = 0.257589941557054;
        expect(bar, beta / stressFactor * 0.1, 1 / (stressFactor * 1.6e-7), DeformationMode.SHEAR);
        assertThat(1e9 / modulus(bar)).isCloseTo(3.98984119533098, within(4 * BOUND));
    }

    /** The stiffness of a bar does not depend on which side somebody calls its width. */
    @Test
    void aBarMeasuredTheOtherWayRoundIsTheSameBar() throws ReductionFault {
        Map<Dimension, Double> flat =
                Map.of(Dimension.LENGTH, 40 * MM, Dimension.WIDTH, 10 * MM, Dimension.THICKNESS, 4 * MM);
        Map<Dimension, Double> upright =
                Map.of(Dimension.LENGTH, 40 * MM, Dimension.WIDTH, 4 * MM, Dimension.THICKNESS, 10 * MM);

        assertThat(of(GeometryKind.BAR_TORSION, upright)).isEqualTo(of(GeometryKind.BAR_TORSION, flat));
    }

    /** Exact: two pads of 10 x 10 x 2 mm and 1 MPa give 100,000 N/m (ISO 6721-6). */
    @Test
    void twoLayersInShear() throws ReductionFault {
        Geometry pads = of(
                GeometryKind.TWO_LAYER_SHEAR,
                Map.of(Dimension.GAP, 2 * MM, Dimension.WIDTH, 10 * MM, Dimension.LENGTH, 10 * MM));
        Geometry byArea =
                of(GeometryKind.TWO_LAYER_SHEAR, Map.of(Dimension.GAP, 2 * MM, Dimension.AREA, 100 * MM * MM));

        expect(pads, 500, 5000, DeformationMode.SHEAR);
        expect(byArea, 500, 5000, DeformationMode.SHEAR);
        assertThat(1e6 / modulus(pads)).isCloseTo(100_000, within(1e5 * BOUND));
    }

    /** Exact: one span of 17.5 x 10 x 2 mm and 2 GPa gives 29,854.2274 N/m; at ν = 0.35 the shear share is 4.231837 %. */
    @Test
    void oneClampedSpan() throws ReductionFault {
        Map<Dimension, Double> span =
                Map.of(Dimension.LENGTH, 17.5 * MM, Dimension.WIDTH, 10 * MM, Dimension.THICKNESS, 2 * MM);
        Geometry stiff = of(GeometryKind.CLAMPED_BENDING, span);
        Geometry shearing = Geometry.of(spec(GeometryKind.CLAMPED_BENDING, span, 1, 1, OptionalDouble.of(0.35)));

        expect(stiff, 19.5918367346939, 1_312_500, DeformationMode.EXTENSION);
        assertThat(2e9 / modulus(stiff)).isCloseTo(29_854.2274052478, within(3e4 * BOUND));
        assertThat(modulus(shearing) / modulus(stiff)).isCloseTo(1.04231836734694, within(BOUND));
    }

    /** Exact: two such spans give 59,708.4548 N/m; with the full span in place of the free length it would be a sixteenth. */
    @Test
    void twoClampedSpans() throws ReductionFault {
        Geometry spans = Geometry.of(spec(
                GeometryKind.CLAMPED_BENDING,
                Map.of(Dimension.LENGTH, 17.5 * MM, Dimension.WIDTH, 10 * MM, Dimension.THICKNESS, 2 * MM),
                2,
                1,
                OptionalDouble.empty()));

        assertThat(2e9 / modulus(spans)).isCloseTo(59_708.4548104956, within(6e4 * BOUND));
    }

    /** Exact: 50 x 10 x 2 mm of 2 GPa gives 5,120 N/m; at ν = 0.35 the shear share is 0.5184 %. */
    @Test
    void threePointBending() throws ReductionFault {
        Map<Dimension, Double> beam =
                Map.of(Dimension.LENGTH, 50 * MM, Dimension.WIDTH, 10 * MM, Dimension.THICKNESS, 2 * MM);
        Geometry stiff = of(GeometryKind.THREE_POINT_BENDING, beam);
        Geometry shearing = Geometry.of(spec(GeometryKind.THREE_POINT_BENDING, beam, 1, 1, OptionalDouble.of(0.35)));

        expect(stiff, 4.8, 1_875_000, DeformationMode.EXTENSION);
        assertThat(2e9 / modulus(stiff)).isCloseTo(5120, within(5e3 * BOUND));
        assertThat(modulus(shearing) / modulus(stiff)).isCloseTo(1.005184, within(BOUND));
    }

    /** AASHTO T 313 prints this bending beam: 0.980 N, span 102 mm, 12.7 x 6.35 mm, 1 mm deflection: 79.954277 MPa. */
    @Test
    void bendingBeamAsPrinted() throws ReductionFault {
        Geometry beam = of(
                GeometryKind.THREE_POINT_BENDING,
                Map.of(Dimension.LENGTH, 102 * MM, Dimension.WIDTH, 12.7 * MM, Dimension.THICKNESS, 6.35 * MM));

        assertThat(0.980 / MM * modulus(beam)).isCloseTo(79.954277e6, within(1.0));
    }

    /** Exact: 20 x 5 x 0.5 mm of 2 GPa gives 250,000 N/m (ISO 6721-4). */
    @Test
    void stripInTension() throws ReductionFault {
        Geometry strip = of(
                GeometryKind.TENSION,
                Map.of(Dimension.LENGTH, 20 * MM, Dimension.WIDTH, 5 * MM, Dimension.THICKNESS, 0.5 * MM));

        expect(strip, 50, 400_000, DeformationMode.EXTENSION);
        assertThat(2e9 / modulus(strip)).isCloseTo(250_000, within(2.5e5 * BOUND));
    }

    /** Exact: a cylinder of 10 mm diameter and 8 mm height, σ/F = 4/(πD²). */
    @Test
    void cylinderInCompression() throws ReductionFault {
        Geometry cylinder = of(GeometryKind.COMPRESSION, Map.of(Dimension.LENGTH, 8 * MM, Dimension.DIAMETER, 10 * MM));

        expect(cylinder, 125, 12_732.3954473516, DeformationMode.EXTENSION);
    }

    @Test
    void givenStressAndStrainAreTakenAsTheyStand() throws ReductionFault {
        Geometry given = Geometry.of(GeometrySpec.none());

        expect(given, 1, 1, DeformationMode.SHEAR);
    }

    private static void expect(
            Geometry geometry, double strainPerDeformation, double stressPerLoad, DeformationMode mode) {
        assertThat(geometry.strainPerDeformation())
                .isCloseTo(strainPerDeformation, within(BOUND * strainPerDeformation));
        assertThat(geometry.stressPerLoad()).isCloseTo(stressPerLoad, within(BOUND * stressPerLoad));
        assertThat(geometry.deformationMode()).isEqualTo(mode);
    }

    private static double modulus(Geometry geometry) {
        return geometry.stressPerLoad() / geometry.strainPerDeformation();
    }

    private static Geometry of(GeometryKind kind, Map<Dimension, Double> dimensions) throws ReductionFault {
        return Geometry.of(spec(kind, dimensions, 1, 1, OptionalDouble.empty()));
    }

    private static GeometrySpec spec(
            GeometryKind kind, Map<Dimension, Double> dimensions, int spans, double endFactor, OptionalDouble poisson) {
        return new GeometrySpec(kind, dimensions, spans, endFactor, poisson, Optional.empty());
    }
}

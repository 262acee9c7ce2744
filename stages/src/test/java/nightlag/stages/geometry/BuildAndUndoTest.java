package nightlag.stages.geometry;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.EnumMap;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;
import java.util.stream.IntStream;
import java.util.stream.Stream;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.numeric.Complex;
import org.assertj.core.data.Percentage;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;

/**
 * What a bench with inertia, friction, a soft frame and late channels would record of a known material, built from
 * stiffnesses (not from the stress and strain factors under test), must come back as that material.
 */
class BuildAndUndoTest {
    private static final double BOUND = 1e-9;

    @ParameterizedTest(name = "{0}, seed {1}")
    @MethodSource("benches")
    void theMaterialComesBack(GeometryKind kind, long seed) throws ReductionFault {
        Random random = new Random(seed);
        GeometrySpec spec = spec(kind, random);
        double omega = Math.pow(10, 2 * random.nextDouble());
        Complex modulus = Complex.polar(Math.pow(10, 4 + 4 * random.nextDouble()), 1.5 * random.nextDouble());
        double stiffnessPerModulus = stiffnessPerModulus(spec);
        double scale = modulus.abs() * stiffnessPerModulus;
        boolean turn = kind.movement() == Movement.TURN;
        // a frame up to half as stiff, an inertia torque up to three times and a friction up to the specimen's own
        double frame = 2 * random.nextDouble() / scale;
        double mass = 3 * random.nextDouble() * scale / (omega * omega);
        double drag = random.nextDouble() * scale / omega;
        MeasuringWall wall = random.nextBoolean() ? MeasuringWall.FIXED : MeasuringWall.MOVING;
        Corrections corrections = new Corrections(
                1e-3 * random.nextDouble(),
                1e-3 * random.nextDouble(),
                turn ? mass : 0,
                turn ? drag : 0,
                turn ? 0 : mass,
                turn ? 0 : drag,
                turn ? frame : 0,
                turn ? 0 : frame,
                wall);

        // specimen moves by 1, the frame by C·M more; the transducer feels the specimen less inertia, plus friction
        Complex own = apparent(modulus, spec, omega, wall).times(stiffnessPerModulus);
        Complex movement = Complex.ONE.plus(own.times(frame));
        Complex felt = own.minus(movement.times(mass * omega * omega))
                .plus(movement.times(drag * omega).times(Complex.I));
        Complex recordedMovement = movement.times(Complex.polar(1, -omega * corrections.deformationDelayS()));
        Complex recordedLoad = felt.times(Complex.polar(1, -omega * corrections.loadDelayS()));

        SignalCorrection correction = SignalCorrection.of(
                spec,
                corrections,
                turn ? DeformationSignal.ANGLE : DeformationSignal.DISPLACEMENT,
                turn ? LoadSignal.TORQUE : LoadSignal.FORCE);
        CorrectedAmplitudes result = correction.correct(omega, recordedMovement, recordedLoad);
        Complex found = result.modulusPa();
        if (correction.sampleInertia().isPresent()) {
            found = correction.sampleInertia().get().correct(found, omega);
        }

        assertThat(found.minus(modulus).abs() / modulus.abs()).isLessThan(BOUND);
        assertThat(result.complianceRatio()).isCloseTo(own.abs() * frame / movement.abs(), closeTo());
        assertThat(result.inertiaRatio()).isCloseTo(mass * omega * omega * movement.abs() / own.abs(), closeTo());
        CorrectionMap map = correction.at(omega);
        assertThat(map.strain(recordedMovement, recordedLoad)
                        .minus(result.strain())
                        .abs())
                .isLessThan(BOUND * result.strain().abs());
        assertThat(map.stressPa(recordedMovement, recordedLoad)
                        .minus(result.stressPa())
                        .abs())
                .isLessThan(BOUND * result.stressPa().abs());
    }

    static Stream<Arguments> benches() {
        return Stream.of(GeometryKind.values())
                .filter(kind -> kind != GeometryKind.NONE)
                .flatMap(kind -> IntStream.rangeClosed(1, 20).mapToObj(seed -> Arguments.of(kind, (long) seed)));
    }

    private static Percentage closeTo() {
        return Percentage.withPercentage(1e-7);
    }

    private static GeometrySpec spec(GeometryKind kind, Random random) {
        Map<Dimension, Double> sizes = new EnumMap<>(Dimension.class);
        Geometry.requiredDimensions(kind)
                .get(random.nextInt(Geometry.requiredDimensions(kind).size()))
                .forEach(dimension -> sizes.put(dimension, size(dimension, random)));
        if (SampleInertia.knownFor(kind) && random.nextBoolean()) {
            sizes.put(Dimension.DENSITY, 800 + 600 * random.nextDouble());
        }
        return new GeometrySpec(
                kind,
                sizes,
                1 + random.nextInt(2),
                1 + 0.3 * random.nextDouble(),
                random.nextBoolean() ? OptionalDouble.of(0.5 * random.nextDouble()) : OptionalDouble.empty(),
                Optional.empty());
    }

    private static double size(Dimension dimension, Random random) {
        double share = random.nextDouble();
        return switch (dimension) {
            case DIAMETER -> 0.008 + 0.04 * share;
            case GAP -> 0.0005 + 0.0015 * share;
            case CONE_ANGLE -> 0.01 + 0.06 * share;
            case LENGTH -> 0.015 + 0.04 * share;
            case WIDTH, THICKNESS -> 0.001 + 0.01 * share;
            case INNER_DIAMETER -> 0.02 + 0.005 * share;
            case OUTER_DIAMETER -> 0.0255 + 0.003 * share;
            case AREA -> 1e-5 + 1e-4 * share;
            case DENSITY -> 800 + 600 * share;
        };
    }

    /** Load per movement and modulus, each from the stiffness as textbooks give it. */
    private static double stiffnessPerModulus(GeometrySpec spec) {
        Map<Dimension, Double> d = spec.dimensions();
        return switch (spec.kind()) {
            case PARALLEL_PLATE -> Math.PI * Math.pow(d.get(Dimension.DIAMETER), 4) / 32 / d.get(Dimension.GAP);
            case CONE_PLATE -> Math.PI * Math.pow(d.get(Dimension.DIAMETER), 3) / 12 / d.get(Dimension.CONE_ANGLE);
            case ROD_TORSION -> Math.PI * Math.pow(d.get(Dimension.DIAMETER), 4) / 32 / d.get(Dimension.LENGTH);
            case COAXIAL_CYLINDERS ->
                coaxial(
                        d.get(Dimension.INNER_DIAMETER) / 2,
                        d.get(Dimension.OUTER_DIAMETER) / 2,
                        d.get(Dimension.LENGTH) * spec.endFactor());
            case BAR_TORSION -> bar(d.get(Dimension.WIDTH), d.get(Dimension.THICKNESS)) / d.get(Dimension.LENGTH);
            case TWO_LAYER_SHEAR ->
                2
                        * (d.containsKey(Dimension.AREA)
                                ? d.get(Dimension.AREA)
                                : d.get(Dimension.WIDTH) * d.get(Dimension.LENGTH))
                        / d.get(Dimension.GAP);
            case CLAMPED_BENDING -> beam(spec, 12.0 * spec.spans());
            case THREE_POINT_BENDING -> beam(spec, 48);
            case TENSION, COMPRESSION ->
                (d.containsKey(Dimension.DIAMETER)
                                ? Math.PI * Math.pow(d.get(Dimension.DIAMETER) / 2, 2)
                                : d.get(Dimension.WIDTH) * d.get(Dimension.THICKNESS))
                        / d.get(Dimension.LENGTH);
            case NONE -> 1;
        };
    }

    /**
     * The exact stiffness between cylinders, 4πL/(Ri⁻² − Ro⁻²), which the means of ISO 3219 must reproduce: mean stress over
     * mean strain has (1 + δ²) in both, so that it cancels.
     */
    private static double coaxial(double inner, double outer, double length) {
        return 4 * Math.PI * length / (1 / (inner * inner) - 1 / (outer * outer));
    }

    /** GJ per G from Saint-Venant's series in its other usual form, a = w/2, b = t/2, summed term by term. */
    private static double bar(double width, double thickness) {
        double a = Math.max(width, thickness) / 2;
        double b = Math.min(width, thickness) / 2;
        double sum = 0;
        for (int n = 2001; n >= 1; n -= 2) {
            sum += Math.tanh(n * Math.PI * a / (2 * b)) / Math.pow(n, 5);
        }
        return a * b * b * b * (16.0 / 3 - 1024 / Math.pow(Math.PI, 5) * b / a * sum);
    }

    /** kEI/L³ in series with the shear spring κGA/L of the same ends, κ = 5/6. */
    private static double beam(GeometrySpec spec, double k) {
        Map<Dimension, Double> d = spec.dimensions();
        double length = d.get(Dimension.LENGTH);
        double area = d.get(Dimension.WIDTH) * d.get(Dimension.THICKNESS);
        double inertia = area * d.get(Dimension.THICKNESS) * d.get(Dimension.THICKNESS) / 12;
        double bending = k * inertia / Math.pow(length, 3);
        if (spec.poisson().isEmpty()) {
            return bending;
        }
        double shearPaths = spec.kind() == GeometryKind.CLAMPED_BENDING ? spec.spans() : 4;
        double shear =
                shearPaths * 5.0 / 6 * area / length / (2 * (1 + spec.poisson().getAsDouble()));
        return 1 / (1 / bending + 1 / shear);
    }

    /** The wave in the gap by exponentials: cot and 1/sin of kh written out. */
    private static Complex apparent(Complex modulus, GeometrySpec spec, double omega, MeasuringWall wall) {
        Map<Dimension, Double> d = spec.dimensions();
        if (!d.containsKey(Dimension.DENSITY)) {
            return modulus;
        }
        double gap = spec.kind() == GeometryKind.CONE_PLATE
                ? Math.sqrt(0.6) * d.get(Dimension.CONE_ANGLE) * d.get(Dimension.DIAMETER) / 2
                : d.get(Dimension.GAP);
        Complex z =
                new Complex(d.get(Dimension.DENSITY), 0).over(modulus).sqrt().times(omega * gap);
        Complex forth = Complex.polar(Math.exp(-z.im()), z.re());
        Complex back = Complex.polar(Math.exp(z.im()), -z.re());
        Complex twiceSine = forth.minus(back).over(Complex.I);
        Complex numerator = wall == MeasuringWall.FIXED ? new Complex(2, 0) : forth.plus(back);
        return modulus.times(z).times(numerator).over(twiceSine);
    }
}

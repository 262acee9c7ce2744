package nightlag.stages.geometry;

import java.util.List;
import java.util.OptionalDouble;
import java.util.Set;
import nightlag.stages.fault.ReductionFault;

/**
 * A specimen in its holder, all dimensions known: how its load and deformation become stress and strain. Both maps are
 * linear, so the modulus is (load · {@link #stressPerLoad()}) / (deformation · {@link #strainPerDeformation()}).
 */
public sealed interface Geometry
        permits ParallelPlate,
                ConePlate,
                CoaxialCylinders,
                RodTorsion,
                BarTorsion,
                TwoLayerShear,
                ClampedBending,
                ThreePointBending,
                Axial,
                GivenStressAndStrain {
    /** The kind it was configured as. */
    GeometryKind kind();

    /** Strain per rad of angle or per m of displacement. */
    double strainPerDeformation();

    /** Stress in Pa per N·m of torque or per N of force. */
    double stressPerLoad();

    /** Which modulus it measures. */
    default DeformationMode deformationMode() {
        return kind().usualMode();
    }

    /** Whether a record with this deformation can come from it; strain always can and needs no factor. */
    default boolean accepts(DeformationSignal signal) {
        return kind().movement().gives(signal);
    }

    /** Whether a record with this load can come from it; stress always can and needs no factor. */
    default boolean accepts(LoadSignal signal) {
        return kind().movement().gives(signal);
    }

    /**
     * The geometry with all its dimensions checked. Dimensions its kind has no use for are not looked at.
     *
     * @throws ReductionFault if a dimension is missing, not above zero, or at odds with another; the reason names it
     */
    static Geometry of(GeometrySpec spec) throws ReductionFault {
        Sizes sizes = new Sizes(spec);
        return switch (spec.kind()) {
            case PARALLEL_PLATE -> new ParallelPlate(sizes.of(Dimension.DIAMETER), sizes.of(Dimension.GAP));
            case CONE_PLATE -> conePlate(sizes);
            case COAXIAL_CYLINDERS -> coaxialCylinders(sizes);
            case ROD_TORSION -> new RodTorsion(sizes.of(Dimension.DIAMETER), sizes.of(Dimension.LENGTH));
            case BAR_TORSION ->
                new BarTorsion(sizes.of(Dimension.LENGTH), sizes.of(Dimension.WIDTH), sizes.of(Dimension.THICKNESS));
            case TWO_LAYER_SHEAR -> new TwoLayerShear(sizes.of(Dimension.GAP), sizes.layerArea());
            case CLAMPED_BENDING -> clampedBending(sizes);
            case THREE_POINT_BENDING ->
                new ThreePointBending(
                        sizes.of(Dimension.LENGTH),
                        sizes.of(Dimension.WIDTH),
                        sizes.of(Dimension.THICKNESS),
                        poisson(spec));
            case TENSION, COMPRESSION -> new Axial(spec.kind(), sizes.of(Dimension.LENGTH), sizes.crossSection());
            case NONE ->
                new GivenStressAndStrain(spec.deformation().orElse(spec.kind().usualMode()));
        };
    }

    /** The sets of dimensions of which a kind needs one in full; one empty set for {@code none}. */
    static List<Set<Dimension>> requiredDimensions(GeometryKind kind) {
        return switch (kind) {
            case PARALLEL_PLATE -> List.of(Set.of(Dimension.DIAMETER, Dimension.GAP));
            case CONE_PLATE -> List.of(Set.of(Dimension.DIAMETER, Dimension.CONE_ANGLE));
            case COAXIAL_CYLINDERS ->
                List.of(Set.of(Dimension.INNER_DIAMETER, Dimension.OUTER_DIAMETER, Dimension.LENGTH));
            case ROD_TORSION -> List.of(Set.of(Dimension.DIAMETER, Dimension.LENGTH));
            case BAR_TORSION, CLAMPED_BENDING, THREE_POINT_BENDING ->
                List.of(Set.of(Dimension.LENGTH, Dimension.WIDTH, Dimension.THICKNESS));
            case TWO_LAYER_SHEAR ->
                List.of(
                        Set.of(Dimension.GAP, Dimension.AREA),
                        Set.of(Dimension.GAP, Dimension.WIDTH, Dimension.LENGTH));
            case TENSION, COMPRESSION ->
                List.of(
                        Set.of(Dimension.LENGTH, Dimension.WIDTH, Dimension.THICKNESS),
                        Set.of(Dimension.LENGTH, Dimension.DIAMETER));
            case NONE -> List.of(Set.of());
        };
    }

    /** The dimensions a kind can use but does without: the density where sample inertia can be taken out. */
    static Set<Dimension> optionalDimensions(GeometryKind kind) {
        return SampleInertia.knownFor(kind) ? Set.of(Dimension.DENSITY) : Set.of();
    }

    private static Geometry conePlate(Sizes sizes) throws ReductionFault {
        double angle = sizes.of(Dimension.CONE_ANGLE);
        if (angle >= Math.PI / 2) {
            throw new ReductionFault(GeometryReason.GEOMETRY_CONE_ANGLE_TOO_LARGE.with(angle));
        }
        return new ConePlate(sizes.of(Dimension.DIAMETER), angle);
    }

    private static Geometry coaxialCylinders(Sizes sizes) throws ReductionFault {
        double inner = sizes.of(Dimension.INNER_DIAMETER);
        double outer = sizes.of(Dimension.OUTER_DIAMETER);
        if (outer <= inner) {
            throw new ReductionFault(GeometryReason.GEOMETRY_CYLINDERS_DO_NOT_FIT.with(outer, inner));
        }
        double endFactor = sizes.spec().endFactor();
        if (!(endFactor > 0 && endFactor < Double.POSITIVE_INFINITY)) {
            throw new ReductionFault(GeometryReason.GEOMETRY_END_FACTOR.with(endFactor));
        }
        return new CoaxialCylinders(inner, outer, sizes.of(Dimension.LENGTH), endFactor);
    }

    private static Geometry clampedBending(Sizes sizes) throws ReductionFault {
        int spans = sizes.spec().spans();
        if (spans != 1 && spans != 2) {
            throw new ReductionFault(GeometryReason.GEOMETRY_SPANS.with(spans));
        }
        return new ClampedBending(
                spans,
                sizes.of(Dimension.LENGTH),
                sizes.of(Dimension.WIDTH),
                sizes.of(Dimension.THICKNESS),
                poisson(sizes.spec()));
    }

    private static OptionalDouble poisson(GeometrySpec spec) throws ReductionFault {
        OptionalDouble ratio = spec.poisson();
        if (ratio.isPresent() && !(ratio.getAsDouble() > -1 && ratio.getAsDouble() <= 0.5)) {
            throw new ReductionFault(GeometryReason.GEOMETRY_POISSON.with(ratio.getAsDouble()));
        }
        return ratio;
    }
}

package nightlag.pipeline.config;

import java.util.Arrays;
import java.util.EnumSet;
import java.util.List;
import java.util.Set;
import java.util.stream.Collectors;
import nightlag.stages.geometry.Dimension;
import nightlag.stages.geometry.GeometryKind;

/** Which dimensions and options each kind of geometry has. */
final class GeometryRules {
    private GeometryRules() {}

    /** The sets of dimensions any one of which makes a kind complete. */
    static List<Set<Dimension>> completeSets(GeometryKind kind) {
        return switch (kind) {
            case PARALLEL_PLATE -> List.of(EnumSet.of(Dimension.DIAMETER, Dimension.GAP));
            case CONE_PLATE -> List.of(EnumSet.of(Dimension.DIAMETER, Dimension.CONE_ANGLE));
            case COAXIAL_CYLINDERS ->
                List.of(EnumSet.of(Dimension.INNER_DIAMETER, Dimension.OUTER_DIAMETER, Dimension.LENGTH));
            case ROD_TORSION -> List.of(EnumSet.of(Dimension.DIAMETER, Dimension.LENGTH));
            case BAR_TORSION, CLAMPED_BENDING, THREE_POINT_BENDING ->
                List.of(EnumSet.of(Dimension.LENGTH, Dimension.WIDTH, Dimension.THICKNESS));
            case TWO_LAYER_SHEAR ->
                List.of(
                        EnumSet.of(Dimension.GAP, Dimension.WIDTH, Dimension.LENGTH),
                        EnumSet.of(Dimension.GAP, Dimension.AREA));
            case TENSION, COMPRESSION ->
                List.of(
                        EnumSet.of(Dimension.LENGTH, Dimension.WIDTH, Dimension.THICKNESS),
                        EnumSet.of(Dimension.LENGTH, Dimension.DIAMETER));
            case NONE -> List.of(EnumSet.noneOf(Dimension.class));
        };
    }

    /** Whether sample inertia is known for a kind, so that a density means something. */
    static boolean takesDensity(GeometryKind kind) {
        return kind == GeometryKind.PARALLEL_PLATE
                || kind == GeometryKind.CONE_PLATE
                || kind == GeometryKind.TWO_LAYER_SHEAR;
    }

    /** Whether a kind bends, so that Poisson's ratio means something. */
    static boolean takesPoisson(GeometryKind kind) {
        return kind == GeometryKind.CLAMPED_BENDING || kind == GeometryKind.THREE_POINT_BENDING;
    }

    /** Whether a kind turns (torque and angle) rather than pulls (force and displacement). */
    static boolean turns(GeometryKind kind) {
        return switch (kind) {
            case PARALLEL_PLATE, CONE_PLATE, COAXIAL_CYLINDERS, ROD_TORSION, BAR_TORSION -> true;
            case TWO_LAYER_SHEAR, CLAMPED_BENDING, THREE_POINT_BENDING, TENSION, COMPRESSION, NONE -> false;
        };
    }

    /** Every dimension a kind can have. */
    static Set<Dimension> dimensions(GeometryKind kind) {
        Set<Dimension> all = EnumSet.noneOf(Dimension.class);
        completeSets(kind).forEach(all::addAll);
        if (takesDensity(kind)) {
            all.add(Dimension.DENSITY);
        }
        return all;
    }

    /** {@code gap, and width and length or area}, for a message. */
    static String inWords(GeometryKind kind) {
        return completeSets(kind).stream()
                .map(set -> set.stream().map(Dimension::word).collect(Collectors.joining(", ")))
                .collect(Collectors.joining("; or "));
    }

    /** The kinds that have a dimension, for the documentation. */
    static String usersOf(Dimension dimension) {
        return Arrays.stream(GeometryKind.values())
                .filter(kind -> dimensions(kind).contains(dimension))
                .map(kind -> "`" + kind.word() + "`")
                .collect(Collectors.joining(", ", "", "."));
    }
}

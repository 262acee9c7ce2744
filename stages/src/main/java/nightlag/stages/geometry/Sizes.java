package nightlag.stages.geometry;

import java.util.Collection;
import java.util.Comparator;
import java.util.List;
import java.util.Set;
import java.util.stream.Collectors;
import nightlag.stages.fault.ReductionFault;

/** The dimensions of one specimen, each asked for by name and checked when asked for. */
record Sizes(GeometrySpec spec) {
    /** The SI value of a dimension; a fault if it is missing or not above zero. */
    double of(Dimension dimension) throws ReductionFault {
        Double value = spec.dimensions().get(dimension);
        if (value == null) {
            throw missing();
        }
        // written so that NaN fails it
        if (value > 0 && value < Double.POSITIVE_INFINITY) {
            return value;
        }
        throw new ReductionFault(
                GeometryReason.GEOMETRY_DIMENSION_NOT_POSITIVE.with(dimension.word(), value, unit(dimension)));
    }

    /** The cross-section of a bar or a cylinder, m². */
    double crossSection() throws ReductionFault {
        return choose(Dimension.DIAMETER)
                ? Math.PI / 4 * of(Dimension.DIAMETER) * of(Dimension.DIAMETER)
                : of(Dimension.WIDTH) * of(Dimension.THICKNESS);
    }

    /** The area of one layer, m². */
    double layerArea() throws ReductionFault {
        return choose(Dimension.AREA) ? of(Dimension.AREA) : of(Dimension.WIDTH) * of(Dimension.LENGTH);
    }

    /** Whether the alternative marked by this dimension is the one given; a fault if both are, or neither is whole. */
    private boolean choose(Dimension mark) throws ReductionFault {
        List<Set<Dimension>> whole = alternatives().stream()
                .filter(spec.dimensions().keySet()::containsAll)
                .toList();
        if (whole.isEmpty()) {
            throw missing();
        }
        if (whole.size() > 1) {
            throw new ReductionFault(GeometryReason.GEOMETRY_DIMENSIONS_CONTRADICT.with(
                    spec.kind().word(), words(alternatives())));
        }
        return whole.get(0).contains(mark);
    }

    private List<Set<Dimension>> alternatives() {
        return Geometry.requiredDimensions(spec.kind());
    }

    private ReductionFault missing() {
        return new ReductionFault(
                GeometryReason.GEOMETRY_DIMENSION_MISSING.with(spec.kind().word(), words(alternatives())));
    }

    private static String words(Collection<Set<Dimension>> alternatives) {
        return alternatives.stream()
                .map(set -> set.stream()
                        .sorted(Comparator.naturalOrder())
                        .map(Dimension::word)
                        .collect(Collectors.joining(" and ")))
                .collect(Collectors.joining(", or "));
    }

    private static String unit(Dimension dimension) {
        return switch (dimension) {
            case CONE_ANGLE -> "rad";
            case AREA -> "m²";
            case DENSITY -> "kg/m³";
            case DIAMETER, GAP, LENGTH, WIDTH, THICKNESS, INNER_DIAMETER, OUTER_DIAMETER -> "m";
        };
    }
}

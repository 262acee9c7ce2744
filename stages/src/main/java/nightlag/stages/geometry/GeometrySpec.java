package nightlag.stages.geometry;

import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;

/**
 * A geometry as configured: the kind, the dimensions known beforehand, and the options. What is missing may still come
 * from a record's own tags; {@link #with(Map)} lays those over it.
 *
 * @param kind the kind
 * @param dimensions known dimensions in SI (see {@link Dimension})
 * @param spans 1 or 2, for clamped bending
 * @param endFactor c_L of coaxial cylinders (1)
 * @param poisson Poisson's ratio for the shear-deflection correction in bending
 * @param deformation for {@code NONE}: which modulus the file's stress and strain give
 */
public record GeometrySpec(
        GeometryKind kind,
        Map<Dimension, Double> dimensions,
        int spans,
        double endFactor,
        OptionalDouble poisson,
        Optional<DeformationMode> deformation) {
    /** Copies the dimensions. */
    public GeometrySpec {
        dimensions = Map.copyOf(dimensions);
    }

    /** The geometry of a file that already holds shear stress and shear strain. */
    public static GeometrySpec none() {
        return new GeometrySpec(
                GeometryKind.NONE, Map.of(), 1, 1, OptionalDouble.empty(), Optional.of(DeformationMode.SHEAR));
    }

    /** The same with these dimensions laid over its own. */
    public GeometrySpec with(Map<Dimension, Double> recordDimensions) {
        if (recordDimensions.isEmpty()) {
            return this;
        }
        Map<Dimension, Double> merged = new java.util.EnumMap<>(Dimension.class);
        merged.putAll(dimensions);
        merged.putAll(recordDimensions);
        return new GeometrySpec(kind, merged, spans, endFactor, poisson, deformation);
    }
}

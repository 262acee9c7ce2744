package nightlag.stages.geometry;

/**
 * A bar pulled or a block pressed along its axis (ISO 6721-4, ISO 6721-12; ASTM D5026, D5024): σ = F/A, ε = d/L.
 *
 * @param kind {@link GeometryKind#TENSION} or {@link GeometryKind#COMPRESSION}
 * @param lengthM free length, m
 * @param areaM2 cross-section, m²
 */
public record Axial(GeometryKind kind, double lengthM, double areaM2) implements Geometry {
    @Override
    public double strainPerDeformation() {
        return 1 / lengthM;
    }

    @Override
    public double stressPerLoad() {
        return 1 / areaM2;
    }
}

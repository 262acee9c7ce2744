package nightlag.stages.geometry;

/**
 * Two equal layers, one on either side of a plate that is moved between two fixed ones (ISO 6721-6): σ = F/(2A),
 * γ = d/h.
 *
 * @param gapM thickness of one layer, m
 * @param areaM2 area of one layer, m²
 */
public record TwoLayerShear(double gapM, double areaM2) implements Geometry {
    @Override
    public GeometryKind kind() {
        return GeometryKind.TWO_LAYER_SHEAR;
    }

    @Override
    public double strainPerDeformation() {
        return 1 / gapM;
    }

    @Override
    public double stressPerLoad() {
        return 1 / (2 * areaM2);
    }
}

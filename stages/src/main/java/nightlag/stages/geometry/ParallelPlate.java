package nightlag.stages.geometry;

/**
 * Two parallel discs, one turned against the other; stress and strain are those at the rim of a linear material
 * (ISO 6721-10; ASTM D4440): γ = Rθ/h, σ = 2M/(πR³).
 *
 * @param diameterM diameter of the plates, m
 * @param gapM gap, m
 */
public record ParallelPlate(double diameterM, double gapM) implements Geometry {
    @Override
    public GeometryKind kind() {
        return GeometryKind.PARALLEL_PLATE;
    }

    @Override
    public double strainPerDeformation() {
        return diameterM / (2 * gapM);
    }

    @Override
    public double stressPerLoad() {
        double radius = diameterM / 2;
        return 2 / (Math.PI * radius * radius * radius);
    }
}

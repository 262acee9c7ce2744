package nightlag.stages.geometry;

/**
 * A round rod twisted about its axis (Timoshenko; ISO 6721-7 for the method): M/θ = GπD⁴/(32L); stress and strain are
 * those at the surface: γ = Dθ/(2L), σ = 16M/(πD³).
 *
 * @param diameterM diameter, m
 * @param lengthM free length, m
 */
public record RodTorsion(double diameterM, double lengthM) implements Geometry {
    @Override
    public GeometryKind kind() {
        return GeometryKind.ROD_TORSION;
    }

    @Override
    public double strainPerDeformation() {
        return diameterM / (2 * lengthM);
    }

    @Override
    public double stressPerLoad() {
        return 16 / (Math.PI * diameterM * diameterM * diameterM);
    }
}

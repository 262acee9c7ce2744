package nightlag.stages.geometry;

/**
 * A rectangular bar twisted about its axis (ISO 6721-7; ASTM D5279; Saint-Venant's factors after Timoshenko):
 * M/θ = Gβwt³/L; stress and strain are those at the middle of the wide face, where they are largest: σ = M/(k₂wt²),
 * γ = (β/k₂)tθ/L. The larger of the two sides is the width, whichever way round they were measured.
 *
 * @param lengthM free length, m
 * @param widthM larger side w, m
 * @param thicknessM smaller side t, m
 */
public record BarTorsion(double lengthM, double widthM, double thicknessM) implements Geometry {
    /** Puts the larger side first. */
    public BarTorsion {
        double larger = Math.max(widthM, thicknessM);
        thicknessM = Math.min(widthM, thicknessM);
        widthM = larger;
    }

    @Override
    public GeometryKind kind() {
        return GeometryKind.BAR_TORSION;
    }

    @Override
    public double strainPerDeformation() {
        double ratio = widthM / thicknessM;
        return SaintVenant.stiffnessFactor(ratio) / SaintVenant.stressFactor(ratio) * thicknessM / lengthM;
    }

    @Override
    public double stressPerLoad() {
        return 1 / (SaintVenant.stressFactor(widthM / thicknessM) * widthM * thicknessM * thicknessM);
    }
}

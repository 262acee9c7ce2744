package nightlag.stages.geometry;

/**
 * No geometry: the file holds stress and strain.
 *
 * @param deformationMode which modulus they give
 */
public record GivenStressAndStrain(DeformationMode deformationMode) implements Geometry {
    @Override
    public GeometryKind kind() {
        return GeometryKind.NONE;
    }

    @Override
    public double strainPerDeformation() {
        return 1;
    }

    @Override
    public double stressPerLoad() {
        return 1;
    }
}

package nightlag.stages.geometry;

/**
 * A flat cone on a plate, the same strain everywhere (ISO 3219): γ = θ/α, σ = 3M/(2πR³).
 *
 * @param diameterM diameter, m
 * @param coneAngleRad angle α between cone and plate, rad
 */
public record ConePlate(double diameterM, double coneAngleRad) implements Geometry {
    @Override
    public GeometryKind kind() {
        return GeometryKind.CONE_PLATE;
    }

    @Override
    public double strainPerDeformation() {
        return 1 / coneAngleRad;
    }

    @Override
    public double stressPerLoad() {
        double radius = diameterM / 2;
        return 3 / (2 * Math.PI * radius * radius * radius);
    }
}

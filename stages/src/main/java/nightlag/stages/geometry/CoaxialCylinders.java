package nightlag.stages.geometry;

/**
 * A bob in a cup; stress and strain are the means of ISO 3219 over the gap. With δ = outer/inner radius, bob length L and
 * end factor c_L: σ = (1 + δ²)/(2δ²) · M/(2πL R_i² c_L), γ = (1 + δ²)/(δ² − 1) · θ.
 *
 * @param innerDiameterM diameter of the bob, m
 * @param outerDiameterM diameter of the cup, m
 * @param lengthM length of the bob, m
 * @param endFactor c_L, the torque's share from the bob's ends; 1 without end effect
 */
public record CoaxialCylinders(double innerDiameterM, double outerDiameterM, double lengthM, double endFactor)
        implements Geometry {
    @Override
    public GeometryKind kind() {
        return GeometryKind.COAXIAL_CYLINDERS;
    }

    @Override
    public double strainPerDeformation() {
        // (δ − 1)(δ + 1) with δ − 1 taken from the diameters: a narrow gap would lose digits in δ² − 1
        double excess = (outerDiameterM - innerDiameterM) / innerDiameterM;
        double ratio = outerDiameterM / innerDiameterM;
        return (1 + ratio * ratio) / (excess * (1 + ratio));
    }

    @Override
    public double stressPerLoad() {
        double ratio = outerDiameterM / innerDiameterM;
        double innerRadius = innerDiameterM / 2;
        return (1 + ratio * ratio)
                / (2 * ratio * ratio)
                / (2 * Math.PI * lengthM * innerRadius * innerRadius * endFactor);
    }
}

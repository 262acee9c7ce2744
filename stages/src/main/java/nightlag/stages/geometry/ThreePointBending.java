package nightlag.stages.geometry;

import java.util.OptionalDouble;

/**
 * A bar on two supports, loaded in the middle (ISO 6721-5; ASTM D5023; Timoshenko): E = FL³/(4wt³d), ε = 6td/L² at the
 * surface under the load. The stress is E·ε, so that stress over strain is the modulus with the shear deflection taken
 * out where Poisson's ratio is given; ε stays the figure the standards define on the whole deflection.
 *
 * @param lengthM full span between the supports, m
 * @param widthM width, m
 * @param thicknessM thickness in the direction of bending, m
 * @param poisson Poisson's ratio for the shear-deflection correction; empty: none
 */
public record ThreePointBending(double lengthM, double widthM, double thicknessM, OptionalDouble poisson)
        implements Geometry {
    @Override
    public GeometryKind kind() {
        return GeometryKind.THREE_POINT_BENDING;
    }

    @Override
    public double strainPerDeformation() {
        return 6 * thicknessM / (lengthM * lengthM);
    }

    @Override
    public double stressPerLoad() {
        return 1.5
                * lengthM
                / (widthM * thicknessM * thicknessM)
                * ShearDeflection.factor(poisson, thicknessM / lengthM);
    }
}

package nightlag.stages.geometry;

import java.util.OptionalDouble;

/**
 * One or two spans of a bar, both ends of each clamped and guided (ASTM D5418 for two; Timoshenko): E = FL³/(n w t³ d),
 * ε = 3td/L² at the surface beside the clamp. The stress is E·ε, so that stress over strain is the modulus with the shear
 * deflection taken out where Poisson's ratio is given; ε stays the figure the standards define on the whole deflection.
 *
 * @param spans number of spans n, 1 or 2
 * @param lengthM free length of one span, m
 * @param widthM width, m
 * @param thicknessM thickness in the direction of bending, m
 * @param poisson Poisson's ratio for the shear-deflection correction; empty: none
 */
public record ClampedBending(int spans, double lengthM, double widthM, double thicknessM, OptionalDouble poisson)
        implements Geometry {
    @Override
    public GeometryKind kind() {
        return GeometryKind.CLAMPED_BENDING;
    }

    @Override
    public double strainPerDeformation() {
        return 3 * thicknessM / (lengthM * lengthM);
    }

    @Override
    public double stressPerLoad() {
        return 3
                * lengthM
                / (spans * widthM * thicknessM * thicknessM)
                * ShearDeflection.factor(poisson, thicknessM / lengthM);
    }
}

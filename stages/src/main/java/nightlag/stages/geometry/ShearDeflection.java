package nightlag.stages.geometry;

import java.util.OptionalDouble;

/** The share of a beam's deflection that is shear, not bending (Timoshenko; ISO 6721-5). */
final class ShearDeflection {
    private ShearDeflection() {}

    /**
     * Modulus over apparent modulus: 1 + (6/5)(E/G)(t/L)² with E/G = 2(1 + ν), the shear coefficient 6/5 of a rectangle.
     *
     * @param poisson ν; empty: 1, no correction
     * @param slenderness t/L
     */
    static double factor(OptionalDouble poisson, double slenderness) {
        return poisson.isPresent() ? 1 + 2.4 * (1 + poisson.getAsDouble()) * slenderness * slenderness : 1;
    }
}

package nightlag.stages.geometry;

/**
 * Saint-Venant's torsion of a rectangle of sides w ≥ t (Timoshenko &amp; Goodier, Theory of Elasticity, torsion of
 * rectangular bars). The sums run over odd n.
 */
final class SaintVenant {
    /** Σ 1/n⁵ over odd n: (31/32) ζ(5), with ζ(5) = 1.036927755143369926… to the digits a double holds. */
    private static final double ODD_FIFTH_POWERS = 31.0 / 32.0 * 1.03692775514337;

    /** A term this small against the sum changes no digit of it. */
    private static final double NEGLIGIBLE = 1e-17;

    private SaintVenant() {}

    /**
     * β in M/θ = Gβwt³/L: β = ⅓[1 − (192/π⁵)(t/w) Σ tanh(nπw/2t)/n⁵]. With tanh x = 1 − 2/(e^{2x} + 1) the slow part of
     * the sum is known in closed form and what is left falls off like e^{−nπw/t}.
     *
     * @param ratio w/t, 1 or more
     */
    static double stiffnessFactor(double ratio) {
        double rest = 0;
        double term = 1;
        for (int n = 1; term > NEGLIGIBLE * rest; n += 2) {
            term = 2 / (fifthPower(n) * (Math.exp(n * Math.PI * ratio) + 1));
            rest += term;
        }
        return (1 - 192 / fifthPower(Math.PI) / ratio * (ODD_FIFTH_POWERS - rest)) / 3;
    }

    /**
     * k₂ in σ = M/(k₂wt²) at the middle of the wide face: k₂ = β/[1 − (8/π²) Σ 1/(n² cosh(nπw/2t))].
     *
     * @param ratio w/t, 1 or more
     */
    static double stressFactor(double ratio) {
        double sum = 0;
        double term = 1;
        for (int n = 1; term > NEGLIGIBLE * sum; n += 2) {
            term = 1 / ((double) n * n * Math.cosh(n * Math.PI * ratio / 2));
            sum += term;
        }
        return stiffnessFactor(ratio) / (1 - 8 / (Math.PI * Math.PI) * sum);
    }

    private static double fifthPower(double x) {
        return x * x * x * x * x;
    }
}

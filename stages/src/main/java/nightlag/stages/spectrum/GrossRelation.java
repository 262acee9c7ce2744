package nightlag.stages.spectrum;

/**
 * The density of one kind of spectrum from that of the other, exactly (Gross, Mathematical Structure of the Theories of
 * Viscoelasticity, 1953).
 *
 * <p>For Q(s) = c + η s + ∫ D(τ) sτ/(1 + sτ) d ln τ the reciprocal 1/Q has on the negative real axis, at s = −1/τ, the density
 * D̃(τ) = D/(K² + π²D²) with K(τ) = c − η/τ + PV∫ D(u)/(1 − τ/u) d ln u. With Q = s·Ĝ(s) it gives L from H, with c = Ge.
 * As a function of 1/s, s·Ĵ(s) has the same form, with c = J0, η the fluidity 1/η0, and D the density L at inverse times; then
 * it gives H from L, also at inverse times.
 *
 * <p>The principal value at a node is taken over every second node beside it: its pole lies midway between two of them, where
 * the parts the trapezoidal rule leaves out on either side cancel (the same remark as in {@link LogTimes}; what it errs
 * by falls exponentially with the step).
 */
final class GrossRelation {
    private static final double TWO_STEPS = 2 * LogTimes.STEP;
    private static final double PI_SQUARED = Math.PI * Math.PI;

    private final LogTimes times;
    private final double[] density;
    private final double constant;
    private final double viscous;
    private final double[] operator;

    /**
     * One side of the relation.
     *
     * @param times where the density stands
     * @param density D at each, not negative
     * @param constant c
     * @param viscous η
     */
    GrossRelation(LogTimes times, double[] density, double constant, double viscous) {
        this.times = times;
        this.density = density.clone();
        this.constant = constant;
        this.viscous = viscous;
        this.operator = new double[density.length];
        for (int j = 0; j < operator.length; j++) {
            operator[j] = constant - viscous / times.time(j);
            for (int k = firstBeside(j); k < operator.length; k += 2) {
                operator[j] += density[k] * kernel(j, k);
            }
        }
    }

    private static int firstBeside(int node) {
        return (node + 1) % 2;
    }

    private static double kernel(int node, int other) {
        return -TWO_STEPS / Math.expm1((node - other) * LogTimes.STEP);
    }

    /** ln D̃ at each node. */
    double[] logConjugate() {
        double[] result = new double[density.length];
        for (int j = 0; j < result.length; j++) {
            result[j] = Math.log(density[j]) - Math.log(size(j));
        }
        return result;
    }

    /** Its derivatives by ln D at every node, then by ln c and by ln η, whether or not these are zero. */
    double[] byLogs(int node) {
        double[] result = new double[density.length + 2];
        double factor = -2 * operator[node] / size(node);
        for (int k = firstBeside(node); k < density.length; k += 2) {
            result[k] = factor * density[k] * kernel(node, k);
        }
        result[node] = 1 - 2 * PI_SQUARED * density[node] * density[node] / size(node);
        result[density.length] = factor * constant;
        result[density.length + 1] = -factor * viscous / times.time(node);
        return result;
    }

    private double size(int node) {
        return operator[node] * operator[node] + PI_SQUARED * density[node] * density[node];
    }
}

package nightlag.stages.superposition;

import java.util.Random;

/** Covariances of made-up shifts, and draws from them. */
final class Shifts {
    private Shifts() {}

    /** Shifts that know nothing of one another. */
    static double[][] independent(int isotherms, int anchor, double u) {
        double[][] covariance = new double[isotherms][isotherms];
        for (int i = 0; i < isotherms; i++) {
            covariance[i][i] = i == anchor ? 0 : u * u;
        }
        return covariance;
    }

    /**
     * Shifts as neighbours overlap: each step from one isotherm to the next is known to u, and a shift is the sum of the steps
     * from the anchor to it. Shifts on one side of the anchor share the steps near it.
     */
    static double[][] ofSteps(int isotherms, int anchor, double u) {
        double[][] covariance = new double[isotherms][isotherms];
        for (int i = 0; i < isotherms; i++) {
            for (int j = 0; j < isotherms; j++) {
                boolean sameSide = (i > anchor) == (j > anchor);
                int shared = sameSide ? Math.min(Math.abs(i - anchor), Math.abs(j - anchor)) : 0;
                covariance[i][j] = u * u * shared;
            }
        }
        return covariance;
    }

    /** The same as errors: one draw of {@link #ofSteps}. */
    static double[] drawSteps(int isotherms, int anchor, double u, Random random) {
        double[] errors = new double[isotherms];
        for (int i = anchor + 1; i < isotherms; i++) {
            errors[i] = errors[i - 1] + u * random.nextGaussian();
        }
        for (int i = anchor - 1; i >= 0; i--) {
            errors[i] = errors[i + 1] + u * random.nextGaussian();
        }
        return errors;
    }
}

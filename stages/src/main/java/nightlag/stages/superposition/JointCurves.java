package nightlag.stages.superposition;

/**
 * Isotherms on common smooth curves. Arrays have one value an isotherm.
 *
 * @param anchor the one that stays
 * @param horizontal ln a
 * @param vertical ln b
 * @param levels what else was added to ln G, as the specimens of an isotherm differ from all others
 * @param covariance covariance of ln a and, following them, ln b; rows of zeros where one is not fitted
 * @param squares Σ rᵀ W r of all points
 * @param cost the same and the penalty on roughness
 * @param freedom degrees of freedom of the squares
 * @param isotherm which isotherm each point is of
 * @param departures of each point's ln G' and ln G'' from the curves; NaN where the modulus is missing
 */
record JointCurves(
        int anchor,
        double[] horizontal,
        double[] vertical,
        double[] levels,
        double[][] covariance,
        double squares,
        double cost,
        double freedom,
        int[] isotherm,
        double[][] departures) {
    private static final double LN_10 = Math.log(10);

    /** What u² of the shifts is multiplied by: points scatter about common curves by more where these do not hold. */
    double widening() {
        return freedom > 0 ? Math.max(1, squares / freedom) : 1;
    }

    /** Rms distance of all moduli from the curves, decades. */
    double misfitDecades() {
        return misfit(-1);
    }

    /** Rms distance of one isotherm's moduli from the curves, decades. */
    double misfitDecades(int which) {
        return misfit(which);
    }

    private double misfit(int which) {
        double squared = 0;
        int count = 0;
        for (int p = 0; p < departures.length; p++) {
            for (double departure : departures[p]) {
                if ((which < 0 || isotherm[p] == which) && !Double.isNaN(departure)) {
                    squared += departure * departure;
                    count++;
                }
            }
        }
        return Math.sqrt(squared / count) / LN_10;
    }
}

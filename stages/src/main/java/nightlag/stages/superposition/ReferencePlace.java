package nightlag.stages.superposition;

import java.util.Optional;

/**
 * The reference temperature among the isotherms: shifts at it are weighted means of theirs, plus what a law adds.
 *
 * @param weights one an isotherm, their sum is one: a single one where the reference is an isotherm, else those of a straight
 *     line between the two beside it
 * @param lowerK the isotherm itself, or the one below, K
 * @param upperK the isotherm itself, or the one above, K
 */
record ReferencePlace(double[] weights, double lowerK, double upperK) {
    /** As near as this an isotherm is at the reference temperature, K. */
    private static final double TOLERANCE_K = 0.5;

    static boolean isAt(double temperatureK, double referenceK) {
        return Math.abs(temperatureK - referenceK) <= TOLERANCE_K;
    }

    /**
     * Finds the reference.
     *
     * @param temperaturesK temperatures of the isotherms, rising
     * @return empty where the reference is outside
     */
    static Optional<ReferencePlace> of(double[] temperaturesK, double referenceK) {
        double[] weights = new double[temperaturesK.length];
        int nearest = 0;
        int above = 0;
        for (int i = 0; i < temperaturesK.length; i++) {
            if (Math.abs(temperaturesK[i] - referenceK) < Math.abs(temperaturesK[nearest] - referenceK)) {
                nearest = i;
            }
            if (temperaturesK[i] < referenceK) {
                above = i + 1;
            }
        }
        if (isAt(temperaturesK[nearest], referenceK)) {
            weights[nearest] = 1;
            return Optional.of(new ReferencePlace(weights, temperaturesK[nearest], temperaturesK[nearest]));
        }
        if (above == 0 || above == temperaturesK.length) {
            return Optional.empty();
        }
        double lower = temperaturesK[above - 1];
        double upper = temperaturesK[above];
        weights[above] = (referenceK - lower) / (upper - lower);
        weights[above - 1] = 1 - weights[above];
        return Optional.of(new ReferencePlace(weights, lower, upper));
    }

    boolean isIsotherm() {
        return lowerK == upperK;
    }

    /** The weighted mean of values, one an isotherm. */
    double mean(double[] values) {
        double sum = 0;
        for (int i = 0; i < values.length; i++) {
            sum += weights[i] * values[i];
        }
        return sum;
    }

    /**
     * Covariance of values less their weighted mean.
     *
     * @param covariance of several kinds of values, each kind one value an isotherm, one kind after the other
     */
    double[][] ofDifferences(double[][] covariance) {
        return transposed(lessMeanRows(transposed(lessMeanRows(covariance))));
    }

    private double[][] lessMeanRows(double[][] rows) {
        double[][] less = new double[rows.length][];
        for (int i = 0; i < rows.length; i++) {
            less[i] = rows[i].clone();
            int first = i - i % weights.length;
            for (int k = 0; k < weights.length; k++) {
                for (int j = 0; weights[k] != 0 && j < rows.length; j++) {
                    less[i][j] -= weights[k] * rows[first + k][j];
                }
            }
        }
        return less;
    }

    private static double[][] transposed(double[][] square) {
        double[][] transposed = new double[square.length][square.length];
        for (int i = 0; i < square.length; i++) {
            for (int j = 0; j < square.length; j++) {
                transposed[j][i] = square[i][j];
            }
        }
        return transposed;
    }
}

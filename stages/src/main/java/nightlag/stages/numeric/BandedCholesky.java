package nightlag.stages.numeric;

import java.util.Optional;

/** A symmetric positive definite matrix that is zero beyond a few diagonals, factored: M = L Lᵀ. */
public final class BandedCholesky {
    private final double[][] lower;

    private BandedCholesky(double[][] lower) {
        this.lower = lower;
    }

    /**
     * Factors a matrix.
     *
     * @param band n rows, each of w + 1 values: {@code band[i][k]} is M(i, i − k); those with k &gt; i are not read
     * @return empty if the matrix is not positive definite
     */
    public static Optional<BandedCholesky> of(double[][] band) {
        int n = band.length;
        double[][] lower = new double[n][];
        for (int i = 0; i < n; i++) {
            double[] row = band[i].clone();
            lower[i] = row;
            for (int k = Math.min(row.length - 1, i); k >= 0; k--) {
                int j = i - k;
                double[] other = lower[j];
                double sum = row[k];
                int last = Math.min(row.length - 1 - k, j);
                for (int m = 1; m <= last; m++) {
                    sum -= row[k + m] * other[m];
                }
                if (k > 0) {
                    row[k] = sum / other[0];
                } else if (sum > 0 && sum < Double.POSITIVE_INFINITY) {
                    row[0] = Math.sqrt(sum);
                } else {
                    return Optional.empty();
                }
            }
        }
        return Optional.of(new BandedCholesky(lower));
    }

    /** The solution x of M x = b. */
    public double[] solve(double[] b) {
        int n = lower.length;
        if (b.length != n) {
            throw new IllegalArgumentException(b.length + " values for a matrix of size " + n);
        }
        double[] x = b.clone();
        for (int i = 0; i < n; i++) {
            double[] row = lower[i];
            double sum = x[i];
            for (int k = Math.min(row.length - 1, i); k > 0; k--) {
                sum -= row[k] * x[i - k];
            }
            x[i] = sum / row[0];
        }
        for (int i = n - 1; i >= 0; i--) {
            double[] row = lower[i];
            double value = x[i] / row[0];
            x[i] = value;
            for (int k = Math.min(row.length - 1, i); k > 0; k--) {
                x[i - k] -= row[k] * value;
            }
        }
        return x;
    }

    /** ln det M. */
    public double logDeterminant() {
        double sum = 0;
        for (double[] row : lower) {
            sum += 2 * Math.log(row[0]);
        }
        return sum;
    }
}

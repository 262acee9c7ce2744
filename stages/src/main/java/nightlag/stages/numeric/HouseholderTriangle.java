package nightlag.stages.numeric;

/**
 * The upper triangle R of A = QR and, where a right-hand side came along as the last column, Qᵀb with it (Householder
 * reflections; Golub &amp; Van Loan, Matrix Computations, section 5.2).
 */
final class HouseholderTriangle {
    private HouseholderTriangle() {}

    /**
     * Reduces a matrix given by its columns, in place: afterwards {@code columns[j][i]} is R_ij for i ≤ j and of no meaning
     * below the diagonal.
     */
    static void reduce(double[][] columns) {
        int count = columns.length;
        int rows = count == 0 ? 0 : columns[0].length;
        for (int k = 0; k < Math.min(rows, count); k++) {
            double[] pivot = columns[k];
            double norm = norm(pivot, k);
            if (norm == 0) {
                continue;
            }
            double alpha = pivot[k] > 0 ? -norm : norm;
            pivot[k] -= alpha;
            double beta = -alpha * pivot[k];
            for (int j = k + 1; j < count; j++) {
                double[] column = columns[j];
                double dot = 0;
                for (int i = k; i < rows; i++) {
                    dot += pivot[i] * column[i];
                }
                double factor = dot / beta;
                for (int i = k; i < rows; i++) {
                    column[i] -= factor * pivot[i];
                }
            }
            pivot[k] = alpha;
        }
    }

    /** The solution of R x = c, R the first n of the reduced columns, c the column given. */
    static double[] solve(double[][] columns, int n, double[] c) {
        double[] x = new double[n];
        for (int i = n - 1; i >= 0; i--) {
            double sum = c[i];
            for (int j = i + 1; j < n; j++) {
                sum -= columns[j][i] * x[j];
            }
            x[i] = sum / columns[i][i];
        }
        return x;
    }

    /** The solution of Rᵀ y = v. */
    static double[] solveTransposed(double[][] columns, int n, double[] v) {
        double[] y = new double[n];
        for (int i = 0; i < n; i++) {
            double sum = v[i];
            for (int j = 0; j < i; j++) {
                sum -= columns[i][j] * y[j];
            }
            y[i] = sum / columns[i][i];
        }
        return y;
    }

    /** The length of a vector from an entry on. */
    static double norm(double[] vector, int from) {
        double largest = 0;
        for (int i = from; i < vector.length; i++) {
            largest = Math.max(largest, Math.abs(vector[i]));
        }
        if (largest == 0 || !Double.isFinite(largest)) {
            return largest;
        }
        double sum = 0;
        for (int i = from; i < vector.length; i++) {
            double scaled = vector[i] / largest;
            sum += scaled * scaled;
        }
        return largest * Math.sqrt(sum);
    }
}

package nightlag.stages.numeric;

import java.util.Optional;

/**
 * A symmetric positive definite matrix of normal equations, factored: S M S = L Lᵀ with S = diag(1/√M_jj), so that columns
 * of very different size do no harm.
 */
public final class Cholesky {
    /** Pivots of the scaled matrix below this are rounding, not information. */
    private static final double SMALLEST_PIVOT = 1e-13;

    private final double[][] lower;
    private final double[] scale;

    private Cholesky(double[][] lower, double[] scale) {
        this.lower = lower;
        this.scale = scale;
    }

    /**
     * Factors a matrix.
     *
     * @param matrix n × n; only the lower triangle is read
     * @return empty if the matrix is not positive definite to working accuracy
     */
    public static Optional<Cholesky> of(double[][] matrix) {
        int n = matrix.length;
        double[] scale = new double[n];
        for (int j = 0; j < n; j++) {
            if (!(matrix[j][j] > 0 && matrix[j][j] < Double.POSITIVE_INFINITY)) {
                return Optional.empty();
            }
            scale[j] = 1 / Math.sqrt(matrix[j][j]);
        }
        double[][] lower = new double[n][];
        for (int i = 0; i < n; i++) {
            double[] row = new double[i + 1];
            lower[i] = row;
            for (int j = 0; j <= i; j++) {
                double[] other = lower[j];
                double sum = matrix[i][j] * scale[i] * scale[j];
                for (int k = 0; k < j; k++) {
                    sum -= row[k] * other[k];
                }
                if (j < i) {
                    row[j] = sum / other[j];
                } else if (sum > SMALLEST_PIVOT) {
                    row[i] = Math.sqrt(sum);
                } else {
                    return Optional.empty();
                }
            }
        }
        return Optional.of(new Cholesky(lower, scale));
    }

    /**
     * Factors AᵀA by reflections of A, without forming it: to twice the digits {@link #of} has.
     *
     * @param columns n columns of A, which hang on each other nowhere, of at least n numbers each
     */
    public static Cholesky ofGram(double[][] columns) {
        int n = columns.length;
        double[][] triangle = new double[n][];
        for (int j = 0; j < n; j++) {
            triangle[j] = columns[j].clone();
        }
        HouseholderTriangle.reduce(triangle);
        double[][] lower = new double[n][];
        double[] scale = new double[n];
        for (int i = 0; i < n; i++) {
            scale[i] = 1;
            lower[i] = new double[i + 1];
            for (int j = 0; j <= i; j++) {
                lower[i][j] = Math.copySign(1, triangle[j][j]) * triangle[i][j];
            }
        }
        return new Cholesky(lower, scale);
    }

    /** The size n. */
    public int size() {
        return scale.length;
    }

    /** ln det M. */
    public double logDeterminant() {
        double sum = 0;
        for (int i = 0; i < scale.length; i++) {
            sum += 2 * Math.log(lower[i][i] / scale[i]);
        }
        return sum;
    }

    /** The solution x of M x = b. */
    public double[] solve(double[] b) {
        double[] x = whiten(b);
        for (int i = x.length - 1; i >= 0; i--) {
            double value = x[i] / lower[i][i];
            x[i] = value;
            for (int k = 0; k < i; k++) {
                x[k] -= lower[i][k] * value;
            }
        }
        for (int i = 0; i < x.length; i++) {
            x[i] *= scale[i];
        }
        return x;
    }

    /** L⁻¹ S b, whose squared length is bᵀ M⁻¹ b. */
    public double[] whiten(double[] b) {
        if (b.length != scale.length) {
            throw new IllegalArgumentException(b.length + " values for a matrix of size " + scale.length);
        }
        double[] x = new double[b.length];
        for (int i = 0; i < x.length; i++) {
            double sum = b[i] * scale[i];
            double[] row = lower[i];
            for (int k = 0; k < i; k++) {
                sum -= row[k] * x[k];
            }
            x[i] = sum / row[i];
        }
        return x;
    }

    /** bᵀ M⁻¹ b. */
    public double inverseForm(double[] b) {
        double sum = 0;
        for (double value : whiten(b)) {
            sum += value * value;
        }
        return sum;
    }

    /** The columns of the upper triangle R with RᵀR = M, each of n values. */
    public double[][] columns() {
        int n = scale.length;
        double[][] columns = new double[n][n];
        for (int j = 0; j < n; j++) {
            for (int i = 0; i <= j; i++) {
                columns[j][i] = lower[j][i] / scale[j];
            }
        }
        return columns;
    }

    /** M⁻¹. */
    public double[][] inverse() {
        int n = scale.length;
        double[][] inverse = new double[n][];
        for (int j = 0; j < n; j++) {
            double[] unit = new double[n];
            unit[j] = 1;
            inverse[j] = solve(unit);
        }
        return inverse;
    }
}

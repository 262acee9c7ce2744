package nightlag.stages.numeric;

import java.util.ArrayList;
import java.util.List;

/**
 * A covariance as a sum over few directions, C ≈ Σ d dᵀ: Cholesky's factorisation with the largest variance that is left as the
 * next pivot, ended where what is left no longer counts.
 */
public final class PivotedCholesky {
    private PivotedCholesky() {}

    /**
     * The directions, the widest first.
     *
     * @param covariance symmetric, not negative definite, n × n; only rounding may make it indefinite
     * @param leastVariance no variance that the directions leave out is above this
     */
    public static List<double[]> directions(double[][] covariance, double leastVariance) {
        int n = covariance.length;
        double[] left = new double[n];
        for (int i = 0; i < n; i++) {
            left[i] = covariance[i][i];
        }
        List<double[]> directions = new ArrayList<>();
        while (directions.size() < n) {
            int pivot = 0;
            for (int i = 1; i < n; i++) {
                pivot = left[i] > left[pivot] ? i : pivot;
            }
            if (!(left[pivot] > leastVariance)) {
                break;
            }
            double[] direction = new double[n];
            double width = Math.sqrt(left[pivot]);
            for (int i = 0; i < n; i++) {
                double value = covariance[i][pivot];
                for (double[] other : directions) {
                    value -= other[i] * other[pivot];
                }
                direction[i] = value / width;
                left[i] -= direction[i] * direction[i];
            }
            left[pivot] = 0;
            directions.add(direction);
        }
        return directions;
    }
}

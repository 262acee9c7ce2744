package nightlag.stages.sweep;

import java.util.function.DoubleFunction;
import nightlag.stages.numeric.Complex;

/** The storage onset of a material by the rule of two tangents, its integrals and derivatives by brute force. */
final class DenseOnset {
    private static final double STEP_K = 0.01;

    private DenseOnset() {}

    static double of(DoubleFunction<Complex> material, SweepPlan.OnsetAxis axis, double firstK, double lastK) {
        boolean log = axis == SweepPlan.OnsetAxis.LOG;
        int n = (int) Math.round((lastK - firstK) / STEP_K) + 1;
        double[] y = new double[n];
        for (int i = 0; i < n; i++) {
            double storage = material.apply(firstK + i * STEP_K).re();
            y[i] = log ? Math.log(storage) : storage;
        }
        int steepest = 1;
        for (int i = 1; i < n - 1; i++) {
            if (y[i + 1] - y[i - 1] < y[steepest + 1] - y[steepest - 1]) {
                steepest = i;
            }
        }
        double at = firstK + steepest * STEP_K;
        double slope = (y[steepest + 1] - y[steepest - 1]) / (2 * STEP_K);
        double width = 5;
        for (int repeat = 0; repeat < 200; repeat++) {
            double from = at - 11 * width;
            double to = at - 3 * width;
            // relative errors are alike, so on the linear axis each value counts by 1/y²
            double[] sums = new double[5];
            for (int i = 0; i < n; i++) {
                double t = firstK + i * STEP_K;
                if (t >= from && t <= to) {
                    double weight = log ? 1 : 1 / (y[i] * y[i]);
                    double x = t - at;
                    sums[0] += weight;
                    sums[1] += weight * x;
                    sums[2] += weight * x * x;
                    sums[3] += weight * y[i];
                    sums[4] += weight * x * y[i];
                }
            }
            double lineSlope = (sums[0] * sums[4] - sums[1] * sums[3]) / (sums[0] * sums[2] - sums[1] * sums[1]);
            double lineValue = (sums[3] - lineSlope * sums[1]) / sums[0];
            width = (y[steepest] - lineValue) / (slope - lineSlope);
        }
        return at - width;
    }
}

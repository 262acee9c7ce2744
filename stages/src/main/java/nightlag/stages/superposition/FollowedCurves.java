package nightlag.stages.superposition;

import java.util.List;

/**
 * Smooth curves that follow parameters which move some of the points: the normal equations of the parameters alone, the curves'
 * coefficients being at their best for each of their values (Golub &amp; Pereyra 1973). A parameter touches few points, so all
 * is done on these and on the coefficients.
 *
 * @param information JᵀJ with J the derivatives of all residuals and penalties by the parameters
 * @param gradient Jᵀr
 * @param follow how the coefficients follow each parameter, with the sign turned
 */
record FollowedCurves(double[][] information, double[] gradient, double[][] follow) {
    /**
     * What a parameter does while the curves stay.
     *
     * @param from the first point it moves
     * @param values derivatives of the whitened differences of this and the next points, two a point
     */
    record Push(int from, double[] values) {}

    /**
     * Forms them.
     *
     * @param pair the curves
     * @param pushes one a parameter
     * @param differences the curves less the points at the best coefficients, whitened, two a point
     */
    static FollowedCurves of(SmoothPair pair, List<Push> pushes, double[] differences) {
        int n = pushes.size();
        double[][] information = new double[n][n];
        double[] gradient = new double[n];
        double[][] follow = new double[n][];
        for (int i = 0; i < n; i++) {
            Push push = pushes.get(i);
            double[] right = pair.transposed(push.from(), push.values());
            follow[i] = pair.solve(right);
            int first = first(right);
            int last = last(right);
            for (int j = 0; j <= i; j++) {
                double sum = common(push, pushes.get(j));
                double[] other = follow[j];
                for (int k = first; k < last; k++) {
                    sum -= right[k] * other[k];
                }
                information[i][j] = sum;
                information[j][i] = sum;
            }
            for (int k = 0; k < push.values().length; k++) {
                gradient[i] += push.values()[k] * differences[2 * push.from() + k];
            }
        }
        return new FollowedCurves(information, gradient, follow);
    }

    private static int first(double[] values) {
        int first = 0;
        while (first < values.length && values[first] == 0) {
            first++;
        }
        return first;
    }

    private static int last(double[] values) {
        int last = values.length;
        while (last > 0 && values[last - 1] == 0) {
            last--;
        }
        return last;
    }

    private static double common(Push one, Push other) {
        int from = 2 * Math.max(one.from(), other.from());
        int to = Math.min(2 * one.from() + one.values().length, 2 * other.from() + other.values().length);
        double sum = 0;
        for (int k = from; k < to; k++) {
            sum += one.values()[k - 2 * one.from()] * other.values()[k - 2 * other.from()];
        }
        return sum;
    }
}

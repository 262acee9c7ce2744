package nightlag.stages.numeric;

import java.util.Arrays;

/**
 * Nonlinear least squares within bounds: Levenberg's and Marquardt's damping (Marquardt, SIAM J. Appl. Math. 11 (1963) 431)
 * with the gain-controlled damping of Nielsen (1999), steps solved by orthogonal reflections, parameters at a bound held
 * there while the residual pushes outwards.
 */
public final class LevenbergMarquardt {
    private static final double FIRST_DAMPING = 1e-3;

    private LevenbergMarquardt() {}

    /** What is fitted. */
    public interface Problem {
        /** The residuals at a place, each over its own uncertainty. */
        double[] residuals(double[] parameters);

        /** The derivatives of the residuals at a place, one array a parameter. */
        double[][] jacobian(double[] parameters);
    }

    /**
     * Where the search ended.
     *
     * @param parameters the place
     * @param chiSquared the sum of squared residuals there
     */
    public record Fit(double[] parameters, double chiSquared) {}

    /**
     * Searches downhill from a start; never ends higher than it began.
     *
     * @param problem what is fitted
     * @param start where to begin, finite, within the bounds
     * @param lower lower bounds
     * @param upper upper bounds
     * @param enough the search ends when a step, or the best it can hope for, takes less than this share off χ²
     * @param maxSteps the most steps taken
     */
    public static Fit minimise(
            Problem problem, double[] start, double[] lower, double[] upper, double enough, int maxSteps) {
        double[] place = start.clone();
        double[] residuals = problem.residuals(place);
        double cost = square(residuals);
        if (!Double.isFinite(cost)) {
            throw new IllegalArgumentException("the residuals are not finite at the start");
        }
        double damping = FIRST_DAMPING;
        double growth = 2;
        Step linear = new Step(problem.jacobian(place), residuals, place, lower, upper);
        for (int step = 0; step < maxSteps && cost > 0; step++) {
            double[] move = linear.solve(damping);
            double[] next = new double[place.length];
            for (int i = 0; i < next.length; i++) {
                next[i] = Math.min(upper[i], Math.max(lower[i], place[i] + move[i]));
            }
            if (Arrays.equals(next, place)) {
                break;
            }
            double[] nextResiduals = problem.residuals(next);
            double nextCost = square(nextResiduals);
            double expected = linear.expectedGain(move);
            if (nextCost < cost) {
                double progress = (cost - nextCost) / cost;
                double gain = expected > 0 ? (cost - nextCost) / expected : 1;
                damping *= Math.max(1.0 / 3, 1 - Math.pow(2 * gain - 1, 3));
                growth = 2;
                place = next;
                residuals = nextResiduals;
                cost = nextCost;
                if (progress < enough) {
                    break;
                }
                linear = new Step(problem.jacobian(place), residuals, place, lower, upper);
            } else {
                if (!(expected > enough * cost)) {
                    break;
                }
                damping *= growth;
                growth *= 2;
            }
        }
        return new Fit(place, cost);
    }

    private static double square(double[] vector) {
        double sum = 0;
        for (double v : vector) {
            sum += v * v;
        }
        return sum;
    }

    /** The linearised problem at one place, ready to be solved for any damping. */
    private static final class Step {
        private final double[][] triangle;
        private final double[] scales;
        private final boolean[] held;

        Step(double[][] jacobian, double[] residuals, double[] place, double[] lower, double[] upper) {
            int n = place.length;
            held = new boolean[n];
            scales = new double[n];
            double[][] work = new double[n + 1][];
            for (int j = 0; j < n; j++) {
                double gradient = 0;
                for (int i = 0; i < residuals.length; i++) {
                    gradient += jacobian[j][i] * residuals[i];
                }
                held[j] = (place[j] <= lower[j] && gradient > 0) || (place[j] >= upper[j] && gradient < 0);
                scales[j] = HouseholderTriangle.norm(jacobian[j], 0);
                held[j] |= !(scales[j] > 0);
                double scale = held[j] ? 0 : 1 / scales[j];
                work[j] = Arrays.stream(jacobian[j]).map(v -> v * scale).toArray();
            }
            work[n] = Arrays.stream(residuals).map(v -> -v).toArray();
            HouseholderTriangle.reduce(work);
            triangle = new double[n + 1][];
            for (int j = 0; j <= n; j++) {
                triangle[j] = new double[n];
                System.arraycopy(work[j], 0, triangle[j], 0, Math.min(work[j].length, Math.min(j + 1, n)));
            }
        }

        double[] solve(double damping) {
            int n = scales.length;
            double root = Math.sqrt(damping);
            double[][] work = new double[n + 1][];
            for (int j = 0; j <= n; j++) {
                work[j] = Arrays.copyOf(triangle[j], 2 * n);
                if (j < n) {
                    work[j][n + j] = held[j] ? 1 : root;
                }
            }
            HouseholderTriangle.reduce(work);
            double[] move = HouseholderTriangle.solve(work, n, work[n]);
            for (int j = 0; j < n; j++) {
                move[j] = held[j] ? 0 : move[j] / scales[j];
            }
            return move;
        }

        /** The fall of the sum of squares if the problem were linear, |r|² − |r + Jδ|². */
        double expectedGain(double[] move) {
            int n = scales.length;
            double before = 0;
            double after = 0;
            for (int i = 0; i < n; i++) {
                double row = triangle[n][i];
                before += row * row;
                for (int j = i; j < n; j++) {
                    row -= triangle[j][i] * move[j] * scales[j];
                }
                after += row * row;
            }
            return before - after;
        }
    }
}

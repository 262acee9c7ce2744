package nightlag.stages.spectrum;

import java.util.Arrays;
import nightlag.stages.numeric.Cholesky;

/**
 * The likeliest spectrum under one {@link SmoothPrior}, found in the prior's standard numbers by Gauss's and Newton's method
 * with steps cut where they go too far, and how likely the data are under that prior (Laplace's approximation of the
 * marginal likelihood; MacKay, Neural Computation 4 (1992) 415).
 *
 * <p>Beside the spectrum a few positive figures (an equilibrium modulus, a viscosity) are fitted by their logarithms, each with
 * a normal prior of its own.
 */
final class LogFit {
    /** u of the logarithm of a figure beside the spectrum. */
    private static final double FIGURE_U = 5;

    /** A step may move no logarithm further than this. */
    private static final double LONGEST_MOVE = 3;

    private static final double SHORTEST_CUT = 1e-4;

    /** The search ends when a step promises less than this to the logarithm of the posterior. */
    private static final double ENOUGH = 1e-3;

    private static final int MAX_STEPS = 60;

    private final InverseProblem problem;
    private final SmoothPrior prior;
    private final double[] standard;
    private double[] logs;
    private double[] residuals;
    private double cost;
    private double[][] jacobian;
    private Cholesky information;

    private LogFit(InverseProblem problem, SmoothPrior prior, double[] start) {
        this.problem = problem;
        this.prior = prior;
        this.standard = start.clone();
        place();
    }

    /**
     * Fits from a start.
     *
     * @param start standard numbers of the prior, then those of the figures
     */
    static LogFit from(InverseProblem problem, SmoothPrior prior, double[] start) {
        LogFit fit = new LogFit(problem, prior, start);
        fit.search();
        return fit;
    }

    private void place() {
        logs = logsOf(standard);
        residuals = problem.residuals(logs);
        cost = (square(residuals) + square(standard)) / 2;
    }

    private double[] logsOf(double[] numbers) {
        double[] result = linear(numbers);
        double[] expected = problem.expectedLogs();
        for (int i = 0; i < result.length; i++) {
            result[i] += expected[i];
        }
        return result;
    }

    /** The logarithms, less what they are expected at. */
    private double[] linear(double[] numbers) {
        double[] result = Arrays.copyOf(prior.curve(numbers), numbers.length);
        for (int i = problem.nodes(); i < numbers.length; i++) {
            result[i] = FIGURE_U * numbers[i];
        }
        return result;
    }

    private void search() {
        linearise();
        for (int step = 0; step < MAX_STEPS; step++) {
            double[] gradient = gradient();
            double[] move = information.solve(gradient);
            double promise = dot(gradient, move) / 2;
            if (promise < ENOUGH || !walk(move)) {
                return;
            }
            linearise();
        }
    }

    /** Moves along a direction as far as it leads downhill. */
    private boolean walk(double[] move) {
        double furthest = Arrays.stream(linear(move)).map(Math::abs).max().orElse(0);
        double[] from = standard.clone();
        double before = cost;
        for (double cut = Math.min(1, LONGEST_MOVE / furthest); cut > SHORTEST_CUT; cut /= 2) {
            for (int i = 0; i < standard.length; i++) {
                standard[i] = from[i] + cut * move[i];
            }
            place();
            if (cost < before) {
                return true;
            }
        }
        System.arraycopy(from, 0, standard, 0, from.length);
        place();
        return false;
    }

    private void linearise() {
        double[][] byLogs = problem.byLogs(logs);
        double[][] ofNodes = prior.byStandard(Arrays.copyOf(byLogs, problem.nodes()));
        jacobian = Arrays.copyOf(ofNodes, byLogs.length);
        for (int j = problem.nodes(); j < byLogs.length; j++) {
            jacobian[j] = Arrays.stream(byLogs[j]).map(v -> FIGURE_U * v).toArray();
        }
        double[][] normal = new double[jacobian.length][];
        for (int i = 0; i < normal.length; i++) {
            normal[i] = new double[i + 1];
            for (int j = 0; j <= i; j++) {
                normal[i][j] = dot(jacobian[i], jacobian[j]);
            }
            normal[i][i] += 1;
        }
        information = Cholesky.of(normal).orElseGet(this::byReflections);
    }

    /** Where the data are too sure for the squares of their derivatives to stand beside the prior's 1. */
    private Cholesky byReflections() {
        double[][] stacked = new double[jacobian.length][];
        int rows = residuals.length;
        for (int j = 0; j < stacked.length; j++) {
            stacked[j] = Arrays.copyOf(jacobian[j], rows + stacked.length);
            stacked[j][rows + j] = 1;
        }
        return Cholesky.ofGram(stacked);
    }

    /** Downhill: −d cost/dz. */
    private double[] gradient() {
        double[] result = new double[standard.length];
        for (int j = 0; j < result.length; j++) {
            result[j] = dot(jacobian[j], residuals) - standard[j];
        }
        return result;
    }

    /** The standard numbers, for a prior whose bends are stiffer by a factor in ln α. */
    double[] startFor(double gainOfLogStiffness) {
        double[] result = standard.clone();
        double factor = Math.exp(gainOfLogStiffness / 2);
        for (int i = 2; i < problem.nodes(); i++) {
            result[i] *= factor;
        }
        return result;
    }

    /** ln of the marginal likelihood, up to a constant that all priors share. */
    double logEvidence() {
        return -cost - information.logDeterminant() / 2;
    }

    /** Logarithms of the nodes, then of the figures. */
    double[] logs() {
        return logs.clone();
    }

    double chiSquared() {
        return square(residuals);
    }

    /** Their covariance. */
    double[][] covariance() {
        double[][] inverse = information.inverse();
        double[][] half = new double[inverse.length][];
        for (int i = 0; i < half.length; i++) {
            half[i] = linear(inverse[i]);
        }
        double[][] result = new double[half.length][];
        double[] column = new double[half.length];
        for (int j = 0; j < half.length; j++) {
            for (int i = 0; i < half.length; i++) {
                column[i] = half[i][j];
            }
            result[j] = linear(column);
        }
        return result;
    }

    private static double square(double[] values) {
        return dot(values, values);
    }

    private static double dot(double[] a, double[] b) {
        double sum = 0;
        for (int i = 0; i < a.length; i++) {
            sum += a[i] * b[i];
        }
        return sum;
    }
}

package nightlag.stages.numeric;

import java.util.Arrays;
import java.util.Optional;

/**
 * A smooth curve through scattered values, with the uncertainty of its value and its derivatives anywhere.
 *
 * <p>The curve is a smoothing spline, taken as what it is in the sense of Wahba (J. R. Stat. Soc. B 40 (1978) 364): a
 * polynomial of degree m − 1 plus an m-fold integrated Wiener process of unknown strength, observed with noise. Values that
 * the polynomial can follow leave the process out; values known better than that let it in. The strength is that of the
 * greatest restricted likelihood (Harville, J. Am. Stat. Assoc. 72 (1977) 320). Where the values scatter by more than their
 * uncertainties say, all of these are widened alike; variances far below the scatter thus leave the scatter to decide. How far
 * the given variances are trusted is the caller's choice: {@link #through}, {@link #throughKnown}, {@link #throughBelieved}.
 */
public final class SmoothCurve {
    /** Variance the weakest process tried makes over the whole range, over that of the mean of all values. */
    private static final double WEAKEST = 0.1;
    /** Variance the strongest makes over a mean interval, over the square of the range of the values. */
    private static final double STRONGEST = 100;

    /** A smaller widening of u² may be the curve's own turns. */
    private static final double BELIEVED = 4;

    private static final int FEWEST_FOR_PARABOLA = 5;
    private static final double COARSE_STEP = 100;
    private static final double FINE_STEP = Math.sqrt(10);
    private static final int FINE_STEPS = 4;
    private static final double ROUGHER_STEP = Math.sqrt(FINE_STEP);
    private static final double PROCESS_SHARE = 0.25;
    /** Strengths whose deviances, minus twice the log-likelihood, differ by no more are about equally likely. */
    private static final double EQUALLY_LIKELY = 1;

    private static final int ROUGHER_STEPS = 16;

    private final WienerProcess process;
    private final double[] x;
    private final double[][] polynomial;
    private final double[][] unitCovariance;
    private final double[] variance;
    private final boolean known;
    private final Choice choice;

    private final Fit fit;

    /**
     * Which strength of the process is taken.
     *
     * @param least none is weaker
     * @param roughest the strongest that is about as likely as the likeliest, and not that one
     */
    private record Choice(double least, boolean roughest) {
        static final Choice LIKELIEST = new Choice(0, false);
    }

    private SmoothCurve(
            double[] x, double[][] y, double[] variance, boolean known, Choice choice, WienerProcess process) {
        this.known = known;
        this.choice = choice;
        this.x = x.clone();
        this.variance = variance.clone();
        this.process = process;
        int n = x.length;
        int order = process.order();
        polynomial = new double[order][n];
        unitCovariance = new double[n][n];
        for (int i = 0; i < n; i++) {
            double[] powers = process.powers(x[i], 0);
            for (int p = 0; p < order; p++) {
                polynomial[p][i] = powers[p];
            }
            for (int j = 0; j <= i; j++) {
                unitCovariance[i][j] = process.covariance(x[i], x[j], 0, 0);
            }
        }
        fit = mostLikely(y);
    }

    /**
     * A figure of a curve.
     *
     * @param value the figure
     * @param u its standard uncertainty
     */
    public record Estimate(double value, double u) {}

    /**
     * What is known of a curve at one place.
     *
     * @param derivatives the value and its derivatives, from the 0th on
     * @param noise their covariance from the noise alone, the strength of the process taken as given
     * @param full their covariance with what the curve may do between and against the values
     */
    public record Local(double[] derivatives, double[][] noise, double[][] full) {
        /**
         * Covariance for a figure at one place, such as that of a maximum or a zero: the noise's and a quarter of what the full one
         * adds to it. The full one holds on average over all that the process may do. A single peak or step bends less wildly,
         * and intervals from the full covariance hold its place too often.
         */
        public double peakCovariance(int i, int j) {
            return noise[i][j] + PROCESS_SHARE * (full[i][j] - noise[i][j]);
        }
    }

    /**
     * The curve through values.
     *
     * @param x where they were observed, strictly rising; also the range in which the curve may be asked for
     * @param y the values
     * @param variance u² of each, above zero
     * @param order how often the process is integrated, m; there must be more values than that
     */
    public static SmoothCurve through(double[] x, double[] y, double[] variance, int order) {
        return through(x, new double[][] {y}, variance, order, x[0], x[x.length - 1]);
    }

    /**
     * The same where the variances are sure and stay as they are: few values scatter too little or too much by chance, and
     * widening them for it makes their uncertainty too large on average.
     */
    public static SmoothCurve throughKnown(double[] x, double[] y, double[] variance, int order) {
        checkCount(x, order);
        return new SmoothCurve(
                x,
                new double[][] {y},
                variance,
                true,
                Choice.LIKELIEST,
                new WienerProcess(order, x[0], x[x.length - 1] - x[0]));
    }

    /**
     * The same where uncertainties that would be too small by less than a factor of two are believed, for values may turn
     * faster than a smooth curve likes. The order is the {@linkplain #order usual} one. Where nothing is known beforehand of the
     * process, the strongest is taken that is about as likely as the likeliest one: few values say little of its strength,
     * and too weak a one smooths away more than u says, while too strong a one only makes u larger.
     *
     * @param least how strong the process is at the least, in squares of the values over the fifth power of the places: what
     *     the curve may do for all one knows beforehand; 0 where nothing is known
     */
    public static SmoothCurve throughBelieved(double[] x, double[] y, double[] variance, double least) {
        int order = order(x.length);
        checkCount(x, order);
        double[][] values = {y};
        WienerProcess process = new WienerProcess(order, x[0], x[x.length - 1] - x[0]);
        SmoothCurve free = new SmoothCurve(x, values, variance, false, new Choice(least, false), process);
        return free.widening() < BELIEVED
                ? new SmoothCurve(x, values, variance, true, new Choice(least, least == 0), process)
                : free;
    }

    /** The same where the uncertainties are believed in any case: what scatters by more is taken for what the curve does. */
    public static SmoothCurve throughTrusted(double[] x, double[] y, double[] variance, double least) {
        int order = order(x.length);
        checkCount(x, order);
        return new SmoothCurve(
                x,
                new double[][] {y},
                variance,
                true,
                new Choice(least, least == 0),
                new WienerProcess(order, x[0], x[x.length - 1] - x[0]));
    }

    /** The usual order: 3, a spline of fifth degree; of three or four values, which tell too little, 2, the cubic spline. */
    static int order(int values) {
        return values < FEWEST_FOR_PARABOLA ? 2 : 3;
    }

    private static void checkCount(double[] x, int order) {
        if (x.length <= order) {
            throw new IllegalArgumentException(x.length + " values for a process of order " + order);
        }
    }

    /** The same for curves that are equally smooth and known equally well, one array each, within a wider range. */
    static SmoothCurve through(double[] x, double[][] y, double[] variance, int order, double from, double to) {
        checkCount(x, order);
        return new SmoothCurve(x, y, variance, false, Choice.LIKELIEST, new WienerProcess(order, from, to - from));
    }

    /** The i-th derivative of a curve at a place, i below the order. */
    double derivative(int curve, double place, int i) {
        return dot(covariances(place, i), fit.residuals[curve])
                + dot(process.powers(place, i), fit.coefficients[curve]);
    }

    /** The i-th derivative of the only curve at a place; the 0th is the value. */
    public double derivative(double place, int i) {
        return derivative(0, place, i);
    }

    /**
     * The i-th derivative of the only curve at a place. Its u² is the noise's and a quarter of what the curve may do besides,
     * as {@link Local#peakCovariance} has it, and no less than all the curve may do: between values that stand far apart, or
     * have hardly any noise, this is what the error is made of.
     */
    public Estimate estimate(double place, int i) {
        Estimator estimator = new Estimator(place, i);
        double noise = estimator.noiseCovariance(estimator);
        double besides = Math.max(estimator.fullCovariance(estimator) - noise, 0);
        return new Estimate(derivative(place, i), Math.sqrt(Math.max(noise + PROCESS_SHARE * besides, besides)));
    }

    /** By how much u² of the values is larger than was given, their scatter being so. */
    public double widening() {
        return fit.widening;
    }

    /** How much the i-th derivative at a place moves with each value. */
    public double[] weights(double place, int i) {
        return new Estimator(place, i).weights;
    }

    /** u² of the i-th derivative at a place, what the curve may do between the values included. */
    public double fullVariance(double place, int i) {
        Estimator estimator = new Estimator(place, i);
        return Math.max(estimator.fullCovariance(estimator), 0);
    }

    /** What is known of the only curve's value and first derivatives at a place. */
    public Local at(double place, int highest) {
        int count = highest + 1;
        double[] derivatives = new double[count];
        double[][] noise = new double[count][count];
        double[][] full = new double[count][count];
        Estimator[] estimators = new Estimator[count];
        for (int i = 0; i < count; i++) {
            estimators[i] = new Estimator(place, i);
            derivatives[i] = derivative(place, i);
            for (int j = 0; j <= i; j++) {
                noise[i][j] = estimators[i].noiseCovariance(estimators[j]);
                noise[j][i] = noise[i][j];
                full[i][j] = estimators[i].fullCovariance(estimators[j]);
                full[j][i] = full[i][j];
            }
        }
        return new Local(derivatives, noise, full);
    }

    private Fit mostLikely(double[][] y) {
        double precision = Arrays.stream(variance).map(v -> 1 / v).sum();
        double low = WEAKEST / (precision * process.varianceAfter(process.span()));
        double range =
                Arrays.stream(y).mapToDouble(SmoothCurve::squaredRange).max().orElseThrow();
        double interval = process.span() / (x.length - 1);
        double high = Math.max(low, STRONGEST * range / process.varianceAfter(interval));
        Fit weakest = fit(y, low).orElseThrow();
        Fit best = choice.least() > low ? fit(y, choice.least()).orElse(weakest) : weakest;
        for (double strength = low * COARSE_STEP; strength <= high; strength *= COARSE_STEP) {
            best = better(best, y, strength);
        }
        double coarse = best.strength;
        for (int step = -FINE_STEPS + 1; step < FINE_STEPS; step++) {
            best = better(best, y, Math.max(low, coarse * Math.pow(FINE_STEP, step)));
        }
        return choice.roughest() ? roughest(best, y) : best;
    }

    /** The strongest process about as likely as the likeliest one. */
    private Fit roughest(Fit best, double[][] y) {
        Fit roughest = best;
        for (int step = 1; step <= ROUGHER_STEPS; step++) {
            Optional<Fit> next = fit(y, best.strength * Math.pow(ROUGHER_STEP, step));
            if (next.isEmpty() || next.get().deviance > best.deviance + EQUALLY_LIKELY) {
                break;
            }
            roughest = next.get();
        }
        return roughest;
    }

    private static double squaredRange(double[] values) {
        double range = Arrays.stream(values).max().orElseThrow()
                - Arrays.stream(values).min().orElseThrow();
        return range * range;
    }

    /** The more likely of a fit and that of another strength. */
    private Fit better(Fit best, double[][] y, double strength) {
        return fit(y, strength)
                .filter(other -> other.deviance < best.deviance && other.strength * other.widening >= choice.least())
                .orElse(best);
    }

    /** Empty where the process is so strong that the arithmetic gives out. */
    private Optional<Fit> fit(double[][] y, double strength) {
        int n = x.length;
        double[][] covariance = new double[n][n];
        for (int i = 0; i < n; i++) {
            for (int j = 0; j <= i; j++) {
                covariance[i][j] = strength * unitCovariance[i][j];
            }
            covariance[i][i] += variance[i];
        }
        Optional<Cholesky> spread = Cholesky.of(covariance);
        if (spread.isEmpty()) {
            return Optional.empty();
        }
        double[][] solved = Arrays.stream(polynomial).map(spread.get()::solve).toArray(double[][]::new);
        double[][] normal = new double[solved.length][solved.length];
        for (int p = 0; p < solved.length; p++) {
            for (int q = 0; q < solved.length; q++) {
                normal[p][q] = dot(solved[p], polynomial[q]);
            }
        }
        return Cholesky.of(normal).map(factor -> new Fit(y, strength, spread.get(), solved, factor));
    }

    /** Covariances, with the values, of the process's i-th derivative at a place. */
    private double[] covariances(double place, int i) {
        double[] with = new double[x.length];
        for (int k = 0; k < with.length; k++) {
            with[k] = fit.strength * process.covariance(place, x[k], i, 0);
        }
        return with;
    }

    private static double dot(double[] left, double[] right) {
        double sum = 0;
        for (int i = 0; i < left.length; i++) {
            sum += left[i] * right[i];
        }
        return sum;
    }

    /** The curves for one strength of the process: generalised least squares. */
    private final class Fit {
        private final double strength;
        private final Cholesky spread;
        private final double[][] spreadPolynomial;
        private final Cholesky normal;
        private final double[][] coefficients;
        private final double[][] residuals;
        private final double deviance;
        private final double widening;

        Fit(double[][] y, double strength, Cholesky spread, double[][] spreadPolynomial, Cholesky normal) {
            this.strength = strength;
            this.spread = spread;
            this.normal = normal;
            this.spreadPolynomial = spreadPolynomial;
            int curves = y.length;
            this.coefficients = new double[curves][];
            this.residuals = new double[curves][];
            double misfit = 0;
            for (int c = 0; c < curves; c++) {
                double[] values = y[c];
                coefficients[c] = normal.solve(Arrays.stream(spreadPolynomial)
                        .mapToDouble(column -> dot(column, values))
                        .toArray());
                double[] rest = values.clone();
                for (int p = 0; p < polynomial.length; p++) {
                    for (int i = 0; i < rest.length; i++) {
                        rest[i] -= coefficients[c][p] * polynomial[p][i];
                    }
                }
                residuals[c] = spread.solve(rest);
                misfit += dot(rest, residuals[c]);
            }
            int freedom = curves * (x.length - polynomial.length);
            this.widening = known ? 1 : Math.max(1, misfit / freedom);
            this.deviance = curves * (spread.logDeterminant() + normal.logDeterminant())
                    + freedom * Math.log(widening)
                    + misfit / widening;
        }
    }

    /** The estimate of one derivative at one place. */
    private final class Estimator {
        private final double place;
        private final int times;
        private final double[] with;
        private final double[] solved;
        private final double[] lacking;
        private final double[] weights;

        Estimator(double place, int times) {
            this.place = place;
            this.times = times;
            this.with = covariances(place, times);
            this.solved = fit.spread.solve(with);
            this.lacking = process.powers(place, times);
            for (int p = 0; p < lacking.length; p++) {
                lacking[p] -= dot(fit.spreadPolynomial[p], with);
            }
            double[] correction = fit.normal.solve(lacking);
            this.weights = solved.clone();
            for (int p = 0; p < correction.length; p++) {
                for (int i = 0; i < weights.length; i++) {
                    weights[i] += correction[p] * fit.spreadPolynomial[p][i];
                }
            }
        }

        double noiseCovariance(Estimator other) {
            double sum = 0;
            for (int i = 0; i < weights.length; i++) {
                sum += weights[i] * other.weights[i] * variance[i];
            }
            return fit.widening * sum;
        }

        double fullCovariance(Estimator other) {
            return fit.widening
                    * (fit.strength * process.covariance(place, other.place, times, other.times)
                            - dot(with, other.solved)
                            + dot(lacking, fit.normal.solve(other.lacking)));
        }
    }
}

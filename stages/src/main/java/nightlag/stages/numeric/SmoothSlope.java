package nightlag.stages.numeric;

import java.util.Arrays;
import java.util.Optional;
import java.util.stream.IntStream;

/**
 * The slope of a smooth curve through scattered values, with its uncertainty.
 *
 * <p>The curve is a smoothing spline of fifth degree, taken as what it is in the sense of Wahba (J. R. Stat. Soc. B 40 (1978)
 * 364): a parabola plus a threefold integrated Wiener process of unknown strength, observed with noise. Values that a
 * parabola can follow leave the process out; values known better than that let it in. The strength is that of the greatest
 * restricted likelihood (Harville, J. Am. Stat. Assoc. 72 (1977) 320). Where the values scatter by more than their
 * uncertainties say, all of these are widened alike. Of three or four values there is too little to tell, and a straight line
 * and a twofold process (the cubic spline) take their place.
 */
public final class SmoothSlope {
    private static final int FEWEST = 3;
    private static final int FEWEST_FOR_PARABOLA = 5;
    /** Variance the weakest process tried makes over the whole range, over that of the mean of all values. */
    private static final double WEAKEST = 0.1;
    /** Variance the strongest makes over a mean interval, over the square of the range of the values. */
    private static final double STRONGEST = 100;

    /** A smaller widening of the variances of a curve's values may be the curve's own turns. */
    private static final double BELIEVED = 4;

    private static final double COARSE_STEP = 100;
    private static final double FINE_STEP = Math.sqrt(10);
    private static final int FINE_STEPS = 4;

    private final double[] x;
    private final double[][] y;
    private final double[] variance;
    private final double[] places;
    private final double origin;
    private final double span;
    /** How often the process is integrated; the degree of the polynomial is one less. */
    private final int order;

    /** Whether the values scatter as their uncertainties say, whatever they look like. */
    private final boolean believed;

    /** No process is taken to be weaker. */
    private final double least;

    private SmoothSlope(double[] x, double[][] y, double[] variance, double[] places, boolean believed, double least) {
        this.believed = believed;
        this.least = least;
        this.x = x;
        this.y = y;
        this.variance = variance;
        this.places = places;
        this.origin = Math.min(x[0], places[0]);
        this.span = Math.max(x[x.length - 1], places[places.length - 1]) - origin;
        this.order = x.length < FEWEST_FOR_PARABOLA ? 2 : 3;
    }

    /**
     * What is known about the curves' slopes at each place.
     *
     * @param slope slope of each curve, one array a curve
     * @param variance u² of the slope
     * @param weights how much the slope at a place (row) moves with each value (column)
     */
    public record Slopes(double[][] slope, double[] variance, double[][] weights) {}

    /**
     * The slopes of curves that are equally smooth and known equally well, such as real and imaginary part of one figure.
     *
     * @param x where the values were observed, strictly rising
     * @param y values, one array a curve
     * @param variance u² of the values of each curve, above zero
     * @param places where slopes are wanted, rising
     * @throws IllegalArgumentException if there are fewer than three values
     */
    public static Slopes of(double[] x, double[][] y, double[] variance, double[] places) {
        if (x.length < FEWEST) {
            throw new IllegalArgumentException("fewer than three values");
        }
        return new SmoothSlope(x, y, variance, places, false, 0).mostLikely().slopes();
    }

    /**
     * The curve itself. Uncertainties that would be too small by less than a factor of two are believed: values may turn
     * faster than a smooth curve likes.
     *
     * @param x where the values were observed, strictly rising
     * @param y values
     * @param variance u² of the values, above zero
     * @param least how strong the process is at the least, in squares of the values over the fifth power of the places: what
     *     the curve may do for all one knows beforehand; 0 where nothing is known
     * @throws IllegalArgumentException if there are fewer than three values
     */
    public static Curve curve(double[] x, double[] y, double[] variance, double least) {
        if (x.length < FEWEST) {
            throw new IllegalArgumentException("fewer than three values");
        }
        double[][] values = {y};
        Fit free = new SmoothSlope(x, values, variance, x, false, least).mostLikely();
        return new Curve(
                free.widening < BELIEVED ? new SmoothSlope(x, values, variance, x, true, least).mostLikely() : free);
    }

    /**
     * A figure of a curve.
     *
     * @param value the figure
     * @param u its standard uncertainty
     */
    public record Estimate(double value, double u) {}

    /** A smooth curve through scattered values, between the first of them and the last. */
    public static final class Curve {
        private final Fit fit;

        private Curve(Fit fit) {
            this.fit = fit;
        }

        /** The curve (derivative 0) or its slope (1) at a place. */
        public double at(double place, int derivative) {
            return fit.at(place, derivative).values[0];
        }

        /** Standard uncertainty of the curve or its slope at a place. */
        public double u(double place, int derivative) {
            return Math.sqrt(fit.at(place, derivative).variance);
        }

        /** The curve (derivative 0) or its slope (1) at a place with its uncertainty. */
        public Estimate estimate(double place, int derivative) {
            Place there = fit.at(place, derivative);
            return new Estimate(there.values[0], Math.sqrt(there.variance));
        }

        /** How much the curve at a place moves with each value. */
        public double[] weights(double place) {
            return fit.at(place, 0).weights;
        }

        /** By how much u² of the values is larger than was given, their scatter being so. */
        public double widening() {
            return fit.widening;
        }
    }

    /** What is known at one place: a figure of each curve, u² of all, how much they move with each value. */
    private record Place(double[] values, double variance, double[] weights) {}

    private Fit mostLikely() {
        double precision = Arrays.stream(variance).map(v -> 1 / v).sum();
        double perStrength = process(span, span, 0, 0);
        double low = WEAKEST / (precision * perStrength);
        double range =
                Arrays.stream(y).mapToDouble(SmoothSlope::squaredRange).max().orElseThrow();
        double interval = span / (x.length - 1);
        double high = Math.max(low, STRONGEST * range / process(interval, interval, 0, 0));
        Fit weakest = Fit.of(this, low).orElseThrow();
        Fit best = least > low ? Fit.of(this, least).orElse(weakest) : weakest;
        for (double strength = low * COARSE_STEP; strength <= high; strength *= COARSE_STEP) {
            best = best.orBetter(strength);
        }
        double coarse = best.strength;
        for (int step = -FINE_STEPS + 1; step < FINE_STEPS; step++) {
            best = best.orBetter(Math.max(low, coarse * Math.pow(FINE_STEP, step)));
        }
        return best;
    }

    private static double squaredRange(double[] values) {
        double range = Arrays.stream(values).max().orElseThrow()
                - Arrays.stream(values).min().orElseThrow();
        return range * range;
    }

    /**
     * Covariance of the process, per strength, differentiated i times by s and j times by t:
     * ∫ (s − w)^(m−1−i) (t − w)^(m−1−j)/((m−1−i)! (m−1−j)!) dw from 0 to the smaller of s and t.
     */
    private double process(double s, double t, int i, int j) {
        double end = Math.min(s, t);
        int p = order - 1 - (s <= t ? i : j);
        int r = order - 1 - (s <= t ? j : i);
        double distance = Math.abs(t - s);
        // ∫ w^p (w + d)^r dw from 0 to the end
        double sum = 0;
        double binomial = 1;
        for (int k = r; k >= 0; k--) {
            sum += binomial * Math.pow(distance, r - k) * Math.pow(end, p + k + 1) / (p + k + 1);
            binomial = binomial * k / (r - k + 1);
        }
        return sum / (factorial(p) * factorial(r));
    }

    private static double factorial(int n) {
        return IntStream.rangeClosed(1, n).asDoubleStream().reduce(1, (a, b) -> a * b);
    }

    /** The powers of the polynomial at a place, in units of the span, or their derivatives by the place. */
    private double[] powers(double place, int derivative) {
        double[] powers = new double[order];
        double part = (place - origin) / span;
        for (int p = derivative; p < order; p++) {
            powers[p] = derivative == 0 ? Math.pow(part, p) : p * Math.pow(part, p - 1) / span;
        }
        return powers;
    }

    /** The curves for one strength of the process: generalised least squares. */
    private static final class Fit {
        private final SmoothSlope data;
        private final double strength;
        private final Cholesky spread;
        private final double[][] spreadPolynomial;
        private final Cholesky normal;
        private final double[][] coefficients;
        private final double[][] residuals;
        private final double deviance;
        private final double widening;

        private Fit(SmoothSlope data, double strength, Cholesky spread, double[][] polynomial, Cholesky normal) {
            this.data = data;
            this.strength = strength;
            this.spread = spread;
            this.normal = normal;
            this.spreadPolynomial = Arrays.stream(polynomial).map(spread::solve).toArray(double[][]::new);
            int curves = data.y.length;
            this.coefficients = new double[curves][];
            this.residuals = new double[curves][];
            double misfit = 0;
            for (int c = 0; c < curves; c++) {
                double[] values = data.y[c];
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
            int freedom = curves * (data.x.length - data.order);
            this.widening = data.believed ? 1 : Math.max(1, misfit / freedom);
            this.deviance = curves * (spread.logDeterminant() + normal.logDeterminant())
                    + freedom * Math.log(widening)
                    + misfit / widening;
        }

        /** Empty where the process is so strong that the arithmetic gives out. */
        static Optional<Fit> of(SmoothSlope data, double strength) {
            int n = data.x.length;
            double[][] covariance = new double[n][n];
            for (int i = 0; i < n; i++) {
                for (int j = 0; j <= i; j++) {
                    covariance[i][j] = strength * data.process(data.x[i] - data.origin, data.x[j] - data.origin, 0, 0);
                    covariance[j][i] = covariance[i][j];
                }
                covariance[i][i] += data.variance[i];
            }
            Optional<Cholesky> spread = Cholesky.of(covariance);
            if (spread.isEmpty()) {
                return Optional.empty();
            }
            double[][] polynomial = new double[data.order][n];
            for (int i = 0; i < n; i++) {
                double[] powers = data.powers(data.x[i], 0);
                for (int p = 0; p < data.order; p++) {
                    polynomial[p][i] = powers[p];
                }
            }
            double[][] normal = new double[data.order][data.order];
            for (int p = 0; p < data.order; p++) {
                double[] solved = spread.get().solve(polynomial[p]);
                for (int q = 0; q < data.order; q++) {
                    normal[p][q] = dot(solved, polynomial[q]);
                }
            }
            for (int p = 0; p < data.order; p++) {
                for (int q = 0; q < p; q++) {
                    normal[p][q] = normal[q][p];
                }
            }
            return Cholesky.of(normal).map(factor -> new Fit(data, strength, spread.get(), polynomial, factor));
        }

        /** The more likely of this fit and that of another strength. */
        Fit orBetter(double otherStrength) {
            return of(data, otherStrength)
                    .filter(other -> other.deviance < deviance && other.strength * other.widening >= data.least)
                    .orElse(this);
        }

        Slopes slopes() {
            int count = data.places.length;
            double[][] slope = new double[data.y.length][count];
            double[] slopeVariance = new double[count];
            double[][] weights = new double[count][];
            for (int k = 0; k < count; k++) {
                Place place = at(data.places[k], 1);
                for (int c = 0; c < slope.length; c++) {
                    slope[c][k] = place.values[c];
                }
                slopeVariance[k] = place.variance;
                weights[k] = place.weights;
            }
            return new Slopes(slope, slopeVariance, weights);
        }

        /** The curves, or their derivatives, at a place. */
        Place at(double where, int derivative) {
            int n = data.x.length;
            double place = where - data.origin;
            double[] with = new double[n];
            for (int i = 0; i < n; i++) {
                with[i] = strength * data.process(place, data.x[i] - data.origin, derivative, 0);
            }
            double[] own = data.powers(where, derivative);
            double[] values = new double[data.y.length];
            for (int c = 0; c < values.length; c++) {
                values[c] = dot(with, residuals[c]) + dot(own, coefficients[c]);
            }
            double[] solved = spread.solve(with);
            double[] lacking = own.clone();
            for (int p = 0; p < lacking.length; p++) {
                lacking[p] -= dot(spreadPolynomial[p], with);
            }
            double[] correction = normal.solve(lacking);
            double variance = widening
                    * Math.max(
                            strength * data.process(place, place, derivative, derivative)
                                    - dot(with, solved)
                                    + dot(lacking, correction),
                            0);
            double[] weights = solved;
            for (int p = 0; p < correction.length; p++) {
                for (int i = 0; i < n; i++) {
                    weights[i] += correction[p] * spreadPolynomial[p][i];
                }
            }
            return new Place(values, variance, weights);
        }

        private static double dot(double[] left, double[] right) {
            double sum = 0;
            for (int i = 0; i < left.length; i++) {
                sum += left[i] * right[i];
            }
            return sum;
        }
    }
}

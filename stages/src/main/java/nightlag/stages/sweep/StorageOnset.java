package nightlag.stages.sweep;

import nightlag.stages.numeric.SmoothCurve;

/**
 * The extrapolated onset of the fall of the storage modulus (ASTM E1640, ISO 6721-11): where the glassy line and the tangent at
 * the steepest fall meet, on the linear or the logarithmic axis of the modulus.
 *
 * <p>With T_s the temperature of the steepest fall, T_o the onset and w = T_s − T_o, the glassy line is the straight line of
 * least squares through the values from T_o − 10w to T_o − 2w, as far as there are any. T_o is on both sides of that rule, and
 * is found by repeating it. At T_o − 2w a fall that decays exponentially towards the glass has 2 % of its size at T_o left,
 * which moves the onset by less than 0.01 w. The tangent is that of a smooth curve through the logarithms within 2w of T_s. Where
 * the tangent is steepest the onset does not depend on T_s to first order.
 */
final class StorageOnset {
    /** Temperatures a glassy line needs. */
    static final int FEWEST_ON_THE_LINE = 4;
    /** Standard uncertainties of the slope by which the modulus must fall. */
    static final double STANDS_OUT = 5;

    private static final int FEWEST_AROUND_THE_FALL = 9;
    private static final double HALF_WIDTH = 2;
    private static final double LINE_FROM = 10;
    private static final double LINE_TO = 2;
    /** Of the line, in widths of the fall. */
    private static final double LEAST_LENGTH = 0.8;
    /** A logistic fall has half its steepest slope at 0.88 w from the steepest place. */
    private static final double WIDTH_OVER_HALF_SLOPE = 1.2;

    private static final int ROUNDS = 3;
    private static final int REPEATS = 60;
    private static final int UNDAMPED = 10;
    private static final double SETTLED_K = 1e-5;
    private static final int STEPS = 200;
    private static final double MARGIN = 0.1;

    private final TemperatureCurve curve;
    private final SweepPlan.OnsetAxis axis;

    StorageOnset(TemperatureCurve curve, SweepPlan.OnsetAxis axis) {
        this.curve = curve;
        this.axis = axis;
    }

    /** What a search comes to. */
    sealed interface Outcome permits Found, FallsAtTheEdge, DoesNotFall, NoGlassyLine {}

    /** The onset, K, its standard uncertainty, the steepest place, and the values of the glassy line. */
    record Found(double temperatureK, double u, double steepestK, TemperatureCurve line) implements Outcome {}

    /** The steepest fall is at an end. */
    record FallsAtTheEdge(double temperatureK) implements Outcome {}

    /** No fall stands out. */
    record DoesNotFall() implements Outcome {}

    /** Too few values below the end of the line. */
    record NoGlassyLine(int values, double endK) implements Outcome {}

    /** The tangent at the steepest fall: value and slope on the axis, their covariance, and where. */
    private record Tangent(
            double atK, double value, double slope, double valueVariance, double slopeVariance, double covariance) {}

    /** The glassy line: value at the tangent's temperature, slope, and their covariance. */
    private record Line(
            double value,
            double slope,
            double valueVariance,
            double slopeVariance,
            double covariance,
            TemperatureCurve values) {}

    /** Looks for the onset of the steepest fall. Needs {@link TransitionPeaks#FEWEST} temperatures. */
    Outcome find() {
        TemperatureCurve coarse = curve.atMost(TransitionPeaks.COARSE_VALUES);
        SmoothCurve smooth = SmoothCurve.through(
                coarse.temperatures(), coarse.logarithms(), coarse.variances(), TransitionPeaks.COARSE_ORDER);
        double[] t = coarse.temperatures();
        int n = t.length;
        double[] slopes = new double[n];
        int steepest = 0;
        for (int i = 0; i < n; i++) {
            slopes[i] = slope(smooth, t[i]);
            if (slopes[i] < slopes[steepest]) {
                steepest = i;
            }
        }
        if (!standsOut(smooth, t[steepest])) {
            return new DoesNotFall();
        }
        if (steepest == 0 || steepest == n - 1) {
            return new FallsAtTheEdge(t[steepest]);
        }
        int half = steepest;
        while (half > 0 && slopes[half] < slopes[steepest] / 2) {
            half--;
        }
        double width = Math.max(t[steepest] - t[half], t[steepest] - t[steepest - 1]) * WIDTH_OVER_HALF_SLOPE;
        return fromNear(t[steepest], width);
    }

    private Outcome fromNear(double nearK, double firstWidth) {
        double steepestK = nearK;
        double width = firstWidth;
        Outcome outcome = new FallsAtTheEdge(nearK);
        for (int round = 0; round < ROUNDS; round++) {
            TemperatureCurve window = curve.around(
                            steepestK - HALF_WIDTH * width, steepestK + HALF_WIDTH * width, FEWEST_AROUND_THE_FALL)
                    .atMost(TransitionPeaks.FINE_VALUES);
            SmoothCurve smooth = SmoothCurve.throughKnown(
                    window.temperatures(),
                    window.logarithms(),
                    window.variances(),
                    Math.min(TransitionPeaks.FINE_ORDER, window.size() - 2));
            double step = (window.last() - window.first()) * (1 - 2 * MARGIN) / STEPS;
            double from = window.first() + MARGIN * (window.last() - window.first());
            int best = 0;
            for (int k = 1; k <= STEPS; k++) {
                if (slope(smooth, from + k * step) < slope(smooth, from + best * step)) {
                    best = k;
                }
            }
            steepestK = from + best * step;
            if (best == 0 || best == STEPS) {
                outcome = new FallsAtTheEdge(steepestK);
            } else {
                outcome = meeting(tangent(smooth, steepestK), width);
                if (!(outcome instanceof Found found)) {
                    return outcome;
                }
                width = steepestK - found.temperatureK();
            }
        }
        return outcome;
    }

    private double slope(SmoothCurve smooth, double atK) {
        double slope = smooth.derivative(atK, 1);
        return axis == SweepPlan.OnsetAxis.LOG ? slope : slope * Math.exp(smooth.derivative(atK, 0));
    }

    private static boolean standsOut(SmoothCurve smooth, double atK) {
        return smooth.derivative(atK, 1) < -STANDS_OUT * Math.sqrt(smooth.fullVariance(atK, 1));
    }

    private Tangent tangent(SmoothCurve smooth, double atK) {
        SmoothCurve.Local local = smooth.at(atK, 1);
        double y = local.derivatives()[0];
        double slope = local.derivatives()[1];
        double yVariance = local.peakCovariance(0, 0);
        double slopeVariance = local.peakCovariance(1, 1);
        double both = local.peakCovariance(0, 1);
        if (axis == SweepPlan.OnsetAxis.LOG) {
            return new Tangent(atK, y, slope, yVariance, slopeVariance, both);
        }
        // G' = eʸ and dG'/dT = eʸ y'
        double value = Math.exp(y);
        double square = value * value;
        return new Tangent(
                atK,
                value,
                value * slope,
                square * yVariance,
                square * (slope * slope * yVariance + 2 * slope * both + slopeVariance),
                square * (slope * yVariance + both));
    }

    private Outcome meeting(Tangent tangent, double firstWidth) {
        double width = firstWidth;
        for (int k = 0; k < REPEATS; k++) {
            double end = tangent.atK() - (1 + LINE_TO) * width;
            // on the way to the onset a line that is still too short reaches nearer to the fall
            TemperatureCurve values = curve.around(
                    tangent.atK() - (1 + LINE_FROM) * width, Math.max(end, curve.first() + width), FEWEST_ON_THE_LINE);
            boolean enough = values.last() <= end && values.last() - values.first() >= LEAST_LENGTH * width;
            Line line = line(values, tangent.atK());
            double next = (tangent.value() - line.value()) / (tangent.slope() - line.slope());
            if (!(next > 0)) {
                return new DoesNotFall();
            }
            if (Math.abs(next - width) < SETTLED_K || k == REPEATS - 1) {
                return enough
                        ? new Found(tangent.atK() - next, u(tangent, line, next), tangent.atK(), values)
                        : new NoGlassyLine(curve.between(curve.first(), end).size(), end);
            }
            width = k < UNDAMPED ? next : (width + next) / 2;
        }
        throw new IllegalStateException("the last repeat returns");
    }

    /** With T_o = T_s − w and w = (p − a)/(s − b): ∂T_o/∂p = −1/(s − b), ∂T_o/∂s = w/(s − b), and the opposite for a and b. */
    private static double u(Tangent tangent, Line line, double width) {
        double value = tangent.valueVariance() + line.valueVariance();
        double slope = tangent.slopeVariance() + line.slopeVariance();
        double both = tangent.covariance() + line.covariance();
        double variance = value - 2 * width * both + width * width * slope;
        return Math.sqrt(Math.max(variance, 0)) / Math.abs(tangent.slope() - line.slope());
    }

    /** Weighted least squares; where the values scatter more than their u, the scatter counts. */
    private Line line(TemperatureCurve values, double atK) {
        int n = values.size();
        double[] t = values.temperatures();
        double[] y = new double[n];
        double[] weight = new double[n];
        double sum = 0;
        double meanT = 0;
        double meanY = 0;
        for (int i = 0; i < n; i++) {
            boolean log = axis == SweepPlan.OnsetAxis.LOG;
            y[i] = log ? values.logarithms()[i] : Math.exp(values.logarithms()[i]);
            weight[i] = 1 / (values.variances()[i] * (log ? 1 : y[i] * y[i]));
            sum += weight[i];
            meanT += weight[i] * (t[i] - atK);
            meanY += weight[i] * y[i];
        }
        meanT /= sum;
        meanY /= sum;
        double spread = 0;
        double slope = 0;
        for (int i = 0; i < n; i++) {
            double distance = t[i] - atK - meanT;
            spread += weight[i] * distance * distance;
            slope += weight[i] * distance * (y[i] - meanY);
        }
        slope /= spread;
        double misfit = 0;
        for (int i = 0; i < n; i++) {
            double rest = y[i] - meanY - slope * (t[i] - atK - meanT);
            misfit += weight[i] * rest * rest;
        }
        double widening = Math.max(1, misfit / (n - 2));
        double slopeVariance = widening / spread;
        return new Line(
                meanY - slope * meanT,
                slope,
                widening / sum + meanT * meanT * slopeVariance,
                slopeVariance,
                -meanT * slopeVariance,
                values);
    }
}

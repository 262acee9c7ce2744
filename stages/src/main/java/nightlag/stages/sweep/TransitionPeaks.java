package nightlag.stages.sweep;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import nightlag.stages.numeric.SmoothCurve;

/**
 * Peaks of a figure over temperature. A smooth curve through all values shows where they are: a peak must rise above the
 * lowest value on either side of it, as far as the next higher one, by five standard uncertainties of the difference, and
 * must not lie within two values of an end. A second curve, through the logarithms within a factor e^1.2 of the top, places it
 * where its slope is zero, with u = u(slope)/|curvature|.
 */
final class TransitionPeaks {
    /** Standard uncertainties by which a peak stands out. */
    static final double STANDS_OUT = 5;
    /** Temperatures a search needs. */
    static final int FEWEST = 7;

    static final int COARSE_VALUES = 150;
    static final int COARSE_ORDER = 3;
    static final int FINE_VALUES = 100;
    static final int FINE_ORDER = 4;
    /**
     * Of the curve through a top where there are values enough for it. With one less, noise of 1 % leaves a cubic, which places
     * the top of a broad and lopsided peak half a u too low without its likelihood showing it.
     */
    private static final int TOP_ORDER = 5;
    /** Three values for each coefficient. */
    private static final int ENOUGH_FOR_TOP_ORDER = 3 * TOP_ORDER;

    private static final double DROP = 1.2;
    /** Values at either end among which no peak is looked for. */
    static final int FROM_THE_END = 2;

    private static final int STEPS = 100;
    private static final int BISECTIONS = 60;
    /** Beyond this part of its window's width a peak's u comes from more than the curvature at the top. */
    private static final double WIDEST_U = 0.25;

    private final TemperatureCurve curve;

    TransitionPeaks(TemperatureCurve curve) {
        this.curve = curve;
    }

    /** A peak, or about where one is that cannot be placed. */
    record Peak(double temperatureK, double u, double height, TemperatureCurve window, boolean placed) {}

    /** The peaks, temperature rising. Needs {@link #FEWEST} temperatures. */
    List<Peak> find() {
        TemperatureCurve coarse = curve.atMost(COARSE_VALUES);
        SmoothCurve smooth =
                SmoothCurve.through(coarse.temperatures(), coarse.logarithms(), coarse.variances(), COARSE_ORDER);
        int n = coarse.size();
        double[] t = coarse.temperatures();
        double[] y = new double[n];
        for (int i = 0; i < n; i++) {
            y[i] = smooth.derivative(t[i], 0);
        }
        List<Peak> peaks = new ArrayList<>();
        for (int i = FROM_THE_END; i < n - FROM_THE_END; i++) {
            if (y[i] > y[i - 1] && y[i] >= y[i + 1]) {
                int left = lowest(y, i, -1);
                int right = lowest(y, i, 1);
                if (standsOut(smooth, t[i], t[left]) && standsOut(smooth, t[i], t[right])) {
                    double from = t[reach(y, i, left)];
                    double to = t[reach(y, i, right)];
                    peaks.add(placed(t[i], curve.around(from, to, FEWEST)));
                }
            }
        }
        return peaks;
    }

    /** The place of the lowest value on one side, before the next one higher than the top. */
    private static int lowest(double[] y, int top, int step) {
        int lowest = top;
        for (int i = top; i >= 0 && i < y.length && y[i] <= y[top]; i += step) {
            if (y[i] < y[lowest]) {
                lowest = i;
            }
        }
        return lowest;
    }

    private static boolean standsOut(SmoothCurve smooth, double topK, double sideK) {
        double rise = smooth.derivative(topK, 0) - smooth.derivative(sideK, 0);
        double u = Math.sqrt(smooth.fullVariance(topK, 0) + smooth.fullVariance(sideK, 0));
        return rise > STANDS_OUT * u;
    }

    /** As far towards a side as the values stay within the drop. */
    private static int reach(double[] y, int top, int side) {
        int step = Integer.signum(side - top);
        int i = top;
        while (i != side && y[i] > y[top] - DROP) {
            i += step;
        }
        return i;
    }

    private static Peak placed(double nearK, TemperatureCurve all) {
        TemperatureCurve window = all.atMost(FINE_VALUES);
        boolean enough = window.size() >= ENOUGH_FOR_TOP_ORDER;
        SmoothCurve smooth = SmoothCurve.throughKnown(
                window.temperatures(), window.logarithms(), window.variances(), enough ? TOP_ORDER : FINE_ORDER);
        Optional<Double> top = nearestTop(smooth, window, nearK);
        if (top.isEmpty()) {
            return new Peak(nearK, Double.NaN, Double.NaN, all, false);
        }
        double at = top.get();
        SmoothCurve.Local local = smooth.at(at, 2);
        // the process of the lower order bends more wildly than a peak does, as peakCovariance has it
        double variance = enough ? local.full()[1][1] : local.peakCovariance(1, 1);
        double u = Math.sqrt(Math.max(variance, 0)) / Math.abs(local.derivatives()[2]);
        double[] t = all.temperatures();
        boolean inside = at > t[1] && at < t[t.length - 2];
        boolean clear = u < WIDEST_U * (window.last() - window.first());
        return new Peak(at, u, local.derivatives()[0], all, inside && clear);
    }

    private static Optional<Double> nearestTop(SmoothCurve smooth, TemperatureCurve window, double nearK) {
        double step = (window.last() - window.first()) / STEPS;
        Optional<Double> nearest = Optional.empty();
        double before = smooth.derivative(window.first(), 1);
        for (int k = 1; k <= STEPS; k++) {
            double to = window.first() + k * step;
            double slope = smooth.derivative(to, 1);
            if (before > 0 && slope <= 0) {
                double top = bisect(smooth, to - step, to);
                if (nearest.isEmpty() || Math.abs(top - nearK) < Math.abs(nearest.get() - nearK)) {
                    nearest = Optional.of(top);
                }
            }
            before = slope;
        }
        return nearest;
    }

    private static double bisect(SmoothCurve smooth, double rising, double falling) {
        double low = rising;
        double high = falling;
        for (int k = 0; k < BISECTIONS; k++) {
            double middle = (low + high) / 2;
            if (smooth.derivative(middle, 1) > 0) {
                low = middle;
            } else {
                high = middle;
            }
        }
        return (low + high) / 2;
    }
}

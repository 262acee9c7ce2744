package nightlag.stages.waveform;

import java.util.Arrays;

/** Samples that say nothing about the specimen: those at a channel's limit, and isolated spikes. */
final class Damage {
    /** A shorter run at a channel's extreme may be chance. */
    private static final int SHORTEST_RUN = 3;
    /** The top of a wave in coarse steps ends by one or two steps; at a channel's limit the wave leaves it at a slope. */
    private static final double STEPS_OUT_OF_A_RUN = 3;
    /** A channel that stands at its extremes nearly always is a square wave, not a wave cut off. */
    private static final double SQUARE_WAVE_SHARE = 0.9;
    /** Samples this near an extreme (as part of the range) tell the channel's step there. */
    private static final double NEAR_EXTREME = 0.1;
    /** Residuals beyond this many of their rms are worth a closer look; white noise hardly ever gets there. */
    private static final double SUSPICIOUS = 5;
    /** Residuals beyond this many robust standard deviations are spikes. */
    private static final double SPIKE = 6;
    /** From the median of |residual| to the standard deviation of normal noise. */
    private static final double MEDIAN_TO_DEVIATION = 1.4826;
    /** More outliers than this part of the samples are no isolated spikes but something else. */
    private static final double MOST_SPIKES = 0.01;

    /** A sample so many times further out than nearly all others is no part of a wave. */
    private static final double TOWERING = 3;

    private static final double NEARLY_ALL = 0.95;
    private static final int LONGEST_SPIKE = 3;

    private Damage() {}

    /**
     * Marks runs of samples at a channel's limit and one sample on either side.
     *
     * @return how many samples stand at the limit
     */
    static int markClipped(double[] values, int first, boolean[] leftOut) {
        double low = Double.POSITIVE_INFINITY;
        double high = Double.NEGATIVE_INFINITY;
        int atLow = 0;
        int atHigh = 0;
        for (int i = first; i < values.length; i++) {
            double value = values[i];
            if (value > high) {
                high = value;
                atHigh = 0;
            }
            if (value < low) {
                low = value;
                atLow = 0;
            }
            atHigh += value == high ? 1 : 0;
            atLow += value == low ? 1 : 0;
        }
        boolean squareWave = atLow + atHigh > SQUARE_WAVE_SHARE * (values.length - first);
        int clipped = 0;
        if (!squareWave && atHigh >= SHORTEST_RUN) {
            clipped += markRuns(values, first, high, high - low, leftOut);
        }
        if (!squareWave && atLow >= SHORTEST_RUN) {
            clipped += markRuns(values, first, low, high - low, leftOut);
        }
        return clipped;
    }

    private static int markRuns(double[] values, int first, double limit, double range, boolean[] leftOut) {
        double step = stepNear(values, first, limit, NEAR_EXTREME * range);
        int clipped = 0;
        int i = first;
        while (i < values.length) {
            if (values[i] != limit) {
                i++;
                continue;
            }
            int end = i;
            while (end < values.length && values[end] == limit) {
                end++;
            }
            double before = i > first ? Math.abs(values[i - 1] - limit) : 0;
            double after = end < values.length ? Math.abs(values[end] - limit) : 0;
            if (end - i >= SHORTEST_RUN && Math.max(before, after) > STEPS_OUT_OF_A_RUN * step) {
                clipped += end - i;
                Arrays.fill(leftOut, Math.max(first, i - 1), Math.min(values.length, end + 1), true);
            }
            i = end;
        }
        return clipped;
    }

    /** The smallest change between neighbouring samples near a limit; 0 if there is none to see. */
    private static double stepNear(double[] values, int first, double limit, double reach) {
        double smallest = Double.POSITIVE_INFINITY;
        for (int i = first + 1; i < values.length; i++) {
            double change = Math.abs(values[i] - values[i - 1]);
            if (change > 0
                    && change < smallest
                    && Math.abs(values[i] - limit) <= reach
                    && Math.abs(values[i - 1] - limit) <= reach) {
                smallest = change;
            }
        }
        return smallest == Double.POSITIVE_INFINITY ? 0 : smallest;
    }

    /**
     * Marks samples that tower over a whole channel, before anything is fitted: left in, they would drown the line in the
     * transform.
     *
     * @return how many
     */
    static int markTowering(double[] values, int first, boolean[] leftOut) {
        int count = values.length - first;
        double mean = 0;
        for (int i = first; i < values.length; i++) {
            mean += (values[i] - values[first]) / count;
        }
        mean += values[first];
        double[] distances = new double[count];
        for (int i = 0; i < count; i++) {
            distances[i] = values[first + i] - mean;
        }
        if (!suspicious(distances)) {
            return 0;
        }
        double[] sorted = Arrays.copyOfRange(values, first, values.length);
        Arrays.sort(sorted);
        double median = sorted[count / 2];
        for (int i = 0; i < count; i++) {
            distances[i] = Math.abs(values[first + i] - median);
        }
        sorted = distances.clone();
        Arrays.sort(sorted);
        double limit = TOWERING * sorted[(int) (NEARLY_ALL * (count - 1))];
        int towering = count;
        while (towering > 0 && sorted[towering - 1] > limit) {
            towering--;
        }
        towering = count - towering;
        if (towering > MOST_SPIKES * count + 1) {
            return 0;
        }
        for (int i = 0; i < count; i++) {
            leftOut[first + i] |= distances[i] > limit;
        }
        return towering;
    }

    /** Whether a channel's residuals may hold spikes; one pass, so that a clean record pays nothing more. */
    static boolean suspicious(double[] residuals) {
        double squares = 0;
        double largest = 0;
        for (double residual : residuals) {
            squares += residual * residual;
            largest = Math.max(largest, Math.abs(residual));
        }
        return largest * largest * residuals.length > SUSPICIOUS * SUSPICIOUS * squares;
    }

    /**
     * Finds isolated spikes.
     *
     * @param residuals of one channel
     * @param freedom the residuals' degrees of freedom
     * @param smallest what a spike exceeds at least
     * @return places in {@code residuals}; none if the outliers are too many or stand together
     */
    static int[] spikes(double[] residuals, double freedom, double smallest) {
        int count = residuals.length;
        double[] sizes = new double[count];
        for (int i = 0; i < count; i++) {
            sizes[i] = Math.abs(residuals[i]);
        }
        double[] sorted = sizes.clone();
        Arrays.sort(sorted);
        double deviation = MEDIAN_TO_DEVIATION * sorted[count / 2] * Math.sqrt(count / Math.max(1, freedom));
        double limit = Math.max(smallest, SPIKE * deviation);
        int[] found = new int[count];
        int spikes = 0;
        int run = 0;
        for (int i = 0; i < count; i++) {
            run = sizes[i] > limit ? run + 1 : 0;
            if (run > LONGEST_SPIKE) {
                return new int[0];
            }
            if (run > 0) {
                found[spikes++] = i;
            }
        }
        return spikes > MOST_SPIKES * count + 1 ? new int[0] : Arrays.copyOf(found, spikes);
    }
}

package nightlag.stages.waveform;

import java.util.Arrays;

/** Samples that say nothing about the specimen: isolated spikes. Those at a channel's limit are {@link LimitRun}s. */
final class Damage {
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
     * Marks samples that tower over a whole channel, before anything is fitted: left in, they would drown the line in the
     * transform.
     *
     * @return how many
     */
    static int markTowering(double[] values, boolean[] leftOut) {
        int count = values.length;
        if (count == 0) {
            return 0;
        }
        double mean = 0;
        for (int i = 0; i < values.length; i++) {
            mean += (values[i] - values[0]) / count;
        }
        mean += values[0];
        double[] distances = new double[count];
        for (int i = 0; i < count; i++) {
            distances[i] = values[i] - mean;
        }
        if (!suspicious(distances)) {
            return 0;
        }
        double[] sorted = values.clone();
        Arrays.sort(sorted);
        double median = sorted[count / 2];
        for (int i = 0; i < count; i++) {
            distances[i] = Math.abs(values[i] - median);
        }
        sorted = distances.clone();
        Arrays.sort(sorted);
        double limit = TOWERING * sorted[(int) (NEARLY_ALL * (count - 1))];
        int towering = count;
        while (towering > 0 && sorted[towering - 1] > limit) {
            towering--;
        }
        towering = count - towering;
        if (towering > mostSpikes(count)) {
            return 0;
        }
        for (int i = 0; i < count; i++) {
            leftOut[i] |= distances[i] > limit;
        }
        return towering;
    }

    /** How many outliers still are isolated spikes; where spikes come by chance a short record may get more than its share. */
    private static double mostSpikes(int count) {
        double share = MOST_SPIKES * count;
        return share + 1 + 2 * Math.sqrt(share);
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
        return spikes > mostSpikes(count) ? new int[0] : Arrays.copyOf(found, spikes);
    }
}

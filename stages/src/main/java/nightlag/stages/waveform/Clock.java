package nightlag.stages.waveform;

import java.util.Arrays;

/**
 * How evenly a record was sampled.
 *
 * @param gapShare share of the duration that is missing: what intervals of more than one and a half usual ones hold beyond
 *     one
 * @param jitter standard deviation of the other intervals over their mean
 * @param intervalS the usual sampling interval, gaps left aside, s
 * @param largestDeviationS largest distance of a time from an even clock through the first and the last, s
 */
record Clock(double gapShare, double jitter, double intervalS, double largestDeviationS) {
    private static final double GAP = 1.5;

    /** The clock of the times from {@code first} on. */
    static Clock of(double[] timeS, int first) {
        int spans = timeS.length - 1 - first;
        if (spans < 1) {
            return new Clock(0, 0, 0, 0);
        }
        double begin = timeS[first];
        double mean = (timeS[timeS.length - 1] - begin) / spans;
        double largest = 0;
        double deviation = 0;
        double squares = 0;
        for (int i = 0; i < spans; i++) {
            double interval = timeS[first + i + 1] - timeS[first + i];
            largest = Math.max(largest, interval);
            squares += (interval - mean) * (interval - mean);
            deviation = Math.max(deviation, Math.abs(timeS[first + i] - begin - i * mean));
        }
        // usual is near the mean unless rows are missing; only then it takes a sort to know
        if (largest <= 1.2 * mean) {
            return new Clock(0, Math.sqrt(squares / spans) / mean, mean, deviation);
        }
        return withGaps(timeS, first, spans, deviation);
    }

    /**
     * The share of a planned span that is missing: gaps between the samples, and what of the same length lies before the first
     * and behind the last of them.
     */
    double gapShareOf(double fromS, double toS, double firstS, double lastS) {
        double within = gapShare * (lastS - firstS + intervalS);
        return (within + missing(firstS - fromS) + missing(toS - lastS)) / (toS - fromS);
    }

    private double missing(double spanS) {
        return spanS > GAP * intervalS ? spanS - intervalS : 0;
    }

    private static Clock withGaps(double[] timeS, int first, int spans, double deviation) {
        double[] sorted = new double[spans];
        for (int i = 0; i < spans; i++) {
            sorted[i] = timeS[first + i + 1] - timeS[first + i];
        }
        Arrays.sort(sorted);
        double usual = sorted[spans / 2];
        double missing = 0;
        double sum = 0;
        int count = 0;
        for (double interval : sorted) {
            if (interval > GAP * usual) {
                missing += interval - usual;
            } else {
                sum += interval;
                count++;
            }
        }
        double mean = sum / count;
        double squares = 0;
        for (int i = 0; i < count; i++) {
            squares += (sorted[i] - mean) * (sorted[i] - mean);
        }
        double duration = timeS[timeS.length - 1] - timeS[first] + usual;
        return new Clock(missing / duration, Math.sqrt(squares / count) / mean, mean, deviation);
    }
}

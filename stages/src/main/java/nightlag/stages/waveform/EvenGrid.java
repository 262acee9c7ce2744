package nightlag.stages.waveform;

/**
 * A channel brought from its true time stamps to an even clock, for a transform: each value is that of the polynomial of
 * fifth degree through the six nearest samples (Lagrange), or of the straight line across a longer gap. It is the same
 * linear operation for both channels, so the quotient of their transforms hardly feels it.
 */
final class EvenGrid {
    private static final int POINTS = 6;
    /** Over more usual intervals than this a polynomial would swing. */
    private static final double LONGEST_GAP = 4;

    private EvenGrid() {}

    /** The values at {@code count} even times from the first sample to the last. */
    static double[] values(double[] seconds, double[] values, int count, double usualIntervalS) {
        double[] even = new double[count];
        int last = seconds.length - 1;
        double interval = (seconds[last] - seconds[0]) / (count - 1);
        int right = 1;
        for (int i = 0; i < count; i++) {
            double t = seconds[0] + i * interval;
            while (right < last && seconds[right] < t) {
                right++;
            }
            int from = Math.max(0, Math.min(seconds.length - POINTS, right - POINTS / 2));
            boolean gap = seconds[right] - seconds[right - 1] > LONGEST_GAP * usualIntervalS;
            even[i] = gap
                    ? interpolated(seconds, values, right - 1, right, t)
                    : interpolated(seconds, values, from, Math.min(last, from + POINTS - 1), t);
        }
        return even;
    }

    private static double interpolated(double[] seconds, double[] values, int from, int to, double t) {
        double sum = 0;
        for (int i = from; i <= to; i++) {
            double weight = 1;
            for (int j = from; j <= to; j++) {
                if (j != i) {
                    weight *= (t - seconds[j]) / (seconds[i] - seconds[j]);
                }
            }
            sum += weight * values[i];
        }
        return sum;
    }
}

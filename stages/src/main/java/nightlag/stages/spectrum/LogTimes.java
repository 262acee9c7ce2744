package nightlag.stages.spectrum;

import java.util.stream.IntStream;

/**
 * Times evenly spaced in their logarithm, ten a decade, a power of ten among them, so that the spectra of different lots stand
 * at the same times.
 *
 * <p>On such a grid the trapezoidal rule is as good as exact: the kernels of G* are analytic in ln τ up to ±iπ/2, and its
 * error falls as exp(−π²/step), 1e-18 here (Trefethen &amp; Weideman, SIAM Review 56 (2014) 385).
 *
 * @param first log10 of the first time in s, times ten
 * @param count how many there are
 */
record LogTimes(int first, int count) {
    /** Nodes a decade. */
    static final int PER_DECADE = 10;

    /** Distance of neighbours in ln τ. */
    static final double STEP = Math.log(10) / PER_DECADE;

    /** How far the grid goes beyond the inverse of the data's frequencies, in nodes. */
    private static final int REACH = 2 * PER_DECADE;

    /** A grid for data between two angular frequencies. */
    static LogTimes around(double lowest, double highest) {
        int first = (int) Math.floor(-PER_DECADE * Math.log10(highest)) - REACH;
        int last = (int) Math.ceil(-PER_DECADE * Math.log10(lowest)) + REACH;
        return new LogTimes(first, last - first + 1);
    }

    /** The time of a node in s. */
    double time(int node) {
        return Math.pow(10, (double) (first + node) / PER_DECADE);
    }

    /** All times in s, rising. */
    double[] times() {
        return IntStream.range(0, count).mapToDouble(this::time).toArray();
    }

    /** The grid of 1/τ: its node i is the inverse of this one's node i from the end. */
    LogTimes inverted() {
        return new LogTimes(-(first + count - 1), count);
    }
}

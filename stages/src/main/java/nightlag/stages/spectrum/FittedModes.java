package nightlag.stages.spectrum;

import java.util.Arrays;
import java.util.stream.IntStream;

/**
 * A set of modes on its way to the best one.
 *
 * @param times τ_i in s, rising
 * @param strengths g_i in Pa, not negative
 * @param equilibrium Ge in Pa, 0 for none
 * @param chiSquared sum of squared weighted residuals
 */
record FittedModes(double[] times, double[] strengths, double equilibrium, double chiSquared) {
    int count() {
        return times.length;
    }

    /** How many numbers were fitted. */
    int parameters() {
        return 2 * count() + (equilibrium > 0 ? 1 : 0);
    }

    /** The times without one of them. */
    double[] timesWithout(int dropped) {
        return IntStream.range(0, count())
                .filter(i -> i != dropped)
                .mapToDouble(i -> times[i])
                .toArray();
    }

    /** The times of the modes that have a strength. */
    double[] timesInUse() {
        return IntStream.range(0, count())
                .filter(i -> strengths[i] > 0)
                .mapToDouble(i -> times[i])
                .toArray();
    }

    /** The times with one and its neighbour above replaced by their mean in ln τ, weighted by strength. */
    double[] timesMerged(int lower) {
        double share = strengths[lower + 1] / (strengths[lower] + strengths[lower + 1]);
        double merged = times[lower] * Math.pow(times[lower + 1] / times[lower], share);
        double[] result = timesWithout(lower + 1);
        result[lower] = merged;
        return result;
    }

    /** The times with one more. */
    double[] timesWith(double added) {
        double[] result = Arrays.copyOf(times, count() + 1);
        result[count()] = added;
        Arrays.sort(result);
        return result;
    }
}

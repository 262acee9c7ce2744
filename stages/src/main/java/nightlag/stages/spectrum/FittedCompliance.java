package nightlag.stages.spectrum;

import java.util.Arrays;
import java.util.stream.IntStream;

/**
 * A set of retardation modes on its way to the best one.
 *
 * @param times λ in s, rising
 * @param strengths j in 1/Pa, not negative
 * @param instantaneous J0 in 1/Pa, 0 for none
 * @param fluidity 1/η0 in 1/(Pa·s), 0 for none
 * @param moves how far the shifts of the creep curves are off, see {@link CreepData}
 * @param chiSquared sum of squared weighted residuals
 */
record FittedCompliance(
        double[] times, double[] strengths, double instantaneous, double fluidity, double[] moves, double chiSquared) {
    int count() {
        return times.length;
    }

    /** How many numbers of the spectrum were fitted. */
    int ofSpectrum() {
        return 2 * count() + (instantaneous > 0 ? 1 : 0) + (fluidity > 0 ? 1 : 0);
    }

    /** How many numbers were fitted. */
    int parameters() {
        return ofSpectrum() + moves.length;
    }

    /** How many relaxation modes this makes: where there is no J0 the fastest mode takes its place. */
    int relaxationModes() {
        return count() - (instantaneous > 0 ? 0 : 1) + (fluidity > 0 ? 1 : 0);
    }

    /** The times of the modes that have a strength. */
    double[] timesInUse() {
        return IntStream.range(0, count())
                .filter(i -> strengths[i] > 0)
                .mapToDouble(i -> times[i])
                .toArray();
    }

    /** The times without one of them. */
    double[] timesWithout(int dropped) {
        return IntStream.range(0, count())
                .filter(i -> i != dropped)
                .mapToDouble(i -> times[i])
                .toArray();
    }

    /** The times with one and its neighbour above replaced by their mean in ln λ, weighted by strength. */
    double[] timesMerged(int lower) {
        double share = strengths[lower + 1] / Math.max(Double.MIN_NORMAL, strengths[lower] + strengths[lower + 1]);
        double[] result = timesWithout(lower + 1);
        result[lower] = times[lower] * Math.pow(times[lower + 1] / times[lower], share);
        return result;
    }

    /** ln j, ln λ, then ln J0 and ln 1/η0 where they are there, then the moves. */
    double[] place() {
        double[] all = new double[parameters()];
        for (int i = 0; i < count(); i++) {
            all[i] = Math.log(strengths[i]);
            all[count() + i] = Math.log(times[i]);
        }
        int next = 2 * count();
        if (instantaneous > 0) {
            all[next++] = Math.log(instantaneous);
        }
        if (fluidity > 0) {
            all[next] = Math.log(fluidity);
        }
        System.arraycopy(moves, 0, all, ofSpectrum(), moves.length);
        return all;
    }

    /** The set of as many modes that has its place there. */
    FittedCompliance at(double[] place) {
        int n = count();
        int next = 2 * n;
        double[] values =
                Arrays.stream(place).limit(ofSpectrum()).map(Math::exp).toArray();
        double j0 = instantaneous > 0 ? values[next++] : 0;
        double phi = fluidity > 0 ? values[next] : 0;
        return new FittedCompliance(
                Arrays.copyOfRange(values, n, 2 * n),
                Arrays.copyOf(values, n),
                j0,
                phi,
                Arrays.copyOfRange(place, ofSpectrum(), place.length),
                Double.NaN);
    }

    /** The same, J0 and flow taken for none where they are no more than this. */
    FittedCompliance without(double leastInstantaneous, double leastFluidity) {
        return new FittedCompliance(
                times,
                strengths,
                instantaneous > leastInstantaneous ? instantaneous : 0,
                fluidity > leastFluidity ? fluidity : 0,
                moves,
                chiSquared);
    }

    /** The same with its modes in the order of their times. */
    FittedCompliance sorted(double ofChiSquared) {
        int[] order = IntStream.range(0, count())
                .boxed()
                .sorted((a, b) -> Double.compare(times[a], times[b]))
                .mapToInt(Integer::intValue)
                .toArray();
        return new FittedCompliance(
                IntStream.of(order).mapToDouble(i -> times[i]).toArray(),
                IntStream.of(order).mapToDouble(i -> strengths[i]).toArray(),
                instantaneous,
                fluidity,
                moves,
                ofChiSquared);
    }
}

package nightlag.stages.sweep;

import java.util.Arrays;
import java.util.OptionalDouble;
import java.util.stream.IntStream;

/**
 * How much values scatter that nobody gave an uncertainty. Of each four neighbours the combination that is blind to any parabola (their third divided
 * difference), over what independent errors of size one would make of it; rms over those nearest to a place. A curve that bends
 * faster than a parabola follows adds to it, so it is too large there and never too small.
 */
final class NeighbourScatter {
    /** Fewer values tell too little. */
    static final int FEWEST = 8;

    /** So many neighbours are looked at together. */
    static final int TOGETHER = 4;

    private static final int NEAREST = 20;

    /**
     * Neighbouring groups share values, which correlates them by −0.75, 0.3 and −0.05: their mean square has 1/(1 + 2 Σ ρ²) as many
     * degrees of freedom as there are groups.
     */
    private static final double FREEDOM_OF_A_GROUP = 0.43;

    private static final double MOST = 3;

    private NeighbourScatter() {}

    /**
     * By how much a variance from so many values is to be larger than the square of their scatter, as this is itself known from
     * few: ν/(ν − 2), the variance of Student's t (JCGM 101:2008, 6.4.9.4), and no more than 3.
     */
    static double doubt(int values) {
        double freedom = FREEDOM_OF_A_GROUP * Math.min(values - TOGETHER + 1, NEAREST);
        return freedom > MOST ? freedom / (freedom - 2) : MOST;
    }

    /**
     * The standard deviation of values about their neighbours.
     *
     * @param x where they are, strictly rising
     * @param y the values
     * @param place near which; of many values only those count that are near
     * @return in the unit of the values; empty where there are fewer than {@link #FEWEST}
     */
    static OptionalDouble at(double[] x, double[] y, double place) {
        if (x.length < FEWEST) {
            return OptionalDouble.empty();
        }
        int[] nearest = IntStream.rangeClosed(0, x.length - TOGETHER)
                .boxed()
                .sorted((i, j) -> Double.compare(distance(x, i, place), distance(x, j, place)))
                .limit(NEAREST)
                .mapToInt(Integer::intValue)
                .toArray();
        double meanSquare = Arrays.stream(nearest)
                .mapToDouble(from -> Math.pow(beyondAParabola(x, y, from), 2))
                .average()
                .orElseThrow();
        return OptionalDouble.of(Math.sqrt(meanSquare));
    }

    private static double distance(double[] x, int from, double place) {
        return Math.abs((x[from + 1] + x[from + 2]) / 2 - place);
    }

    private static double beyondAParabola(double[] x, double[] y, int from) {
        double[] factors = blindToParabolas(x, from);
        double difference = 0;
        double squares = 0;
        for (int i = 0; i < TOGETHER; i++) {
            difference += factors[i] * y[from + i];
            squares += factors[i] * factors[i];
        }
        return difference / Math.sqrt(squares);
    }

    /** Factors of four neighbours' values whose sum is zero for any parabola: those of the third divided difference. */
    static double[] blindToParabolas(double[] x, int from) {
        double span = x[from + TOGETHER - 1] - x[from];
        double[] factors = new double[TOGETHER];
        for (int i = 0; i < TOGETHER; i++) {
            double product = 1;
            for (int j = 0; j < TOGETHER; j++) {
                product *= j == i ? 1 : (x[from + i] - x[from + j]) / span;
            }
            factors[i] = 1 / product;
        }
        return factors;
    }
}

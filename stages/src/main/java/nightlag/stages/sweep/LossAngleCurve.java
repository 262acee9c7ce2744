package nightlag.stages.sweep;

import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.function.ToDoubleFunction;
import java.util.stream.IntStream;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.numeric.Cholesky;

/** The loss angle δ at one frequency over time or temperature, one value a place. */
final class LossAngleCurve {
    private static final double SMALLEST_U = 1e-9;
    /** The median of the size of normal deviates over their standard deviation. */
    private static final double MEDIAN_OF_SIZE = 0.6745;
    /** A local polynomial spans no more of ln tan δ to either side than this. */
    private static final double SPAN = 0.5;

    /** The least of dδ/d ln tan δ = ½ sin 2δ that counts for the span. */
    private static final double LEAST_TURN = 0.05;

    private static final int MOST_POINTS = 60;
    private static final int CUBIC = 3;
    private static final double TIGHTER = 0.8;
    private static final double TOLERATED = 1.5;
    private static final double CLEAR = 3;

    private final double logAngularFrequency;
    private final double[] places;
    private final double[] angles;
    private final double[] variances;
    private final boolean uKnown;

    private LossAngleCurve(
            double logAngularFrequency, double[] places, double[] angles, double[] variances, boolean uKnown) {
        this.logAngularFrequency = logAngularFrequency;
        this.places = places;
        this.angles = angles;
        this.variances = variances;
        this.uKnown = uKnown;
    }

    /**
     * The curve of a sweep.
     *
     * @param sweep at one frequency
     * @param place what varies in it
     */
    static LossAngleCurve of(Sweep sweep, ToDoubleFunction<ModulusPoint> place) {
        List<ModulusPoint> points = sweep.points();
        boolean known = points.stream()
                .allMatch(point -> point.moduli().flatMap(Moduli::covariance).isPresent());
        double[] at = points.stream().mapToDouble(place).distinct().sorted().toArray();
        double[] angles = new double[at.length];
        double[] weights = new double[at.length];
        for (ModulusPoint point : points) {
            int i = Arrays.binarySearch(at, place.applyAsDouble(point));
            Moduli moduli = point.moduli().orElseThrow();
            double weight = known ? 1 / variance(moduli) : 1;
            angles[i] += weight * moduli.phaseRad();
            weights[i] += weight;
        }
        for (int i = 0; i < at.length; i++) {
            angles[i] /= weights[i];
        }
        double scatter = known ? 1 : scatter(at, angles);
        double[] variances =
                Arrays.stream(weights).map(weight -> scatter / weight).toArray();
        return new LossAngleCurve(
                Math.log(2 * Math.PI * sweep.frequencyHz().orElseThrow()), at, angles, variances, known);
    }

    /** u²(δ) with δ = atan2(G'', G') by the law of propagation (JCGM 100:2008, 5.2). */
    private static double variance(Moduli moduli) {
        ModuliCovariance known = moduli.covariance().orElseThrow();
        double storage = moduli.storagePa();
        double loss = moduli.lossPa();
        double square = moduli.magnitudePa() * moduli.magnitudePa();
        double variance = (loss * loss * known.storageVariance()
                        - 2 * storage * loss * known.covariance()
                        + storage * storage * known.lossVariance())
                / (square * square);
        return Math.max(variance, SMALLEST_U * SMALLEST_U);
    }

    /** Variance of the values about their neighbours, as a median so that a step does not count. */
    private static double scatter(double[] at, double[] values) {
        double[] sizes = IntStream.range(1, at.length - 1)
                .mapToDouble(i -> {
                    double share = (at[i] - at[i - 1]) / (at[i + 1] - at[i - 1]);
                    double line = values[i - 1] + share * (values[i + 1] - values[i - 1]);
                    return Math.abs(values[i] - line) / Math.sqrt(1 + share * share + (1 - share) * (1 - share));
                })
                .sorted()
                .toArray();
        double u = sizes.length == 0 ? 0 : sizes[sizes.length / 2] / MEDIAN_OF_SIZE;
        return Math.max(u * u, SMALLEST_U * SMALLEST_U);
    }

    double logAngularFrequency() {
        return logAngularFrequency;
    }

    /** Where its points are, rising. */
    double[] places() {
        return places.clone();
    }

    int size() {
        return places.length;
    }

    double first() {
        return places[0];
    }

    double last() {
        return places[places.length - 1];
    }

    /** Whether its uncertainties are those of the moduli; else they come from the scatter. */
    boolean uKnown() {
        return uKnown;
    }

    /** δ and u²(δ) on the straight line between neighbours; {@code place} within the points. */
    Angle between(double place) {
        int found = Arrays.binarySearch(places, place);
        if (found >= 0) {
            return new Angle(angles[found], variances[found]);
        }
        int after = -found - 1;
        double share = (place - places[after - 1]) / (places[after] - places[after - 1]);
        return new Angle(
                (1 - share) * angles[after - 1] + share * angles[after],
                (1 - share) * (1 - share) * variances[after - 1] + share * share * variances[after]);
    }

    /**
     * A loss angle.
     *
     * @param value δ, rad
     * @param variance u²(δ), rad²
     */
    record Angle(double value, double variance) {}

    /** How far from a place its points go before ln tan δ has changed by a half. */
    double reach(double place) {
        double middle = between(place).value();
        double span = SPAN * Math.max(LEAST_TURN, Math.abs(Math.sin(2 * middle)) / 2);
        return IntStream.range(0, places.length)
                .filter(i -> Math.abs(angles[i] - middle) > span)
                .mapToDouble(i -> Math.abs(places[i] - place))
                .min()
                .orElse(Double.POSITIVE_INFINITY);
    }

    /**
     * A cubic (with few points a parabola) through the points nearest a place, as many as it meets within their uncertainty.
     * Empty where they do not fix it.
     *
     * @param place within the points
     * @param reach how far from it points may be; the five nearest may be farther
     */
    Optional<Piece> near(double place, double reach) {
        int[] nearest = IntStream.range(0, places.length)
                .boxed()
                .sorted((i, j) -> Double.compare(Math.abs(places[i] - place), Math.abs(places[j] - place)))
                .mapToInt(Integer::intValue)
                .toArray();
        int least = Math.min(nearest.length, CUBIC + 2);
        int count = least;
        while (count < Math.min(nearest.length, MOST_POINTS) && Math.abs(places[nearest[count]] - place) < reach) {
            count++;
        }
        Optional<Piece> piece = piece(place, Arrays.copyOf(nearest, count));
        while (count > least && piece.map(Piece::misses).orElse(false)) {
            count = Math.max(least, (int) (TIGHTER * count));
            piece = piece(place, Arrays.copyOf(nearest, count));
        }
        return piece;
    }

    private Optional<Piece> piece(double place, int[] members) {
        int terms = Math.min(CUBIC, members.length - 2) + 1;
        double reach = 0;
        for (int i : members) {
            reach = Math.max(reach, Math.abs(places[i] - place));
        }
        double[][] normal = new double[terms][terms];
        double[] right = new double[terms];
        for (int i : members) {
            double[] powers = powers((places[i] - place) / reach, terms);
            for (int j = 0; j < terms; j++) {
                right[j] += powers[j] * angles[i] / variances[i];
                for (int k = 0; k < terms; k++) {
                    normal[j][k] += powers[j] * powers[k] / variances[i];
                }
            }
        }
        double scale = reach;
        return Cholesky.of(normal).map(factored -> {
            double[] coefficients = factored.solve(right);
            double chiSquared = 0;
            for (int i : members) {
                double misfit = angles[i] - sum(coefficients, powers((places[i] - place) / scale, terms));
                chiSquared += misfit * misfit / variances[i];
            }
            double from =
                    IntStream.of(members).mapToDouble(i -> places[i]).min().orElseThrow();
            double to = IntStream.of(members).mapToDouble(i -> places[i]).max().orElseThrow();
            return new Piece(place, scale, coefficients, factored, from, to, chiSquared, members.length - terms);
        });
    }

    private static double[] powers(double x, int terms) {
        double[] powers = new double[terms];
        powers[0] = 1;
        for (int k = 1; k < terms; k++) {
            powers[k] = powers[k - 1] * x;
        }
        return powers;
    }

    private static double sum(double[] left, double[] right) {
        double sum = 0;
        for (int k = 0; k < left.length; k++) {
            sum += left[k] * right[k];
        }
        return sum;
    }

    /** A local polynomial of δ. */
    static final class Piece {
        private final double centre;
        private final double reach;
        private final double[] coefficients;
        private final Cholesky normal;
        private final double from;
        private final double to;
        private final double chiSquared;
        private final int freedom;

        private Piece(
                double centre,
                double reach,
                double[] coefficients,
                Cholesky normal,
                double from,
                double to,
                double chiSquared,
                int freedom) {
            this.centre = centre;
            this.reach = reach;
            this.coefficients = coefficients;
            this.normal = normal;
            this.from = from;
            this.to = to;
            this.chiSquared = chiSquared;
            this.freedom = freedom;
        }

        /** Where its first point is. */
        double from() {
            return from;
        }

        /** Where its last point is. */
        double to() {
            return to;
        }

        /** Whether χ² is more than one and a half of its own standard deviation above ν. */
        boolean misses() {
            return chiSquared > freedom + TOLERATED * Math.sqrt(2.0 * freedom);
        }

        /** 1 where δ rises over the piece by more than three of its uncertainties, −1 where it falls, else 0. */
        int trend() {
            Angle start = at(from);
            Angle end = at(to);
            double change = end.value() - start.value();
            return Math.abs(change) > CLEAR * Math.sqrt(start.variance() + end.variance())
                    ? (int) Math.signum(change)
                    : 0;
        }

        /** δ and u²(δ). */
        Angle at(double place) {
            double[] powers = powers((place - centre) / reach, coefficients.length);
            return new Angle(sum(coefficients, powers), normal.inverseForm(powers));
        }

        /** dδ/dx. */
        double slope(double place) {
            double x = (place - centre) / reach;
            double sum = 0;
            for (int k = coefficients.length - 1; k > 0; k--) {
                sum = sum * x + k * coefficients[k];
            }
            return sum / reach;
        }
    }
}

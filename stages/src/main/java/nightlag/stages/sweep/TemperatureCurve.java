package nightlag.stages.sweep;

import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.stream.IntStream;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusPoint;

/**
 * The logarithm of one figure of a temperature sweep against temperature, strictly rising, with u² of each value. Where any
 * point comes without an uncertainty all count alike. Where neighbours scatter clearly more than their u says, all are widened alike; that
 * is what gives a u where there is none.
 */
final class TemperatureCurve {
    /** u² of a logarithm below this is rounding. */
    private static final double LEAST_VARIANCE = 1e-24;
    /** Temperatures this close are one, K: less than any thermometer tells apart. */
    private static final double SAME_K = 1e-6;

    private static final double MEDIAN_OF_A_NORMAL_SIZE = 0.6745;
    /** Below this chance, or a curve that bends between the points, may be all there is to it. */
    private static final double WORTH_WIDENING = 2;

    private final double[] temperatures;
    private final double[] logarithms;
    private final double[] variances;
    private final boolean weighted;

    private TemperatureCurve(double[] temperatures, double[] logarithms, double[] variances, boolean weighted) {
        this.temperatures = temperatures;
        this.logarithms = logarithms;
        this.variances = variances;
        this.weighted = weighted;
    }

    /** What is drawn against temperature. */
    enum Figure {
        STORAGE("storage modulus"),
        LOSS("loss modulus"),
        TAN_DELTA("tan δ");

        private final String words;

        Figure(String words) {
            this.words = words;
        }

        String words() {
            return words;
        }

        private double value(Moduli moduli) {
            return switch (this) {
                case STORAGE -> moduli.storagePa();
                case LOSS -> moduli.lossPa();
                case TAN_DELTA -> moduli.tanDelta();
            };
        }

        private Optional<Double> u(Moduli moduli) {
            return switch (this) {
                case STORAGE -> moduli.covariance().map(ModuliCovariance::storageU);
                case LOSS -> moduli.covariance().map(ModuliCovariance::lossU);
                case TAN_DELTA ->
                    moduli.covariance().map(known -> moduli.tanDeltaU().orElseThrow());
            };
        }
    }

    private record Reading(double temperatureK, double logarithm, Optional<Double> variance) {}

    /** The curve of the points whose figure is above zero; others have no logarithm. */
    static TemperatureCurve of(List<ModulusPoint> points, Figure figure) {
        List<Reading> readings = points.stream()
                .filter(point ->
                        point.temperatureK().isPresent() && point.moduli().isPresent())
                .filter(point -> isPositive(figure.value(point.moduli().get()))
                        && point.moduli().get().storagePa() > 0)
                .map(point -> reading(point, figure))
                .sorted(Comparator.comparingDouble(Reading::temperatureK))
                .toList();
        boolean weighted =
                readings.stream().allMatch(reading -> reading.variance().isPresent());
        double[] temperatures =
                readings.stream().mapToDouble(Reading::temperatureK).toArray();
        double[] logarithms = readings.stream().mapToDouble(Reading::logarithm).toArray();
        double[] given = readings.stream()
                .mapToDouble(reading -> weighted ? reading.variance().orElseThrow() : LEAST_VARIANCE)
                .toArray();
        double scatter = scatter(temperatures, logarithms, given);
        double widening = weighted && scatter < WORTH_WIDENING ? 1 : scatter;
        double[] variances =
                Arrays.stream(given).map(variance -> variance * widening).toArray();
        return new TemperatureCurve(temperatures, logarithms, variances, weighted).averaged(SAME_K);
    }

    /**
     * By how much u² is larger than given, 1 or more: of each four neighbours the combination that is blind to any parabola, over its
     * own u. The median of the sizes is that of a normal error as long as less than half of them see the curve bend.
     */
    private static double scatter(double[] t, double[] y, double[] variance) {
        double[] sizes = IntStream.range(0, t.length - 3)
                .filter(k -> t[k] < t[k + 1] && t[k + 1] < t[k + 2] && t[k + 2] < t[k + 3])
                .mapToDouble(k -> Math.abs(beyondAParabola(t, y, variance, k)))
                .sorted()
                .toArray();
        double median = sizes.length == 0 ? 0 : (sizes[sizes.length / 2] + sizes[(sizes.length - 1) / 2]) / 2;
        return Math.max(Math.pow(median / MEDIAN_OF_A_NORMAL_SIZE, 2), 1);
    }

    private static double beyondAParabola(double[] t, double[] y, double[] variance, int from) {
        double difference = 0;
        double squares = 0;
        for (int i = from; i < from + 4; i++) {
            double product = 1;
            for (int j = from; j < from + 4; j++) {
                product *= j == i ? 1 : (t[i] - t[j]) / (t[from + 3] - t[from]);
            }
            difference += y[i] / product;
            squares += variance[i] / (product * product);
        }
        return difference / Math.sqrt(squares);
    }

    private static boolean isPositive(double value) {
        return value > 0 && value < Double.POSITIVE_INFINITY;
    }

    private static Reading reading(ModulusPoint point, Figure figure) {
        Moduli moduli = point.moduli().orElseThrow();
        double value = figure.value(moduli);
        return new Reading(
                point.temperatureK().orElseThrow(),
                Math.log(value),
                figure.u(moduli).map(u -> Math.max(Math.pow(u / value, 2), LEAST_VARIANCE)));
    }

    /** Neighbours within a width become one at their mean, by weight. */
    private TemperatureCurve averaged(double width) {
        int n = temperatures.length;
        double[] t = new double[n];
        double[] y = new double[n];
        double[] v = new double[n];
        int count = 0;
        int from = 0;
        while (from < n) {
            int to = from;
            double weights = 0;
            while (to < n && temperatures[to] <= temperatures[from] + width) {
                double weight = 1 / variances[to];
                weights += weight;
                // sums of differences, so that a lone value stays as it is to the last digit
                t[count] += weight * (temperatures[to] - temperatures[from]);
                y[count] += weight * (logarithms[to] - logarithms[from]);
                to++;
            }
            t[count] = temperatures[from] + t[count] / weights;
            y[count] = logarithms[from] + y[count] / weights;
            v[count] = 1 / weights;
            count++;
            from = to;
        }
        return new TemperatureCurve(
                Arrays.copyOf(t, count), Arrays.copyOf(y, count), Arrays.copyOf(v, count), weighted);
    }

    /** The same, neighbours averaged until there are no more values than this, or a few. */
    TemperatureCurve atMost(int values) {
        return size() <= values ? this : averaged((last() - first()) / values);
    }

    /** The values from one temperature to another, which may be none. */
    TemperatureCurve between(double fromK, double toK) {
        int from = 0;
        while (from < size() && temperatures[from] < fromK) {
            from++;
        }
        int to = from;
        while (to < size() && temperatures[to] <= toK) {
            to++;
        }
        return part(from, to);
    }

    /** The values from one temperature to another, and the nearest beyond them until there are so many. */
    TemperatureCurve around(double fromK, double toK, int atLeast) {
        int from = 0;
        while (from < size() && temperatures[from] < fromK) {
            from++;
        }
        int to = from;
        while (to < size() && temperatures[to] <= toK) {
            to++;
        }
        double middle = (fromK + toK) / 2;
        while (to - from < Math.min(atLeast, size())) {
            boolean below = to == size() || (from > 0 && middle - temperatures[from - 1] < temperatures[to] - middle);
            if (below) {
                from--;
            } else {
                to++;
            }
        }
        return part(from, to);
    }

    private TemperatureCurve part(int from, int to) {
        return new TemperatureCurve(
                Arrays.copyOfRange(temperatures, from, to),
                Arrays.copyOfRange(logarithms, from, to),
                Arrays.copyOfRange(variances, from, to),
                weighted);
    }

    int size() {
        return temperatures.length;
    }

    /** The index of the highest value. */
    int highest() {
        int highest = 0;
        for (int i = 1; i < size(); i++) {
            if (logarithms[i] > logarithms[highest]) {
                highest = i;
            }
        }
        return highest;
    }

    double first() {
        return temperatures[0];
    }

    double last() {
        return temperatures[size() - 1];
    }

    /** Temperatures, K. */
    double[] temperatures() {
        return temperatures;
    }

    double[] logarithms() {
        return logarithms;
    }

    /** u² of the logarithms. */
    double[] variances() {
        return variances;
    }

    /** Where the points bring no uncertainty, what to add to a method; else nothing. */
    String sourceOfU() {
        return weighted ? "" : "; u from the scatter";
    }
}

package nightlag.stages.superposition;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import nightlag.stages.numeric.Cholesky;
import nightlag.stages.numeric.EvenSplines;
import nightlag.stages.superposition.FollowedCurves.Push;
import nightlag.stages.superposition.LogIsotherm.LogReading;

/**
 * Isotherms without what their specimens differ by. A specimen whose dimensions are not what they were taken for has both
 * moduli wrong by one factor, at all frequencies alike: a constant of ln |G*|. Pooled specimens scatter about any curve by
 * that much, which says nothing of the material.
 *
 * <p>Within an isotherm the constants are fitted beside a smooth curve. Over all isotherms they are then parted, by least
 * squares, in what a specimen has everywhere and what a loading adds: isotherms of other specimens come to one level, and how
 * far the loadings of one specimen differ says how well that level is known.
 *
 * @param isotherms without the constants
 * @param fitted how many constants were fitted, one an isotherm
 * @param levelVariances of ln |G*| of each isotherm as a whole; zero where no specimen was loaded twice beside another
 * @param rms of the constants of several specimens about their mean in an isotherm; zero where there are none
 */
record SpecimenOffsets(List<LogIsotherm> isotherms, int[] fitted, double[] levelVariances, double rms) {
    /** Curves that bend as they need to: they only have to run between the points. */
    private static final Smoothness FREE = new Smoothness(new double[] {2, 2}, new double[] {-2, -2});

    private static final double NOTHING_KNOWN = 1e-9;

    SpecimenOffsets {
        isotherms = List.copyOf(isotherms);
    }

    /** Takes them out. */
    static SpecimenOffsets of(List<LogIsotherm> isotherms) {
        List<Constants> found = isotherms.stream().map(SpecimenOffsets::within).toList();
        List<Map<String, Double>> constants =
                found.stream().map(Constants::bySpecimen).toList();
        int count = isotherms.size();
        int[] fitted = constants.stream()
                .mapToInt(each -> Math.max(0, each.size() - 1))
                .toArray();
        if (Arrays.stream(fitted).sum() == 0) {
            return new SpecimenOffsets(isotherms, fitted, new double[count], 0);
        }
        Map<String, Double> everywhere = everywhere(constants);
        double squares = 0;
        double apart = 0;
        double[] levels = new double[count];
        for (int i = 0; i < count; i++) {
            Map<String, Double> own = constants.get(i);
            levels[i] = mean(own)
                    - own.keySet().stream()
                            .mapToDouble(everywhere::get)
                            .average()
                            .orElse(0);
            for (Map.Entry<String, Double> one : own.entrySet()) {
                squares += Math.pow(one.getValue() - levels[i] - everywhere.get(one.getKey()), 2);
                apart += Math.pow(one.getValue() - mean(own), 2);
            }
        }
        int pooled = Arrays.stream(fitted).sum();
        int free = pooled - (everywhere.size() - groups(constants));
        double noise = found.stream()
                .filter(one -> one.bySpecimen().size() > 1)
                .mapToDouble(Constants::noise)
                .average()
                .orElse(0);
        double ofLoading = free > 0 ? Math.max(0, squares / free - noise) : 0;
        double[] variances = new double[count];
        List<LogIsotherm> without = new ArrayList<>();
        for (int i = 0; i < count; i++) {
            variances[i] = ofLoading / (fitted[i] + 1);
            without.add(without(isotherms.get(i), constants.get(i), levels[i]));
        }
        return new SpecimenOffsets(without, fitted, variances, Math.sqrt(apart / pooled));
    }

    /** Those of some isotherms, given by their numbers. */
    SpecimenOffsets ofIsotherms(List<Integer> numbers) {
        return new SpecimenOffsets(
                numbers.stream().map(isotherms::get).toList(),
                numbers.stream().mapToInt(i -> fitted[i]).toArray(),
                numbers.stream().mapToDouble(i -> levelVariances[i]).toArray(),
                rms);
    }

    private static double mean(Map<String, Double> values) {
        return values.values().stream()
                .mapToDouble(Double::doubleValue)
                .average()
                .orElse(0);
    }

    private static LogIsotherm without(LogIsotherm isotherm, Map<String, Double> constants, double level) {
        return new LogIsotherm(
                isotherm.temperatureK(),
                isotherm.readings().stream()
                        .map(reading -> reading.moved(0, level - constants.getOrDefault(reading.specimen(), 0.0)))
                        .toList(),
                isotherm.missing());
    }

    /**
     * The constants of an isotherm's specimens, against one of them.
     *
     * @param bySpecimen the constants, in ln |G*|
     * @param noise variance that the scatter of the points gives a specimen's constant
     */
    private record Constants(Map<String, Double> bySpecimen, double noise) {}

    /** Fits them. A specimen that shares no stretch of frequencies with the others has no part in it. */
    private static Constants within(LogIsotherm isotherm) {
        List<String> compared = compared(isotherm.readings());
        return compared.size() < 2
                ? new Constants(zeros(compared), 0)
                : fitted(isotherm, compared).orElseGet(() -> new Constants(zeros(compared.subList(0, 1)), 0));
    }

    private static Map<String, Double> zeros(List<String> specimens) {
        Map<String, Double> zeros = new LinkedHashMap<>();
        specimens.forEach(specimen -> zeros.put(specimen, 0.0));
        return zeros;
    }

    /** Empty where the points do not tell specimens and curves apart. */
    private static Optional<Constants> fitted(LogIsotherm isotherm, List<String> compared) {
        Weights weights = Weights.of(isotherm.readings(), false, FREE);
        List<Push> pushes = compared.stream()
                .skip(1)
                .map(specimen -> push(isotherm.readings(), specimen, weights))
                .toList();
        OwnCurves.Prepared prepared = OwnCurves.Prepared.of(isotherm);
        return prepared.fit(false, FREE).flatMap(curve -> {
            FollowedCurves followed = FollowedCurves.of(curve.pair(), pushes, prepared.differences(curve, weights));
            return Cholesky.of(followed.information())
                    .map(factored -> constants(compared, curve, followed.gradient(), factored));
        });
    }

    private static Push push(List<LogReading> readings, String specimen, Weights weights) {
        double[] values = new double[2 * readings.size()];
        for (int p = 0; p < readings.size(); p++) {
            if (readings.get(p).specimen().equals(specimen)) {
                weights.whiten(p, 1, 1, values);
            }
        }
        return new Push(0, values);
    }

    private static Constants constants(
            List<String> compared, OwnCurves.OwnCurve curve, double[] gradient, Cholesky factored) {
        Map<String, Double> constants = zeros(compared);
        double[] less = factored.solve(gradient);
        double squares = curve.residualSquares();
        double ofDifference = 0;
        double[][] inverse = factored.inverse();
        for (int k = 0; k < less.length; k++) {
            constants.put(compared.get(k + 1), -less[k]);
            squares -= less[k] * gradient[k];
            ofDifference += inverse[k][k] / less.length;
        }
        double free = curve.freedom() - less.length;
        // the difference of two specimens has the variance of both
        return new Constants(constants, free > 0 ? ofDifference / 2 * squares / free : 0);
    }

    /** The specimen of most points, and those with some places among the others'. */
    private static List<String> compared(List<LogReading> readings) {
        Map<String, List<LogReading>> bySpecimen = new LinkedHashMap<>();
        readings.forEach(reading -> bySpecimen
                .computeIfAbsent(reading.specimen(), key -> new ArrayList<>())
                .add(reading));
        List<String> mostFirst = bySpecimen.entrySet().stream()
                .sorted((left, right) ->
                        right.getValue().size() - left.getValue().size())
                .map(Map.Entry::getKey)
                .toList();
        List<String> sharing = mostFirst.size() == 1
                ? mostFirst
                : mostFirst.stream().filter(one -> shares(one, readings)).toList();
        return sharing.isEmpty() ? mostFirst.stream().limit(1).toList() : sharing;
    }

    private static boolean shares(String specimen, List<LogReading> readings) {
        double[] others = readings.stream()
                .filter(reading -> !reading.specimen().equals(specimen))
                .mapToDouble(LogReading::x)
                .toArray();
        return readings.stream()
                        .filter(reading -> reading.specimen().equals(specimen)
                                && others[0] <= reading.x()
                                && reading.x() <= others[others.length - 1])
                        .mapToDouble(LogReading::x)
                        .distinct()
                        .count()
                >= EvenSplines.SMOOTH_COEFFICIENTS;
    }

    /** What each specimen has on all isotherms, by least squares; of those that hang together the mean is zero. */
    private static Map<String, Double> everywhere(List<Map<String, Double>> constants) {
        List<String> specimens = constants.stream()
                .flatMap(each -> each.keySet().stream())
                .distinct()
                .toList();
        double[][] normal = new double[specimens.size()][specimens.size()];
        double[] right = new double[specimens.size()];
        for (int i = 0; i < normal.length; i++) {
            normal[i][i] = NOTHING_KNOWN;
        }
        for (Map<String, Double> own : constants) {
            double mean = mean(own);
            for (Map.Entry<String, Double> one : own.entrySet()) {
                int i = specimens.indexOf(one.getKey());
                normal[i][i]++;
                right[i] += one.getValue() - mean;
                for (String other : own.keySet()) {
                    normal[i][specimens.indexOf(other)] -= 1.0 / own.size();
                }
            }
        }
        double[] solved = Cholesky.of(normal).orElseThrow().solve(right);
        Map<String, Double> everywhere = new LinkedHashMap<>();
        for (int i = 0; i < solved.length; i++) {
            everywhere.put(specimens.get(i), solved[i]);
        }
        return everywhere;
    }

    /** In how many groups the specimens hang together by isotherms they share. */
    private static int groups(List<Map<String, Double>> constants) {
        Map<String, String> leader = new LinkedHashMap<>();
        constants.forEach(own -> own.keySet().forEach(specimen -> leader.putIfAbsent(specimen, specimen)));
        for (Map<String, Double> own : constants) {
            own.keySet().stream().findFirst().map(leader::get).ifPresent(first -> {
                for (String specimen : own.keySet()) {
                    String merged = leader.get(specimen);
                    leader.replaceAll((name, led) -> led.equals(merged) ? first : led);
                }
            });
        }
        return (int) leader.values().stream().distinct().count();
    }
}

package nightlag.stages.sweep;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;
import java.util.stream.IntStream;
import nightlag.stages.moduli.ModulusPoint;

/**
 * Groups points into isotherms. Where a point has both a tagged temperature and a measured one, the tag says which isotherm
 * it belongs to; else points within 0.5 K of each other are one. Points without a temperature belong to none.
 */
public final class Isotherms {
    /** Points this close are at one temperature, K. */
    public static final double TOLERANCE_K = 0.5;

    private final List<ModulusPoint> points;
    private final double[] temperatures;

    private Isotherms(List<ModulusPoint> points) {
        this.points = points;
        this.temperatures = points.stream()
                .mapToDouble(point -> point.temperatureK().orElseThrow())
                .toArray();
    }

    /** The isotherms, temperature rising; points keep the order in which they were given. */
    public static List<Isotherm> group(List<ModulusPoint> points) {
        return new Isotherms(points.stream()
                        .filter(point -> point.temperatureK().isPresent())
                        .toList())
                .group();
    }

    /** The isotherm nearest to a temperature, if one lies within 0.5 K. */
    public static Optional<Isotherm> near(List<Isotherm> isotherms, double temperatureK) {
        return isotherms.stream()
                .filter(isotherm -> Math.abs(isotherm.temperatureK() - temperatureK) <= TOLERANCE_K)
                .min(Comparator.comparingDouble(isotherm -> Math.abs(isotherm.temperatureK() - temperatureK)));
    }

    private List<Isotherm> group() {
        Map<Double, List<Integer>> tagged = new TreeMap<>();
        for (int i = 0; i < temperatures.length; i++) {
            if (isMeasuredAndTagged(i)) {
                double tag = points.get(i).taggedTemperatureK().orElseThrow();
                tagged.computeIfAbsent(tag, key -> new ArrayList<>()).add(i);
            }
        }
        List<Integer> others = new ArrayList<>();
        for (int i = 0; i < temperatures.length; i++) {
            if (!isMeasuredAndTagged(i)) {
                int index = i;
                nearestTag(tagged, temperatures[i]).ifPresentOrElse(group -> group.add(index), () -> others.add(index));
            }
        }
        List<List<Integer>> groups = new ArrayList<>(tagged.values());
        groups.addAll(byNearness(others));
        return groups.stream()
                .map(this::isotherm)
                .sorted(Comparator.comparingDouble(Isotherm::temperatureK))
                .toList();
    }

    /** A point without a temperature channel carries its tag as its temperature. */
    private boolean isMeasuredAndTagged(int i) {
        return points.get(i).taggedTemperatureK().orElse(temperatures[i]) != temperatures[i];
    }

    private static Optional<List<Integer>> nearestTag(Map<Double, List<Integer>> tagged, double temperature) {
        return tagged.entrySet().stream()
                .filter(entry -> Math.abs(entry.getKey() - temperature) <= TOLERANCE_K)
                .min(Comparator.comparingDouble(entry -> Math.abs(entry.getKey() - temperature)))
                .map(Map.Entry::getValue);
    }

    private List<List<Integer>> byNearness(List<Integer> indices) {
        List<Integer> rising = indices.stream()
                .sorted(Comparator.comparingDouble(i -> temperatures[i]))
                .toList();
        List<List<Integer>> groups = new ArrayList<>();
        double first = Double.NEGATIVE_INFINITY;
        for (int i : rising) {
            if (temperatures[i] - first > TOLERANCE_K) {
                groups.add(new ArrayList<>());
                first = temperatures[i];
            }
            groups.get(groups.size() - 1).add(i);
        }
        return groups;
    }

    private Isotherm isotherm(List<Integer> group) {
        int[] indices = group.stream().mapToInt(Integer::intValue).sorted().toArray();
        // summed as departures from one of them, so that equal temperatures have exactly that mean
        double first = temperatures[indices[0]];
        double departure = IntStream.of(indices)
                .mapToDouble(i -> temperatures[i] - first)
                .average()
                .orElseThrow();
        return new Isotherm(
                first + departure, IntStream.of(indices).mapToObj(points::get).toList());
    }
}

package nightlag.stages.sweep;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;
import java.util.function.ToDoubleFunction;
import java.util.stream.Collectors;
import nightlag.stages.moduli.ModulusPoint;

/** Points that are alike in one figure. */
final class PointGroups {
    /** Strains and frequencies this close, relatively, are one. */
    private static final double SAME = 0.01;
    /** What a thermostat may wander while it holds a temperature, K. */
    static final double HOLD_K = 3;

    private PointGroups() {}

    /** By frequency, those within a hundredth of the lowest together, frequency rising. */
    static List<List<ModulusPoint>> byFrequency(List<ModulusPoint> points) {
        return byNearness(points, PointGroups::frequencyHz, SAME);
    }

    /** By strain, likewise. */
    static List<List<ModulusPoint>> byStrain(List<ModulusPoint> points) {
        return byNearness(points, AmplitudeSweeps::strain, SAME);
    }

    /** By a positive figure, those within a part of the smallest together, the figure rising. */
    static List<List<ModulusPoint>> byNearness(
            List<ModulusPoint> points, ToDoubleFunction<ModulusPoint> figure, double part) {
        List<List<ModulusPoint>> groups = new ArrayList<>();
        double first = 0;
        for (ModulusPoint point : rising(points, figure)) {
            if (groups.isEmpty() || figure.applyAsDouble(point) > first * (1 + part)) {
                groups.add(new ArrayList<>());
                first = figure.applyAsDouble(point);
            }
            groups.get(groups.size() - 1).add(point);
        }
        return groups;
    }

    /** By isotherm, temperature rising; points without a temperature are together, last. */
    static List<List<ModulusPoint>> byIsotherm(List<ModulusPoint> points) {
        List<List<ModulusPoint>> groups = new ArrayList<>();
        Isotherms.group(points).forEach(isotherm -> groups.add(isotherm.points()));
        addThoseWithoutTemperature(points, groups);
        return groups;
    }

    /**
     * By temperature, where neighbours within 0.5 K of each other are together however far they lead: a ramp is one group,
     * and so is a hold that wanders. Where tags tell temperatures apart they say it. Points without a temperature are
     * together, last.
     */
    static List<List<ModulusPoint>> byUnbrokenTemperature(List<ModulusPoint> points) {
        if (points.stream().allMatch(point -> point.taggedTemperatureK().isPresent())) {
            Map<Double, List<ModulusPoint>> tagged = points.stream()
                    .collect(Collectors.groupingBy(
                            point -> point.taggedTemperatureK().orElseThrow(), TreeMap::new, Collectors.toList()));
            if (tagged.size() > 1) {
                return List.copyOf(tagged.values());
            }
        }
        List<ModulusPoint> known = rising(
                points.stream()
                        .filter(point -> point.temperatureK().isPresent())
                        .toList(),
                PointGroups::temperatureK);
        List<List<ModulusPoint>> groups = new ArrayList<>();
        double last = Double.NEGATIVE_INFINITY;
        for (ModulusPoint point : known) {
            if (temperatureK(point) - last > Isotherms.TOLERANCE_K) {
                groups.add(new ArrayList<>());
            }
            groups.get(groups.size() - 1).add(point);
            last = temperatureK(point);
        }
        addThoseWithoutTemperature(points, groups);
        return groups;
    }

    private static void addThoseWithoutTemperature(List<ModulusPoint> points, List<List<ModulusPoint>> groups) {
        List<ModulusPoint> unknown =
                points.stream().filter(point -> point.temperatureK().isEmpty()).toList();
        if (!unknown.isEmpty()) {
            groups.add(unknown);
        }
    }

    /** Whether some of the points lead from one temperature to another without a break, by more than a hold may wander. */
    static boolean ramps(List<ModulusPoint> points) {
        return byUnbrokenTemperature(points).stream()
                .anyMatch(group -> range(group, point -> point.temperatureK().orElse(0)) > HOLD_K);
    }

    /** The points by a figure, rising; equal ones in the order in which they come. */
    static List<ModulusPoint> rising(List<ModulusPoint> points, ToDoubleFunction<ModulusPoint> figure) {
        return points.stream().sorted(Comparator.comparingDouble(figure)).toList();
    }

    /** Largest less smallest. */
    static double range(List<ModulusPoint> points, ToDoubleFunction<ModulusPoint> figure) {
        return points.stream().mapToDouble(figure).max().orElseThrow()
                - points.stream().mapToDouble(figure).min().orElseThrow();
    }

    static double frequencyHz(ModulusPoint point) {
        return point.frequencyHz().orElseThrow();
    }

    static double temperatureK(ModulusPoint point) {
        return point.temperatureK().orElseThrow();
    }
}

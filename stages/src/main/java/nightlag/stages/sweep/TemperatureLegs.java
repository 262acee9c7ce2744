package nightlag.stages.sweep;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.function.Function;
import java.util.stream.Collectors;
import nightlag.stages.moduli.ModulusPoint;

/**
 * Heating and cooling of a temperature sweep at one frequency, told apart by the order in which its points were recorded. The
 * ramp turns where the temperature comes back from its extreme by more than a hold may wander.
 */
final class TemperatureLegs {
    /** An order in which any leg has fewer points, or does not lead out of a hold, is not that of the record. */
    private static final int LEAST = 3;

    private static final Comparator<ModulusPoint> BY_TIME =
            Comparator.comparingDouble(point -> point.elapsedS().orElse(0));

    private TemperatureLegs() {}

    /**
     * Points between two turns.
     *
     * @param heating whether the temperature rises
     * @param points in the order of the record
     */
    record Stretch(boolean heating, List<ModulusPoint> points) {
        boolean isOne() {
            return points.size() >= LEAST && PointGroups.range(points, PointGroups::temperatureK) > PointGroups.HOLD_K;
        }
    }

    /**
     * The legs in the order of the record: by elapsed time where all points have one; where that does not tell, as for files that
     * each have a clock of their own, by the time within each file; else by the order of the points. One of all points where
     * the ramp does not turn, or no order tells where.
     *
     * @param points one or more, all of them with a temperature
     */
    static List<Stretch> of(List<ModulusPoint> points) {
        List<List<Stretch>> found = new ArrayList<>();
        if (points.stream().allMatch(point -> point.elapsedS().isPresent())) {
            if (areDifferent(points, point -> point.elapsedS().orElseThrow())) {
                found.add(between(points.stream().sorted(BY_TIME).toList()));
            }
            found.add(ofFiles(points));
        }
        if (areDifferent(points, point -> point.key().point())) {
            found.add(between(points.stream().sorted(PointOrder.BY_KEY).toList()));
        }
        return found.stream()
                .filter(legs -> !legs.isEmpty() && legs.stream().allMatch(Stretch::isOne))
                .findFirst()
                .orElse(List.of(new Stretch(true, points)));
    }

    /**
     * The first heating of all files together, for they are repeats; so the first cooling, the second heating … None where a
     * file is too short to tell.
     */
    private static List<Stretch> ofFiles(List<ModulusPoint> points) {
        Map<String, List<ModulusPoint>> files = points.stream()
                .sorted(PointOrder.BY_KEY)
                .collect(Collectors.groupingBy(
                        point -> point.key().sourceFile(), LinkedHashMap::new, Collectors.toList()));
        Map<Integer, List<ModulusPoint>> legs = new LinkedHashMap<>();
        for (List<ModulusPoint> file : files.values()) {
            int heatings = 0;
            int coolings = 0;
            for (Stretch leg : between(file.stream().sorted(BY_TIME).toList())) {
                if (!leg.isOne()) {
                    return List.of();
                }
                int number = leg.heating() ? ++heatings : - ++coolings;
                legs.computeIfAbsent(number, any -> new ArrayList<>()).addAll(leg.points());
            }
        }
        return legs.entrySet().stream()
                .map(leg -> new Stretch(leg.getKey() > 0, leg.getValue()))
                .toList();
    }

    private static boolean areDifferent(List<ModulusPoint> points, Function<ModulusPoint, Object> figure) {
        return points.stream().map(figure).distinct().count() == points.size();
    }

    private static List<Stretch> between(List<ModulusPoint> ordered) {
        List<Stretch> legs = new ArrayList<>();
        int begin = 0;
        int extreme = 0;
        int direction = firstDirection(ordered);
        for (int i = 0; i < ordered.size() && direction != 0; i++) {
            double beyond = direction
                    * (PointGroups.temperatureK(ordered.get(i)) - PointGroups.temperatureK(ordered.get(extreme)));
            if (beyond >= 0) {
                extreme = i;
            } else if (beyond < -PointGroups.HOLD_K) {
                legs.add(new Stretch(direction > 0, ordered.subList(begin, extreme + 1)));
                begin = extreme + 1;
                extreme = i;
                direction = -direction;
            }
        }
        legs.add(new Stretch(direction >= 0, ordered.subList(begin, ordered.size())));
        return legs;
    }

    /** 1 where the temperature first leaves a hold upwards, −1 where downwards, 0 where it never does. */
    private static int firstDirection(List<ModulusPoint> ordered) {
        double lowest = Double.POSITIVE_INFINITY;
        double highest = Double.NEGATIVE_INFINITY;
        for (ModulusPoint point : ordered) {
            double temperature = PointGroups.temperatureK(point);
            lowest = Math.min(lowest, temperature);
            highest = Math.max(highest, temperature);
            if (highest - lowest > PointGroups.HOLD_K) {
                return temperature == highest ? 1 : -1;
            }
        }
        return 0;
    }
}

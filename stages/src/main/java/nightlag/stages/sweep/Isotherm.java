package nightlag.stages.sweep;

import java.util.List;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.ModulusReading;

/**
 * Points at one temperature.
 *
 * @param temperatureK their mean temperature, K
 * @param points the points, in the order they were given
 */
public record Isotherm(double temperatureK, List<ModulusPoint> points) {
    /** Copies the list. */
    public Isotherm {
        points = List.copyOf(points);
    }

    /** The moduli over frequency of those points that have both, in their order. */
    public List<ModulusReading> readings() {
        return readings(points);
    }

    /** Names of the points with both, in their order: specimen and sweep of each reading. */
    public List<SweepName> names() {
        return points.stream().filter(Isotherm::isReading).map(SweepName::of).toList();
    }

    private static boolean isReading(ModulusPoint point) {
        return point.frequencyHz().isPresent() && point.moduli().isPresent();
    }

    /** The moduli over frequency of points, likewise. */
    static List<ModulusReading> readings(List<ModulusPoint> points) {
        return points.stream()
                .filter(Isotherm::isReading)
                .map(point -> new ModulusReading(
                        2 * Math.PI * point.frequencyHz().orElseThrow(),
                        point.moduli().orElseThrow()))
                .toList();
    }
}

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

    /** The moduli over frequency of points, likewise. */
    static List<ModulusReading> readings(List<ModulusPoint> points) {
        return points.stream()
                .filter(point ->
                        point.frequencyHz().isPresent() && point.moduli().isPresent())
                .map(point -> new ModulusReading(
                        2 * Math.PI * point.frequencyHz().orElseThrow(),
                        point.moduli().orElseThrow()))
                .toList();
    }
}

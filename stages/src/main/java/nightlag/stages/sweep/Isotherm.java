package nightlag.stages.sweep;

import java.util.List;
import nightlag.stages.moduli.ModulusPoint;

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
}

package nightlag.stages;

import java.util.List;
import nightlag.stages.moduli.ModulusPoint;

/**
 * What one record gave.
 *
 * @param points its points; one for a record at one frequency
 */
public record Reduction(List<ModulusPoint> points) {
    /** Copies the list. */
    public Reduction {
        points = List.copyOf(points);
    }
}

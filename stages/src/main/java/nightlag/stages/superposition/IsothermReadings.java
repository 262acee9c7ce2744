package nightlag.stages.superposition;

import java.util.List;
import nightlag.stages.moduli.ModulusReading;

/**
 * The moduli of a lot at one temperature, over frequency.
 *
 * @param temperatureK mean temperature, K
 * @param readings finite moduli at positive frequencies, in any order, repeats allowed
 */
public record IsothermReadings(double temperatureK, List<ModulusReading> readings) {
    /** Copies the list. */
    public IsothermReadings {
        readings = List.copyOf(readings);
    }
}

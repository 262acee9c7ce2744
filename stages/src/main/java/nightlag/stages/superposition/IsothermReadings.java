package nightlag.stages.superposition;

import java.util.Collections;
import java.util.List;
import nightlag.stages.moduli.ModulusReading;

/**
 * The moduli of a lot at one temperature, over frequency.
 *
 * @param temperatureK mean temperature, K
 * @param readings finite moduli at positive frequencies, in any order, repeats allowed
 * @param specimens of each reading the specimen, or the loading, whose dimensions it shares
 */
public record IsothermReadings(double temperatureK, List<ModulusReading> readings, List<String> specimens) {
    /** Copies the lists. */
    public IsothermReadings {
        if (readings.size() != specimens.size()) {
            throw new IllegalArgumentException(readings.size() + " readings of " + specimens.size() + " specimens");
        }
        readings = List.copyOf(readings);
        specimens = List.copyOf(specimens);
    }

    /** Readings of one specimen. */
    public IsothermReadings(double temperatureK, List<ModulusReading> readings) {
        this(temperatureK, readings, Collections.nCopies(readings.size(), ""));
    }
}

package nightlag.stages.acceptance;

import java.util.List;
import java.util.OptionalDouble;

/**
 * A lot's value for one limit.
 *
 * @param value in the limit's unit
 * @param u its standard uncertainty; empty where none can be had
 * @param notes how it was had, a clause each
 */
record Estimate(double value, OptionalDouble u, List<String> notes) {
    /** Copies the list. */
    Estimate {
        notes = List.copyOf(notes);
    }
}

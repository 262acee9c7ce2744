package nightlag.stages.acceptance;

import java.util.List;
import java.util.Optional;

/**
 * What is remembered of a lot to compare others with.
 *
 * @param lot its name
 * @param made its date as tagged, the earliest of its records; empty where there is none
 * @param values its values for limits
 */
public record LotRecord(String lot, Optional<String> made, List<Value> values) {
    /** Copies the list. */
    public LotRecord {
        values = List.copyOf(values);
    }

    /**
     * A lot's value for a limit.
     *
     * @param quantity what the limit is on, see {@link LimitPlan#quantity()}
     * @param value in the limit's unit, K for a temperature
     */
    public record Value(String quantity, double value) {}
}

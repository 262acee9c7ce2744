package nightlag.stages.acceptance;

import java.util.List;
import java.util.OptionalLong;

/**
 * What is remembered of a lot to compare others with.
 *
 * @param lot its name
 * @param day its date, counted in days from any day that is the same for all lots; empty where it has none
 * @param values its values for limits
 */
public record LotRecord(String lot, OptionalLong day, List<Value> values) {
    /** Copies the list. */
    public LotRecord {
        values = List.copyOf(values);
    }

    /** The same lot with other values. */
    public LotRecord with(List<Value> others) {
        return new LotRecord(lot, day, others);
    }

    /**
     * A lot's value for a limit.
     *
     * @param quantity what the limit is on, see {@link LimitPlan#quantity()}
     * @param value in the limit's unit, K for a temperature
     */
    public record Value(String quantity, double value) {}
}

package nightlag.stages.acceptance;

import java.util.Collection;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import nightlag.stages.sweep.NaturalOrder;

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
     * A lot whose records may be tagged with several dates: the earliest that can be read as one counts, else the first of the
     * texts in their order.
     */
    public static LotRecord of(String lot, Collection<String> dates, List<Value> values) {
        Optional<String> made = dates.stream()
                .filter(text -> LotDate.of(text).isPresent())
                .min(Comparator.comparing((String text) -> LotDate.of(text).orElseThrow())
                        .thenComparing(Comparator.naturalOrder()))
                .or(() -> dates.stream().min(NaturalOrder::compare));
        return new LotRecord(lot, made, values);
    }

    /** The same lot with other values. */
    public LotRecord with(List<Value> others) {
        return new LotRecord(lot, made, others);
    }

    /**
     * A lot's value for a limit.
     *
     * @param quantity what the limit is on, see {@link LimitPlan#quantity()}
     * @param value in the limit's unit, K for a temperature
     */
    public record Value(String quantity, double value) {}
}

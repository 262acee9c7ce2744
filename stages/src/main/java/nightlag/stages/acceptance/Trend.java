package nightlag.stages.acceptance;

import java.util.List;
import java.util.Locale;
import nightlag.stages.fault.ReasonCode;

/**
 * A lot's value among those of the grade's earlier lots: an individuals chart (ISO 7870-2:2023).
 *
 * @param limit the limit whose values are followed
 * @param value the lot's value, in the limit's unit, K for a temperature
 * @param mean mean of the earlier values
 * @param lower lower control limit
 * @param upper upper control limit
 * @param lots how many earlier lots the control limits rest on
 * @param earlier the latest of them, the first one first
 */
public record Trend(
        LimitPlan limit, double value, double mean, double lower, double upper, int lots, List<LotValue> earlier) {
    /** Copies the list. */
    public Trend {
        earlier = List.copyOf(earlier);
    }

    /**
     * A lot's value.
     *
     * @param lot the lot's name
     * @param value its value
     */
    public record LotValue(String lot, double value) {}

    /** Inside or outside of the control limits; it says nothing about the limits of acceptance. */
    public Verdict verdict() {
        return value >= lower && value <= upper ? Verdict.CONFORMING : Verdict.NONCONFORMING;
    }

    /** In words; it begins with {@code trend}. */
    public String note() {
        String where = verdict() == Verdict.CONFORMING ? "among" : value > upper ? "above" : "below";
        String unit =
                limit.shown().symbol().equals("1") ? "" : " " + limit.shown().symbol();
        return String.format(
                Locale.ROOT,
                "trend: %s its %d earlier lots; mean %s%s, control limits 2.66 mean moving ranges about it",
                where,
                lots,
                ReasonCode.shortest(limit.shown().of(mean)),
                unit);
    }
}

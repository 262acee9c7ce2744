package nightlag.stages;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import nightlag.stages.acceptance.IndividualsChart;
import nightlag.stages.acceptance.LimitPlan;
import nightlag.stages.acceptance.LotRecord;
import nightlag.stages.acceptance.Trend;
import nightlag.stages.sweep.NaturalOrder;

/** Each lot of a grade among the earlier ones. */
public final class Compare {
    private Compare() {}

    /**
     * Compares the lots of one grade.
     *
     * @param lots what is remembered of each, in any order
     * @return by lot, the lots in their {@linkplain #inOrder order}: a trend for each limit that the lot and at least {@value
     *     IndividualsChart#FEWEST} earlier ones have a value for, in the order of the configuration; a limit on the same
     *     quantity as one before it says nothing new and has none
     */
    public static Map<String, List<Trend>> compare(List<LotRecord> lots, ConclusionPlan plan) {
        Map<String, IndividualsChart> charts = charts(plan);
        Map<String, List<Trend>> trends = new LinkedHashMap<>();
        inOrder(lots).forEach(lot -> trends.put(lot.lot(), next(lot, charts)));
        return trends;
    }

    /**
     * The trends of one lot.
     *
     * @param earlier the grade's lots before it, in their {@linkplain #inOrder order}
     */
    public static List<Trend> compare(LotRecord lot, List<LotRecord> earlier, ConclusionPlan plan) {
        Map<String, IndividualsChart> charts = charts(plan);
        earlier.forEach(before -> next(before, charts));
        return next(lot, charts);
    }

    /** What is to be remembered of a lot. */
    public static List<LotRecord.Value> values(LotResult result) {
        return result.acceptance().stream()
                .filter(judged -> judged.value().isPresent())
                .map(judged -> new LotRecord.Value(
                        judged.limit().quantity(), judged.value().getAsDouble()))
                .distinct()
                .toList();
    }

    private static Map<String, IndividualsChart> charts(ConclusionPlan plan) {
        Map<String, IndividualsChart> charts = new LinkedHashMap<>();
        for (LimitPlan limit : plan.limits()) {
            charts.putIfAbsent(limit.quantity(), new IndividualsChart(limit));
        }
        return charts;
    }

    private static List<Trend> next(LotRecord lot, Map<String, IndividualsChart> charts) {
        List<Trend> trends = new ArrayList<>();
        charts.forEach((quantity, chart) -> value(lot, quantity)
                .flatMap(value -> chart.next(lot.lot(), value))
                .ifPresent(trends::add));
        return List.copyOf(trends);
    }

    private static Optional<Double> value(LotRecord lot, String quantity) {
        return lot.values().stream()
                .filter(value -> value.quantity().equals(quantity) && Double.isFinite(value.value()))
                .map(LotRecord.Value::value)
                .findFirst();
    }

    /**
     * The lots as they came: by date where every one has a date, those of one day by name; else all by name, digits compared as
     * the numbers they are.
     */
    public static List<LotRecord> inOrder(List<LotRecord> lots) {
        Comparator<LotRecord> byName = Comparator.comparing(LotRecord::lot, NaturalOrder::compare);
        Comparator<LotRecord> order = lots.stream().allMatch(lot -> lot.day().isPresent())
                ? Comparator.comparingLong((LotRecord lot) -> lot.day().orElseThrow())
                        .thenComparing(byName)
                : byName;
        return lots.stream().sorted(order).toList();
    }
}

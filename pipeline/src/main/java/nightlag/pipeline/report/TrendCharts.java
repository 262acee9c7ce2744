package nightlag.pipeline.report;

import java.util.ArrayList;
import java.util.List;
import java.util.stream.IntStream;
import nightlag.stages.acceptance.ShownUnit;
import nightlag.stages.acceptance.Trend;

/** The lot among its predecessors: an individuals chart for each value that has enough of them. */
final class TrendCharts {
    private static final int MEAN_LOOK = 2;
    private static final int LIMIT_LOOK = 6;

    private TrendCharts() {}

    static List<Chart> of(List<Trend> trends) {
        return trends.stream().map(TrendCharts::chart).toList();
    }

    private static Chart chart(Trend trend) {
        ShownUnit shown = trend.limit().shown();
        List<Trend.LotValue> earlier = trend.earlier();
        int first = trend.lots() - earlier.size() + 1;
        int last = trend.lots() + 1;
        List<Series> series = new ArrayList<>();
        series.add(Series.of(
                "earlier lots",
                0,
                true,
                false,
                IntStream.range(0, earlier.size()).boxed().toList(),
                i -> first + i,
                i -> shown.of(earlier.get(i).value())));
        series.add(Series.of("this lot", 1, true, false, List.of(trend), one -> last, one -> shown.of(one.value())));
        series.add(level("mean of the earlier lots", MEAN_LOOK, first, last, shown.of(trend.mean())));
        series.add(level("control limits", LIMIT_LOOK, first, last, shown.of(trend.lower())));
        series.add(level("control limits", LIMIT_LOOK, first, last, shown.of(trend.upper())));
        return new Chart(
                "The lot among its predecessors: " + trend.limit().title(),
                "Each lot of the grade in its order, this one last, from "
                        + earlier.get(0).lot() + " to "
                        + earlier.get(earlier.size() - 1).lot()
                        + " and this. Outside the control limits, the mean and 2.66 mean"
                        + " moving ranges, a lot is unlike those before it; it may still meet its limits.",
                Axis.linear("number of the lot", ""),
                Axis.linear(
                        trend.limit().property().replace('_', ' '),
                        shown.symbol().equals("1") ? "" : shown.symbol()),
                series);
    }

    private static Series level(String name, int look, int first, int last, double value) {
        return Series.of(name, look, false, true, List.of(first, last), place -> place, place -> value);
    }
}

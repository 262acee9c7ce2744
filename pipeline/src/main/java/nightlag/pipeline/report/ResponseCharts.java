package nightlag.pipeline.report;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.function.ToDoubleFunction;
import java.util.stream.IntStream;
import nightlag.stages.response.ResponsePlan.Controlled;
import nightlag.stages.response.ResponseRow;
import nightlag.stages.response.ResponseRow.Band;

/**
 * A chart of each prediction, with its band: over time where its stretches are alike long, else over log time. What no data
 * stand behind is grey.
 */
final class ResponseCharts {
    private static final String CAUTION =
            " A linear viscoelastic estimate from small samples; not a design value. Ageing, moisture, damage and yield are not in it,"
                    + " nor are thermal strain and the vertical shift. Structural, pressure or medical use needs the applicable"
                    + " code and a licensed engineer's judgement.";

    /** A first stretch shorter than this share of the whole would be lost on an axis that is not logarithmic. */
    private static final double LEAST_SHARE = 0.02;

    /** The look that is grey. */
    private static final int GREY = 6;

    private ResponseCharts() {}

    static List<Chart> of(List<ResponseRow> rows) {
        Map<String, List<ResponseRow>> byName = new LinkedHashMap<>();
        rows.forEach(row -> byName.computeIfAbsent(row.response(), name -> new ArrayList<>())
                .add(row));
        return byName.entrySet().stream()
                .map(response -> chart(response.getKey(), response.getValue()))
                .toList();
    }

    private static Chart chart(String name, List<ResponseRow> rows) {
        boolean strain = rows.get(0).controlled() == Controlled.STRESS;
        ToDoubleFunction<ResponseRow> predicted = strain ? ResponseRow::strain : ResponseRow::stressPa;
        boolean wide =
                firstStepS(rows) < LEAST_SHARE * rows.get(rows.size() - 1).timeS();
        List<Series> series = new ArrayList<>();
        for (List<ResponseRow> run : runs(wide ? afterTheStart(rows) : rows)) {
            boolean inside = run.stream().allMatch(ResponseRow::insideData);
            series.add(Series.withBand(
                    inside ? "inside the data" : "beyond the data",
                    inside ? 0 : GREY,
                    run,
                    ResponseRow::timeS,
                    predicted,
                    row -> row.band().map(Band::low).orElse(predicted.applyAsDouble(row)),
                    row -> row.band().map(Band::high).orElse(predicted.applyAsDouble(row))));
        }
        return new Chart(
                name + (strain ? ": strain" : ": stress"),
                "Predicted " + (strain ? "strain" : "stress")
                        + " and the band it lies in with 95 % probability; grey where no data" + " stand behind it."
                        + CAUTION,
                wide ? Axis.log("time", "s") : Axis.linear("time", "s"),
                Axis.linear(strain ? "strain" : "stress", strain ? "" : "Pa"),
                series);
    }

    /** When something steps for the first time after the start; 0 where nothing does. */
    private static double firstStepS(List<ResponseRow> rows) {
        return IntStream.range(1, rows.size())
                .filter(i -> rows.get(i).timeS() == rows.get(i - 1).timeS())
                .mapToDouble(i -> rows.get(i).timeS())
                .filter(timeS -> timeS > 0)
                .findFirst()
                .orElse(0);
    }

    private static List<ResponseRow> afterTheStart(List<ResponseRow> rows) {
        return rows.stream().filter(row -> row.timeS() > 0).toList();
    }

    /** Neighbours that are alike inside or beyond the data; those beyond reach over to what is beside them, so that none is torn. */
    private static List<List<ResponseRow>> runs(List<ResponseRow> all) {
        List<ResponseRow> rows = thinned(all);
        List<List<ResponseRow>> runs = new ArrayList<>();
        int from = 0;
        for (int to = 1; to <= rows.size(); to++) {
            boolean inside = rows.get(from).insideData();
            if (to == rows.size() || rows.get(to).insideData() != inside) {
                int first = inside ? from : Math.max(0, from - 1);
                int end = inside ? to : Math.min(rows.size(), to + 1);
                runs.add(rows.subList(first, end));
                from = to;
            }
        }
        return runs;
    }

    private static List<ResponseRow> thinned(List<ResponseRow> rows) {
        int step = 1 + (rows.size() - 1) / Series.MOST_POINTS;
        return IntStream.range(0, rows.size())
                .filter(i -> i % step == 0 || i == rows.size() - 1)
                .mapToObj(rows::get)
                .toList();
    }
}

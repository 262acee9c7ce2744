package nightlag.pipeline.tables;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.OptionalDouble;
import nightlag.stages.LotResult;
import nightlag.stages.acceptance.Judgement;
import nightlag.stages.acceptance.LimitPlan;
import nightlag.stages.acceptance.Trend;
import nightlag.stages.acceptance.Verdict;

/** The declaration of {@code acceptance}; rows stand in the order of the configuration, a trend behind its limit. */
final class AcceptanceTable {
    private static final String CELSIUS = "°C";
    private static final String OWN_UNIT = "see the column unit";

    static final Table<Row> TABLE = Table.of(
            "acceptance",
            "The lot against one limit of its grade, or among the grade's earlier lots: then the note begins with trend. Linear"
                    + " viscoelastic estimates from small samples, not design values: ageing, moisture, damage and yield are"
                    + " not in them; structural, pressure or medical use needs the applicable code and a licensed engineer's"
                    + " judgement",
            LotColumns.before(
                    Row::grade,
                    Row::lot,
                    row -> "",
                    List.of(
                            Column.<Row>text(
                                            "property",
                                            "what the limit is on",
                                            row -> row.limit().property())
                                    .required(),
                            Column.optional(
                                    "temperature_C",
                                    CELSIUS,
                                    "temperature the limit holds at",
                                    row -> Columns.celsius(row.limit().temperatureK())),
                            Column.<Row>optional(
                                            "frequency_Hz",
                                            "Hz",
                                            "frequency the limit holds at",
                                            row -> row.limit().frequencyHz())
                                    .atLeast(0),
                            Column.optional(
                                    "value",
                                    OWN_UNIT,
                                    "the lot's value; empty where it is missing",
                                    row -> row.shown(row.value())),
                            Column.<Row>optional(
                                            "u",
                                            OWN_UNIT,
                                            "standard uncertainty of the value, what many records share included",
                                            Row::u)
                                    .atLeast(0),
                            Column.<Row>text(
                                            "unit",
                                            "unit of value, u and limits: as the property has it in points or markers",
                                            row -> row.limit().unit())
                                    .required(),
                            Column.optional(
                                    "lower_limit",
                                    OWN_UNIT,
                                    "lower limit; of a trend the lower control limit",
                                    row -> row.shown(row.lower())),
                            Column.optional(
                                    "upper_limit",
                                    OWN_UNIT,
                                    "upper limit; of a trend the upper control limit",
                                    row -> row.shown(row.upper())),
                            Column.<Row>word(
                                            "verdict",
                                            "what is said of the lot; of a trend, whether it lies within the control limits",
                                            Arrays.stream(Verdict.values())
                                                    .map(Verdict::word)
                                                    .toList(),
                                            row -> row.verdict().word())
                                    .required(),
                            Column.text("note", "how the value was had, and what else there is to know", Row::note))));

    private AcceptanceTable() {}

    /** A row of the table. */
    record Row(
            String grade,
            String lot,
            LimitPlan limit,
            OptionalDouble value,
            OptionalDouble u,
            OptionalDouble lower,
            OptionalDouble upper,
            Verdict verdict,
            String note) {
        private OptionalDouble shown(OptionalDouble number) {
            return limit.unit().equals(CELSIUS) ? Columns.celsius(number) : number;
        }
    }

    static List<Row> rows(LotResult result, String grade, String lot) {
        List<Row> rows = new ArrayList<>();
        for (Judgement judged : result.acceptance()) {
            LimitPlan limit = judged.limit();
            rows.add(new Row(
                    grade,
                    lot,
                    limit,
                    judged.value(),
                    judged.u(),
                    limit.min(),
                    limit.max(),
                    judged.verdict(),
                    judged.note()));
            result.trend().stream()
                    .filter(trend -> trend.limit().equals(limit))
                    .forEach(trend -> rows.add(row(grade, lot, trend, judged.u())));
        }
        return rows;
    }

    private static Row row(String grade, String lot, Trend trend, OptionalDouble u) {
        return new Row(
                grade,
                lot,
                trend.limit(),
                OptionalDouble.of(trend.value()),
                u,
                OptionalDouble.of(trend.lower()),
                OptionalDouble.of(trend.upper()),
                trend.verdict(),
                trend.note());
    }
}

package nightlag.pipeline.tables;

import java.util.List;
import java.util.OptionalDouble;
import java.util.function.ToDoubleFunction;
import nightlag.stages.response.ResponsePlan.Controlled;
import nightlag.stages.response.ResponseRow;
import nightlag.stages.response.ResponseRow.Band;
import nightlag.stages.response.ResponseRow.StrainParts;

/** The declaration of {@code response}; rows stand in the order of the configuration, then of time. */
final class ResponseTable {
    static final Table<Row> TABLE = Table.of(
            "response",
            "Stress and strain at one instant of a prediction by linear viscoelasticity, without thermal strain and without the"
                    + " vertical shift. Estimates from small samples, not design values: ageing, moisture, damage and yield are"
                    + " not in them; structural, pressure or medical use needs the applicable code and a licensed engineer's"
                    + " judgement",
            LotColumns.before(
                    Row::grade,
                    Row::lot,
                    row -> "",
                    List.of(
                            Column.text(
                                    "response",
                                    "name of the prediction in the grade file",
                                    row -> row.at().response()),
                            Column.<Row>number(
                                            "temperature_C",
                                            "°C",
                                            "temperature at that instant",
                                            row -> Cells.celsius(row.at().temperatureK()))
                                    .required(),
                            Column.<Row>number(
                                            "time_s",
                                            "s",
                                            "time since the programme began; a step has two rows, before it and after it",
                                            row -> row.at().timeS())
                                    .required()
                                    .atLeast(0),
                            Column.number(
                                    "stress_Pa", "Pa", "stress", row -> row.at().stressPa()),
                            Column.number(
                                    "strain", "1", "strain", row -> row.at().strain()),
                            Column.yesNo(
                                    "inside_data",
                                    "whether data stand behind it: every reduced time since a step is one the spectrum is"
                                            + " supported at, every temperature so far is among the isotherms",
                                    row -> row.at().insideData()),
                            end(
                                    "stress_low_Pa",
                                    "Pa",
                                    "lower end of the 95 % band of a predicted stress",
                                    Controlled.STRAIN,
                                    Band::low),
                            end("stress_high_Pa", "Pa", "upper end of it", Controlled.STRAIN, Band::high),
                            end(
                                    "strain_low",
                                    "1",
                                    "lower end of the 95 % band of a predicted strain",
                                    Controlled.STRESS,
                                    Band::low),
                            end("strain_high", "1", "upper end of it", Controlled.STRESS, Band::high),
                            part(
                                    "strain_at_once",
                                    "part of a predicted strain that goes at once when the stress is taken off",
                                    StrainParts::atOnce),
                            part("strain_later", "part of it that comes back with time", StrainParts::later),
                            part("strain_never", "part of it that has flowed and stays", StrainParts::never))));

    private ResponseTable() {}

    private static Column<Row> end(
            String name, String unit, String meaning, Controlled controlled, ToDoubleFunction<Band> which) {
        return Column.optional(
                name,
                unit,
                meaning,
                row -> row.at().controlled() == controlled
                        ? Columns.from(row.at().band(), which)
                        : OptionalDouble.empty());
    }

    private static Column<Row> part(String name, String meaning, ToDoubleFunction<StrainParts> which) {
        return Column.optional(name, "1", meaning, row -> Columns.from(row.at().parts(), which));
    }

    /** An instant of a prediction with the lot it is of. */
    record Row(String grade, String lot, ResponseRow at) {}
}

package nightlag.pipeline.tables;

import java.util.List;
import nightlag.stages.moduli.FigureRow;

/** The declaration of {@code derived}. */
final class DerivedTable {
    static final Table<FigureRow> TABLE = Table.of(
            "derived",
            "One figure that the grade defines for itself, at one usable point",
            LotColumns.before(
                    row -> row.key().grade(),
                    row -> row.key().lot(),
                    row -> row.key().specimen(),
                    List.of(
                            Column.<FigureRow>text(
                                            "sweep",
                                            "sweep of the specimen",
                                            row -> row.key().sweep())
                                    .asKey(),
                            Column.<FigureRow>text(
                                            "point",
                                            "point of the sweep, as in points",
                                            row -> row.key().point())
                                    .asKey(),
                            Column.<FigureRow>text("quantity", "what the figure is called", FigureRow::quantity)
                                    .required()
                                    .asKey(),
                            Column.optional(
                                    "temperature_C",
                                    "°C",
                                    "temperature of the point",
                                    row -> Columns.celsius(row.temperatureK())),
                            Column.<FigureRow>optional(
                                            "frequency_Hz", "Hz", "frequency of the point", FigureRow::frequencyHz)
                                    .atLeast(0),
                            Column.<FigureRow>number("value", "see the column unit", "the figure", FigureRow::value)
                                    .required(),
                            Column.<FigureRow>optional(
                                            "u",
                                            "see the column unit",
                                            "standard uncertainty of the figure from the record's own noise",
                                            FigureRow::u)
                                    .atLeast(0),
                            Column.<FigureRow>text(
                                            "unit", "unit of the figure, as the grade file says", FigureRow::unit)
                                    .required(),
                            Column.<FigureRow>text(
                                            "source_file",
                                            "raw file the point came from",
                                            row -> row.key().sourceFile())
                                    .required()
                                    .asKey())));

    private DerivedTable() {}
}

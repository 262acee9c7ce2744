package nightlag.pipeline.tables;

import java.util.Comparator;
import java.util.List;
import nightlag.stages.moduli.Marker;
import nightlag.stages.sweep.NaturalOrder;

/** The declaration of {@code markers}. */
final class MarkersTable {
    private static final String CELSIUS = "°C";

    static final Table<Row> TABLE = Table.of(
            "markers",
            "One characteristic figure of a sweep or of the whole lot",
            LotColumns.before(
                    Row::grade,
                    Row::lot,
                    row -> row.marker().specimen(),
                    List.of(
                            Column.<Row>text(
                                            "sweep",
                                            "sweep of the specimen; empty where the figure is drawn from the whole lot",
                                            row -> row.marker().sweep())
                                    .asKey(),
                            Column.<Row>text(
                                            "property",
                                            "what the figure is",
                                            row -> row.marker().property())
                                    .required()
                                    .asKey(),
                            Column.<Row>optional(
                                            "temperature_C",
                                            CELSIUS,
                                            "temperature it was found at",
                                            row -> Columns.celsius(row.marker().temperatureK()))
                                    .asKey(),
                            Column.<Row>optional(
                                            "frequency_Hz",
                                            "Hz",
                                            "frequency it was found at",
                                            row -> row.marker().frequencyHz())
                                    .atLeast(0)
                                    .asKey(),
                            Column.number("value", "see the column unit", "the figure", MarkersTable::value),
                            Column.<Row>optional(
                                            "u",
                                            "see the column unit",
                                            "standard uncertainty of the figure",
                                            row -> row.marker().u())
                                    .atLeast(0),
                            Column.<Row>text(
                                            "unit",
                                            "unit of the figure: SI without prefix, or °C",
                                            row -> row.marker().unit())
                                    .required(),
                            Column.text(
                                    "method",
                                    "how it was found",
                                    row -> row.marker().method()))),
            Comparator.comparing((Row row) -> row.marker().method(), NaturalOrder::compare)
                    .thenComparingDouble(MarkersTable::value));

    private MarkersTable() {}

    private static double value(Row row) {
        Marker marker = row.marker();
        return marker.unit().equals(CELSIUS) ? Cells.celsius(marker.value()) : marker.value();
    }

    /** A marker with the lot it is of. */
    record Row(String grade, String lot, Marker marker) {}
}

package nightlag.pipeline.tables;

import java.util.Arrays;
import java.util.List;
import nightlag.stages.spectrum.SpectrumRow;

/** The declaration of {@code spectrum}. */
final class SpectrumTable {
    private static final String SEE_UNIT = "see the column unit";

    static final Table<Row> TABLE = Table.of(
            "spectrum",
            "One mode of a discrete spectrum, or one node of a continuous one",
            LotColumns.before(
                    Row::grade,
                    Row::lot,
                    row -> "",
                    List.of(
                            Column.<Row>number(
                                            "reference_temperature_C",
                                            "°C",
                                            "temperature the spectrum holds at",
                                            row -> Cells.celsius(row.mode().referenceTemperatureK()))
                                    .required()
                                    .asKey(),
                            Column.<Row>word(
                                            "kind",
                                            "which spectrum: of moduli or of compliances",
                                            Arrays.stream(SpectrumRow.Kind.values())
                                                    .map(SpectrumRow.Kind::word)
                                                    .toList(),
                                            row -> row.mode().kind().word())
                                    .asKey(),
                            Column.<Row>word(
                                            "form",
                                            "modes, or a density per unit of ln(time)",
                                            Arrays.stream(SpectrumRow.Form.values())
                                                    .map(SpectrumRow.Form::word)
                                                    .toList(),
                                            row -> row.mode().form().word())
                                    .asKey(),
                            Column.<Row>number(
                                            "time_s",
                                            "s",
                                            "relaxation or retardation time",
                                            row -> row.mode().timeS())
                                    .required()
                                    .atLeast(0)
                                    .asKey(),
                            Column.number(
                                    "value",
                                    SEE_UNIT,
                                    "modulus or compliance",
                                    row -> row.mode().value()),
                            Column.optional(
                                    "low",
                                    SEE_UNIT,
                                    "lower end of the 95 % band of a continuous spectrum; modes have none",
                                    row -> row.mode().low()),
                            Column.optional(
                                    "high",
                                    SEE_UNIT,
                                    "upper end of it, likewise",
                                    row -> row.mode().high()),
                            Column.word(
                                    "unit",
                                    "unit of value, low and high",
                                    Arrays.stream(SpectrumRow.Kind.values())
                                            .map(SpectrumRow.Kind::unit)
                                            .toList(),
                                    row -> row.mode().kind().unit()))));

    private SpectrumTable() {}

    /** A row of a spectrum with the lot it is of. */
    record Row(String grade, String lot, SpectrumRow mode) {}
}

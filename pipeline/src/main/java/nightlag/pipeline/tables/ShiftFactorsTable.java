package nightlag.pipeline.tables;

import java.util.List;
import nightlag.stages.superposition.ShiftFactor;

/** The declaration of {@code shift_factors}. */
final class ShiftFactorsTable {
    static final Table<Row> TABLE = Table.of(
            "shift_factors",
            "How far one isotherm is moved onto the master curve",
            LotColumns.before(
                    Row::grade,
                    Row::lot,
                    row -> "",
                    List.of(
                            Column.<Row>number(
                                            "reference_temperature_C",
                                            "°C",
                                            "temperature of the master curve",
                                            row -> Cells.celsius(row.shift().referenceTemperatureK()))
                                    .required()
                                    .asKey(),
                            Column.<Row>number(
                                            "temperature_C",
                                            "°C",
                                            "mean temperature of the isotherm",
                                            row -> Cells.celsius(row.shift().temperatureK()))
                                    .required()
                                    .asKey(),
                            Column.optional(
                                    "log10_a",
                                    "1",
                                    "decadic logarithm of the horizontal shift: reduced frequency = a × frequency",
                                    row -> row.shift().log10A()),
                            Column.<Row>optional(
                                            "log10_a_u",
                                            "1",
                                            "standard uncertainty of log10_a",
                                            row -> row.shift().log10AU())
                                    .atLeast(0),
                            Column.optional(
                                    "log10_b",
                                    "1",
                                    "decadic logarithm of the vertical shift: reduced modulus = b × modulus",
                                    row -> row.shift().log10B()),
                            Column.<Row>optional(
                                            "log10_b_u",
                                            "1",
                                            "standard uncertainty of log10_b; empty where it is not fitted",
                                            row -> row.shift().log10BU())
                                    .atLeast(0),
                            Column.optional(
                                    "law_log10_a",
                                    "1",
                                    "log10_a by the fitted law; empty without a law",
                                    row -> row.shift().lawLog10A()),
                            Column.<Row>optional(
                                            "misfit_decades",
                                            "1",
                                            "rms distance of the isotherm from the master curve, decades of modulus",
                                            row -> row.shift().misfitDecades())
                                    .atLeast(0),
                            Column.yesNo(
                                    "used",
                                    "whether the isotherm is part of the master curve",
                                    row -> row.shift().used()))));

    private ShiftFactorsTable() {}

    /** A shift with the lot it is of. */
    record Row(String grade, String lot, ShiftFactor shift) {}
}

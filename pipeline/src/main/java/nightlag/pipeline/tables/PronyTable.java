package nightlag.pipeline.tables;

import java.util.List;
import nightlag.stages.spectrum.RelativeMode;

/** The declaration of {@code prony}. */
final class PronyTable {
    static final Table<Row> TABLE = Table.of(
            "prony",
            "One relaxation mode as a part of the instantaneous modulus, which stands in markers; what a solid's modes leave of 1 is"
                    + " its equilibrium modulus",
            LotColumns.before(
                    Row::grade,
                    Row::lot,
                    row -> "",
                    List.of(
                            Column.<Row>number(
                                            "reference_temperature_C",
                                            "°C",
                                            "temperature the set holds at",
                                            row -> Cells.celsius(row.mode().referenceTemperatureK()))
                                    .required()
                                    .asKey(),
                            Column.<Row>count(
                                            "mode",
                                            "number of the mode from 1, times rising",
                                            row -> row.mode().mode())
                                    .asKey(),
                            Column.<Row>number(
                                            "relative_modulus",
                                            "1",
                                            "its modulus over the instantaneous modulus",
                                            row -> row.mode().relativeModulus())
                                    .required()
                                    .atLeast(0)
                                    .atMost(1),
                            Column.<Row>number(
                                            "time_s",
                                            "s",
                                            "relaxation time",
                                            row -> row.mode().timeS())
                                    .required()
                                    .atLeast(0))));

    private PronyTable() {}

    /** A mode with the lot it is of. */
    record Row(String grade, String lot, RelativeMode mode) {}
}

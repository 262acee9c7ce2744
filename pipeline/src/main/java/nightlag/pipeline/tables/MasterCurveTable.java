package nightlag.pipeline.tables;

import java.util.Comparator;
import java.util.List;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.superposition.MasterPoint;

/** The declaration of {@code master_curve}. */
final class MasterCurveTable {
    static final Table<Row> TABLE = Table.of(
            "master_curve",
            "One measured point moved to the reference temperature",
            LotColumns.before(
                    Row::grade,
                    Row::lot,
                    row -> "",
                    List.of(
                            Column.<Row>number(
                                            "reference_temperature_C",
                                            "°C",
                                            "temperature of the master curve",
                                            row -> Cells.celsius(row.point().referenceTemperatureK()))
                                    .required()
                                    .asKey(),
                            Column.<Row>number(
                                            "temperature_C",
                                            "°C",
                                            "mean temperature of the isotherm the point was measured on",
                                            row -> Cells.celsius(row.point().temperatureK()))
                                    .required()
                                    .asKey(),
                            Column.<Row>number(
                                            "reduced_angular_frequency_rad_s",
                                            "rad/s",
                                            "angular frequency times the horizontal shift",
                                            row -> row.point().reduced().angularFrequency())
                                    .required()
                                    .atLeast(0)
                                    .asKey(),
                            Column.number(
                                    "storage_modulus_Pa",
                                    "Pa",
                                    "storage modulus times the vertical shift",
                                    row -> row.moduli().storagePa()),
                            Column.number(
                                    "loss_modulus_Pa",
                                    "Pa",
                                    "loss modulus times the vertical shift",
                                    row -> row.moduli().lossPa()),
                            Column.number(
                                    "tan_delta",
                                    "1",
                                    "loss factor, which a vertical shift leaves as it is",
                                    row -> row.moduli().tanDelta()))),
            Comparator.comparingDouble((Row row) -> row.moduli().storagePa())
                    .thenComparingDouble(row -> row.moduli().lossPa()));

    private MasterCurveTable() {}

    /** A point of the master curve with the lot it is of. */
    record Row(String grade, String lot, MasterPoint point) {
        private Moduli moduli() {
            return point.reduced().moduli();
        }
    }
}

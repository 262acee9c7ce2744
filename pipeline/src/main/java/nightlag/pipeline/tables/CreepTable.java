package nightlag.pipeline.tables;

import java.util.Arrays;
import java.util.List;
import java.util.stream.Collectors;
import nightlag.stages.geometry.DeformationMode;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.moduli.CreepPart;
import nightlag.stages.moduli.CreepReading;
import nightlag.stages.moduli.Flag;
import nightlag.stages.moduli.Quality;

/** The declaration of {@code creep}. */
final class CreepTable {
    private static final double ABSOLUTE_ZERO_CELSIUS = -273.15;

    static final Table<Row> TABLE = Table.of(
            "creep",
            "One reading of a creep curve: the mean of some samples that follow each other",
            LotColumns.before(
                    row -> row.curve().key().grade(),
                    row -> row.curve().key().lot(),
                    row -> row.curve().key().specimen(),
                    List.of(
                            Column.<Row>text(
                                            "sweep",
                                            "sweep of the specimen",
                                            row -> row.curve().key().sweep())
                                    .asKey(),
                            Column.<Row>optional(
                                            "temperature_C",
                                            "°C",
                                            "mean of the temperature channel over the record, else the tag",
                                            row -> Columns.celsius(row.curve().temperatureK()))
                                    .atLeast(ABSOLUTE_ZERO_CELSIUS)
                                    .asKey(),
                            Column.<Row>number(
                                            "time_s",
                                            "s",
                                            "time since the first step of the record",
                                            row -> row.reading().timeS())
                                    .required()
                                    .atLeast(0)
                                    .asKey(),
                            Column.number(
                                    "stress_Pa",
                                    "Pa",
                                    "stress",
                                    row -> row.reading().stressPa()),
                            Column.number(
                                    "strain",
                                    "1",
                                    "strain as recorded, the frame's share taken off; its zero is not",
                                    row -> row.reading().strain()),
                            Column.number(
                                    "compliance_1_Pa",
                                    "1/Pa",
                                    "strain since just before the step over the step's stress: J(t) after a load, recovered"
                                            + " compliance after an unload",
                                    row -> row.reading().compliancePerPa()),
                            Column.<Row>number(
                                            "compliance_u_1_Pa",
                                            "1/Pa",
                                            "standard uncertainty of the compliance from the record's own noise",
                                            row -> row.reading().complianceUPerPa())
                                    .atLeast(0),
                            Column.word(
                                    "part",
                                    "what the step did",
                                    Arrays.stream(CreepPart.values())
                                            .map(CreepPart::word)
                                            .toList(),
                                    row -> row.part().word()),
                            Column.<Row>text(
                                            "point",
                                            "what the record is called: the tag's value, else the file's name",
                                            row -> row.curve().key().point())
                                    .asKey(),
                            Column.<Row>count(
                                            "step",
                                            "number of the step of the stress that the reading follows, from 1",
                                            row -> row.reading().step())
                                    .atLeast(1),
                            Column.<Row>number(
                                            "step_time_s",
                                            "s",
                                            "time since that step",
                                            row -> row.reading().sinceStepS())
                                    .atLeast(0),
                            Column.word(
                                    "deformation",
                                    "which compliance it is: the inverse of G in shear, of E in extension",
                                    Arrays.stream(DeformationMode.values())
                                            .map(DeformationMode::word)
                                            .toList(),
                                    row -> row.curve().deformation().word()),
                            Column.word(
                                    "quality",
                                    "how far the record can be trusted",
                                    Arrays.stream(Quality.values())
                                            .map(Quality::word)
                                            .toList(),
                                    row -> row.curve().quality().word()),
                            Column.text(
                                    "flags",
                                    "why it is not sound, words between semicolons, as in points",
                                    row -> row.curve().flags().stream()
                                            .map(Flag::word)
                                            .collect(Collectors.joining(";"))),
                            Column.<Row>text(
                                            "source_file",
                                            "raw file it came from: the intake folder's name, then the path below it",
                                            row -> row.curve().key().sourceFile())
                                    .required()
                                    .asKey())));

    private CreepTable() {}

    /** Every reading of every curve. */
    static List<Row> rows(List<CreepCurve> curves) {
        return curves.stream()
                .flatMap(curve -> curve.readings().stream().map(reading -> new Row(curve, reading)))
                .toList();
    }

    /** A reading with the curve it is of. */
    record Row(CreepCurve curve, CreepReading reading) {
        private CreepPart part() {
            return curve.steps().get(reading.step() - 1).part();
        }
    }
}

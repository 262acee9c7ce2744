package nightlag.pipeline.samples;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.entry;

import java.io.IOException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;
import nightlag.pipeline.config.Configuration;
import nightlag.pipeline.config.ConfigurationException;
import nightlag.pipeline.config.ConfigurationReader;
import nightlag.pipeline.config.Intake;
import nightlag.pipeline.config.Plans;
import nightlag.pipeline.config.Problem;
import nightlag.pipeline.decode.DecodeCounts;
import nightlag.pipeline.decode.DecodeException;
import nightlag.pipeline.decode.RawFileDecoder;
import nightlag.pipeline.decode.RunSheets;
import nightlag.pipeline.intake.IntakeScan;
import nightlag.pipeline.intake.RawFile;
import nightlag.stages.MeasuredRecord;
import nightlag.stages.Reduce;
import nightlag.stages.Reduction;
import nightlag.stages.geometry.DeformationMode;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.moduli.Flag;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.Quality;
import nightlag.stages.numeric.Complex;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;

/** The samples, read as {@code config/} says and reduced, give back the materials they were made of. */
class SampleRecordsTest {
    private static final Path NIGHT = Path.of("..", "config", "night.toml");

    private static final Map<String, Integer> RECORDS = new TreeMap<>();
    private static final List<ModulusPoint> POINTS = new ArrayList<>();
    private static final List<CreepCurve> CURVES = new ArrayList<>();
    private static final List<Problem> SET_ASIDE = new ArrayList<>();

    @BeforeAll
    static void reduceEverything() throws ConfigurationException, IOException {
        Configuration configuration = ConfigurationReader.read(NIGHT);
        assertThat(configuration.gradeProblems()).isEmpty();
        RunSheets runSheets = new RunSheets();
        for (Intake intake : configuration.intakes()) {
            for (RawFile file : IntakeScan.scan(intake).files()) {
                List<MeasuredRecord> records = new ArrayList<>();
                try {
                    DecodeCounts counts = RawFileDecoder.decode(file, runSheets.rowOf(file), records::add);
                    assertThat(counts.leftOut()).as(file.tableName()).isZero();
                } catch (DecodeException e) {
                    SET_ASIDE.add(e.problem());
                    continue;
                }
                RECORDS.merge(intake.name(), records.size(), Integer::sum);
                for (MeasuredRecord record : records) {
                    var grade = configuration.grades().get(record.tags().key().grade());
                    assertThat(Plans.mismatch(intake.instrument(), grade)).isEmpty();
                    Reduction reduction = Reduce.reduce(record, Plans.reduction(intake.instrument(), grade));
                    POINTS.addAll(reduction.points());
                    reduction.creep().ifPresent(CURVES::add);
                }
            }
        }
    }

    @Test
    void everyFileButTheBadOneIsReadInFull() {
        assertThat(RECORDS)
                .containsExactly(
                        entry("creep-bench", 1),
                        entry("damper-bench", 13),
                        entry("melt-bench", 68),
                        entry("partner-table", 100),
                        entry("ramp-bench", 251),
                        entry("shear-bench", 16));
    }

    @Test
    void theBadFileSaysWhereItIsBad() {
        assertThat(SET_ASIDE).singleElement().satisfies(problem -> {
            assertThat(problem.file()).isEqualTo("melt-bench/H3-0418/B/190C-01.csv");
            assertThat(problem.line()).isEqualTo(57);
            assertThat(problem.place()).contains("M");
            assertThat(problem.found()).contains("OVL");
        });
    }

    @Test
    void twoPointsAreDoubtfulAsMeantAndAllOthersSound() {
        Map<String, List<Flag>> flagged = new LinkedHashMap<>();
        POINTS.stream()
                .filter(point -> point.quality() != Quality.SOUND)
                .forEach(point -> flagged.put(point.key().sourceFile(), point.flags()));

        assertThat(flagged)
                .containsOnly(
                        entry("melt-bench/H3-0418/A/175C-07.csv", List.of(Flag.FEW_CYCLES)),
                        entry("damper-bench/B45-031_2_07.txt", List.of(Flag.CLIPPED)));
    }

    /** Six standard uncertainties: over some 400 figures one beyond that would be no chance. */
    @Test
    void everyModulusIsThatOfItsModelWithinItsUncertainty() {
        assertThat(POINTS).allSatisfy(point -> {
            Complex model = model(point);
            Moduli moduli = point.moduli().orElseThrow();
            ModuliCovariance covariance = moduli.covariance().orElseThrow();
            // decimals in the file and the geometry's own rounding leave a few parts in a million
            double rounding = 1e-5 * moduli.magnitudePa();

            assertThat(Math.abs(moduli.storagePa() - model.re())).isLessThan(6 * covariance.storageU() + rounding);
            assertThat(Math.abs(moduli.lossPa() - model.im())).isLessThan(6 * covariance.lossU() + rounding);
        });
    }

    @Test
    void theCreepIsThatOfItsModelWithinItsUncertainty() {
        assertThat(CURVES).singleElement().satisfies(curve -> {
            assertThat(curve.quality()).as("%s", curve.reasons()).isEqualTo(Quality.SOUND);
            assertThat(curve.steps()).hasSize(2);
            assertThat(curve.readings()).hasSizeGreaterThan(100).allSatisfy(reading -> {
                double since = reading.sinceStepS();
                double model = reading.step() == 1
                        ? Sedge.compliance(since)
                        : Sedge.compliance(600) + Sedge.compliance(since) - Sedge.compliance(600 + since);
                assertThat(Math.abs(reading.compliancePerPa() - model))
                        .isLessThan(6 * reading.complianceUPerPa() + 1e-3 * model);
            });
        });
    }

    @Test
    void stripsGiveYoungsModulusAndPadsTheShearModulus() {
        assertThat(POINTS)
                .allSatisfy(point -> assertThat(point.deformation())
                        .isEqualTo(
                                point.key().lot().equals("B45-031")
                                        ? DeformationMode.EXTENSION
                                        : DeformationMode.SHEAR));
    }

    /** The model at the frequency found; a melt is at the tagged temperature, about which its sensor only scatters. */
    private static Complex model(ModulusPoint point) {
        double frequency = point.frequencyHz().orElseThrow();
        double omega = 2 * Math.PI * frequency;
        return switch (point.key().lot()) {
            case "H3-0417" -> Heron.MELT.modulus(omega * Heron.shift(tagged(point)));
            case "H3-0418" -> Heron.SECOND_LOT.modulus(omega * Heron.shift(tagged(point)));
            case "B45-031" -> Bracken.ELASTOMER.modulus(omega);
            case "B45-032" -> Bracken.ELASTOMER.modulus(omega).times(1.0 / 3);
            case "A12-77" -> Alder.modulus(frequency, celsius(point), 1);
            case "A12-78" -> Alder.modulus(frequency, celsius(point), Alder.SECOND_LOT_TIME);
            // the sensor scatters by more than the modulus is uncertain
            case "A12-79" ->
                Alder.modulus(frequency, AlderRamp.celsius(point.elapsedS().orElseThrow()), 1);
            default -> throw new IllegalStateException("no such lot: " + point.key());
        };
    }

    private static double tagged(ModulusPoint point) {
        return point.taggedTemperatureK().orElseThrow() - 273.15;
    }

    private static double celsius(ModulusPoint point) {
        return point.temperatureK().orElseThrow() - 273.15;
    }
}

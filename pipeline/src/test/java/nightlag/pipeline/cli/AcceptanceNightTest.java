package nightlag.pipeline.cli;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Map;
import java.util.stream.Stream;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** Limits, trends and what they leave in the tables, the summary and the exit code. */
class AcceptanceNightTest {
    private static final double[] AT_ONE_HERTZ = Lab.moduli(2 * Math.PI);

    @TempDir
    private Path folder;

    private Lab lab;

    @BeforeEach
    void setUp() {
        lab = new Lab(folder);
    }

    private static String limit(String property, String more) {
        return "[[limit]]\nproperty = \"" + property + "\"\n" + more + "\n";
    }

    private static String atOneHertz(String property, String more) {
        return limit(property, "temperature = \"25 °C\"\nfrequency = \"1 Hz\"\n" + more);
    }

    private static double number(Map<String, String> row, String column) {
        return Double.parseDouble(row.get(column));
    }

    private List<Map<String, String>> acceptance(String lot) {
        return lab.table("plover", lot, "acceptance");
    }

    @Test
    void everyLimitHasARowInTheOrderOfTheGradeFileAndNoVerdictChangesTheExitCode() {
        lab.grade(
                "plover",
                atOneHertz("tan_delta", "max = 2")
                        + atOneHertz("storage_modulus", "min = \"2 kPa\"")
                        + limit("crossover_modulus", "min = \"1 Pa\"\ntemperature = \"60 °C\"")
                        + limit("zero_shear_viscosity", "min = \"1 Pa·s\""));
        lab.sweep("plover", "A1");

        Lab.Ended night = lab.run();

        assertThat(night.exitCode()).isZero();
        assertThat(acceptance("A1"))
                .extracting(row -> row.get("property") + " " + row.get("verdict"))
                .containsExactly(
                        "tan_delta conforming",
                        "storage_modulus nonconforming",
                        "crossover_modulus missing",
                        "zero_shear_viscosity conforming");
        Map<String, String> stiffness = acceptance("A1").get(1);
        assertThat(stiffness)
                .containsEntry("temperature_C", "25")
                .containsEntry("frequency_Hz", "1")
                .containsEntry("unit", "Pa")
                .containsEntry("lower_limit", "2000")
                .containsEntry("upper_limit", "");
        assertThat(number(stiffness, "value")).isCloseTo(AT_ONE_HERTZ[0], within(1e-6 * AT_ONE_HERTZ[0]));
        assertThat(night.out())
                .contains("limits  2 conforming, 1 nonconforming, 0 undecided, 1 missing")
                .contains("look at: lots against their limits (2)")
                .containsPattern("plover lot A1: storage_modulus 25 °C 1 Hz nonconforming: .* kPa, at least 2 kPa");
        assertThat(lab.logLines("zero_shear_viscosity conforming")).hasSize(1);
    }

    @Test
    void aGradeWithoutLimitsHasATableWithoutRows() {
        lab.sweep("plover", "A1");
        lab.run();
        assertThat(lab.read("results/plover/A1/acceptance.csv"))
                .isEqualTo(
                        "grade,lot,specimen,property,temperature_C,frequency_Hz,value,u,unit,lower_limit,upper_limit,"
                                + "verdict,note\r\n");
    }

    @Test
    void whatAllRecordsShareIsInTheUncertaintyOfWhatItActsOn() {
        lab.write(
                "config/instruments/bench.toml",
                lab.read("config/instruments/bench.toml") + "[uncertainty]\nstress = \"2 %\"\nstrain = \"1 %\"\n");
        double value = AT_ONE_HERTZ[0];
        lab.grade(
                "plover",
                atOneHertz("storage_modulus", "min = \"" + (0.97 * value) + " Pa\"")
                        + atOneHertz("tan_delta", "max = 100")
                        + limit("zero_shear_viscosity", "max = \"1 MPa·s\""));
        lab.sweep("plover", "A1");

        lab.run();

        Map<String, String> stiffness = acceptance("A1").get(0);
        // 2 % of stress and 1 % of strain, and 3 % of room
        assertThat(number(stiffness, "u") / value).isCloseTo(Math.hypot(0.02, 0.01), within(2e-4));
        assertThat(stiffness)
                .containsEntry("verdict", "undecided")
                .containsEntry("note", "u holds that of strain, stress");
        assertThat(number(acceptance("A1").get(1), "u")).isLessThan(1e-6);
        Map<String, String> viscosity = acceptance("A1").get(2);
        assertThat(number(viscosity, "u") / number(viscosity, "value")).isCloseTo(Math.hypot(0.02, 0.01), within(1e-3));
        assertThat(viscosity.get("note")).contains("u holds that of strain, stress");
    }

    @Test
    void aChangedLimitIsJudgedAgainWithoutTheRawFiles() {
        lab.grade("plover", atOneHertz("tan_delta", "max = 100"));
        lab.sweep("plover", "A1");
        lab.run();
        assertThat(acceptance("A1").get(0)).containsEntry("verdict", "conforming");

        lab.grade("plover", atOneHertz("tan_delta", "max = 0.1"));
        lab.run();

        assertThat(lab.files()).extracting(row -> row.get("status")).containsOnly("unchanged");
        assertThat(acceptance("A1").get(0)).containsEntry("verdict", "nonconforming");
    }

    /** A lot of one record, its moduli multiplied by a factor. */
    private static void lot(Lab lab, String name, double factor) {
        lab.record("bench/" + name + ".csv", "plover", name, 1, factor);
    }

    private void nineLots() {
        lab.grade("plover", atOneHertz("storage_modulus", "min = \"1 Pa\""));
        for (int i = 2; i <= 9; i++) {
            lot(lab, "L" + i, 1 + 0.01 * (i % 3));
        }
        lot(lab, "L10", 1.5);
    }

    private static Stream<String> verdicts(List<Map<String, String>> rows) {
        return rows.stream().map(row -> row.get("verdict") + (row.get("note").startsWith("trend") ? " trend" : ""));
    }

    @Test
    void theNinthLotStandsAmongTheEightBeforeIt() {
        nineLots();

        Lab.Ended night = lab.run();

        assertThat(night.exitCode()).isZero();
        assertThat(verdicts(acceptance("L9"))).containsExactly("conforming");
        assertThat(verdicts(acceptance("L10"))).containsExactly("conforming", "nonconforming trend");
        Map<String, String> trend = acceptance("L10").get(1);
        // factors 1.02, 1, 1.01, 1.02, 1, 1.01, 1.02, 1: mean 1.01, moving ranges 0.02, 0.01, 0.01, 0.02, 0.01, 0.01,
        // 0.02
        double half = 2.66 * 0.10 / 7;
        assertThat(number(trend, "lower_limit")).isCloseTo(AT_ONE_HERTZ[0] * (1.01 - half), within(0.01));
        assertThat(number(trend, "upper_limit")).isCloseTo(AT_ONE_HERTZ[0] * (1.01 + half), within(0.01));
        assertThat(trend.get("note")).startsWith("trend: above its 8 earlier lots");
        assertThat(night.out()).contains("look at: lots unlike the earlier ones of their grade (1)");
    }

    @Test
    void aSecondNightTouchesNothing() {
        nineLots();
        lab.run();
        Map<String, String> before = lab.state();
        lab.run();
        assertThat(lab.state()).isEqualTo(before);
    }

    @Test
    void aLotThatComesLateMovesOnlyThoseBehindIt(@TempDir Path other) {
        nineLots();
        lab.run();
        Map<String, String> before = lab.tables();

        lot(lab, "L1", 0.99);
        lab.run();

        Map<String, String> after = lab.tables();
        assertThat(after.keySet())
                .filteredOn(name -> !after.get(name).equals(before.get(name)))
                .allMatch(name -> name.contains("/L1/") || name.contains("/L9/") || name.contains("/L10/"))
                .contains("plover/L9/acceptance.csv", "plover/L10/acceptance.csv");
        assertThat(verdicts(acceptance("L9"))).containsExactly("conforming", "conforming trend");
        assertThat(acceptance("L10").get(1).get("note")).contains("9 earlier lots");
        // whatever way it came about, the tables are the same
        Lab twin = new Lab(other);
        lab = twin;
        nineLots();
        lot(twin, "L1", 0.99);
        twin.run("--workers", "1");
        assertThat(twin.tables()).isEqualTo(after);
    }

    @Test
    void lotsWithDatesStandInTheirOrder() {
        lab.write(
                "config/instruments/bench.toml",
                lab.read("config/instruments/bench.toml") + "made = { preamble = \"made\" }\n");
        lab.grade("plover", atOneHertz("storage_modulus", "min = \"1 Pa\""));
        for (int day = 1; day <= 9; day++) {
            // the later the date the earlier the name
            String name = "L" + (10 - day);
            lab.write(
                    "bench/" + name + ".csv",
                    "made," + day + ".3.2026\n" + Lab.recordText("plover", name, 1, 1 + 0.01 * (day % 2)));
        }
        lab.run();
        assertThat(verdicts(acceptance("L1"))).containsExactly("conforming", "conforming trend");
        assertThat(verdicts(acceptance("L9"))).containsExactly("conforming");
    }

    @Test
    void olderNightsGoAndNothingElse() throws IOException {
        lab.write("config/night.toml", "keep_nights = 2\n" + lab.read("config/night.toml"));
        lab.sweep("plover", "A1");
        lab.write("results/nights/2020-01-01T020000/files.csv", "");
        lab.write("results/nights/2020-01-01T020000-2/night.log", "");
        lab.write("results/nights/2020-01-02T020000/files.csv", "");
        lab.write("results/nights/2020-01-02T020000/why lot A1 was blocked.txt", "of somebody");
        lab.write("results/nights/best of 2020/files.csv", "");
        lab.write("results/nights/2020-01-03.txt", "");

        lab.run();
        lab.run();
        lab.run();

        try (Stream<Path> left = Files.list(lab.path("results/nights"))) {
            assertThat(left.map(path -> path.getFileName().toString()))
                    .hasSize(5)
                    .contains("2020-01-02T020000", "best of 2020", "2020-01-03.txt");
        }
        assertThat(lab.path("results/nights/2020-01-02T020000/files.csv")).exists();
        assertThat(lab.logLines("stays, as there is something in it")).hasSize(1);
    }
}

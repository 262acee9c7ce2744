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

/** A night that ends with predictions. */
class ResponseNightTest {
    @TempDir
    Path root;

    private Lab lab;

    @BeforeEach
    void setUp() {
        lab = new Lab(root);
        lab.sweep("plover", "P-1");
    }

    @Test
    void creepAndRecoveryAreInTheTableAndOnThePage() throws IOException {
        lab.grade("plover", """
                [[response]]
                name = "a second's load"
                stress = [["0 s", "100 Pa"], ["1 s", "0 Pa"]]
                until = "10 s"

                [[response]]
                name = "a stretch"
                strain = [["0 s", "10 %"]]
                until = "1 s"
                """);

        Lab.Ended ended = lab.run();

        assertThat(ended.exitCode()).isZero();
        assertThat(ended.out()).doesNotContain("[[response]]");
        List<Map<String, String>> rows = lab.table("plover", "P-1", "response");
        assertThat(rows.stream().map(row -> row.get("response")).distinct())
                .containsExactly("a second's load", "a stretch");
        assertThat(rows.get(0))
                .containsEntry("time_s", "0")
                .containsEntry("strain", "0")
                .containsEntry("stress_Pa", "0");
        Map<String, String> loaded = last(rows, "a second's load", 1);
        // 10 kPa at 0.01 s and 1 kPa at 1 s: η0 = 1100 Pa·s, so a second of 100 Pa leaves 1/11
        assertThat(number(loaded, "strain_never")).isCloseTo(0.1 / 1.1, within(1e-3));
        assertThat(number(loaded, "strain_at_once") + number(loaded, "strain_later") + number(loaded, "strain_never"))
                .isCloseTo(number(loaded, "strain"), within(1e-12));
        assertThat(number(loaded, "strain_low")).isLessThanOrEqualTo(number(loaded, "strain"));
        assertThat(number(loaded, "strain_high")).isGreaterThanOrEqualTo(number(loaded, "strain"));
        assertThat(loaded).containsEntry("stress_low_Pa", "").containsEntry("stress_high_Pa", "");
        Map<String, String> relaxed = last(rows, "a stretch", 1);
        double stress = 0.1 * (1e4 * Math.exp(-100) + 1e3 * Math.exp(-1));
        assertThat(number(relaxed, "stress_Pa")).isCloseTo(stress, within(0.01 * stress));
        assertThat(relaxed)
                .containsEntry("strain", "0.1")
                .containsEntry("strain_low", "")
                .containsEntry("strain_never", "");
        assertThat(rows).extracting(row -> row.get("inside_data")).contains("true", "false");
        assertThat(report())
                .contains("a second's load: strain")
                .contains("a stretch: stress")
                .contains("not a design value");
    }

    @Test
    void theSetForASimulationAddsUpToOne() {
        lab.run();

        List<Map<String, String>> modes = lab.table("plover", "P-1", "prony");
        assertThat(modes).extracting(row -> row.get("mode")).containsExactly("1", "2");
        assertThat(number(modes.get(0), "relative_modulus")).isCloseTo(10 / 11.0, within(1e-3));
        assertThat(number(modes.get(0), "time_s")).isCloseTo(0.01, within(1e-5));
        assertThat(modes.stream()
                        .mapToDouble(row -> number(row, "relative_modulus"))
                        .sum())
                .isCloseTo(1, within(1e-12));
    }

    @Test
    void aResponseThatCannotBeHadIsSaidInWords() {
        lab.grade("plover", """
                [[response]]
                name = "summer"
                temperature = "40 °C"
                stress = [["0 s", "100 Pa"]]
                until = "10 s"
                """);

        lab.run();

        assertThat(lab.table("plover", "P-1", "response")).isEmpty();
        assertThat(lab.logLines("no response \"summer\": 40 °C is asked for, but the spectrum is of 25 °C"))
                .hasSize(1);
    }

    @Test
    void anotherProgrammeRedoesTheLot() {
        lab.run();
        lab.grade("plover", """
                [[response]]
                name = "a stretch"
                strain = [["0 s", "10 %"]]
                until = "1 s"
                """);

        lab.run();

        assertThat(lab.table("plover", "P-1", "response")).isNotEmpty();
    }

    private static Map<String, String> last(List<Map<String, String>> rows, String name, double timeS) {
        // at a step the first of two rows is the one before it
        return rows.stream()
                .filter(row -> row.get("response").equals(name) && number(row, "time_s") == timeS)
                .findFirst()
                .orElseThrow();
    }

    private static double number(Map<String, String> row, String column) {
        return Double.parseDouble(row.get(column));
    }

    private String report() throws IOException {
        try (Stream<Path> nights = Files.list(lab.path("results/nights"))) {
            return Files.readString(nights.findFirst().orElseThrow().resolve("report.html"));
        }
    }
}

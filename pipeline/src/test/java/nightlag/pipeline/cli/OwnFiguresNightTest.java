package nightlag.pipeline.cli;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.nio.file.Path;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/**
 * Nights with figures of the grade's own. An invented binder, given as moduli: at f Hz and T °C, |G*| = 1 MPa · 10^(−T/20) √f
 * and δ = 60° + T/4 − 5 lg f, each modulus known to 1 %.
 */
class OwnFiguresNightTest {
    private static final double[] CELSIUS = {34, 46, 58};
    private static final double[] HERTZ = {0.1, 1, 10 / (2 * Math.PI), 10};

    private static final String FIGURES = """
            grade = "sorrel"

            [[derived]]
            name = "rutting_factor"
            expression = "complex_modulus / sin(phase_angle)"
            unit = "Pa"

            [[derived]]
            name = "third"
            expression = "relative_third_harmonic * 2"
            unit = "1"

            [[marker]]
            name = "limiting_temperature"
            quantity = "rutting_factor"
            reaches = "10 kPa"
            along = "temperature"
            frequency = "10 rad/s"

            [[marker]]
            name = "crossing_stiffness"
            quantity = "phase_angle"
            reaches = "70 °"
            along = "frequency"
            scale = "linear"
            report = "complex_modulus"

            [[limit]]
            property = "rutting_factor"
            temperature = "46 °C"
            frequency = "10 rad/s"
            min = "1 kPa"

            [[limit]]
            property = "limiting_temperature"
            min = "40 °C"
            """;

    @TempDir
    private Path folder;

    private Lab lab;

    @BeforeEach
    void setUp() {
        lab = new Lab(folder);
        lab.write("config/instruments/bench.toml", """
                name = "Bench"

                [files]
                match = "**/*.csv"
                header = "f,"

                [records]
                layout = "moduli"

                [channels]
                frequency = { column = "f", unit = "Hz" }
                temperature = { column = "T", unit = "°C" }
                storage_modulus = { column = "G1", unit = "Pa" }
                loss_modulus = { column = "G2", unit = "Pa" }
                storage_modulus_u = { column = "u1", unit = "Pa" }
                loss_modulus_u = { column = "u2", unit = "Pa" }

                [tags]
                grade = { preamble = "grade" }
                lot = { preamble = "lot" }
                """);
        StringBuilder text = new StringBuilder("grade,sorrel\nlot,A1\nf,T,G1,G2,u1,u2\n");
        for (double celsius : CELSIUS) {
            for (double hertz : HERTZ) {
                double storage = stiffness(celsius, hertz) * Math.cos(phase(celsius, hertz));
                double loss = stiffness(celsius, hertz) * Math.sin(phase(celsius, hertz));
                text.append(String.format(
                        Locale.ROOT, "%s,%s,%s,%s,%s,%s%n", hertz, celsius, storage, loss, storage / 100, loss / 100));
            }
        }
        lab.write("bench/a1.csv", text.toString());
        lab.write("config/grades/sorrel.toml", FIGURES);
    }

    private static double stiffness(double celsius, double hertz) {
        return 1e6 * Math.pow(10, -celsius / 20) * Math.sqrt(hertz);
    }

    private static double phase(double celsius, double hertz) {
        return Math.toRadians(60 + celsius / 4 - 5 * Math.log10(hertz));
    }

    private List<Map<String, String>> markers(String property) {
        return lab.table("sorrel", "A1", "markers").stream()
                .filter(row -> row.get("property").equals(property))
                .toList();
    }

    @Test
    void aFigureOfEveryPoint() {
        assertThat(lab.run().exitCode()).isZero();

        List<Map<String, String>> rows = lab.table("sorrel", "A1", "derived");
        assertThat(rows).hasSize(CELSIUS.length * HERTZ.length);
        assertThat(rows).allSatisfy(row -> {
            double celsius = Double.parseDouble(row.get("temperature_C"));
            double hertz = Double.parseDouble(row.get("frequency_Hz"));
            double expected = stiffness(celsius, hertz) / Math.sin(phase(celsius, hertz));
            double sine = Math.sin(phase(celsius, hertz));
            // |G*|/sin δ = (G'² + G''²)/G'': relative u of 2 cos²δ and 1 − 2 cos²δ times 1 % (exact)
            double share = 2 * (1 - sine * sine);
            assertThat(row.get("quantity")).isEqualTo("rutting_factor");
            assertThat(row.get("unit")).isEqualTo("Pa");
            assertThat(Double.parseDouble(row.get("value")) / expected).isCloseTo(1, within(1e-12));
            assertThat(Double.parseDouble(row.get("u")) / expected)
                    .isCloseTo(0.01 * Math.hypot(share, 1 - share), within(1e-8));
        });
        assertThat(lab.logLines("third: no value at 12 of 12 usable points; it needs relative_third_harmonic"))
                .hasSize(1);
    }

    @Test
    void whereItFallsToALimit() {
        lab.run();

        assertThat(markers("limiting_temperature")).hasSize(1);
        Map<String, String> row = markers("limiting_temperature").get(0);
        double hertz = 10 / (2 * Math.PI);
        double there = Double.parseDouble(row.get("value"));
        assertThat(stiffness(there, hertz) / Math.sin(phase(there, hertz))).isCloseTo(10_000, within(30.0));
        assertThat(row.get("unit")).isEqualTo("°C");
        assertThat(row.get("temperature_C")).isEqualTo(row.get("value"));
        assertThat(Double.parseDouble(row.get("frequency_Hz"))).isCloseTo(hertz, within(1e-12));
        assertThat(Double.parseDouble(row.get("u"))).isBetween(0.03, 0.12);
        assertThat(row.get("method"))
                .isEqualTo(
                        "rutting_factor falls to 10000 Pa, log over temperature by a smooth curve, between 34 and 46 °C");
    }

    /** δ = 70° at lg f = T/20 − 2: 10^−0.3 Hz at 34 °C, 10^0.3 at 46 °C, 10^0.9 at 58 °C; |G*| there 1 MPa · 10^(−T/40 − 1). */
    @Test
    void theStiffnessAtACrossingPhaseIsothermByIsotherm() {
        lab.run();

        List<Map<String, String>> rows = markers("crossing_stiffness");
        assertThat(rows).hasSize(3);
        for (int i = 0; i < 3; i++) {
            assertThat(Double.parseDouble(rows.get(i).get("temperature_C"))).isCloseTo(CELSIUS[i], within(1e-9));
            assertThat(Math.log10(Double.parseDouble(rows.get(i).get("frequency_Hz"))))
                    .isCloseTo(CELSIUS[i] / 20 - 2, within(1e-9));
            assertThat(Math.log10(Double.parseDouble(rows.get(i).get("value"))))
                    .isCloseTo(5 - CELSIUS[i] / 40, within(1e-9));
            assertThat(rows.get(i).get("unit")).isEqualTo("Pa");
        }
    }

    @Test
    void aCommentChangesNothingAndAnExpressionRedoesTheLotFromTheArchive() {
        lab.run();
        Map<String, String> first = lab.state();
        lab.write("config/grades/sorrel.toml", "# looked at\n" + FIGURES);
        lab.run();
        assertThat(lab.state()).isEqualTo(first);

        lab.write("config/grades/sorrel.toml", FIGURES.replace("complex_modulus /", "2 * complex_modulus /"));
        double before =
                Double.parseDouble(lab.table("sorrel", "A1", "derived").get(0).get("value"));
        assertThat(lab.run().exitCode()).isZero();

        assertThat(Double.parseDouble(
                                lab.table("sorrel", "A1", "derived").get(0).get("value"))
                        / before)
                .isCloseTo(2, within(1e-12));
        assertThat(lab.files()).extracting(row -> row.get("status")).containsExactly("unchanged");
    }

    @Test
    void aWrongExpressionIsNamedWithItsLine() {
        lab.write("config/grades/sorrel.toml", FIGURES.replace("sin(phase_angle)", "sin(phase)"));

        Lab.Ended ended = lab.command("check");

        assertThat(ended.exitCode()).isEqualTo(2);
        assertThat(ended.out() + ended.err())
                .contains("sorrel.toml, line 5, [[derived]] expression: no quantity is called 'phase'");
    }
}

package nightlag.pipeline.cli;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.nio.file.Path;
import java.util.List;
import java.util.Map;
import java.util.stream.Collectors;
import java.util.stream.IntStream;
import java.util.stream.Stream;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/**
 * A night with a temperature ramp: an invented polymer with one relaxation, E* = Er + (Eu − Er) ix/(1 + ix),
 * x = f exp[(Ea/R)(1/T − 1/T₀)], f in Hz, Eu = 2 GPa, Er = 20 MPa, Ea = 400 kJ/mol, T₀ = 373.15 K, its stress following
 * E*(T(t)) at once.
 */
class RollingNightTest {
    private static final double KELVIN_AT_ZERO = 273.15;
    private static final int PER_CYCLE = 50;
    private static final int CYCLES = 600;

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
                header = "t,"

                [records]
                layout = "rolling"

                [channels]
                time = { column = "t", unit = "s" }
                strain = { column = "strain", unit = "1" }
                stress = { column = "stress", unit = "Pa" }
                temperature = { column = "T", unit = "°C" }

                [tags]
                grade = { preamble = "grade" }
                lot = { preamble = "lot" }
                frequency = { value = "1 Hz" }
                elapsed = { value = "60 s" }
                """);
        lab.write("config/grades/plover.toml", """
                grade = "plover"

                [geometry]
                kind = "none"
                deformation = "extension"
                """);
    }

    /** Re and Im of E* in Pa. */
    private static double[] modulus(double kelvin) {
        double x = Math.exp(400e3 / 8.314462618 * (1 / kelvin - 1 / 373.15));
        double relaxed = 1.98e9 * x / (1 + x * x);
        return new double[] {20e6 + relaxed * x, relaxed};
    }

    private static double kelvin(double timeS) {
        return 365 + 2 * timeS / 60;
    }

    private static String ramp(int rows) {
        StringBuilder text = new StringBuilder("grade,plover\nlot,A1\nt,strain,stress,T\n");
        for (int i = 0; i < rows; i++) {
            double time = (double) i / PER_CYCLE;
            double[] moduli = modulus(kelvin(time));
            double sine = Math.sin(2 * Math.PI * time);
            double cosine = Math.cos(2 * Math.PI * time);
            text.append(time)
                    .append(',')
                    .append(1e-4 * sine)
                    .append(',')
                    .append(1e-4 * (moduli[0] * sine + moduli[1] * cosine))
                    .append(',')
                    .append(kelvin(time) - KELVIN_AT_ZERO)
                    .append('\n');
        }
        return text.toString();
    }

    @Test
    void aRampThroughTheGlassTransitionBecomesAPointEveryThirdCycle() {
        lab.write("bench/ramp.csv", ramp(PER_CYCLE * CYCLES));

        Lab.Ended night = lab.run();

        assertThat(night.exitCode()).as(night.err()).isZero();
        List<Map<String, String>> points = lab.table("plover", "A1", "points");
        assertThat(points)
                .extracting(point -> point.get("point"))
                .containsExactlyElementsOf(IntStream.rangeClosed(1, 199)
                        .mapToObj(Integer::toString)
                        .toList());
        for (int i = 0; i < points.size(); i++) {
            Map<String, String> point = points.get(i);
            double middle = 3 * i + 3 - 0.5 / PER_CYCLE;
            assertThat(number(point, "elapsed_s")).isCloseTo(60 + middle, within(1e-9));
            double temperature = number(point, "temperature_C") + KELVIN_AT_ZERO;
            assertThat(temperature).isCloseTo(kelvin(middle), within(1e-9));
            double[] expected = modulus(temperature);
            assertThat(number(point, "storage_modulus_Pa")).isCloseTo(expected[0], within(5e-5 * expected[0]));
            assertThat(number(point, "loss_modulus_Pa")).isCloseTo(expected[1], within(5e-5 * expected[1]));
            assertThat(point.get("quality")).isNotEqualTo("unusable");
        }
    }

    /** Every window lacks a row or two; the log says each count once and how many points share it. */
    @Test
    void emptyCellsOfALongRecordAreALineForAllItsWindows() {
        String[] lines = ramp(PER_CYCLE * 120).lines().toArray(String[]::new);
        for (int i = 60; i < lines.length; i += 190) {
            String[] cells = lines[i].split(",", -1);
            lines[i] = cells[0] + "," + cells[1] + ",," + cells[3];
        }
        lab.write("bench/ramp.csv", String.join("\n", lines) + "\n");

        assertThat(lab.run().exitCode()).isZero();

        List<String> said = lab.logLines(" rows without a value in a needed column");
        assertThat(said).hasSize(1).allMatch(line -> line.matches(".* points \\d+, \\d+, \\d+ and \\d+ more: .*"));
    }

    @Test
    void aTraceSaysWhereEachOtherWindowStands() {
        lab.write("bench/A1/ramp.csv", ramp(90 * PER_CYCLE));

        // the tag elapsed says 60 s; the middle of window 2 is 6 s later, 2 K/min from 91.85 °C on
        assertThat(lab.command("trace", "bench/A1/ramp.csv").out().lines())
                .anyMatch(line -> line.startsWith("other points 2: 1 Hz, 92.0497 °C, 65.99 s, storage "))
                .anyMatch(line -> line.startsWith("             29: 1 Hz, 94.7497 °C, 146.99 s, storage "));
        assertThat(lab.command("trace", "--point", "30", "bench/A1/ramp.csv").err())
                .contains("has no point '30'; its points are '1', '2', ", "'20' and 9 more, the last '29'");
    }

    @Test
    void aWindowCutShortByABreakInTheClockHasGaps() {
        List<String> lines = ramp(20 * PER_CYCLE).lines().toList();
        // three lines of head, then 4.5 s of the first window's 6 s; the second and the third would hold less than half
        String broken = Stream.concat(
                        lines.subList(0, 3 + 45 * PER_CYCLE / 10).stream(),
                        lines.subList(3 + 115 * PER_CYCLE / 10, lines.size()).stream())
                .collect(Collectors.joining("\n", "", "\n"));
        lab.write("bench/ramp.csv", broken);

        lab.run();

        List<Map<String, String>> points = lab.table("plover", "A1", "points");
        assertThat(points).extracting(point -> point.get("point")).containsExactly("1", "4", "5");
        assertThat(points.get(0)).containsEntry("flags", "gaps").containsEntry("quality", "doubtful");
        // from 9 s to 15 s, of which the first 2.5 s are missing
        assertThat(points.get(1)).containsEntry("flags", "gaps").containsEntry("quality", "unusable");
        assertThat(points.get(2)).containsEntry("flags", "").containsEntry("quality", "sound");
    }

    @Test
    void aRampShorterThanAWindowIsSetAside() {
        lab.write("bench/ramp.csv", ramp(PER_CYCLE * 5));

        assertThat(lab.run().exitCode()).isEqualTo(1);

        assertThat(lab.files())
                .singleElement()
                .satisfies(file -> assertThat(file)
                        .containsEntry("status", "set-aside")
                        .containsEntry("grade", "plover")
                        .containsEntry("lot", "A1")
                        .hasEntrySatisfying(
                                "reason", reason -> assertThat(reason).contains("6 cycles at 1 Hz are 6 s")));
    }

    private static double number(Map<String, String> row, String column) {
        return Double.parseDouble(row.get(column));
    }
}

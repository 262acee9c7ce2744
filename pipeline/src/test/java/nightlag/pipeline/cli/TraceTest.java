package nightlag.pipeline.cli;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.PrintWriter;
import java.io.StringWriter;
import java.nio.file.Path;
import java.util.List;
import java.util.Locale;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** {@code trace} as a technician sees it. */
class TraceTest {
    @TempDir
    Path root;

    private Lab lab;

    @BeforeEach
    void aLabWithOneSweep() {
        lab = new Lab(root);
        lab.sweep("plover", "L1");
    }

    /** A second bench: torque and angle of parallel plates, three records told apart by a column, a comma for a point. */
    private void platesBench() {
        lab.write("config/instruments/plates.toml", """
                name = "Plates"

                [files]
                match = "**/*.txt"
                delimiter = ";"
                decimal = ","
                header = "n;"
                path_pattern = '(?<lot>[^/]+)/[^/]+[.]txt'

                [records]
                layout = "column"

                [channels]
                time = { column = "t", unit = "ms" }
                angle = { column = "phi", unit = "mrad" }
                torque = { column = "M", unit = "mN·m" }

                [tags]
                grade = { value = "dunlin" }
                lot = { path = "lot" }
                point = { column = "n" }
                frequency = { preamble = "f", unit = "Hz" }
                gap = { preamble = "gap", unit = "mm" }

                [corrections]
                signal_delay = "1 ms"
                inertia = "1e-5 kg·m²"
                compliance = "0.01 rad/(N·m)"
                """);
        lab.write("config/grades/dunlin.toml", """
                grade = "dunlin"

                [geometry]
                kind = "parallel-plate"
                diameter = "20 mm"
                gap = "1 mm"

                [extraction]
                harmonics = 3
                """);
        lab.write("config/night.toml", lab.read("config/night.toml") + """

                [[intake]]
                folder = "../plates"
                instrument = "plates"
                """);
    }

    private static String platesText() {
        StringBuilder text = new StringBuilder("f;5\ngap;0,8\nn;t;phi;M\n");
        for (int n = 1; n <= 3; n++) {
            for (int i = 0; i < 200; i++) {
                double phase = 2 * Math.PI * i / 40;
                text.append(String.format(
                                        Locale.ROOT,
                                        "%d;%.1f;%.9f;%.9f",
                                        n,
                                        5.0 * i,
                                        n * Math.sin(phase),
                                        0.5 * n * Math.sin(phase + 0.8) + 0.01 * n * Math.sin(3 * phase))
                                .replace('.', ','))
                        .append('\n');
            }
        }
        return text.toString();
    }

    @Test
    void aCleanRecordIsFollowedThroughEveryStage() {
        Lab.Ended trace = lab.command("trace", "bench/L1/p3.csv");

        assertThat(trace.err()).isEmpty();
        assertThat(trace.exitCode()).isZero();
        assertThat(trace.out().lines())
                .contains(
                        "file         bench/L1/p3.csv, instrument bench",
                        "decoding     UTF-8, layout single, header in line 4, data from line 5",
                        "  time       column 1 't' in s ([channels]): 0, 0.015625, 0.03125 … s",
                        "  strain     column 2 'strain' in 1 ([channels]): 0, 9.801714e-4, 0.001950903 … 1",
                        "  frequency  1.0 = 1 Hz, from line 3, 'f'",
                        "  specimen   1, from default",
                        "rows         256 read, 256 used, 0 left out for an empty cell; 1 record",
                        "record       point p3: 256 samples of strain and stress over 3.98438 s",
                        "geometry     none",
                        "corrections  none",
                        "temperature  25 °C",
                        "flags        sound, no flag",
                        "lot          its points would join plover, lot L1: specimen 1, sweep 1, point p3")
                .anyMatch(line -> line.startsWith("frequency    1 Hz, u ") && line.endsWith(" of it"))
                .anyMatch(line -> line.startsWith("signal       4 cycles, 256 samples used, 0 left out"))
                .anyMatch(line -> line.startsWith("moduli       storage 1014.62 Pa, u "))
                .anyMatch(line -> line.startsWith("             loss    781.071 Pa, u "))
                .anyMatch(line -> line.startsWith("             tan δ   0.769817"));
        fitsOneScreen(trace);
    }

    private static void fitsOneScreen(Lab.Ended trace) {
        List<String> lines = trace.out().lines().toList();
        assertThat(lines).hasSizeLessThanOrEqualTo(45);
        assertThat(lines).allSatisfy(line -> assertThat(line.length()).isLessThanOrEqualTo(100));
    }

    @Test
    void nothingIsWritten() {
        lab.command("trace", "bench/L1/p1.csv");

        assertThat(lab.path("results")).doesNotExist();
    }

    @Test
    void geometryAndCorrectionsAreShownWithTheirSize() {
        platesBench();
        lab.write("plates/L7/run.txt", platesText());

        Lab.Ended trace = lab.command("trace", "plates/L7/run.txt");

        assertThat(trace.err()).isEmpty();
        // R = 10 mm, h = 0.8 mm from the file: R/h = 12.5, 2/(πR³) = 636620 1/m³
        // ω = 31.416 rad/s: 2 sin(ω Δt/2) = 0.0314147; Iω²θ/M = 1e-5·986.96·2 rad/(N·m) = 0.0197
        assertThat(trace.out().lines())
                .contains(
                        "  gap        0,8 = 0.0008 m, from line 2, 'gap'",
                        "geometry     parallel-plate, diameter 0.02, gap 8e-4 (SI)",
                        "             strain = 12.5 × deformation, stress = 636620 × load, shear",
                        "corrections  delay of the load 0.001 s: 0.0314 of the load",
                        "             inertia 1e-5 kg·m²: 0.0197 of the measured load",
                        "record       point 1: 200 samples of angle and torque over 0.995 s")
                .anyMatch(line -> line.startsWith("             compliance 0.01 rad/(N·m): 0.00")
                        && line.endsWith(" of the measured movement"))
                .anyMatch(line -> line.startsWith("harmonics    I2/I1 ") && line.contains("I3/I1 0.0"))
                .contains("flags        doubtful")
                .anyMatch(line -> line.startsWith("             nonlinear: the third harmonic is 0.0"))
                .anyMatch(line ->
                        line.startsWith("other points 2: 5 Hz, storage ") && line.endsWith("doubtful nonlinear"))
                .anyMatch(line -> line.startsWith("             3: 5 Hz, storage "));
        fitsOneScreen(trace);
    }

    @Test
    void aPointIsPickedByItsName() {
        platesBench();
        lab.write("plates/L7/run.txt", platesText());

        assertThat(lab.command("trace", "--point", "3", "plates/L7/run.txt").out())
                .contains("record       point 3: ", "other points 1: 5 Hz");
        Lab.Ended unknown = lab.command("trace", "--point", "9", "plates/L7/run.txt");
        assertThat(unknown.exitCode()).isEqualTo(2);
        assertThat(unknown.out()).isEmpty();
        assertThat(unknown.err()).contains("plates/L7/run.txt has no point '9'; its points are '1', '2', '3'");
    }

    @Test
    void aFileCanBeCalledByItsPath() {
        Lab.Ended trace = lab.command("trace", lab.path("bench/L1/p2.csv").toString());

        assertThat(trace.exitCode()).isZero();
        assertThat(trace.out()).startsWith("file         bench/L1/p2.csv, ");
    }

    @Test
    void aFileOutsideTheIntakesIsRefused() {
        lab.write("elsewhere/p.csv", "t,strain,stress\n");

        Lab.Ended elsewhere = lab.command("trace", lab.path("elsewhere/p.csv").toString());
        assertThat(elsewhere.exitCode()).isEqualTo(2);
        assertThat(elsewhere.err()).contains("is in none of the intakes").contains("bench");

        Lab.Ended missing = lab.command("trace", "bench/L1/p9.csv");
        assertThat(missing.exitCode()).isEqualTo(2);
        assertThat(missing.err())
                .contains("bench/L1/p9.csv is no raw file of the intake")
                .contains("**/*.csv");
    }

    @Test
    void whatARunWouldSetAsideIsSaidWithItsReason() {
        lab.write("bench/L1/bad.csv", Lab.recordText("plover", "L1", 1, 1) + "4.0,0.001,abc\n");
        Lab.Ended bad = lab.command("trace", "bench/L1/bad.csv");
        assertThat(bad.exitCode()).isEqualTo(1);
        assertThat(bad.out())
                .contains("decoding     UTF-8")
                .contains("set aside")
                .contains("'abc'");
        assertThat(bad.out()).doesNotContain("would join");

        lab.write("bench/L1/stray.csv", Lab.recordText("godwit", "L1", 1, 1));
        Lab.Ended stray = lab.command("trace", "bench/L1/stray.csv");
        assertThat(stray.exitCode()).isEqualTo(1);
        assertThat(stray.out()).contains("no grade file says grade = 'godwit'");
    }

    @Test
    void aFileWithAHeaderOnlyShowsNoRows() {
        lab.write("bench/L1/empty.csv", "grade,plover\nlot,L1\nf,1\nt,strain,stress\n");
        Lab.Ended trace = lab.command("trace", "bench/L1/empty.csv");
        assertThat(trace.exitCode()).isEqualTo(1);
        assertThat(trace.out().lines())
                .contains(
                        "decoding     UTF-8, layout single, header in line 4, no rows of data",
                        "  time       column 1 't' in s ([channels])")
                .anyMatch(line -> line.startsWith("set aside") && line.contains("no rows below the header"));
        assertThat(trace.out()).doesNotContain("line 0").doesNotContain("…");

        for (int i = 1; i <= 6; i++) {
            lab.write("bench/L1/p" + i + ".csv", "grade,plover\nlot,L1\nf,1\nt,strain,stress\n");
        }
        assertThat(lab.command("check").out())
                .contains("header in line 4, no rows of data")
                .doesNotContain("line 0");
    }

    @Test
    void rowsOutsideTheWindowsOfALongRecordAreToldApart() {
        lab.write(
                "config/instruments/bench.toml",
                lab.read("config/instruments/bench.toml")
                        .replace(
                                "[channels]",
                                "[records]\nlayout = \"rolling\"\nwindow = 2\nadvance = 3\n\n[channels]"));
        lab.write(
                "bench/L1/p1.csv",
                Lab.recordText("plover", "L1", 1, 1).replaceFirst("0.015625,[^,]*,[^\n]*\n", "0.015625,,1\n"));

        // 4 cycles of 64 rows: the window takes two, the other two are outside
        Lab.Ended trace = lab.command("trace", "bench/L1/p1.csv");
        assertThat(trace.out().lines())
                .contains(
                        "rows         256 read, 127 used, 1 left out for an empty cell, 128 outside the windows; 1 record");
    }

    @Test
    void theArchiveIsNotAskedAndThatIsSaid() {
        assertThat(lab.command("trace", "bench/L1/p1.csv").out().lines())
                .contains(
                        "             the archive is not asked: a known lot that differs only in case would set it aside");
    }

    @Test
    void aWrongConfigurationStopsIt() {
        lab.write("config/instruments/bench.toml", "nam = 3\n");

        Lab.Ended trace = lab.command("trace", "bench/L1/p1.csv");

        assertThat(trace.exitCode()).isEqualTo(2);
        assertThat(trace.err()).contains("bench.toml");
    }

    @Test
    void theCommandLineExplainsItself() {
        StringWriter out = new StringWriter();
        StringWriter err = new StringWriter();
        assertThat(Nightlag.execute(new PrintWriter(out, true), new PrintWriter(err, true), "help", "trace"))
                .isZero();
        assertThat(out.toString()).contains("nightlag trace [-hV] [--point=P] [NIGHT.toml] FILE");
        assertThat(out.toString().replaceAll("\\s+", " "))
                .contains("The archive is not asked: a run sets the file aside if its lot differs only in case");
        assertThat(Nightlag.execute(new PrintWriter(out, true), new PrintWriter(err, true), "trace"))
                .isEqualTo(2);
    }
}

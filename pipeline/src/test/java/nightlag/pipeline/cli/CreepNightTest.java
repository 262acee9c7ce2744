package nightlag.pipeline.cli;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.nio.file.Path;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Random;
import java.util.function.DoubleUnaryOperator;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** A night on raw creep and recovery records in three dialects, as a user would run it. */
class CreepNightTest {
    private static final double LOADED_S = 100;

    @TempDir
    private Path folder;

    private Lab lab;

    @BeforeEach
    void aLab() {
        lab = new Lab(folder);
    }

    /** A Burgers body (exact), 1/Pa. */
    private static double compliance(double t) {
        return t < 0 ? 0 : 1e-6 + 1e-8 * t + 5e-7 * -Math.expm1(-t / 2);
    }

    private static double stress(double t) {
        return t >= 0 && t < LOADED_S ? 1000 : 0;
    }

    private static double strain(double t) {
        return 1000 * (compliance(t) - compliance(t - LOADED_S));
    }

    private void instrument(String files, String channels, String more) {
        lab.write("config/instruments/bench.toml", """
                [files]
                match = "**/*.csv"
                %s

                [records]
                layout = "creep"

                [channels]
                %s

                [tags]
                grade = { value = "plover" }
                lot = { value = "L1" }
                temperature = { value = "25 °C" }
                %s
                """.formatted(files, channels, more));
    }

    private void plainInstrument() {
        instrument("header = \"t,\"", """
                time = { column = "t", unit = "s" }
                strain = { column = "strain", unit = "%" }
                stress = { column = "stress", unit = "kPa" }
                """, "");
    }

    private static String rows(
            String header,
            String pattern,
            double unitS,
            DoubleUnaryOperator deformation,
            DoubleUnaryOperator load,
            Locale decimals) {
        StringBuilder text = new StringBuilder(header);
        for (int i = 0; i < 6000; i++) {
            // the step lies in the middle between two samples, which is where its instant is taken to be
            double time = -10.025 + 0.05 * i;
            text.append(String.format(
                    decimals, pattern, time / unitS, deformation.applyAsDouble(time), load.applyAsDouble(time)));
        }
        return text.toString();
    }

    private static String plain() {
        return rows(
                "t,strain,stress\n", "%.3f,%.9f,%.6f\n", 1, t -> 100 * strain(t), t -> stress(t) / 1000, Locale.ROOT);
    }

    private void requireCurve(List<Map<String, String>> rows) {
        assertThat(rows).hasSizeBetween(60, 200);
        assertThat(rows).extracting(row -> row.get("part")).contains("load", "recovery");
        for (Map<String, String> row : rows) {
            double since = Double.parseDouble(row.get("step_time_s"));
            double truth = row.get("part").equals("load")
                    ? compliance(since)
                    : compliance(since) - compliance(since + LOADED_S) + compliance(LOADED_S);
            double u = Double.parseDouble(row.get("compliance_u_1_Pa"));
            assertThat(Double.parseDouble(row.get("compliance_1_Pa"))).isCloseTo(truth, within(3 * u + 1e-3 * truth));
            assertThat(row)
                    .containsEntry("sweep", "1")
                    .containsEntry("temperature_C", "25")
                    .containsEntry("quality", "sound")
                    .containsEntry("flags", "");
        }
    }

    @Test
    void stressAndStrainOverCommas() {
        plainInstrument();
        lab.write("bench/run.csv", plain());
        Lab.Ended ended = lab.run();
        assertThat(ended.exitCode()).as(ended.out() + ended.err()).isZero();
        requireCurve(lab.table("plover", "L1", "creep"));
        assertThat(lab.table("plover", "L1", "points")).isEmpty();
        List<Map<String, String>> modes = lab.table("plover", "L1", "spectrum").stream()
                .filter(row -> row.get("kind").equals("retardation"))
                .toList();
        assertThat(modes).singleElement().satisfies(mode -> {
            assertThat(Double.parseDouble(mode.get("time_s"))).isCloseTo(2, within(0.02));
            assertThat(Double.parseDouble(mode.get("value"))).isCloseTo(5e-7, within(5e-9));
        });
        assertThat(lab.table("plover", "L1", "markers"))
                .filteredOn(row -> row.get("property").equals("zero_shear_viscosity"))
                .singleElement()
                .satisfies(
                        row -> assertThat(Double.parseDouble(row.get("value"))).isCloseTo(1e8, within(1e6)));
        assertThat(lab.files()).extracting(row -> row.get("points")).containsExactly("1");
        assertThat(lab.files()).extracting(row -> row.get("lot")).containsExactly("L1");
        assertThat(lab.logLines("left out after each step while the stress settles"))
                .singleElement()
                .asString()
                .contains("bench/run.csv, point run: ");
    }

    @Test
    void torqueAndAngleInADecimalCommaWithAFrameThatGives() {
        // plates of 25 mm and 1 mm: strain = 12.5 φ, stress = 2 M/(π r³); the frame turns 3 rad/(N·m)
        double perTorque = 2 / (Math.PI * Math.pow(12.5e-3, 3));
        instrument("header = \"t;\"\ndelimiter = \";\"\ndecimal = \",\"", """
                time = { column = "t", unit = "min" }
                angle = { column = "phi", unit = "mrad" }
                torque = { column = "M", unit = "mN·m" }
                """, """
                [geometry]
                kind = "parallel-plate"
                diameter = "25 mm"
                gap = "1 mm"

                [corrections]
                compliance = "0.003 rad/(N·m)"
                inertia = "1.2e-5 kg·m²"
                friction = "2e-6 N·m·s"
                """);
        lab.write(
                "bench/run.csv",
                rows(
                        "t;phi;M\n",
                        "%.8f;%.9f;%.9f\n",
                        60,
                        t -> 1000 * (strain(t) / 12.5 + 0.003 * stress(t) / perTorque),
                        t -> 1000 * stress(t) / perTorque,
                        Locale.GERMANY));
        Lab.Ended ended = lab.run();
        assertThat(ended.exitCode()).as(ended.out() + ended.err()).isZero();
        requireCurve(lab.table("plover", "L1", "creep"));
        assertThat(lab.command("trace", "bench/run.csv").out())
                .contains(
                        "corrections  compliance: the movement of the frame is taken off the strain, 0.0375 for each unit");
    }

    @Test
    void forceAndDisplacementOverTabsWithARowOfUnits() {
        // a strip of 20 × 5 × 2 mm
        instrument("header = \"Time\"\ndelimiter = \"tab\"\nunit_row = true", """
                time = { column = "Time", unit = "s" }
                displacement = { column = "x", unit = "mm" }
                force = { column = "F", unit = "N" }
                """, """
                [geometry]
                kind = "tension"
                length = "20 mm"
                width = "5 mm"
                thickness = "2 mm"
                """);
        lab.write(
                "bench/run.csv",
                rows(
                        "Time\tx\tF\ns\t[µm]\t[mN]\n",
                        "%.3f\t%.7f\t%.7f\n",
                        1,
                        t -> 1e6 * 20e-3 * strain(t),
                        t -> 1e3 * stress(t) * 10e-6,
                        Locale.ROOT));
        Lab.Ended ended = lab.run();
        assertThat(ended.exitCode()).as(ended.out() + ended.err()).isZero();
        List<Map<String, String>> rows = lab.table("plover", "L1", "creep");
        requireCurve(rows);
        assertThat(rows).extracting(row -> row.get("deformation")).containsOnly("extension");
    }

    @Test
    void severalRunsOfOneLotStandInOneTable() {
        plainInstrument();
        lab.write("bench/a.csv", plain());
        lab.write("bench/b.csv", plain());
        assertThat(lab.run().exitCode()).isZero();
        List<Map<String, String>> rows = lab.table("plover", "L1", "creep");
        assertThat(rows).extracting(row -> row.get("source_file")).contains("bench/a.csv", "bench/b.csv");
        requireCurve(rows.stream().filter(row -> row.get("point").equals("b")).toList());
        lab.delete("bench/b.csv");
        Map<String, String> before = lab.tables();
        assertThat(lab.run().exitCode()).isZero();
        assertThat(lab.tables()).isEqualTo(before);
    }

    @Test
    void aRecordWithoutAStepIsAnUnusablePointWithItsReason() {
        plainInstrument();
        Random random = new Random(1);
        lab.write(
                "bench/run.csv",
                rows(
                        "t,strain,stress\n",
                        "%.3f,%.9f,%.6f\n",
                        1,
                        t -> 1e-3 * t,
                        t -> 0.3 + 1e-3 * random.nextGaussian(),
                        Locale.ROOT));
        Lab.Ended ended = lab.run();
        assertThat(ended.exitCode()).isZero();
        assertThat(lab.table("plover", "L1", "creep")).isEmpty();
        assertThat(lab.table("plover", "L1", "points"))
                .singleElement()
                .satisfies(
                        point -> assertThat(point).containsEntry("point", "run").containsEntry("quality", "unusable"));
        assertThat(ended.out()).contains("no step of the load is found: the stress stays within ");
    }

    @Test
    void traceShowsStepsReadingsAndFlagsOnOneScreen() {
        plainInstrument();
        lab.write("bench/run.csv", plain());
        Lab.Ended ended = lab.command("trace", "bench/run.csv");
        assertThat(ended.exitCode()).isZero();
        assertThat(ended.out().lines())
                .hasSizeLessThan(40)
                .anyMatch(line -> line.startsWith("step 1       load at 0 s, within 0.05 s: 1000 Pa, u "))
                .anyMatch(line -> line.startsWith("step 2       recovery at 100 s, within 0.05 s: -1000 Pa, u "))
                .anyMatch(line -> line.startsWith("flags        sound, no flag"))
                .anyMatch(line -> line.startsWith("lot          its points would join plover, lot L1"));
    }

    @Test
    void checkShowsHowItDecodes() {
        plainInstrument();
        lab.write("bench/run.csv", plain());
        Lab.Ended ended = lab.command("check");
        assertThat(ended.exitCode()).isZero();
        assertThat(ended.out()).contains("bench/run.csv: UTF-8, layout creep, header in line 1, data from line 2");
    }

    @Test
    void checkSaysWhichCorrectionsDoNothingToCreep() {
        instrument("header = \"t,\"", """
                time = { column = "t", unit = "s" }
                strain = { column = "strain", unit = "%" }
                stress = { column = "stress", unit = "kPa", delay = "12 µs" }
                """, """
                [corrections]
                compliance = "0.003 rad/(N·m)"
                inertia = "1.2e-5 kg·m²"
                damping = "0.05 N·s/m"
                """);

        assertThat(lab.command("check").out())
                .contains(
                        "[corrections] of instrument bench: delays, inertia, damping read and checked, not acted on with"
                                + " layout creep; only compliance is");
        plainInstrument();
        assertThat(lab.command("check").out()).doesNotContain("[corrections]");
    }
}

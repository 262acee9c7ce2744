package nightlag.pipeline.cli;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.nio.file.Path;
import java.util.List;
import java.util.Map;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** A night on records of several frequencies, as a user would run it. */
class SeveralFrequenciesNightTest {
    private static final double[] TONES_HZ = {0.5, 1, 2, 4.5};

    @TempDir
    private Path folder;

    private Lab lab;

    @BeforeEach
    void aLab() {
        lab = new Lab(folder);
    }

    private void instrument(String records) {
        lab.write("config/instruments/bench.toml", """
                [files]
                match = "**/*.csv"
                header = "t,"

                [records]
                %s

                [channels]
                time = { column = "t", unit = "s" }
                strain = { column = "strain", unit = "1" }
                stress = { column = "stress", unit = "Pa" }

                [tags]
                grade = { value = "plover" }
                lot = { value = "L1" }
                temperature = { value = "25 °C" }
                """.formatted(records));
    }

    private static void row(StringBuilder text, double time, double strain, double stress) {
        text.append(time).append(',').append(strain).append(',').append(stress).append('\n');
    }

    private static String multisine() {
        StringBuilder text = new StringBuilder("t,strain,stress\n");
        for (int i = 0; i < 1000; i++) {
            double time = i / 100.0;
            double strain = 0;
            double stress = 0;
            for (double hz : TONES_HZ) {
                double omega = 2 * Math.PI * hz;
                double[] moduli = Lab.moduli(omega);
                strain += 0.01 * Math.sin(omega * time + hz);
                stress += 0.01 * (moduli[0] * Math.sin(omega * time + hz) + moduli[1] * Math.cos(omega * time + hz));
            }
            row(text, time, strain, stress);
        }
        return text.toString();
    }

    /** A sweep from 0.2 to 20 Hz in 40 s on the lab's liquid, its stress stepped through the two modes finely. */
    private static String chirp() {
        double seconds = 40;
        double rate = Math.log(20 / 0.2) / seconds;
        double[] strengths = {1e4, 1e3};
        double[] times = {0.01, 1};
        double[] modes = new double[2];
        StringBuilder text = new StringBuilder("t,strain,stress\n");
        double last = 0;
        int parts = 20;
        double step = 1 / 400.0 / parts;
        for (int i = 0; i < 42 * 400; i++) {
            for (int part = 0; i > 0 && part < parts; part++) {
                double next = chirpStrain((i - 1) / 400.0 + (part + 1) * step, seconds, rate);
                for (int m = 0; m < 2; m++) {
                    // a straight line of strain over the step
                    double decay = Math.exp(-step / times[m]);
                    modes[m] = modes[m] * decay + strengths[m] * (next - last) * times[m] / step * (1 - decay);
                }
                last = next;
            }
            row(text, i / 400.0, last, modes[0] + modes[1]);
        }
        return text.toString();
    }

    private static double chirpStrain(double time, double seconds, double rate) {
        double flank = 0.05 * seconds;
        double inside = Math.min(time, seconds - time);
        double window = inside <= 0 ? 0 : inside >= flank ? 1 : 0.5 - 0.5 * Math.cos(Math.PI * inside / flank);
        return 0.01 * window * Math.sin(2 * Math.PI * 0.2 * Math.expm1(rate * time) / rate);
    }

    private static void requireModuli(Map<String, String> point, double error) {
        double[] truth = Lab.moduli(Double.parseDouble(point.get("angular_frequency_rad_s")));
        double size = Math.hypot(truth[0], truth[1]);
        assertThat(Double.parseDouble(point.get("storage_modulus_Pa"))).isCloseTo(truth[0], within(error * size));
        assertThat(Double.parseDouble(point.get("loss_modulus_Pa"))).isCloseTo(truth[1], within(error * size));
    }

    @Test
    void aMultisineGivesAPointForEachOfItsFrequencies() {
        instrument("layout = \"multisine\"\nfrequencies = [\"4.5 Hz\", \"0.5 Hz\", \"1 Hz\", \"2 Hz\"]");
        lab.write("bench/mix.csv", multisine());
        assertThat(lab.run().exitCode()).isZero();
        List<Map<String, String>> points = lab.table("plover", "L1", "points");
        assertThat(points).extracting(row -> row.get("point")).containsExactly("mix-01", "mix-02", "mix-03", "mix-04");
        assertThat(points).extracting(row -> row.get("quality")).containsOnly("sound");
        assertThat(points).extracting(row -> row.get("relative_third_harmonic")).containsOnly("");
        for (int k = 0; k < TONES_HZ.length; k++) {
            assertThat(Double.parseDouble(points.get(k).get("frequency_Hz")))
                    .isCloseTo(TONES_HZ[k], within(1e-9 * TONES_HZ[k]));
            requireModuli(points.get(k), 1e-9);
        }
        assertThat(lab.table("plover", "L1", "harmonics")).isEmpty();
        assertThat(lab.files()).extracting(row -> row.get("points")).containsExactly("4");
    }

    @Test
    void theFrequenciesOfAMultisineAreFoundWhereTheyAreNotGiven() {
        instrument("layout = \"multisine\"");
        lab.write("bench/mix.csv", multisine());
        assertThat(lab.run().exitCode()).isZero();
        List<Map<String, String>> points = lab.table("plover", "L1", "points");
        assertThat(points).hasSize(TONES_HZ.length).allSatisfy(point -> requireModuli(point, 1e-9));
    }

    @Test
    void aChirpGivesPointsEvenlySpacedInTheLogarithmOfFrequency() {
        instrument("layout = \"chirp\"\npoints_per_decade = 5");
        lab.write("bench/sweep.csv", chirp());
        assertThat(lab.run().exitCode()).isZero();
        List<Map<String, String>> points = lab.table("plover", "L1", "points");
        assertThat(points).hasSizeBetween(8, 10).allSatisfy(point -> {
            assertThat(point.get("quality")).isEqualTo("sound");
            requireModuli(point, 0.01);
        });
        for (int k = 1; k < points.size(); k++) {
            double ratio = Double.parseDouble(points.get(k).get("frequency_Hz"))
                    / Double.parseDouble(points.get(k - 1).get("frequency_Hz"));
            assertThat(Math.log10(ratio)).isCloseTo(0.2, within(1e-9));
        }
        assertThat(lab.table("plover", "L1", "spectrum")).isNotEmpty();
        assertThat(lab.logLines("the sweep is trusted from"))
                .singleElement()
                .asString()
                .contains("bench/sweep.csv, points sweep-01, sweep-02, sweep-03 and ");
    }

    @Test
    void traceShowsEachPointWithItsOwnFit() {
        instrument("layout = \"multisine\"\nfrequencies = [\"4.5 Hz\", \"0.5 Hz\", \"1 Hz\", \"2 Hz\"]");
        lab.write("bench/mix.csv", multisine());
        Lab.Ended given = lab.command("trace", "--point", "mix-02", "bench/mix.csv");
        assertThat(given.out()).contains("  point      mix, from default, the file's name");
        assertThat(given.out().lines())
                .anyMatch(line -> line.startsWith("frequency    1 Hz, u ")
                        && line.contains(" Hz; [records] frequencies says 1 Hz, off by "))
                .anyMatch(line -> line.startsWith("signal       10 cycles, 1000 samples used, 0 left out"));

        instrument("layout = \"multisine\"");
        assertThat(lab.command("trace", "bench/mix.csv").out().lines())
                .anyMatch(line -> line.startsWith("frequency    0.5 Hz, u ")
                        && line.endsWith("; found, [records] frequencies is not given"));
    }

    @Test
    void traceKeepsAMultisineOfOneToneToItsKind() {
        instrument("layout = \"multisine\"\nfrequencies = [\"1 Hz\"]");
        lab.write("bench/one.csv", Lab.recordText("plover", "L1", 1, 1));
        assertThat(lab.command("trace", "bench/one.csv").out().lines())
                .anyMatch(line ->
                        line.startsWith("frequency    1 Hz, u ") && line.contains("[records] frequencies says 1 Hz"));
    }

    @Test
    void traceOfAChirpShowsNoUncertaintyOfAChosenFrequency() {
        instrument("layout = \"chirp\"\npoints_per_decade = 5");
        lab.write("bench/sweep.csv", chirp());
        assertThat(lab.command("trace", "bench/sweep.csv").out().lines())
                .anyMatch(line ->
                        line.startsWith("frequency    ") && line.endsWith(" Hz, one of 5 to the decade of the sweep"))
                .anyMatch(line -> line.startsWith("signal       ") && line.contains(" left out; signal to noise "));
    }

    @Test
    void aRecordThatIsNotWhatItIsSaidToBeIsAnUnusablePoint() {
        instrument("layout = \"chirp\"");
        lab.write("bench/mix.csv", multisine());
        Lab.Ended ended = lab.run();
        assertThat(ended.exitCode()).isZero();
        List<Map<String, String>> points = lab.table("plover", "L1", "points");
        assertThat(points).hasSize(1);
        assertThat(points.get(0)).containsEntry("point", "mix").containsEntry("quality", "unusable");
        assertThat(ended.out()).contains("layout chirp: the deformation's frequency is off an exponential in time");
    }
}

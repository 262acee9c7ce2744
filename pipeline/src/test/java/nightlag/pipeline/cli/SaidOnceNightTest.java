package nightlag.pipeline.cli;

import static org.assertj.core.api.Assertions.assertThat;

import java.nio.file.Path;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** What a night has to say it says once, and where a person looks for it. */
class SaidOnceNightTest {
    @TempDir
    private Path folder;

    private Lab lab;

    @BeforeEach
    void setUp() {
        lab = new Lab(folder);
    }

    @Test
    void oneFlawOfManyFilesIsOneLineWithACount() {
        lab.grade("plover", "[screening]\nmin_cycles = [10, 1]\n");
        lab.sweep("plover", "A1");

        Lab.Ended night = lab.run();

        assertThat(night.out())
                .contains("look at: points that are not sound (6)\n  bench/A1/p1.csv, point p1, and 5 more");
        assertThat(lab.logLines("few-cycles"))
                .singleElement()
                .asString()
                .contains(
                        "bench/A1/p1.csv, point p1, and 5 more points of its lot, in 6 files, doubtful: few-cycles: ");
    }

    @Test
    void aLotThatIsNowhereIsNotPassedOver() {
        lab.sweep("plover", "A1");

        Lab.Ended night = lab.run("--lot", "A2");

        assertThat(night.exitCode()).as("it may come tomorrow").isZero();
        assertThat(night.out()).contains("look at: lots asked for that are nowhere (1)\n  no lot 'A2'");
        assertThat(lab.logLines("no lot 'A2' in the archive")).hasSize(1);
        assertThat(lab.run("--lot", "A1").exitCode()).isZero();
        assertThat(lab.run("--lot", "A1").exitCode())
                .as("known, and nothing new")
                .isZero();
    }

    /** The tag groups isotherms, so a wrong one has to be heard of though the channel is right. */
    @Test
    void aTagFarFromTheMeasuredTemperatureIsSomethingToLookAt() {
        lab.write(
                "config/instruments/bench.toml",
                lab.read("config/instruments/bench.toml")
                        .replace("[tags]", "temperature = { column = \"T\", unit = \"°C\" }\n\n[tags]"));
        for (int i = 1; i <= 4; i++) {
            String[] lines = Lab.recordText("plover", "A1", i, 1).split("\n");
            for (int k = 3; k < lines.length; k++) {
                lines[k] += k == 3 ? ",T" : ",180";
            }
            lab.write("bench/p" + i + ".csv", String.join("\n", lines) + "\n");
        }

        Lab.Ended night = lab.run();

        assertThat(night.exitCode()).isZero();
        assertThat(night.out())
                .contains("look at: lots whose figures are in doubt (1)")
                .contains(
                        "points whose tag and channel give different temperatures: 4, in files: 4; the first, bench/p1.csv:"
                                + " the tag says 25 °C, the channel 180 °C");
        assertThat(lab.table("plover", "A1", "points"))
                .allSatisfy(row -> assertThat(row).containsEntry("quality", "sound"));
    }
}

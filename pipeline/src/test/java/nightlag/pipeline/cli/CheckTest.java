package nightlag.pipeline.cli;

import static org.assertj.core.api.Assertions.assertThat;

import java.nio.file.Path;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** What {@code check} says of a lab, and that it writes nothing. */
class CheckTest {
    @TempDir
    private Path folder;

    private Lab lab;

    @BeforeEach
    void setUp() {
        lab = new Lab(folder);
    }

    @Test
    void checkShowsHowTheFirstFileDecodesAndWritesNothing() {
        lab.sweep("plover", "A1");

        Lab.Ended check = lab.command("check");

        assertThat(check.exitCode()).as(check.err()).isZero();
        assertThat(check.out())
                .contains("takes up bench/A1/p6.csv")
                .contains("stress from column 3 'stress' in Pa")
                .contains("frequency = 0.1 = 0.1 Hz");
        assertThat(lab.path("results")).doesNotExist();
    }

    @Test
    void ofManyFilesTheFirstAreNamedAndTheRestCounted() {
        lab.sweep("plover", "A1");
        lab.sweep("plover", "A2");

        assertThat(lab.command("check").out())
                .contains("takes up 12 files,")
                .contains("takes up bench/A2/p4.csv")
                .doesNotContain("p5.csv\n  takes up bench/A2/p6.csv")
                .contains("  takes up 2 more");
    }

    /** Its lot is another's but for capitals: every night looks whether the other is still there. */
    @Test
    void aFileThatIsTriedEveryNightIsNotCountedAsTakenUp() {
        lab.record("bench/p1.csv", "plover", "A1", 1, 1);
        assertThat(lab.run().exitCode()).isZero();
        lab.record("bench/p2.csv", "plover", "a1", 1, 1);
        assertThat(lab.run().exitCode()).isEqualTo(1);

        assertThat(lab.command("check").out())
                .contains("takes up 0 files, looks again at 1 set aside")
                .contains("  looks again at bench/p2.csv");

        lab.record("bench/p2.csv", "plover", "A1", 3, 1);
        assertThat(lab.command("check").out()).contains("takes up 1 file,");
    }

    @Test
    void checkSaysWhatWouldBeSetAsideAndWhatIsNotSet() {
        lab.sweep("curlew", "C1");
        lab.write(
                "config/instruments/bench.toml",
                lab.read("config/instruments/bench.toml").replace("\"f\"", "\"freq\""));

        Lab.Ended check = lab.command("check");

        assertThat(check.out())
                .contains("would be set aside")
                .contains("no grade file says grade = 'curlew'")
                .contains("frequency = not set")
                .contains("no line 'freq'");
    }
}

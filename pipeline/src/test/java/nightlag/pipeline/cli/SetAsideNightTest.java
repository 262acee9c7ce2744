package nightlag.pipeline.cli;

import static org.assertj.core.api.Assertions.assertThat;

import java.nio.file.Path;
import java.util.Map;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** What cannot be taken up is set aside and named; the rest of the night goes on. */
class SetAsideNightTest {
    @TempDir
    private Path folder;

    private Lab lab;

    @BeforeEach
    void setUp() {
        lab = new Lab(folder);
    }

    @Test
    void aBadFileIsSetAsideWithAReasonAndItsNeighboursAreReduced() {
        lab.sweep("plover", "A1");
        lab.write("bench/A1/p3.csv", Lab.recordText("plover", "A1", 1, 1).replaceFirst("\n0\\.015625,", "\nlunch,"));

        Lab.Ended night = lab.run();

        assertThat(night.exitCode()).isEqualTo(1);
        assertThat(night.out()).contains("bench/A1/p3.csv").contains("lunch");
        Map<String, String> setAside = lab.files().get(2);
        assertThat(setAside)
                .containsEntry("status", "set-aside")
                .containsEntry("grade", "plover")
                .containsEntry("lot", "A1")
                .containsEntry("specimen", "1");
        assertThat(setAside.get("reason")).contains("line 6").contains("'t'").contains("lunch");
        assertThat(lab.table("plover", "A1", "points")).hasSize(5);

        Lab.Ended second = lab.run();
        assertThat(second.exitCode()).as("it has not changed").isZero();
        assertThat(second.out()).contains("still set aside").contains("p3.csv");

        lab.record("bench/A1/p3.csv", "plover", "A1", 1, 1);
        assertThat(lab.run().exitCode()).isZero();
        assertThat(lab.table("plover", "A1", "points")).hasSize(6);
    }

    @Test
    void aValueThatCannotBeIsRefused() {
        lab.write("bench/p1.csv", Lab.recordText("plover", "A1", 1, 1).replace("f,1.0", "f,-1.0"));

        assertThat(lab.run().exitCode()).isEqualTo(1);

        assertThat(lab.files().get(0).get("reason")).contains("line 3").contains("'-1.0', which is no frequency");
    }

    @Test
    void aWrongInstrumentFileTouchesNothing() {
        lab.sweep("plover", "A1");
        lab.write("config/instruments/bench.toml", "name = \"Bench\"\n[files]\nmatsch = \"*.csv\"\n");

        Lab.Ended night = lab.run();

        assertThat(night.exitCode()).isEqualTo(2);
        assertThat(night.err())
                .contains("bench.toml")
                .contains("line 3")
                .contains("matsch")
                .contains("match");
        assertThat(lab.path("results")).doesNotExist();
    }

    @Test
    void theErrorsOfAGradeFileStandOnceHoweverManyFilesTheyStop() {
        lab.write(
                "config/grades/heron.toml",
                "grade = \"heron\"\n[superposition]\nreference_temperature = 1e-4\nlaww = \"wlf\"\n");
        lab.sweep("heron", "B1");

        Lab.Ended night = lab.run();

        assertThat(night.out()).contains("wrong grade files (2)").containsOnlyOnce("laww");
        assertThat(lab.files())
                .extracting(row -> row.get("reason"))
                .hasSize(6)
                .allMatch(reason -> reason.contains("the bare number 1e-4 has no unit")
                        && reason.endsWith("; and 1 more in it, all of them under wrong grade files"));
    }

    @Test
    void aWrongGradeFileStopsThatGradeAloneAndNothingIsLost() {
        lab.grade("heron", "");
        lab.sweep("plover", "A1");
        lab.sweep("heron", "B1");
        assertThat(lab.run().exitCode()).isZero();
        Map<String, String> before = lab.tables();
        lab.grade("heron", "[extraction]\nharmonics = \"seven\"\n");
        lab.sweep("plover", "A2");

        Lab.Ended night = lab.run();

        assertThat(night.exitCode()).isEqualTo(1);
        assertThat(lab.table("plover", "A2", "points")).hasSize(6);
        assertThat(lab.files().stream().filter(row -> row.get("file").contains("B1")))
                .allSatisfy(row -> {
                    assertThat(row).containsEntry("status", "set-aside").containsEntry("grade", "heron");
                    assertThat(row.get("reason")).contains("heron.toml").contains("harmonics");
                });
        assertThat(lab.run().exitCode()).as("nothing changed since").isZero();

        lab.grade("heron", "");
        assertThat(lab.run().exitCode()).isZero();
        assertThat(lab.tables()).containsAllEntriesOf(before);
    }

    @Test
    void aGradeWithoutAFileIsNamed() {
        lab.sweep("curlew", "C1");

        Lab.Ended night = lab.run();

        assertThat(night.exitCode()).isEqualTo(1);
        assertThat(lab.files().get(0).get("reason")).contains("curlew").contains("plover");
        assertThat(lab.run("--grade", "curlew").exitCode()).isEqualTo(2);
    }

    @Test
    void anIntakeThatCannotBeReadIsNamedAndTheOthersAreReduced() {
        lab.sweep("plover", "A1");
        lab.write(
                "config/night.toml",
                lab.read("config/night.toml") + "\n[[intake]]\nfolder = \"../share\"\ninstrument = \"bench\"\n");

        Lab.Ended night = lab.run();

        assertThat(night.exitCode()).isEqualTo(1);
        assertThat(night.out()).contains("share");
        assertThat(lab.table("plover", "A1", "points")).hasSize(6);
    }

    @Test
    void withoutAnyReadableIntakeNothingIsTouched() {
        Lab.Ended night = lab.run();

        assertThat(night.exitCode()).isEqualTo(2);
        assertThat(night.err()).contains("bench");
        assertThat(lab.path("results")).doesNotExist();
    }
}

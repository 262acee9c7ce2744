package nightlag.pipeline.cli;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.attribute.FileTime;
import java.time.Instant;
import java.util.List;
import java.util.Map;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** What a later night makes of files that are new, changed, moved, gone or still being written. */
class ChangedFilesNightTest {
    @TempDir
    private Path folder;

    private Lab lab;

    @BeforeEach
    void setUp() {
        lab = new Lab(folder);
    }

    @Test
    void aNewTimeStampOnTheSameContentReducesNothing() throws IOException {
        lab.sweep("plover", "A1");
        lab.run();
        Map<String, String> before = lab.tables();
        Files.setLastModifiedTime(lab.path("bench/A1/p1.csv"), FileTime.from(Instant.parse("2001-01-01T00:00:00Z")));

        assertThat(lab.run().exitCode()).isZero();

        assertThat(lab.files()).extracting(row -> row.get("status")).containsOnly("unchanged");
        assertThat(lab.tables()).isEqualTo(before);
    }

    @Test
    void aChangedFileReplacesItsPoints() {
        lab.sweep("plover", "A1");
        lab.run();
        lab.record("bench/A1/p2.csv", "plover", "A1", 0.3, 2);

        assertThat(lab.run().exitCode()).isZero();

        List<Map<String, String>> points = lab.table("plover", "A1", "points");
        assertThat(points).hasSize(6);
        assertThat(Double.parseDouble(points.get(1).get("storage_modulus_Pa")))
                .isCloseTo(2 * Lab.moduli(2 * Math.PI * 0.3)[0], within(1e-6));
        assertThat(lab.files())
                .extracting(row -> row.get("status"))
                .containsExactly("unchanged", "reduced", "unchanged", "unchanged", "unchanged", "unchanged");
    }

    @Test
    void aFileThatNamesAnotherLotLeavesItsOldOne() {
        lab.sweep("plover", "A1");
        lab.run();
        lab.record("bench/A1/p2.csv", "plover", "A9", 0.3, 1);

        assertThat(lab.run().exitCode()).isZero();

        assertThat(lab.table("plover", "A1", "points")).hasSize(5);
        assertThat(lab.table("plover", "A9", "points")).hasSize(1);
    }

    @Test
    void aFileThatVanishesKeepsItsPointsAndItsContentElsewhereTakesItsPlace() {
        lab.sweep("plover", "A1");
        lab.run();
        lab.delete("bench/A1/p2.csv");
        lab.run();
        assertThat(lab.table("plover", "A1", "points")).hasSize(6);

        lab.record("bench/found/again.csv", "plover", "A1", 0.3, 1);
        assertThat(lab.run().exitCode()).isZero();

        assertThat(lab.table("plover", "A1", "points"))
                .hasSize(6)
                .extracting(row -> row.get("source_file"))
                .contains("bench/found/again.csv")
                .doesNotContain("bench/A1/p2.csv");
    }

    @Test
    void aFileThatVanishedKeepsItsPointsWhenItsContentTurnsUpWhereItCannotBeReduced() {
        lab.sweep("plover", "A1");
        lab.write(
                "config/instruments/other.toml",
                lab.read("config/instruments/bench.toml").replace("\"t,\"", "\"time,\""));
        lab.write(
                "config/night.toml",
                lab.read("config/night.toml") + "\n[[intake]]\nfolder = \"../other\"\ninstrument = \"other\"\n");
        lab.run();
        lab.write("other/lost.csv", lab.read("bench/A1/p2.csv"));
        lab.delete("bench/A1/p2.csv");

        assertThat(lab.run().exitCode()).isEqualTo(1);

        assertThat(lab.table("plover", "A1", "points")).hasSize(6);
    }

    @Test
    void aChangedSpectrumSectionRedoesTheLotsWithoutTheirRawFiles() {
        lab.sweep("plover", "A1");
        lab.run();
        lab.write("config/grades/plover.toml", "grade = \"plover\"\n");

        assertThat(lab.run().exitCode()).isZero();

        assertThat(lab.files()).extracting(row -> row.get("status")).containsOnly("unchanged");
        assertThat(lab.table("plover", "A1", "spectrum")).isEmpty();
    }

    @Test
    void aFileStillBeingWrittenWaits() {
        lab.write("config/night.toml", "settle = \"1 h\"\n" + lab.read("config/night.toml"));
        lab.sweep("plover", "A1");

        Lab.Ended night = lab.run();

        assertThat(night.exitCode()).isZero();
        assertThat(lab.files()).hasSize(6).extracting(row -> row.get("status")).containsOnly("waiting");
        assertThat(lab.path("results/plover")).doesNotExist();
    }
}

package nightlag.pipeline.cli;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.tuple;
import static org.assertj.core.api.Assertions.within;

import java.io.IOException;
import java.nio.channels.FileChannel;
import java.nio.channels.FileLock;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;
import java.nio.file.attribute.FileTime;
import java.sql.Connection;
import java.sql.DriverManager;
import java.sql.SQLException;
import java.sql.Statement;
import java.time.Instant;
import java.util.List;
import java.util.Map;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** Whole nights in an invented lab, from raw files to tables, as a user sees them. */
class NightTest {
    @TempDir
    private Path folder;

    private Lab lab;

    @BeforeEach
    void setUp() {
        lab = new Lab(folder);
    }

    @Test
    void theFirstNightTurnsASweepIntoModuliAndBothSpectra() {
        lab.sweep("plover", "A1");

        Lab.Ended night = lab.run();

        assertThat(night.exitCode()).as(night.err()).isZero();
        List<Map<String, String>> points = lab.table("plover", "A1", "points");
        assertThat(points).hasSize(6);
        for (Map<String, String> point : points) {
            double[] expected = Lab.moduli(Double.parseDouble(point.get("angular_frequency_rad_s")));
            assertThat(Double.parseDouble(point.get("storage_modulus_Pa")))
                    .isCloseTo(expected[0], within(1e-9 * expected[0]));
            assertThat(Double.parseDouble(point.get("loss_modulus_Pa")))
                    .isCloseTo(expected[1], within(1e-9 * expected[1]));
            assertThat(point).containsEntry("quality", "sound").containsEntry("temperature_C", "25");
        }
        assertThat(lab.table("plover", "A1", "spectrum"))
                .extracting(row -> row.get("kind"))
                .containsExactly("relaxation", "relaxation", "retardation");
        assertThat(lab.table("plover", "A1", "markers"))
                .extracting(row -> row.get("property"))
                .contains("zero_shear_viscosity", "instantaneous_compliance");
        assertThat(lab.files()).extracting(row -> row.get("status")).containsOnly("reduced");
    }

    @Test
    void aSecondNightWithNothingNewTouchesNothing() {
        lab.sweep("plover", "A1");
        lab.run();
        Map<String, String> before = lab.state();

        Lab.Ended second = lab.run();

        assertThat(second.exitCode()).isZero();
        assertThat(lab.state()).isEqualTo(before);
        assertThat(lab.files()).hasSize(6).extracting(row -> row.get("status")).containsOnly("unchanged");
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
    void oneWorkerAndFourWriteTheSameBytes(@TempDir Path other) {
        lab.sweep("plover", "A1");
        lab.sweep("plover", "A2");
        Lab twin = new Lab(other);
        twin.sweep("plover", "A1");
        twin.sweep("plover", "A2");

        lab.run("--workers", "1");
        twin.run("--workers", "4");

        assertThat(lab.tables()).isNotEmpty().isEqualTo(twin.tables());
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
    void aChangedSpectrumSectionRedoesTheLotsWithoutTheirRawFiles() {
        lab.sweep("plover", "A1");
        lab.run();
        lab.write("config/grades/plover.toml", "grade = \"plover\"\n");

        assertThat(lab.run().exitCode()).isZero();

        assertThat(lab.files()).extracting(row -> row.get("status")).containsOnly("unchanged");
        assertThat(lab.table("plover", "A1", "spectrum")).isEmpty();
    }

    @Test
    void aLotThatDiffersOnlyInCaseIsSetAside() {
        lab.sweep("plover", "A1");
        lab.run();
        lab.record("bench/late.csv", "plover", "a1", 1, 1);

        Lab.Ended night = lab.run();

        assertThat(night.exitCode()).isEqualTo(1);
        assertThat(night.out()).contains("'a1'").contains("'A1'");
        assertThat(lab.table("plover", "A1", "points")).hasSize(6);
    }

    @Test
    void aFileStillBeingWrittenWaits() {
        lab.write("config/night.toml", "settle = \"1 h\"\n" + text("config/night.toml"));
        lab.sweep("plover", "A1");

        Lab.Ended night = lab.run();

        assertThat(night.exitCode()).isZero();
        assertThat(lab.files()).hasSize(6).extracting(row -> row.get("status")).containsOnly("waiting");
        assertThat(lab.path("results/plover")).doesNotExist();
    }

    @Test
    void oneLotCanBeAskedFor() {
        lab.sweep("plover", "A1");
        lab.sweep("plover", "A2");

        assertThat(lab.run("--lot", "A2").exitCode()).isZero();

        assertThat(lab.files()).hasSize(6).extracting(row -> row.get("lot")).containsOnly("A2");
        assertThat(lab.path("results/plover/A1")).doesNotExist();
        assertThat(lab.table("plover", "A2", "points")).hasSize(6);
        lab.run();
        assertThat(lab.table("plover", "A1", "points")).hasSize(6);
    }

    @Test
    void aBadFileOfTheLotAskedForIsNamedAndOneOfAnotherLotIsNot() {
        lab.sweep("plover", "A1");
        lab.write("bench/A1/bad.csv", Lab.recordText("plover", "A1", 1, 1).replaceFirst("\n0\\.015625,", "\nlunch,"));
        lab.write("bench/A2/bad.csv", Lab.recordText("plover", "A2", 1, 1).replaceFirst("\n0\\.015625,", "\nlunch,"));

        assertThat(lab.run("--lot", "A1").exitCode()).isEqualTo(1);

        assertThat(lab.files()).hasSize(7).extracting(row -> row.get("lot")).containsOnly("A1");
    }

    @Test
    void aSecondRunAtTheSameTimeStops() throws IOException {
        lab.sweep("plover", "A1");
        lab.run();
        try (FileChannel channel = FileChannel.open(lab.path("results/.run.lock"), StandardOpenOption.WRITE);
                FileLock lock = channel.lock()) {
            assertThat(lock.isValid()).isTrue();

            Lab.Ended night = lab.run();

            assertThat(night.exitCode()).isEqualTo(3);
            assertThat(night.err()).contains("another run");
        }
        assertThat(lab.run().exitCode()).isZero();
    }

    @Test
    void anIntakeThatCannotBeReadIsNamedAndTheOthersAreReduced() {
        lab.sweep("plover", "A1");
        lab.write(
                "config/night.toml",
                text("config/night.toml") + "\n[[intake]]\nfolder = \"../share\"\ninstrument = \"bench\"\n");

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

    @Test
    void sectionsNotActedOnYetAreSaid() {
        lab.grade("plover", """
                [[limit]]
                property = "tan_delta"
                temperature = "25 °C"
                frequency = "1 Hz"
                max = 2
                """);
        lab.sweep("plover", "A1");

        assertThat(lab.run().out()).contains("[[limit]]");
    }

    @Test
    void aKnownLotGoesBeforeItsTwinInCaseWhateverTheFilesAreCalled() {
        lab.record("bench/z.csv", "plover", "L1", 1, 1);
        lab.run();
        lab.record("bench/a.csv", "plover", "l1", 1, 1);
        assertThat(lab.run().exitCode()).isEqualTo(1);

        lab.run("--redo");

        assertThat(lab.files())
                .extracting(row -> row.get("file"), row -> row.get("status"))
                .containsExactly(tuple("bench/a.csv", "set-aside"), tuple("bench/z.csv", "reduced"));
        assertThat(lab.table("plover", "L1", "points")).hasSize(1);
        assertThat(lab.path("results/plover/l1")).doesNotExist();
    }

    @Test
    void aLotWhoseFilesAllChangeTheirCaseTakesTheNewName() {
        lab.record("bench/a.csv", "plover", "L1", 1, 1);
        lab.record("bench/b.csv", "plover", "L1", 3, 1);
        lab.run();
        lab.record("bench/a.csv", "plover", "l1", 1, 1);
        lab.record("bench/b.csv", "plover", "l1", 3, 1);

        assertThat(lab.run().exitCode()).isZero();

        assertThat(lab.table("plover", "l1", "points")).hasSize(2);
    }

    @Test
    void aLotLeftDueByAKillBeforeTheSwapGetsItsTables() throws SQLException {
        lab.sweep("plover", "A1");
        lab.run();
        Map<String, String> whole = lab.tables();
        lab.write("results/plover/A1/points.csv", "the tables of an earlier night");
        try (Connection archive = DriverManager.getConnection("jdbc:sqlite:" + lab.path("results/archive.sqlite"));
                Statement statement = archive.createStatement()) {
            assertThat(statement.executeUpdate("UPDATE lot SET due = 1")).isEqualTo(1);
        }

        assertThat(lab.run().exitCode()).isZero();

        assertThat(lab.tables()).isEqualTo(whole);
    }

    @Test
    void whatStandsInTheWayOfOneLotStopsNoOther() {
        lab.sweep("plover", "A1");
        lab.sweep("plover", "A2");
        lab.write("results/plover/A1", "a file where a folder belongs");

        Lab.Ended night = lab.run();

        assertThat(night.exitCode()).isEqualTo(1);
        assertThat(night.out()).contains("plover lot A1").contains("A1");
        assertThat(lab.table("plover", "A2", "points")).hasSize(6);
        lab.delete("results/plover/A1");
        assertThat(lab.run().exitCode()).isZero();
        assertThat(lab.table("plover", "A1", "points")).hasSize(6);
    }

    @Test
    void aFileThatVanishedKeepsItsPointsWhenItsContentTurnsUpWhereItCannotBeReduced() {
        lab.sweep("plover", "A1");
        lab.write(
                "config/instruments/other.toml",
                text("config/instruments/bench.toml").replace("\"t,\"", "\"time,\""));
        lab.write(
                "config/night.toml",
                text("config/night.toml") + "\n[[intake]]\nfolder = \"../other\"\ninstrument = \"other\"\n");
        lab.run();
        lab.write("other/lost.csv", text("bench/A1/p2.csv"));
        lab.delete("bench/A1/p2.csv");

        assertThat(lab.run().exitCode()).isEqualTo(1);

        assertThat(lab.table("plover", "A1", "points")).hasSize(6);
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
    void checkSaysWhatWouldBeSetAsideAndWhatIsNotSet() {
        lab.sweep("curlew", "C1");
        lab.write(
                "config/instruments/bench.toml",
                text("config/instruments/bench.toml").replace("\"f\"", "\"freq\""));

        Lab.Ended check = lab.command("check");

        assertThat(check.out())
                .contains("would be set aside")
                .contains("no grade file says grade = 'curlew'")
                .contains("frequency = not set")
                .contains("no line 'freq'");
    }

    private String text(String name) {
        try {
            return Files.readString(lab.path(name));
        } catch (IOException e) {
            throw new java.io.UncheckedIOException(e);
        }
    }
}

package nightlag.pipeline.archive;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.catchThrowableOfType;

import java.io.IOException;
import java.nio.ByteBuffer;
import java.nio.channels.FileChannel;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;
import java.sql.Connection;
import java.sql.DriverManager;
import java.sql.SQLException;
import java.sql.Statement;
import java.util.List;
import java.util.Optional;
import java.util.OptionalLong;
import java.util.stream.IntStream;
import nightlag.pipeline.RandomPoints;
import nightlag.pipeline.archive.ArchiveException.Kind;
import nightlag.stages.acceptance.LotRecord;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

/** The archive as a file: made, foreign, of another version, damaged, read-only, held by another program. */
class ArchiveFileTest {
    private static final LotName LOT = new LotName("Heron 3", "L-17");

    @TempDir
    Path folder;

    @Test
    void theFileAndItsFolderAreMadeWhereTheyAreNotThereYet() throws ArchiveException {
        Path file = folder.resolve("results").resolve("archive.sqlite");

        try (Archive archive = Archive.open(file)) {
            assertThat(archive.files()).isEmpty();
        }

        assertThat(file).isRegularFile();
    }

    @Test
    void anEmptyFileThatAKillLeftIsLaidOut() throws ArchiveException, IOException {
        Files.createFile(file());

        try (Archive archive = Archive.open(file())) {
            assertThat(archive.lots()).isEmpty();
        }
    }

    @ParameterizedTest
    @ValueSource(strings = {"results?cache=off", "100 % #1", "file:results", "Größe"})
    void anyFolderNameWill(String name) throws ArchiveException, IOException {
        Path here = Files.createDirectory(folder.resolve(name)).resolve("archive.sqlite");

        Archive.open(here).close();

        assertThat(here).isRegularFile();
        assertThat(folder.toFile().list()).containsExactly(name);
    }

    @Test
    void whatIsNoSqliteFileIsForeign() throws IOException {
        Files.writeString(file(), "Kind regards, and thank you for the samples. ".repeat(100));

        assertThat(failureToOpen().kind()).isEqualTo(Kind.FOREIGN);
        assertThat(failureToOpen()).hasMessageContaining(file() + " is not an archive");
    }

    @Test
    void aSqliteFileOfAnotherProgramIsForeignAndStaysAsItIs() throws SQLException, IOException {
        execute("CREATE TABLE stock (item TEXT)");
        byte[] before = Files.readAllBytes(file());

        assertThat(failureToOpen().kind()).isEqualTo(Kind.FOREIGN);
        assertThat(Files.readAllBytes(file())).isEqualTo(before);
    }

    @ParameterizedTest
    @CsvSource({"3, a newer", "0, an older"})
    void anArchiveOfAnotherLayoutSaysWhich(int version, String which) throws ArchiveException, SQLException {
        fill(1);
        execute("PRAGMA user_version = " + version);

        assertThat(failureToOpen().kind()).isEqualTo(Kind.OTHER_VERSION);
        assertThat(failureToOpen()).hasMessageContaining("written by " + which + " version");
    }

    @Test
    void anArchiveOfLayout1IsExtendedAndKeepsWhatIsInIt() throws ArchiveException, SQLException {
        fill(3);
        execute("DROP TABLE lot_value");
        execute("DROP TABLE sheet_row");
        execute("DROP INDEX record_by_date");
        execute("ALTER TABLE record DROP COLUMN made");
        execute("ALTER TABLE lot DROP COLUMN trend");
        execute("PRAGMA user_version = 1");

        for (int time = 0; time < 2; time++) {
            try (Archive archive = Archive.open(file())) {
                assertThat(archive.files()).hasSize(1);
                archive.bringUpToDate();
                LotState lot = archive.lots().get(0);
                assertThat(lot.points()).isEqualTo(3);
                assertThat(lot.trendFingerprint()).isEmpty();
                assertThat(archive.lotRecords(lot.name().grade()))
                        .containsExactly(new LotRecord(lot.name().lot(), OptionalLong.empty(), List.of()));
            }
        }
    }

    @Test
    void aTruncatedFileIsDamaged() throws ArchiveException, IOException {
        fill(40);
        try (FileChannel channel = FileChannel.open(file(), StandardOpenOption.WRITE)) {
            channel.truncate(channel.size() / 2);
        }

        assertThat(failureToRead().kind()).isEqualTo(Kind.DAMAGED);
        assertThat(failureToRead()).hasMessageContaining("is damaged");
    }

    @Test
    void pagesOverwrittenAreDamage() throws ArchiveException, IOException {
        fill(40);
        try (FileChannel channel = FileChannel.open(file(), StandardOpenOption.WRITE)) {
            channel.write(ByteBuffer.wrap(new byte[(int) channel.size() - 4096]), 4096);
        }

        assertThat(failureToRead().kind()).isEqualTo(Kind.DAMAGED);
    }

    @Test
    void aRecordThatCannotBeReadIsDamageAndIsNamed() throws ArchiveException, SQLException {
        fill(2);
        execute("UPDATE record SET body = '{' WHERE number = 2");

        ArchiveException failure = failureToRead();

        assertThat(failure.kind()).isEqualTo(Kind.DAMAGED);
        assertThat(failure).hasMessageContaining("record 2 of bench/a.csv cannot be read");
    }

    @Test
    void aStatusThatIsNoneIsDamage() throws ArchiveException, SQLException {
        fill(2);
        execute("UPDATE file SET status = 'fine'");

        assertThat(failureToRead().kind()).isEqualTo(Kind.DAMAGED);
        assertThat(failureToRead()).hasMessageContaining("\"fine\" is no status of a file");
    }

    @Test
    void aFolderInItsPlaceCannotBeOpened() throws IOException {
        Files.createDirectory(file());

        assertThat(failureToOpen().kind()).isEqualTo(Kind.NO_ACCESS);
    }

    @Test
    void aBrowserThatReadsDoesNotStopAReader() throws ArchiveException, SQLException {
        fill(2);
        try (Connection browser = DriverManager.getConnection("jdbc:sqlite:" + file());
                Statement statement = browser.createStatement()) {
            statement.execute("BEGIN");
            statement.executeQuery("SELECT * FROM file").close();

            try (Archive archive = Archive.open(file())) {
                assertThat(archive.reductions(LOT)).hasSize(2);
            }
        }
    }

    @Test
    void aRunKilledInACommitLeavesTheArchiveAsItWasBefore() throws ArchiveException, SQLException, IOException {
        fill(3);
        Path copy = Files.createDirectory(folder.resolve("copy"));
        try (Connection killed = DriverManager.getConnection("jdbc:sqlite:" + file());
                Statement statement = killed.createStatement()) {
            // a cache of one page makes the changes reach the file before the commit, with the journal beside it
            statement.execute("PRAGMA cache_size = 1");
            statement.execute("BEGIN IMMEDIATE");
            statement.executeUpdate("DELETE FROM record");
            statement.executeUpdate("UPDATE file SET reason = hex(zeroblob(100000))");
            for (String name : List.of("archive.sqlite", "archive.sqlite-journal")) {
                Files.copy(folder.resolve(name), copy.resolve(name));
            }
            statement.execute("ROLLBACK");
        }

        try (Archive archive = Archive.open(copy.resolve("archive.sqlite"))) {
            assertThat(archive.reductions(LOT)).hasSize(3);
            assertThat(archive.files()).extracting(ArchivedFile::reason).containsExactly("");
        }
        assertThat(copy.resolve("archive.sqlite-journal")).doesNotExist();
    }

    @Test
    void twentyThousandFilesAreListedInOneGo() throws ArchiveException {
        try (Archive archive = Archive.open(file())) {
            archive.commit(IntStream.range(0, 20_000)
                    .mapToObj(i -> new FileOutcome(file("f" + i + ".csv"), List.of(), Optional.empty()))
                    .toList());

            assertThat(archive.files())
                    .hasSize(20_000)
                    .isSortedAccordingTo((one, other) -> one.tableName().compareTo(other.tableName()));
        }
    }

    private Path file() {
        return folder.resolve("archive.sqlite");
    }

    private void fill(int records) throws ArchiveException {
        try (Archive archive = Archive.open(file())) {
            archive.commit(List.of(new FileOutcome(
                    file("a.csv"),
                    new RandomPoints(3).reductions(LOT.grade(), LOT.lot(), "bench/a.csv", records),
                    Optional.empty())));
        }
    }

    private static ArchivedFile file(String path) {
        return new ArchivedFile(
                new FileIdentity("intake/bench", path),
                "bench/" + path,
                "melt-bench",
                4096,
                1_700_000_000_000L,
                "ab12",
                "cd34",
                FileStatus.REDUCED,
                "",
                1,
                LOT.grade(),
                LOT.lot(),
                "1",
                512,
                0);
    }

    private void execute(String statement) throws SQLException {
        try (Connection connection = DriverManager.getConnection("jdbc:sqlite:" + file());
                Statement direct = connection.createStatement()) {
            direct.execute(statement);
        }
    }

    private ArchiveException failureToOpen() {
        return catchThrowableOfType(
                ArchiveException.class, () -> Archive.open(file()).close());
    }

    private ArchiveException failureToRead() {
        return catchThrowableOfType(ArchiveException.class, () -> {
            try (Archive archive = Archive.open(file())) {
                archive.files();
                archive.lots();
                archive.reductions(LOT);
            }
        });
    }
}

package nightlag.pipeline.archive;

import static org.assertj.core.api.Assertions.assertThat;

import java.nio.file.Path;
import java.sql.SQLException;
import nightlag.pipeline.archive.ArchiveException.Kind;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.sqlite.SQLiteErrorCode;
import org.sqlite.SQLiteException;

class StoreErrorsTest {
    private static final Path FILE = Path.of("archive.sqlite");

    @ParameterizedTest
    @CsvSource({
        "SQLITE_BUSY, IN_USE, is in use by another program",
        "SQLITE_BUSY_SNAPSHOT, IN_USE, is in use by another program",
        "SQLITE_LOCKED, IN_USE, is in use by another program",
        "SQLITE_FULL, DISK_FULL, no room is left on the disk",
        "SQLITE_READONLY, NO_ACCESS, cannot be opened for writing",
        "SQLITE_READONLY_DIRECTORY, NO_ACCESS, cannot be opened for writing",
        "SQLITE_CANTOPEN_ISDIR, NO_ACCESS, cannot be opened for writing",
        "SQLITE_CORRUPT_INDEX, DAMAGED, is damaged",
        "SQLITE_NOTADB, FOREIGN, is not an archive",
        "SQLITE_IOERR_WRITE, FAILED, failed"
    })
    void whatTheStoreReportsByNumberIsSaidInWords(SQLiteErrorCode code, Kind kind, String words) {
        ArchiveException failure = StoreErrors.failure(FILE, "list the lots", new SQLiteException("as it said", code));

        assertThat(failure.kind()).isEqualTo(kind);
        assertThat(failure)
                .hasMessageContaining(words)
                .hasMessageContaining("archive.sqlite")
                .hasMessageContaining("cannot list the lots (as it said)");
    }

    @Test
    void aFailureOfTheDriverItselfIsAFailure() {
        assertThat(StoreErrors.failure(FILE, "open it", new SQLException("no driver"))
                        .kind())
                .isEqualTo(Kind.FAILED);
    }
}

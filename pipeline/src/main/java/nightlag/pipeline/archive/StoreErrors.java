package nightlag.pipeline.archive;

import java.nio.file.Path;
import java.sql.SQLException;
import nightlag.pipeline.archive.ArchiveException.Kind;
import org.sqlite.SQLiteErrorCode;
import org.sqlite.SQLiteException;

/** Says in plain words what SQLite reports by number (https://www.sqlite.org/rescode.html). */
final class StoreErrors {
    private static final int PRIMARY_CODE = 0xff;

    private StoreErrors() {}

    /**
     * The failure of one step.
     *
     * @param file the archive
     * @param step what was being done, as in "cannot list the files"
     * @param cause what the store said
     */
    static ArchiveException failure(Path file, String step, SQLException cause) {
        Kind kind = kind(cause);
        String sentence = switch (kind) {
            case DAMAGED -> "the archive " + file + " is damaged";
            case FOREIGN -> "the file " + file + " is not an archive";
            case IN_USE -> "the archive " + file + " is in use by another program";
            case DISK_FULL -> "no room is left on the disk for the archive " + file;
            case NO_ACCESS -> "the archive " + file + " cannot be opened for writing";
            case OTHER_VERSION, FAILED -> "the archive " + file + " failed";
        };
        return new ArchiveException(kind, sentence + "; cannot " + step + " (" + cause.getMessage() + ")", cause);
    }

    private static Kind kind(SQLException cause) {
        int code = cause instanceof SQLiteException fromStore
                ? fromStore.getResultCode().code & PRIMARY_CODE
                : cause.getErrorCode() & PRIMARY_CODE;
        if (code == SQLiteErrorCode.SQLITE_CORRUPT.code) {
            return Kind.DAMAGED;
        }
        if (code == SQLiteErrorCode.SQLITE_NOTADB.code) {
            return Kind.FOREIGN;
        }
        if (code == SQLiteErrorCode.SQLITE_BUSY.code || code == SQLiteErrorCode.SQLITE_LOCKED.code) {
            return Kind.IN_USE;
        }
        if (code == SQLiteErrorCode.SQLITE_FULL.code) {
            return Kind.DISK_FULL;
        }
        if (code == SQLiteErrorCode.SQLITE_CANTOPEN.code
                || code == SQLiteErrorCode.SQLITE_READONLY.code
                || code == SQLiteErrorCode.SQLITE_PERM.code) {
            return Kind.NO_ACCESS;
        }
        return Kind.FAILED;
    }
}

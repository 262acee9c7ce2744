package nightlag.pipeline.archive;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.sql.Connection;
import java.sql.ResultSet;
import java.sql.SQLException;
import java.sql.Statement;
import nightlag.pipeline.archive.ArchiveException.Kind;
import org.sqlite.SQLiteConfig;

/** The SQLite file behind the archive: how it is opened, what is in it, and how it is told from any other file. */
final class Store {
    /** "nlag" in ASCII: says that a SQLite file is an archive of this program. */
    private static final int APPLICATION_ID = 0x6e6c6167;

    /** Goes up by one with every change of the tables below or of the JSON in {@code record.body}. */
    private static final int LAYOUT_VERSION = 2;

    private static final int CAN_BE_EXTENDED = 1;

    private static final int WAIT_FOR_OTHERS_MS = 30_000;

    private static final String[] LAYOUT = {
        """
        CREATE TABLE file (
          id            INTEGER PRIMARY KEY,
          folder        TEXT NOT NULL,     -- the intake folder
          path          TEXT NOT NULL,     -- the path below it
          table_name    TEXT NOT NULL,     -- the name in tables
          instrument    TEXT NOT NULL,
          bytes         INTEGER NOT NULL,
          modified_ms   INTEGER NOT NULL,  -- since 1970
          sha256        TEXT NOT NULL,     -- of the content
          fingerprint   TEXT NOT NULL,     -- of all else that decides about it
          status        TEXT NOT NULL,     -- reduced or set-aside
          reason        TEXT NOT NULL,     -- why it was set aside
          points        INTEGER NOT NULL,
          grade         TEXT NOT NULL,     -- empty where it holds more than one; so are the next two
          lot           TEXT NOT NULL,
          specimen      TEXT NOT NULL,
          rows          INTEGER NOT NULL,
          rows_left_out INTEGER NOT NULL,  -- for an empty cell
          UNIQUE (folder, path)
        )""", """
        CREATE TABLE record (
          file     INTEGER NOT NULL REFERENCES file (id),
          number   INTEGER NOT NULL,       -- from 1, in the order of the file
          grade    TEXT NOT NULL,
          lot      TEXT NOT NULL,
          specimen TEXT NOT NULL,
          sweep    TEXT NOT NULL,
          point    TEXT NOT NULL,          -- of several points of one record, the first
          points   INTEGER NOT NULL,       -- how many points it gave
          body     TEXT NOT NULL,          -- all that was reduced from it: JSON, SI units
          PRIMARY KEY (file, number)
        )""", "CREATE INDEX record_by_lot ON record (grade, lot, points)", """
        CREATE TABLE lot (
          grade      TEXT NOT NULL,
          lot        TEXT NOT NULL,
          due        INTEGER NOT NULL,     -- 1: its tables are behind what stands here
          conclusion TEXT NOT NULL,        -- digest of what its tables were made with
          PRIMARY KEY (grade, lot)
        )""",
    };

    /** What layout 2 has more than layout 1; an archive of layout 1 gets it before a night works with it. */
    private static final String[] SINCE_2 = {
        // the lot's date as the record tags it; empty without one
        "ALTER TABLE record ADD COLUMN made TEXT NOT NULL DEFAULT ''",
        "CREATE INDEX record_by_date ON record (grade, lot, made)",
        // digest of the lot's trends when its tables were written; empty without any
        "ALTER TABLE lot ADD COLUMN trend TEXT NOT NULL DEFAULT ''",
        """
        CREATE TABLE lot_value (
          grade    TEXT NOT NULL,
          lot      TEXT NOT NULL,
          quantity TEXT NOT NULL,          -- what a limit is on, and where
          number   REAL NOT NULL,          -- the lot's value, in the limit's unit, K for a temperature
          PRIMARY KEY (grade, lot, quantity)
        )""",
        """
        CREATE TABLE sheet_row (
          grade   TEXT NOT NULL,
          lot     TEXT NOT NULL,
          body    TEXT NOT NULL,           -- the lot's row in the team sheet, JSON
          written TEXT NOT NULL,           -- the file and sheet it stands in as it is here; empty: none yet
          PRIMARY KEY (grade, lot)
        )""",
    };

    private Store() {}

    /** Opens the file, laying it out where there is none or an empty one. */
    static Connection open(Path file) throws ArchiveException {
        Connection connection;
        try {
            Path folder = file.toAbsolutePath().getParent();
            if (folder != null) {
                Files.createDirectories(folder);
            }
            connection = settings().createConnection("jdbc:sqlite:" + location(file));
        } catch (IOException cause) {
            throw new ArchiveException(
                    Kind.NO_ACCESS, "the folder of the archive " + file + " cannot be made (" + cause + ")", cause);
        } catch (SQLException cause) {
            throw StoreErrors.failure(file, "open it", cause);
        }
        try {
            check(connection, file);
            return connection;
        } catch (SQLException cause) {
            ArchiveException failure = StoreErrors.failure(file, "open it", cause);
            closeAfter(failure, connection);
            throw failure;
        } catch (ArchiveException failure) {
            closeAfter(failure, connection);
            throw failure;
        }
    }

    /**
     * A rollback journal rather than a write-ahead log: reading then leaves no trace on disk, and the results folder may
     * be on a network share. FULL waits for the disk at every commit.
     */
    private static SQLiteConfig settings() {
        SQLiteConfig settings = new SQLiteConfig();
        settings.setJournalMode(SQLiteConfig.JournalMode.DELETE);
        settings.setSynchronous(SQLiteConfig.SynchronousMode.FULL);
        settings.setBusyTimeout(WAIT_FOR_OTHERS_MS);
        settings.enforceForeignKeys(true);
        return settings;
    }

    /** In a plain name the driver would take what follows a question mark for settings. */
    private static String location(Path file) {
        String plain = file.toAbsolutePath().toString();
        return plain.contains("?") ? file.toUri().toString() : plain;
    }

    private static void check(Connection connection, Path file) throws SQLException, ArchiveException {
        int application = number(connection, "PRAGMA application_id");
        int version = number(connection, "PRAGMA user_version");
        int objects = number(connection, "SELECT count(*) FROM sqlite_schema");
        if (application == 0 && version == 0 && objects == 0) {
            layOut(connection);
            return;
        }
        if (application != APPLICATION_ID) {
            throw new ArchiveException(
                    Kind.FOREIGN, "the file " + file + " is a SQLite file, but not an archive of this program");
        }
        if (version != LAYOUT_VERSION && version != CAN_BE_EXTENDED) {
            String which = version > LAYOUT_VERSION ? "a newer" : "an older";
            throw new ArchiveException(
                    Kind.OTHER_VERSION,
                    "the archive " + file + " was written by " + which + " version of the program (layout " + version
                            + ", expected " + LAYOUT_VERSION + ")");
        }
    }

    private static void layOut(Connection connection) throws SQLException {
        inTransaction(connection, () -> {
            for (String part : LAYOUT) {
                execute(connection, part);
            }
            execute(connection, "PRAGMA application_id = " + APPLICATION_ID);
            extend(connection);
        });
    }

    /** Brings an archive of layout 1 to the layout of this version; any other stays as it is. */
    static void bringUpToDate(Connection connection) throws SQLException {
        if (number(connection, "PRAGMA user_version") == CAN_BE_EXTENDED) {
            inTransaction(connection, () -> extend(connection));
        }
    }

    private static void extend(Connection connection) throws SQLException {
        for (String part : SINCE_2) {
            execute(connection, part);
        }
        execute(connection, "PRAGMA user_version = " + LAYOUT_VERSION);
    }

    /**
     * Does all of the work or none of it. The write lock is taken at the start, so that two writers queue instead of
     * failing half-way.
     */
    static void inTransaction(Connection connection, Work work) throws SQLException {
        execute(connection, "BEGIN IMMEDIATE");
        boolean committed = false;
        try {
            work.run();
            execute(connection, "COMMIT");
            committed = true;
        } finally {
            if (!committed) {
                takeBack(connection);
            }
        }
    }

    private static void takeBack(Connection connection) {
        try {
            execute(connection, "ROLLBACK");
        } catch (SQLException alreadyTakenBack) {
            // after some failures, a full disk among them, SQLite has done it by itself; the first failure is the news
        }
    }

    private static void execute(Connection connection, String text) throws SQLException {
        try (Statement statement = connection.createStatement()) {
            statement.executeUpdate(text);
        }
    }

    /** What a transaction does. */
    interface Work {
        void run() throws SQLException;
    }

    private static int number(Connection connection, String query) throws SQLException {
        try (Statement statement = connection.createStatement();
                ResultSet rows = statement.executeQuery(query)) {
            return rows.getInt(1);
        }
    }

    private static void closeAfter(ArchiveException failure, Connection connection) {
        try {
            connection.close();
        } catch (SQLException second) {
            failure.addSuppressed(second);
        }
    }
}

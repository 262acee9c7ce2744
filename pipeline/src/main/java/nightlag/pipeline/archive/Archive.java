package nightlag.pipeline.archive;

import com.fasterxml.jackson.core.JsonProcessingException;
import java.nio.file.Path;
import java.sql.Connection;
import java.sql.PreparedStatement;
import java.sql.ResultSet;
import java.sql.SQLException;
import java.util.ArrayList;
import java.util.Collection;
import java.util.Collections;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import nightlag.pipeline.archive.ArchiveException.Kind;
import nightlag.stages.Reduction;
import nightlag.stages.acceptance.LotRecord;

/** The archive file. Not safe for use by several threads; the night's own thread owns it. */
public final class Archive implements AutoCloseable {
    private static final Comparator<ArchivedFile> BY_NAME = Comparator.comparing(ArchivedFile::tableName)
            .thenComparing(file -> file.identity().folder())
            .thenComparing(file -> file.identity().relativePath());

    private final Path file;
    private final Connection connection;

    private Archive(Path file, Connection connection) {
        this.file = file;
        this.connection = connection;
    }

    /**
     * Opens the archive, making it where it is not there yet. Opening and reading an existing one touches no file, save
     * that what a killed run left half written is taken back.
     *
     * @throws ArchiveException if the file cannot be opened, is damaged, or is not an archive of this version
     */
    public static Archive open(Path file) throws ArchiveException {
        return new Archive(file, Store.open(file));
    }

    /**
     * Brings an archive that an earlier version laid out to the layout of this one, which all but {@link #files} needs; one that
     * is up to date is not touched.
     */
    public void bringUpToDate() throws ArchiveException {
        try {
            Store.bringUpToDate(connection);
        } catch (SQLException cause) {
            throw StoreErrors.failure(file, "bring it up to date", cause);
        }
    }

    /** All files, by table name. */
    public List<ArchivedFile> files() throws ArchiveException {
        return files("list the files", "");
    }

    /**
     * Commits these outcomes in one transaction: all of them or, after an exception, none.
     *
     * @throws ArchiveException if nothing could be committed
     */
    public void commit(Collection<FileOutcome> outcomes) throws ArchiveException {
        inTransaction("keep what was reduced", () -> {
            try (Commit commit = new Commit(connection)) {
                for (FileOutcome outcome : outcomes) {
                    commit.put(outcome);
                }
            }
        });
    }

    /**
     * Puts new states of known files in the place of the old ones; their reductions stay as they are, and so do their lots.
     *
     * @throws ArchiveException if nothing could be noted
     */
    public void amend(Collection<ArchivedFile> files) throws ArchiveException {
        inTransaction("note what became of a file", () -> {
            try (Commit commit = new Commit(connection)) {
                for (ArchivedFile file : files) {
                    commit.putFile(file);
                }
            }
        });
    }

    /** All lots that have points, or are due because they lost theirs; sorted. */
    public List<LotState> lots() throws ArchiveException {
        String query = """
                SELECT lot.grade, lot.lot, lot.due, lot.conclusion, coalesce(sum(record.points), 0), lot.trend
                FROM lot LEFT JOIN record ON record.grade = lot.grade AND record.lot = lot.lot
                GROUP BY lot.grade, lot.lot""";
        List<LotState> lots = new ArrayList<>();
        try (PreparedStatement select = connection.prepareStatement(query);
                ResultSet row = select.executeQuery()) {
            while (row.next()) {
                LotName name = new LotName(row.getString(1), row.getString(2));
                lots.add(new LotState(name, row.getBoolean(3), row.getString(4), row.getInt(5), row.getString(6)));
            }
        } catch (SQLException cause) {
            throw StoreErrors.failure(file, "list the lots", cause);
        }
        lots.sort(Comparator.comparing(LotState::name));
        return Collections.unmodifiableList(lots);
    }

    /**
     * All reductions of a lot; only points of this lot are in them. They come by the identity of their file and then in
     * the order of the file, however they were committed.
     */
    public List<Reduction> reductions(LotName lot) throws ArchiveException {
        String query = """
                SELECT record.body, file.table_name, record.number
                FROM record JOIN file ON file.id = record.file
                WHERE record.grade = ? AND record.lot = ?
                ORDER BY file.table_name, file.folder, file.path, record.number""";
        List<Reduction> reductions = new ArrayList<>();
        try (PreparedStatement select = connection.prepareStatement(query)) {
            select.setString(1, lot.grade());
            select.setString(2, lot.lot());
            try (ResultSet row = select.executeQuery()) {
                while (row.next()) {
                    reductions.add(read(row));
                }
            }
        } catch (SQLException cause) {
            throw StoreErrors.failure(file, "read the points of lot " + lot.lot(), cause);
        }
        return Collections.unmodifiableList(reductions);
    }

    private Reduction read(ResultSet row) throws SQLException, ArchiveException {
        try {
            return ReductionJson.read(row.getString(1));
        } catch (JsonProcessingException cause) {
            throw new ArchiveException(
                    Kind.DAMAGED,
                    "the archive " + file + " is damaged: record " + row.getInt(3) + " of " + row.getString(2)
                            + " cannot be read (" + cause.getOriginalMessage() + ")",
                    cause);
        }
    }

    /** The files with points in a lot, by table name, for the provenance in its data package. */
    public List<ArchivedFile> filesOf(LotName lot) throws ArchiveException {
        return files(
                "list the files of lot " + lot.lot(),
                "WHERE id IN (SELECT record.file FROM record WHERE record.grade = ? AND record.lot = ?)",
                lot.grade(),
                lot.lot());
    }

    /** What is remembered of every lot of a grade that has points, to compare them; by name. */
    public List<LotRecord> lotRecords(String grade) throws ArchiveException {
        try {
            return LotValues.of(connection, grade);
        } catch (SQLException cause) {
            throw StoreErrors.failure(file, "list the values of the lots of grade " + grade, cause);
        }
    }

    /**
     * Notes that a lot's tables are swapped in; a lot without points is forgotten.
     *
     * @param lot the lot
     * @param conclusionFingerprint digest of what they were made with
     * @param values its values for limits
     * @param trendFingerprint digest of its trends
     */
    public void concluded(
            LotName lot, String conclusionFingerprint, List<LotRecord.Value> values, String trendFingerprint)
            throws ArchiveException {
        inTransaction("note that the tables of lot " + lot.lot() + " are written", () -> {
            LotValues.put(connection, lot, values);
            try (PreparedStatement forget = connection.prepareStatement("""
                            DELETE FROM lot WHERE grade = ?1 AND lot = ?2
                            AND NOT EXISTS (SELECT 1 FROM record WHERE record.grade = ?1 AND record.lot = ?2)""");
                    PreparedStatement done = connection.prepareStatement(
                            "UPDATE lot SET due = 0, conclusion = ?3, trend = ?4 WHERE grade = ?1 AND lot = ?2")) {
                for (PreparedStatement statement : List.of(forget, done)) {
                    statement.setString(1, lot.grade());
                    statement.setString(2, lot.lot());
                }
                done.setString(3, conclusionFingerprint);
                done.setString(4, trendFingerprint);
                forget.executeUpdate();
                done.executeUpdate();
            }
        });
    }

    /** Keeps the row of a lot for the team sheet; one that says something new has not been written anywhere yet. */
    public void keepSheetRow(LotName lot, String body) throws ArchiveException {
        inTransaction(
                "keep the row of lot " + lot.lot() + " for the team sheet", () -> SheetRows.put(connection, lot, body));
    }

    /** All rows of the team sheet, by grade and lot. */
    public List<KeptRow> sheetRows() throws ArchiveException {
        try {
            return List.copyOf(SheetRows.all(connection));
        } catch (SQLException cause) {
            throw StoreErrors.failure(file, "list the rows of the team sheet", cause);
        }
    }

    /** Notes where the rows of these lots stand now. */
    public void sheetRowsWritten(Collection<LotName> lots, String where) throws ArchiveException {
        inTransaction("note that the team sheet is written", () -> SheetRows.written(connection, lots, where));
    }

    @Override
    public void close() throws ArchiveException {
        try {
            connection.close();
        } catch (SQLException cause) {
            throw StoreErrors.failure(file, "close it", cause);
        }
    }

    private List<ArchivedFile> files(String step, String condition, String... values) throws ArchiveException {
        String query = """
                SELECT folder, path, table_name, instrument, bytes, modified_ms, sha256, fingerprint, status, reason,
                       points, grade, lot, specimen, rows, rows_left_out
                FROM file\s""";
        List<ArchivedFile> files = new ArrayList<>();
        try (PreparedStatement select = connection.prepareStatement(query + condition)) {
            for (int i = 0; i < values.length; i++) {
                select.setString(i + 1, values[i]);
            }
            try (ResultSet row = select.executeQuery()) {
                while (row.next()) {
                    files.add(archivedFile(row));
                }
            }
        } catch (SQLException cause) {
            throw StoreErrors.failure(file, step, cause);
        }
        files.sort(BY_NAME);
        return Collections.unmodifiableList(files);
    }

    private ArchivedFile archivedFile(ResultSet row) throws SQLException, ArchiveException {
        int column = 0;
        return new ArchivedFile(
                new FileIdentity(row.getString(++column), row.getString(++column)),
                row.getString(++column),
                row.getString(++column),
                row.getLong(++column),
                row.getLong(++column),
                row.getString(++column),
                row.getString(++column),
                status(row.getString(++column)),
                row.getString(++column),
                row.getInt(++column),
                row.getString(++column),
                row.getString(++column),
                row.getString(++column),
                row.getLong(++column),
                row.getLong(++column));
    }

    private FileStatus status(String word) throws ArchiveException {
        Optional<FileStatus> status = FileStatus.of(word);
        if (status.isEmpty()) {
            throw new ArchiveException(
                    Kind.DAMAGED, "the archive " + file + " is damaged: \"" + word + "\" is no status of a file");
        }
        return status.get();
    }

    /** Does the work and commits it; after a failure the archive is as it was before. */
    private void inTransaction(String step, Store.Work work) throws ArchiveException {
        try {
            Store.inTransaction(connection, work);
        } catch (SQLException cause) {
            throw StoreErrors.failure(file, step, cause);
        }
    }
}

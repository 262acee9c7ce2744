package nightlag.pipeline.archive;

import java.sql.Connection;
import java.sql.PreparedStatement;
import java.sql.ResultSet;
import java.sql.SQLException;
import java.util.ArrayList;
import java.util.List;
import nightlag.stages.Reduction;
import nightlag.stages.moduli.PointKey;

/** The statements of one transaction that puts outcomes of files into the store. */
final class Commit implements AutoCloseable {
    private final List<PreparedStatement> all = new ArrayList<>();
    private final PreparedStatement fileId;
    private final PreparedStatement lotsOfFileDue;
    private final PreparedStatement dropRecords;
    private final PreparedStatement dropFile;
    private final PreparedStatement putFile;
    private final PreparedStatement putRecord;
    private final PreparedStatement lotDue;

    Commit(Connection connection) throws SQLException {
        fileId = prepare(connection, "SELECT id FROM file WHERE folder = ? AND path = ?");
        lotsOfFileDue = prepare(
                connection,
                "UPDATE lot SET due = 1 WHERE (grade, lot) IN (SELECT grade, lot FROM record WHERE file = ?)");
        dropRecords = prepare(connection, "DELETE FROM record WHERE file = ?");
        dropFile = prepare(connection, "DELETE FROM file WHERE id = ?");
        putFile = prepare(connection, """
                INSERT INTO file (folder, path, table_name, instrument, bytes, modified_ms, sha256, fingerprint, status,
                                  reason, points, grade, lot, specimen, rows, rows_left_out)
                VALUES (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?)
                ON CONFLICT (folder, path) DO UPDATE SET
                  table_name = excluded.table_name, instrument = excluded.instrument, bytes = excluded.bytes,
                  modified_ms = excluded.modified_ms, sha256 = excluded.sha256, fingerprint = excluded.fingerprint,
                  status = excluded.status, reason = excluded.reason, points = excluded.points,
                  grade = excluded.grade, lot = excluded.lot, specimen = excluded.specimen, rows = excluded.rows,
                  rows_left_out = excluded.rows_left_out
                RETURNING id""");
        putRecord = prepare(connection, """
                INSERT INTO record (file, number, grade, lot, specimen, sweep, point, points, body, made)
                VALUES (?, ?, ?, ?, ?, ?, ?, ?, ?, ?)""");
        lotDue = prepare(connection, """
                INSERT INTO lot (grade, lot, due, conclusion) VALUES (?, ?, 1, '')
                ON CONFLICT (grade, lot) DO UPDATE SET due = 1""");
    }

    private PreparedStatement prepare(Connection connection, String text) throws SQLException {
        PreparedStatement statement = connection.prepareStatement(text);
        all.add(statement);
        return statement;
    }

    /** Puts one file in the place of what it was, and of what it replaces. */
    void put(FileOutcome outcome) throws SQLException {
        if (outcome.replaces().isPresent()) {
            remove(outcome.replaces().get());
        }
        long file = putFile(outcome.file());
        dropRecordsOf(file);
        int number = 0;
        for (Reduction reduction : outcome.reductions()) {
            number++;
            putRecord(file, number, reduction);
        }
    }

    private void remove(FileIdentity identity) throws SQLException {
        fileId.setString(1, identity.folder());
        fileId.setString(2, identity.relativePath());
        long file;
        try (ResultSet found = fileId.executeQuery()) {
            if (!found.next()) {
                return;
            }
            file = found.getLong(1);
        }
        dropRecordsOf(file);
        dropFile.setLong(1, file);
        dropFile.executeUpdate();
    }

    private void dropRecordsOf(long file) throws SQLException {
        lotsOfFileDue.setLong(1, file);
        lotsOfFileDue.executeUpdate();
        dropRecords.setLong(1, file);
        dropRecords.executeUpdate();
    }

    /** Puts the state of a file in the place of the old one and gives its row; its records are not touched. */
    long putFile(ArchivedFile file) throws SQLException {
        int column = 0;
        putFile.setString(++column, file.identity().folder());
        putFile.setString(++column, file.identity().relativePath());
        putFile.setString(++column, file.tableName());
        putFile.setString(++column, file.instrument());
        putFile.setLong(++column, file.bytes());
        putFile.setLong(++column, file.modifiedMillis());
        putFile.setString(++column, file.sha256());
        putFile.setString(++column, file.fingerprint());
        putFile.setString(++column, file.status().word());
        putFile.setString(++column, file.reason());
        putFile.setInt(++column, file.points());
        putFile.setString(++column, file.grade());
        putFile.setString(++column, file.lot());
        putFile.setString(++column, file.specimen());
        putFile.setLong(++column, file.rows());
        putFile.setLong(++column, file.rowsLeftOut());
        try (ResultSet id = putFile.executeQuery()) {
            return id.getLong(1);
        }
    }

    private void putRecord(long file, int number, Reduction reduction) throws SQLException {
        PointKey key = reduction.keys().findFirst().orElseThrow();
        int column = 0;
        putRecord.setLong(++column, file);
        putRecord.setInt(++column, number);
        putRecord.setString(++column, key.grade());
        putRecord.setString(++column, key.lot());
        putRecord.setString(++column, key.specimen());
        putRecord.setString(++column, key.sweep());
        putRecord.setString(++column, key.point());
        putRecord.setInt(++column, reduction.count());
        putRecord.setString(++column, ReductionJson.write(reduction));
        putRecord.setString(++column, reduction.made().orElse(""));
        putRecord.executeUpdate();
        lotDue.setString(1, key.grade());
        lotDue.setString(2, key.lot());
        lotDue.executeUpdate();
    }

    @Override
    public void close() throws SQLException {
        for (PreparedStatement statement : all) {
            statement.close();
        }
    }
}

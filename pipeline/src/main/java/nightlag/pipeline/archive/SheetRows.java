package nightlag.pipeline.archive;

import java.sql.Connection;
import java.sql.PreparedStatement;
import java.sql.ResultSet;
import java.sql.SQLException;
import java.sql.Statement;
import java.util.ArrayList;
import java.util.Collection;
import java.util.List;

/** The rows of the team sheet, each kept with where it was last written. */
final class SheetRows {
    private SheetRows() {}

    static void put(Connection connection, LotName lot, String body) throws SQLException {
        try (PreparedStatement put = connection.prepareStatement("""
                INSERT INTO sheet_row (grade, lot, body, written) VALUES (?, ?, ?, '')
                ON CONFLICT (grade, lot) DO UPDATE SET body = excluded.body, written = ''
                WHERE body <> excluded.body""")) {
            put.setString(1, lot.grade());
            put.setString(2, lot.lot());
            put.setString(3, body);
            put.executeUpdate();
        }
    }

    static List<KeptRow> all(Connection connection) throws SQLException {
        List<KeptRow> rows = new ArrayList<>();
        try (Statement select = connection.createStatement();
                ResultSet row =
                        select.executeQuery("SELECT grade, lot, body, written FROM sheet_row ORDER BY grade, lot")) {
            while (row.next()) {
                rows.add(new KeptRow(
                        new LotName(row.getString(1), row.getString(2)), row.getString(3), row.getString(4)));
            }
        }
        return rows;
    }

    static void written(Connection connection, Collection<LotName> lots, String where) throws SQLException {
        try (PreparedStatement note =
                connection.prepareStatement("UPDATE sheet_row SET written = ? WHERE grade = ? AND lot = ?")) {
            for (LotName lot : lots) {
                note.setString(1, where);
                note.setString(2, lot.grade());
                note.setString(3, lot.lot());
                note.executeUpdate();
            }
        }
    }
}

package nightlag.pipeline.archive;

import java.sql.Connection;
import java.sql.PreparedStatement;
import java.sql.ResultSet;
import java.sql.SQLException;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;
import nightlag.stages.acceptance.LotRecord;

/** The statements about what is remembered of lots to compare them. */
final class LotValues {
    private LotValues() {}

    /** Puts a lot's values in the place of those it had. */
    static void put(Connection connection, LotName lot, List<LotRecord.Value> values) throws SQLException {
        try (PreparedStatement forget =
                        connection.prepareStatement("DELETE FROM lot_value WHERE grade = ? AND lot = ?");
                PreparedStatement put = connection.prepareStatement("""
                        INSERT INTO lot_value (grade, lot, quantity, number) VALUES (?, ?, ?, ?)
                        ON CONFLICT (grade, lot, quantity) DO NOTHING""")) {
            forget.setString(1, lot.grade());
            forget.setString(2, lot.lot());
            forget.executeUpdate();
            for (LotRecord.Value value : values) {
                put.setString(1, lot.grade());
                put.setString(2, lot.lot());
                put.setString(3, value.quantity());
                put.setDouble(4, value.value());
                put.executeUpdate();
            }
        }
    }

    /** Every lot of a grade that has points, by name. */
    static List<LotRecord> of(Connection connection, String grade) throws SQLException {
        Map<String, List<String>> made = new TreeMap<>();
        each(connection, "SELECT DISTINCT lot, made FROM record WHERE grade = ?", grade, row -> {
            List<String> dates = made.computeIfAbsent(row.getString(1), lot -> new ArrayList<>());
            if (!row.getString(2).isEmpty()) {
                dates.add(row.getString(2));
            }
        });
        Map<String, List<LotRecord.Value>> values = new TreeMap<>();
        each(
                connection,
                "SELECT lot, quantity, number FROM lot_value WHERE grade = ? ORDER BY lot, quantity",
                grade,
                row -> values.computeIfAbsent(row.getString(1), lot -> new ArrayList<>())
                        .add(new LotRecord.Value(row.getString(2), row.getDouble(3))));
        List<LotRecord> records = new ArrayList<>();
        made.forEach((lot, dates) ->
                records.add(new LotRecord(lot, LotDate.earliestDay(dates), values.getOrDefault(lot, List.of()))));
        return List.copyOf(records);
    }

    private static void each(Connection connection, String query, String grade, Row taken) throws SQLException {
        try (PreparedStatement select = connection.prepareStatement(query)) {
            select.setString(1, grade);
            try (ResultSet row = select.executeQuery()) {
                while (row.next()) {
                    taken.take(row);
                }
            }
        }
    }

    /** Takes one row. */
    private interface Row {
        void take(ResultSet row) throws SQLException;
    }
}

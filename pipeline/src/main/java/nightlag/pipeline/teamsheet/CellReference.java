package nightlag.pipeline.teamsheet;

import java.util.Optional;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/**
 * A cell of a workbook by numbers from 0, and by name, as in {@code B7}.
 *
 * @param row the row
 * @param column the column
 */
record CellReference(int row, int column) {
    static final int MOST_ROWS = 1 << 20;
    static final int MOST_COLUMNS = 1 << 14;

    private static final Pattern NAME = Pattern.compile("\\$?([A-Z]{1,3})\\$?([0-9]{1,7})");
    private static final int LETTERS = 26;

    /** The cell of a name. */
    static Optional<CellReference> of(String name) {
        Matcher parts = NAME.matcher(name);
        if (!parts.matches()) {
            return Optional.empty();
        }
        int column = columnOf(parts.group(1));
        int row = Integer.parseInt(parts.group(2));
        boolean exists = row >= 1 && row <= MOST_ROWS && column < MOST_COLUMNS;
        return exists ? Optional.of(new CellReference(row - 1, column)) : Optional.empty();
    }

    /** The column of its letters; that of no letters is -1. */
    static int columnOf(String letters) {
        return letters.chars().reduce(0, (before, letter) -> before * LETTERS + letter - 'A' + 1) - 1;
    }

    String name() {
        StringBuilder letters = new StringBuilder();
        for (int left = column + 1; left > 0; left = (left - 1) / LETTERS) {
            letters.insert(0, (char) ('A' + (left - 1) % LETTERS));
        }
        return letters.append(row + 1).toString();
    }
}

package nightlag.pipeline.teamsheet;

import java.util.BitSet;
import java.util.Map;
import java.util.NavigableMap;
import java.util.TreeMap;

/** A set of cells of one sheet. */
final class CellSet {
    private final NavigableMap<Integer, BitSet> columnsByRow = new TreeMap<>();

    /** Adds a cell; whether it is new. */
    boolean add(int row, int column) {
        BitSet columns = columnsByRow.computeIfAbsent(row, any -> new BitSet());
        boolean isNew = !columns.get(column);
        columns.set(column);
        return isNew;
    }

    boolean has(int row, int column) {
        BitSet columns = columnsByRow.get(row);
        return columns != null && columns.get(column);
    }

    /** Whether any cell of a block, its ends included, is one of them. */
    boolean meets(int fromRow, int toRow, int fromColumn, int toColumn) {
        if (fromRow > toRow || fromColumn > toColumn) {
            return false;
        }
        for (Map.Entry<Integer, BitSet> row :
                columnsByRow.subMap(fromRow, true, toRow, true).entrySet()) {
            int found = row.getValue().nextSetBit(Math.max(fromColumn, 0));
            if (found >= 0 && found <= toColumn) {
                return true;
            }
        }
        return false;
    }

    boolean isEmpty() {
        return columnsByRow.isEmpty();
    }
}

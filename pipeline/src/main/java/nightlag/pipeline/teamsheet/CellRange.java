package nightlag.pipeline.teamsheet;

import java.util.Optional;

/**
 * A block of cells, as in {@code A1:F20}.
 *
 * @param first the cell at the top left
 * @param last the cell at the bottom right
 */
record CellRange(CellReference first, CellReference last) {
    static Optional<CellRange> of(String name) {
        int colon = name.indexOf(':');
        Optional<CellReference> first = CellReference.of(colon < 0 ? name : name.substring(0, colon));
        Optional<CellReference> last = CellReference.of(name.substring(colon + 1));
        return first.flatMap(from -> last.map(to -> new CellRange(from, to)));
    }

    String name() {
        return first.equals(last) ? first.name() : first.name() + ":" + last.name();
    }

    boolean hasColumn(int column) {
        return column >= first.column() && column <= last.column();
    }

    CellRange downTo(int row) {
        return new CellRange(first, new CellReference(row, last.column()));
    }

    /** The smallest block that holds this one and a cell. */
    CellRange with(CellReference cell) {
        return new CellRange(
                new CellReference(Math.min(first.row(), cell.row()), Math.min(first.column(), cell.column())),
                new CellReference(Math.max(last.row(), cell.row()), Math.max(last.column(), cell.column())));
    }
}

package nightlag.pipeline.teamsheet;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import nightlag.pipeline.teamsheet.FormulaReach.Block;

/**
 * Which formulas of a workbook last gave something that no longer holds, because they look at a cell that changes, or at
 * another such formula. An office program shows what a formula last gave unless it is told to calculate, and not every
 * one heeds that; so what no longer holds is taken out, and every program calculates it. All other formulas keep theirs.
 */
final class StaleResults {
    /** After so many rounds whatever is still left counts as stale; formulas in the order of their rows take one or two. */
    private static final int MOST_ROUNDS = 100;

    private final Map<String, CellSet> changed = new HashMap<>();
    private final Map<String, CellSet> stale = new HashMap<>();
    private final List<Place> waiting = new ArrayList<>();

    /** A formula in a cell. */
    private record Place(String sheet, int row, int column, Formula formula, FormulaReach reach) {}

    /** Says that a cell changes. */
    void change(String sheet, int row, int column) {
        changed.computeIfAbsent(key(sheet), any -> new CellSet()).add(row, column);
    }

    /** Adds the formulas of a sheet. */
    void addFormulas(String sheet, SheetPart part) {
        Map<Formula, FormulaReach> reaches = new HashMap<>();
        for (BookRow row : part.rows().values()) {
            for (BookCell cell : row.cells()) {
                if (cell.hasFormula()) {
                    FormulaReach reach =
                            reaches.computeIfAbsent(cell.formula(), formula -> FormulaReach.of(formula.text()));
                    waiting.add(new Place(key(sheet), row.number(), cell.column(), cell.formula(), reach));
                }
            }
        }
    }

    /** Finds what no longer holds. */
    void find() {
        boolean more = true;
        for (int round = 0; more; round++) {
            boolean all = round == MOST_ROUNDS;
            more = waiting.removeIf(place -> {
                boolean isStale = all || looksAtChange(place);
                if (isStale) {
                    add(place);
                }
                return isStale;
            });
        }
    }

    /** The formulas of a sheet whose results no longer hold. */
    CellSet of(String sheet) {
        return stale.getOrDefault(key(sheet), new CellSet());
    }

    private boolean looksAtChange(Place place) {
        return place.reach().anything()
                || place.reach().blocks().stream().anyMatch(block -> looksAtChange(place, block));
    }

    private boolean looksAtChange(Place place, Block block) {
        CellSet there = changed.get(block.sheet().isEmpty() ? place.sheet() : block.sheet());
        if (there == null) {
            return false;
        }
        int down = place.row() - place.formula().origin().row();
        int right = place.column() - place.formula().origin().column();
        int row = block.from().rowAt(down, 0);
        int otherRow = block.to().rowAt(down, CellReference.MOST_ROWS);
        int column = block.from().columnAt(right, 0);
        int otherColumn = block.to().columnAt(right, CellReference.MOST_COLUMNS);
        return there.meets(
                Math.min(row, otherRow),
                Math.max(row, otherRow),
                Math.min(column, otherColumn),
                Math.max(column, otherColumn));
    }

    private void add(Place place) {
        mark(place.sheet(), place.row(), place.column());
        if (place.formula().array().isPresent()) {
            CellRange filled = place.formula().array().get();
            for (int row = filled.first().row(); row <= filled.last().row(); row++) {
                for (int column = filled.first().column();
                        column <= filled.last().column();
                        column++) {
                    mark(place.sheet(), row, column);
                }
            }
        }
    }

    private void mark(String sheet, int row, int column) {
        changed.computeIfAbsent(sheet, any -> new CellSet()).add(row, column);
        stale.computeIfAbsent(sheet, any -> new CellSet()).add(row, column);
    }

    private static String key(String sheet) {
        return sheet.toLowerCase(Locale.ROOT);
    }
}

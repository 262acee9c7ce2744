package nightlag.pipeline.teamsheet;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashMap;
import java.util.HashSet;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.TreeMap;
import java.util.stream.Collectors;
import nightlag.pipeline.teamsheet.SheetOutcome.Written;
import nightlag.stages.sweep.NaturalOrder;

/**
 * Puts rows into a grid. Headings are found by their text: one that somebody renamed is theirs, and ours is added anew.
 * Rows are found by grade and lot. Nothing but our own cells is written, and none that says what it should.
 */
final class Merge {
    static final String GRADE = "grade";
    static final String LOT = "lot";
    static final String UPDATED = "updated";

    /** So many rows may stand above the headings. */
    private static final int MOST_ABOVE = 100;

    private static final Comparator<SheetRow> BY_GRADE_AND_LOT = Comparator.comparing(
                    SheetRow::grade, NaturalOrder::compare)
            .thenComparing(SheetRow::lot, NaturalOrder::compare);

    private final Grid grid;
    private final SheetUpdate update;
    private final Map<String, Integer> columns = new HashMap<>();
    private final Map<Key, List<Integer>> rowsByKey = new HashMap<>();
    private final List<String> added = new ArrayList<>();
    private final List<String> notes = new ArrayList<>();
    private int headingRow;
    private int lastRow;

    private Merge(Grid grid, SheetUpdate update) {
        this.grid = grid;
        this.update = update;
    }

    /** What names a row, as the grid shows it. */
    private record Key(String grade, String lot) {}

    /**
     * Puts the rows into the grid.
     *
     * @throws SheetFault if there are no headings, one of ours stands twice, or two rows name one lot that is due
     */
    static Written into(Grid grid, SheetUpdate update) throws SheetFault {
        return new Merge(grid, update).merge();
    }

    private Written merge() throws SheetFault {
        boolean isNew = grid.rows() == 0;
        if (isNew) {
            headingRow = 0;
            for (String heading : List.of(GRADE, LOT, UPDATED)) {
                column(heading);
            }
        } else {
            findHeadings();
        }
        lastRow = headingRow;
        findRows();
        List<SheetRow> toAdd = new ArrayList<>();
        Map<Integer, SheetRow> toChange = new TreeMap<>();
        List<SheetRow> due = new ArrayList<>(update.due());
        if (isNew) {
            due.addAll(update.others());
        }
        due.sort(BY_GRADE_AND_LOT);
        for (SheetRow row : due) {
            List<Integer> there = rowsByKey.getOrDefault(key(row), List.of());
            if (there.size() > 1) {
                throw new SheetFault(named(row) + " stands in more than one row (" + places(there)
                        + "); leave one of them, or name the lot differently in the others");
            }
            if (there.isEmpty()) {
                toAdd.add(row);
            } else {
                toChange.put(there.get(0), row);
            }
        }
        addColumns(due);
        if (!isNew) {
            // a column that is new is new for the lots that went in before as well
            for (SheetRow row : update.others()) {
                List<Integer> there = rowsByKey.getOrDefault(key(row), List.of());
                if (there.size() == 1 && showsNewColumn(row)) {
                    toChange.putIfAbsent(there.get(0), row);
                }
            }
        }
        int changed = 0;
        for (Map.Entry<Integer, SheetRow> row : toChange.entrySet()) {
            changed += change(row.getKey(), row.getValue()) ? 1 : 0;
        }
        append(toAdd);
        return new Written(toAdd.size(), changed, added, notes);
    }

    private void findHeadings() throws SheetFault {
        for (int row = 0; row < Math.min(grid.rows(), MOST_ABOVE); row++) {
            Map<String, List<Integer>> found = new LinkedHashMap<>();
            for (int column = 0; column < grid.width(row); column++) {
                found.computeIfAbsent(grid.text(row, column), any -> new ArrayList<>())
                        .add(column);
            }
            if (found.containsKey(GRADE) && found.containsKey(LOT)) {
                headingRow = row;
                takeHeadings(found);
                return;
            }
        }
        throw new SheetFault("no row of headings with the cells \"" + GRADE + "\" and \"" + LOT + "\" in the first "
                + MOST_ABOVE + " rows; these two have to keep their names, any other may be renamed");
    }

    private void takeHeadings(Map<String, List<Integer>> found) throws SheetFault {
        for (Map.Entry<String, List<Integer>> heading : found.entrySet()) {
            columns.put(heading.getKey(), heading.getValue().get(0));
        }
        Set<String> ours = new HashSet<>(List.of(GRADE, LOT, UPDATED));
        for (SheetRow row : update.due()) {
            for (SheetValue value : row.values()) {
                ours.add(grid.asShown(value.valueHeading()));
                ours.add(grid.asShown(value.verdictHeading()));
            }
        }
        for (Map.Entry<String, List<Integer>> heading : found.entrySet()) {
            if (heading.getValue().size() > 1 && ours.contains(heading.getKey())) {
                throw new SheetFault("the heading \"" + heading.getKey() + "\" stands more than once ("
                        + heading.getValue().stream()
                                .map(column -> grid.place(headingRow, column))
                                .collect(Collectors.joining(", "))
                        + "); rename all but ours");
            }
        }
    }

    private void findRows() {
        if (!columns.containsKey(GRADE)) {
            return;
        }
        int gradeColumn = columns.get(GRADE);
        int lotColumn = columns.get(LOT);
        for (int row = headingRow + 1; row < grid.rows(); row++) {
            Key key = new Key(grid.text(row, gradeColumn), grid.text(row, lotColumn));
            if (!key.grade().isEmpty() && !key.lot().isEmpty()) {
                rowsByKey.computeIfAbsent(key, any -> new ArrayList<>()).add(row);
                lastRow = row;
            }
        }
    }

    private Key key(SheetRow row) {
        return new Key(
                grid.asShown(row.grade()).strip(), grid.asShown(row.lot()).strip());
    }

    private void addColumns(List<SheetRow> rows) throws SheetFault {
        if (rows.isEmpty()) {
            return;
        }
        column(UPDATED);
        for (SheetRow row : rows) {
            for (SheetValue value : row.values()) {
                column(value.valueHeading());
                column(value.verdictHeading());
            }
        }
    }

    /** The column of a heading, added where there is none. */
    private int column(String heading) throws SheetFault {
        String shown = grid.asShown(heading).strip();
        Integer there = columns.get(shown);
        if (there != null) {
            return there;
        }
        int column = grid.addColumn(headingRow, heading);
        columns.put(shown, column);
        added.add(heading);
        return column;
    }

    private boolean showsNewColumn(SheetRow row) {
        return row.values().stream()
                .anyMatch(value -> added.contains(value.valueHeading()) || added.contains(value.verdictHeading()));
    }

    /** Writes what differs in a row that is there; whether anything did. */
    private boolean change(int row, SheetRow wanted) throws SheetFault {
        boolean changed = false;
        for (Map.Entry<Integer, Value> cell : cells(wanted).entrySet()) {
            changed |= set(row, cell.getKey(), cell.getValue());
        }
        int updated = columns.get(UPDATED);
        if (changed || grid.text(row, updated).isEmpty()) {
            changed |= set(row, updated, new Value.Day(update.today()));
        }
        return changed;
    }

    private boolean set(int row, int column, Value value) throws SheetFault {
        if (grid.holds(row, column, value)) {
            return false;
        }
        if (grid.hasFormula(row, column)) {
            notes.add(grid.place(row, column) + " (" + grid.text(headingRow, column)
                    + ") holds somebody's formula and was left as it is");
            return false;
        }
        grid.put(row, column, value);
        return true;
    }

    private void append(List<SheetRow> rows) throws SheetFault {
        if (rows.isEmpty()) {
            return;
        }
        Grid.Area area = new Grid.Area(headingRow, lastRow, ourColumns(rows), columns.get(GRADE), columns.get(LOT));
        int next = grid.addRows(area, rows.size());
        for (SheetRow row : rows) {
            grid.put(next, area.grade(), new Value.Text(row.grade()));
            grid.put(next, area.lot(), new Value.Text(row.lot()));
            grid.put(next, columns.get(UPDATED), new Value.Day(update.today()));
            for (Map.Entry<Integer, Value> cell : cells(row).entrySet()) {
                if (!(cell.getValue() instanceof Value.Nothing)) {
                    grid.put(next, cell.getKey(), cell.getValue());
                }
            }
            next++;
        }
    }

    private Set<Integer> ourColumns(List<SheetRow> rows) throws SheetFault {
        Set<Integer> ours = new HashSet<>(List.of(columns.get(GRADE), columns.get(LOT), columns.get(UPDATED)));
        for (SheetRow row : rows) {
            ours.addAll(cells(row).keySet());
        }
        return ours;
    }

    /** Values and verdicts of a row by their columns; those without a column are of no row that is due. */
    private Map<Integer, Value> cells(SheetRow row) {
        Map<Integer, Value> cells = new LinkedHashMap<>();
        for (SheetValue value : row.values()) {
            put(cells, value.valueHeading(), Value.of(value.value()));
            put(cells, value.verdictHeading(), Value.of(value.verdict()));
        }
        return cells;
    }

    private void put(Map<Integer, Value> cells, String heading, Value value) {
        Integer column = columns.get(grid.asShown(heading).strip());
        if (column != null) {
            cells.put(column, value);
        }
    }

    private static String named(SheetRow row) {
        return row.grade() + " lot " + row.lot();
    }

    private String places(List<Integer> rows) {
        return rows.stream().map(row -> grid.place(row, columns.get(LOT))).collect(Collectors.joining(", "));
    }
}

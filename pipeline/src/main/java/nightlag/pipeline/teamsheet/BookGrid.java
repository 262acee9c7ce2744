package nightlag.pipeline.teamsheet;

import java.io.IOException;
import java.io.OutputStream;
import java.math.BigDecimal;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.NavigableMap;
import java.util.Optional;
import java.util.TreeMap;
import java.util.regex.Pattern;
import nightlag.pipeline.teamsheet.BookCell.Kind;

/**
 * One sheet of an .xlsx. Cells are put into the sheet's own part, which is taken apart and written as text; what is not ours
 * is copied as it stands, and so is every other part but for the few that have to know: a table that grows, the style of a
 * date, and that formulas are to be calculated when the workbook is next opened.
 */
final class BookGrid implements Grid {
    private static final Pattern FORMULA = Pattern.compile("<(?:[\\w.-]+:)?f[\\s>/]");

    private final Book book;
    private final BookParts parts;
    private final String sheetName;
    private final String part;
    private final List<String> sharedStrings;
    private final SheetPart sheet;
    private final NavigableMap<Integer, NavigableMap<Integer, Value>> cells = new TreeMap<>();
    private final int rows;
    private int widest;
    private Optional<Area> area = Optional.empty();
    private int firstNewRow = CellReference.MOST_ROWS;

    private BookGrid(Book book, BookParts parts, String sheetName) throws SheetFault {
        this.book = book;
        this.parts = parts;
        this.sheetName = sheetName;
        this.part = parts.sheet(sheetName).orElseThrow();
        this.sharedStrings = parts.sharedStrings();
        this.sheet = SheetPart.of(part, book.text(part), sharedStrings);
        int last = 0;
        for (BookRow row : sheet.rows().values()) {
            int width = row.width();
            widest = Math.max(widest, width);
            last = width > 0 ? row.number() + 1 : last;
        }
        this.rows = last;
    }

    /** Opens a sheet of a workbook; where it has none of this name, it gets one. */
    static BookGrid of(byte[] bytes, String sheetName) throws SheetFault {
        Book book = Book.of(bytes);
        BookParts parts = BookParts.of(book);
        if (parts.sheet(sheetName).isEmpty()) {
            parts.addSheet(sheetName);
            parts = BookParts.of(book);
        }
        return new BookGrid(book, parts, sheetName);
    }

    @Override
    public int rows() {
        return rows;
    }

    @Override
    public int width(int row) {
        BookRow there = sheet.rows().get(row);
        return there == null ? 0 : there.width();
    }

    private Optional<BookCell> cell(int row, int column) {
        return Optional.ofNullable(sheet.rows().get(row)).flatMap(there -> there.cell(column));
    }

    @Override
    public String text(int row, int column) {
        return cell(row, column).map(BookGrid::shown).orElse("");
    }

    /** A number is shown in plain digits: a lot may be one. */
    private static String shown(BookCell cell) {
        String text = cell.value().strip();
        if (cell.kind() != Kind.NUMBER) {
            return text;
        }
        try {
            return new BigDecimal(text).stripTrailingZeros().toPlainString();
        } catch (NumberFormatException noNumber) {
            return text;
        }
    }

    @Override
    public String asShown(String text) {
        return text;
    }

    @Override
    public boolean holds(int row, int column, Value value) {
        Optional<BookCell> cell = cell(row, column);
        if (cell.isEmpty() || !cell.get().hasContent()) {
            return value instanceof Value.Nothing;
        }
        BookCell there = cell.get();
        if (there.hasFormula()) {
            return false;
        }
        if (value instanceof Value.Text text) {
            return there.kind() == Kind.TEXT && there.value().equals(text.text());
        }
        return value instanceof Value.Figure number
                && there.kind() == Kind.NUMBER
                && there.value().strip().matches("[-+]?[0-9.]+([eE][-+]?[0-9]+)?")
                && Double.parseDouble(there.value().strip()) == number.number();
    }

    @Override
    public boolean hasFormula(int row, int column) {
        return cell(row, column).filter(BookCell::hasFormula).isPresent();
    }

    @Override
    public String place(int row, int column) {
        return new CellReference(row, column).name();
    }

    @Override
    public int addColumn(int headingRow, String heading) throws SheetFault {
        if (widest >= CellReference.MOST_COLUMNS) {
            throw new SheetFault("the sheet has no column left for \"" + heading + "\"");
        }
        int column = widest++;
        put(headingRow, column, new Value.Text(heading));
        return column;
    }

    @Override
    public int addRows(Area where, int count) throws SheetFault {
        area = Optional.of(where);
        firstNewRow = new RoomBelow(sheet, where).firstRow(rows);
        if (firstNewRow + count > CellReference.MOST_ROWS) {
            throw new SheetFault("the sheet has no room for " + count + " more rows");
        }
        return firstNewRow;
    }

    @Override
    public void put(int row, int column, Value value) {
        cells.computeIfAbsent(row, any -> new TreeMap<>()).put(column, value);
    }

    @Override
    public void writeTo(OutputStream out) throws IOException, SheetFault {
        try (book) {
            BookStyles styles = styles();
            book.replace(
                    part,
                    new SheetWriter(sheet, styles, parts.datesFrom1904(), this::styleLike)
                            .write(cells, staleResults()));
            if (area.isPresent()) {
                int lastRow = cells.lastKey();
                for (BookTable table : BookTable.of(book, part)) {
                    if (table.growsWith(area.get(), firstNewRow)) {
                        book.replace(table.part(), table.grownTo(book, lastRow));
                    }
                }
            }
            parts.calculateOnOpening();
            book.writeTo(out);
        }
    }

    /** Formulas of this sheet that lose what they last gave; those of the other sheets have lost it then. */
    private CellSet staleResults() throws SheetFault {
        StaleResults stale = new StaleResults();
        cells.forEach((row, columns) -> columns.keySet().forEach(column -> stale.change(sheetName, row, column)));
        stale.addFormulas(sheetName, sheet);
        Map<String, SheetPart> others = new LinkedHashMap<>();
        for (String name : parts.sheetNames()) {
            String other = parts.sheet(name).orElseThrow();
            if (!other.equals(part) && FORMULA.matcher(book.text(other)).find()) {
                others.put(name, SheetPart.of(other, book.text(other), sharedStrings));
                stale.addFormulas(name, others.get(name));
            }
        }
        stale.find();
        for (Map.Entry<String, SheetPart> other : others.entrySet()) {
            CellSet ofOther = stale.of(other.getKey());
            if (!ofOther.isEmpty()) {
                book.replace(
                        parts.sheet(other.getKey()).orElseThrow(),
                        SheetWriter.withoutResults(other.getValue(), ofOther));
            }
        }
        return stale.of(sheetName);
    }

    /** The styles, with that of a date among them. */
    private BookStyles styles() throws SheetFault {
        String name = parts.styles()
                .orElseThrow(() ->
                        new SheetFault("the workbook has no styles; open it in the office program and save it again"));
        BookStyles styles = BookStyles.of(name, book.text(name));
        book.replace(name, styles.withDateStyle());
        return styles;
    }

    /** The style of a cell that is not there yet: what its neighbour has, above in a new row, to the left in the headings. */
    private int styleLike(int row, int column) {
        if (area.isPresent()
                && row >= firstNewRow
                && area.get().lastRow() > area.get().headingRow()) {
            return cell(area.get().lastRow(), column).map(BookCell::style).orElse(0);
        }
        BookRow there = sheet.rows().get(row);
        boolean heading = there != null && column >= there.width() && isHeading(there);
        return heading ? there.cell(there.width() - 1).map(BookCell::style).orElse(0) : 0;
    }

    private static boolean isHeading(BookRow row) {
        return row.cells().stream().anyMatch(cell -> cell.value().strip().equals(Merge.GRADE))
                && row.cells().stream().anyMatch(cell -> cell.value().strip().equals(Merge.LOT));
    }
}

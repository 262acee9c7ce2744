package nightlag.pipeline.teamsheet;

import java.io.IOException;
import java.io.OutputStream;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.NavigableMap;
import java.util.TreeMap;

/** A CSV file in whatever dialect it is in; a cell that is not ours keeps its bytes, quotation marks included. */
final class CsvGrid implements Grid {
    private static final List<Character> DELIMITERS = List.of(',', ';', '\t', '|');

    private final CsvText file;
    private final List<CsvLine> lines;
    private final CsvDialect dialect;
    private final int[] widths;
    private final Map<Integer, NavigableMap<Integer, String>> cells = new HashMap<>();
    private final List<NavigableMap<Integer, String>> added = new ArrayList<>();
    private final int rows;
    private int widest;
    private int headingRow = -1;
    private int headingCells;

    private CsvGrid(CsvText file, List<CsvLine> lines, CsvDialect dialect) {
        this.file = file;
        this.lines = lines;
        this.dialect = dialect;
        this.widths = new int[lines.size()];
        int last = 0;
        for (int row = 0; row < widths.length; row++) {
            CsvLine line = lines.get(row);
            int width = line.cells();
            while (width > 0 && line.cell(file.text(), width - 1).isBlank()) {
                width--;
            }
            widths[row] = width;
            widest = Math.max(widest, width);
            last = width > 0 ? row + 1 : last;
        }
        this.rows = last;
    }

    /** A file that is not there yet: RFC 4180, UTF-8 without a mark. */
    static CsvGrid empty() {
        return new CsvGrid(CsvText.empty(), List.of(), new CsvDialect(',', '.', "\r\n"));
    }

    /** Reads a file; its delimiter is the one that makes our headings stand apart. */
    static CsvGrid of(byte[] bytes) throws SheetFault {
        CsvText file = CsvText.of(bytes);
        SheetFault unreadable = null;
        CsvGrid asLastResort = null;
        for (char delimiter : DELIMITERS) {
            List<CsvLine> lines;
            try {
                lines = CsvLine.split(file.text(), delimiter);
            } catch (SheetFault e) {
                unreadable = unreadable == null ? e : unreadable;
                continue;
            }
            CsvGrid grid = new CsvGrid(file, lines, CsvDialect.of(file.text(), lines, delimiter));
            if (grid.hasOurHeadings()) {
                return grid;
            }
            asLastResort = asLastResort == null ? grid : asLastResort;
        }
        if (asLastResort == null) {
            throw unreadable;
        }
        return asLastResort;
    }

    private boolean hasOurHeadings() {
        for (int row = 0; row < rows; row++) {
            boolean grade = false;
            boolean lot = false;
            for (int column = 0; column < widths[row]; column++) {
                String text = text(row, column);
                grade |= text.equals(Merge.GRADE);
                lot |= text.equals(Merge.LOT);
            }
            if (grade && lot) {
                return true;
            }
        }
        return false;
    }

    @Override
    public int rows() {
        return rows;
    }

    @Override
    public int width(int row) {
        return widths[row];
    }

    @Override
    public String text(int row, int column) {
        if (row >= lines.size()) {
            return "";
        }
        return lines.get(row).cell(file.text(), column).strip();
    }

    @Override
    public String asShown(String text) {
        return CsvDialect.harmless(text);
    }

    @Override
    public boolean holds(int row, int column, Value value) {
        String there = text(row, column);
        if (value instanceof Value.Figure number) {
            return dialect.number(there).stream().anyMatch(found -> found == number.number());
        }
        return there.equals(dialect.text(value).strip());
    }

    @Override
    public boolean hasFormula(int row, int column) {
        return false;
    }

    @Override
    public String place(int row, int column) {
        return "row " + (row + 1) + ", column " + (column + 1);
    }

    @Override
    public int addColumn(int row, String heading) throws SheetFault {
        if (headingRow < 0) {
            headingRow = row;
            headingCells = row < lines.size() ? lines.get(row).cells() : 0;
        }
        if (rows == 0 && added.isEmpty()) {
            added.add(new TreeMap<>());
        }
        int column = widest++;
        put(row, column, new Value.Text(heading));
        return column;
    }

    @Override
    public int addRows(Area area, int count) {
        int first = rows + added.size();
        if (area.headingRow() < rows) {
            widest = Math.max(widest, lines.get(area.headingRow()).cells());
        }
        for (int i = 0; i < count; i++) {
            added.add(new TreeMap<>());
        }
        return first;
    }

    @Override
    public void put(int row, int column, Value value) throws SheetFault {
        String text = dialect.text(value);
        if (!file.canHold(text)) {
            throw new SheetFault("the file is in " + file.charset() + ", which cannot hold \"" + text
                    + "\"; save it once as CSV in UTF-8");
        }
        NavigableMap<Integer, String> line =
                row < rows ? cells.computeIfAbsent(row, any -> new TreeMap<>()) : added.get(row - rows);
        line.put(column, dialect.cell(text));
    }

    @Override
    public void writeTo(OutputStream out) throws IOException {
        StringBuilder whole = new StringBuilder(file.text().length() + 256 * added.size());
        for (int row = 0; row < rows; row++) {
            writeLine(whole, row);
        }
        if (!added.isEmpty()) {
            writeAdded(whole);
        }
        for (int row = rows; row < lines.size(); row++) {
            writeLine(whole, row);
        }
        out.write(file.encode(whole));
    }

    private void writeAdded(StringBuilder whole) {
        boolean lastLineEnds = rows == 0 || !lines.get(rows - 1).lineEnd().isEmpty();
        for (int i = 0; i < added.size(); i++) {
            if (i > 0 || !lastLineEnds) {
                whole.append(dialect.lineEnd());
            }
            NavigableMap<Integer, String> line = added.get(i);
            for (int column = 0; column < widest; column++) {
                whole.append(column == 0 ? "" : dialect.delimiter()).append(line.getOrDefault(column, ""));
            }
        }
        if (lastLineEnds) {
            whole.append(dialect.lineEnd());
        }
    }

    private void writeLine(StringBuilder whole, int row) {
        CsvLine line = lines.get(row);
        NavigableMap<Integer, String> ours = cells.getOrDefault(row, new TreeMap<>());
        int count = Math.max(line.cells(), ours.isEmpty() ? 0 : ours.lastKey() + 1);
        boolean belowHeadings = headingRow >= 0 && row >= headingRow && row < rows && widths[row] > 0;
        if (belowHeadings && line.cells() >= headingCells) {
            // a table that was as wide as its headings stays so
            count = Math.max(count, widest);
        }
        for (int column = 0; column < count; column++) {
            if (column > 0) {
                whole.append(dialect.delimiter());
            }
            String cell = ours.get(column);
            if (cell != null) {
                whole.append(cell);
            } else if (column < line.cells()) {
                whole.append(line.raw(file.text(), column));
            }
        }
        whole.append(line.lineEnd());
    }
}

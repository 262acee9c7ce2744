package nightlag.pipeline.teamsheet;

import java.time.LocalDate;
import java.time.temporal.ChronoUnit;
import java.util.Map;
import java.util.NavigableMap;
import java.util.Optional;
import java.util.Set;
import java.util.TreeMap;

/** Writes cells of ours into the part of a sheet. */
final class SheetWriter {
    /** Day 0 of the usual count: it takes 1900 for a leap year, so that this holds from 1 March 1900 on. */
    private static final LocalDate DAY_0 = LocalDate.of(1899, 12, 30);

    private static final LocalDate DAY_0_FROM_1904 = LocalDate.of(1904, 1, 1);

    private final SheetPart sheet;
    private final BookStyles styles;
    private final LocalDate dayZero;
    private final StyleOfNew styleOfNew;

    /** The style of a cell that is not there yet. */
    interface StyleOfNew {
        int at(int row, int column);
    }

    SheetWriter(SheetPart sheet, BookStyles styles, boolean datesFrom1904, StyleOfNew styleOfNew) {
        this.sheet = sheet;
        this.styles = styles;
        this.dayZero = datesFrom1904 ? DAY_0_FROM_1904 : DAY_0;
        this.styleOfNew = styleOfNew;
    }

    /**
     * The part with these cells in it.
     *
     * @param cells ours, by row and column
     * @param stale formulas that lose what they last gave
     */
    String write(NavigableMap<Integer, NavigableMap<Integer, Value>> cells, CellSet stale) {
        Splice splice = new Splice(sheet.xml());
        dropResults(splice, sheet, stale, cells.keySet());
        StringBuilder below = new StringBuilder();
        for (Map.Entry<Integer, NavigableMap<Integer, Value>> row : cells.entrySet()) {
            BookRow there = sheet.rows().get(row.getKey());
            if (there != null) {
                splice.replace(there.start(), there.end(), changed(there, row.getValue(), stale));
                continue;
            }
            Map.Entry<Integer, BookRow> next = sheet.rows().higherEntry(row.getKey());
            if (next == null) {
                below.append(added(row.getKey(), row.getValue()));
            } else {
                splice.insert(next.getValue().start(), added(row.getKey(), row.getValue()));
            }
        }
        if (sheet.data().selfClosed()) {
            splice.replace(
                    sheet.data().start(),
                    sheet.data().end(),
                    opened(sheet.data().raw()) + below + endTag("sheetData"));
        } else {
            splice.insert(sheet.dataClose(), below.toString());
        }
        growDimension(splice, cells);
        return splice.text();
    }

    /** The part without what these formulas last gave. */
    static String withoutResults(SheetPart sheet, CellSet stale) {
        Splice splice = new Splice(sheet.xml());
        dropResults(splice, sheet, stale, Set.of());
        return splice.text();
    }

    private static void dropResults(Splice splice, SheetPart sheet, CellSet stale, Set<Integer> rowsApart) {
        for (BookRow row : sheet.rows().values()) {
            if (!rowsApart.contains(row.number())) {
                for (BookCell cell : row.cells()) {
                    if (stale.has(row.number(), cell.column()) && cell.resultStart() < cell.resultEnd()) {
                        splice.replace(cell.resultStart(), cell.resultEnd(), "");
                    }
                }
            }
        }
    }

    private String added(int row, NavigableMap<Integer, Value> cells) {
        StringBuilder xml = new StringBuilder();
        xml.append('<')
                .append(sheet.prefix())
                .append("row r=\"")
                .append(row + 1)
                .append("\">");
        cells.forEach((column, value) -> xml.append(cell(row, column, Optional.empty(), value)));
        return xml.append(endTag("row")).toString();
    }

    private String changed(BookRow row, NavigableMap<Integer, Value> cells, CellSet stale) {
        String text = sheet.xml();
        XmlTags.Tag tag = new XmlTags.Tag(row.start(), row.tagEnd(), text.substring(row.start(), row.tagEnd()));
        StringBuilder xml = new StringBuilder(opened(cellsOutside(row, cells) ? tag.without("spans") : tag.raw()));
        NavigableMap<Integer, Value> left = new TreeMap<>(cells);
        int at = row.tagEnd();
        for (BookCell there : row.cells()) {
            while (!left.isEmpty() && left.firstKey() < there.column()) {
                Map.Entry<Integer, Value> next = left.pollFirstEntry();
                xml.append(cell(row.number(), next.getKey(), Optional.empty(), next.getValue()));
            }
            Value ours = left.remove(there.column());
            if (ours == null && there.resultStart() < there.resultEnd() && stale.has(row.number(), there.column())) {
                xml.append(text, at, there.resultStart()).append(text, there.resultEnd(), there.end());
            } else if (ours == null) {
                xml.append(text, at, there.end());
            } else {
                xml.append(text, at, there.start())
                        .append(cell(row.number(), there.column(), Optional.of(there), ours));
            }
            at = there.end();
        }
        left.forEach((column, value) -> xml.append(cell(row.number(), column, Optional.empty(), value)));
        return xml.append(text, at, row.close()).append(endTag("row")).toString();
    }

    /** Whether the hint of how far the row reaches would be wrong. */
    private static boolean cellsOutside(BookRow row, NavigableMap<Integer, Value> cells) {
        return row.cells().isEmpty()
                || cells.firstKey() < row.cells().get(0).column()
                || cells.lastKey() > row.cells().get(row.cells().size() - 1).column();
    }

    private String cell(int row, int column, Optional<BookCell> there, Value value) {
        int style = there.map(BookCell::style).orElseGet(() -> styleOfNew.at(row, column));
        if (value instanceof Value.Day && !styles.isDate(style)) {
            style = styles.dateStyle();
        }
        String start = "<" + sheet.prefix() + "c r=\"" + new CellReference(row, column).name() + "\""
                + (style == 0 ? "" : " s=\"" + style + "\"");
        if (value instanceof Value.Text text) {
            String p = sheet.prefix();
            return start + " t=\"inlineStr\"><" + p + "is><" + p + "t xml:space=\"preserve\">"
                    + XmlText.cell(text.text()) + "</" + p + "t></" + p + "is>" + endTag("c");
        }
        if (value instanceof Value.Figure number) {
            return start + ">" + number(number.digits()) + endTag("c");
        }
        if (value instanceof Value.Day day) {
            return start + ">" + number(String.valueOf(ChronoUnit.DAYS.between(dayZero, day.date()))) + endTag("c");
        }
        return start + "/>";
    }

    private String number(String digits) {
        return "<" + sheet.prefix() + "v>" + digits + "</" + sheet.prefix() + "v>";
    }

    private static String opened(String tag) {
        return tag.endsWith("/>") ? tag.substring(0, tag.length() - 2).stripTrailing() + ">" : tag;
    }

    private String endTag(String name) {
        return "</" + sheet.prefix() + name + ">";
    }

    private void growDimension(Splice splice, NavigableMap<Integer, NavigableMap<Integer, Value>> cells) {
        if (sheet.dimension().isEmpty()) {
            return;
        }
        XmlTags.Tag tag = sheet.dimension().get();
        Optional<CellRange> before =
                sheet.rows().isEmpty() ? Optional.empty() : tag.attribute("ref").flatMap(CellRange::of);
        Optional<CellRange> range = before;
        for (Map.Entry<Integer, NavigableMap<Integer, Value>> row : cells.entrySet()) {
            for (int column :
                    new int[] {row.getValue().firstKey(), row.getValue().lastKey()}) {
                CellReference cell = new CellReference(row.getKey(), column);
                range = Optional.of(range.map(found -> found.with(cell)).orElse(new CellRange(cell, cell)));
            }
        }
        if (range.isPresent() && !range.equals(before)) {
            splice.replace(tag.start(), tag.end(), tag.with("ref", range.get().name()));
        }
    }
}

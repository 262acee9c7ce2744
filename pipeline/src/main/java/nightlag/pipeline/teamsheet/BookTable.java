package nightlag.pipeline.teamsheet;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import nightlag.pipeline.teamsheet.BookLinks.Link;
import nightlag.pipeline.teamsheet.XmlTags.Tag;

/**
 * A block of cells that somebody made a table of, in the sense of the office programs.
 *
 * @param part its part
 * @param range where it is
 * @param tag its start tag
 * @param filter the tag of its filter
 * @param hasHeadings whether its first row is one of headings
 * @param hasTotals whether its last row is one of totals
 */
record BookTable(String part, CellRange range, Tag tag, Optional<Tag> filter, boolean hasHeadings, boolean hasTotals) {
    /** The tables of a sheet. */
    static List<BookTable> of(Book book, String sheetPart) throws SheetFault {
        List<BookTable> tables = new ArrayList<>();
        for (Link link : BookLinks.of(book, sheetPart)) {
            if (link.is("table")) {
                read(book, link.target()).ifPresent(tables::add);
            }
        }
        return tables;
    }

    private static Optional<BookTable> read(Book book, String part) throws SheetFault {
        try (XmlTags tags = new XmlTags(part, book.text(part))) {
            if (!tags.nextStart("table")) {
                return Optional.empty();
            }
            Optional<CellRange> range = tags.attribute("ref").flatMap(CellRange::of);
            Tag tag = tags.tag();
            boolean hasHeadings = tags.number("headerRowCount", 1) > 0;
            boolean hasTotals = tags.number("totalsRowCount", 0) > 0;
            Optional<Tag> filter = tags.nextStart("autoFilter") ? Optional.of(tags.tag()) : Optional.empty();
            return range.map(found -> new BookTable(part, found, tag, filter, hasHeadings, hasTotals));
        }
    }

    /** Whether it is the table of our rows, and rows below its last one belong to it. */
    boolean growsWith(Grid.Area area, int firstNewRow) {
        return hasHeadings
                && !hasTotals
                && range.first().row() == area.headingRow()
                && range.last().row() == firstNewRow - 1
                && range.hasColumn(area.grade())
                && range.hasColumn(area.lot());
    }

    /** Its part when it ends at a later row. */
    String grownTo(Book book, int lastRow) throws SheetFault {
        Splice splice = new Splice(book.text(part));
        String grown = range.downTo(lastRow).name();
        splice.replace(tag.start(), tag.end(), tag.with("ref", grown));
        if (filter.isPresent()) {
            splice.replace(
                    filter.get().start(), filter.get().end(), filter.get().with("ref", grown));
        }
        return splice.text();
    }
}

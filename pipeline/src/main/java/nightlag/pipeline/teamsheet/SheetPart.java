package nightlag.pipeline.teamsheet;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.NavigableMap;
import java.util.Optional;
import java.util.TreeMap;
import nightlag.pipeline.teamsheet.BookCell.Kind;

/**
 * The part of a workbook that holds one sheet, taken apart into rows and cells with their places.
 *
 * @param xml the part
 * @param prefix the prefix of its tags, with a colon; mostly empty
 * @param rows its rows by number
 * @param data the start tag of the rows
 * @param dataClose where the end tag of the rows begins; the end of the start tag where that closes itself
 * @param dimension the tag that says how large the sheet is
 */
record SheetPart(
        String xml,
        String prefix,
        NavigableMap<Integer, BookRow> rows,
        XmlTags.Tag data,
        int dataClose,
        Optional<XmlTags.Tag> dimension) {
    static SheetPart of(String part, String xml, List<String> sharedStrings) throws SheetFault {
        try (XmlTags tags = new XmlTags(part, xml)) {
            return new Reader(part, xml, tags, sharedStrings).read();
        }
    }

    /** Stands for a formula that the cell does not tell, such as that of a data table. */
    private static final String UNKNOWN = "?";

    /** Reads the rows one after the other. */
    private static final class Reader {
        private final String part;
        private final String xml;
        private final XmlTags tags;
        private final List<String> sharedStrings;
        private final Map<String, Formula> sharedFormulas = new HashMap<>();

        private Reader(String part, String xml, XmlTags tags, List<String> sharedStrings) {
            this.part = part;
            this.xml = xml;
            this.tags = tags;
            this.sharedStrings = sharedStrings;
        }

        private SheetPart read() throws SheetFault {
            Optional<XmlTags.Tag> dimension = Optional.empty();
            while (tags.next()) {
                if (tags.starts("dimension")) {
                    dimension = Optional.of(tags.tag());
                } else if (tags.starts("sheetData")) {
                    XmlTags.Tag data = tags.tag();
                    String prefix = tags.prefix();
                    NavigableMap<Integer, BookRow> rows = rows();
                    int close = data.selfClosed() ? data.end() : tags.start();
                    while (tags.next()) {
                        // the rest is copied, but it has to be whole
                    }
                    return new SheetPart(xml, prefix, rows, data, close, dimension);
                }
            }
            throw new SheetFault("the sheet holds no cells and no place for them; is it a chart?");
        }

        private NavigableMap<Integer, BookRow> rows() throws SheetFault {
            NavigableMap<Integer, BookRow> rows = new TreeMap<>();
            int next = 0;
            while (tags.next() && !tags.ends("sheetData")) {
                if (tags.starts("row")) {
                    int number = tags.number("r", next + 1) - 1;
                    if (number < next || number >= CellReference.MOST_ROWS) {
                        throw new SheetFault(
                                part + " inside the workbook is damaged: row " + (number + 1) + " after row " + next);
                    }
                    rows.put(number, row(number));
                    next = number + 1;
                }
            }
            return rows;
        }

        private BookRow row(int number) throws SheetFault {
            int start = tags.start();
            int tagEnd = tags.end();
            List<BookCell> cells = new ArrayList<>();
            int next = 0;
            while (tags.next() && !tags.ends("row")) {
                if (tags.starts("c")) {
                    int column = column(number, next);
                    cells.add(cell(number, column));
                    next = column + 1;
                }
            }
            boolean selfClosed = xml.startsWith("/>", tagEnd - 2);
            return new BookRow(
                    number, start, tagEnd, selfClosed ? tagEnd : tags.start(), selfClosed ? tagEnd : tags.end(), cells);
        }

        private int column(int row, int next) throws SheetFault {
            Optional<String> name = tags.attribute("r");
            if (name.isEmpty()) {
                return next;
            }
            Optional<CellReference> cell = CellReference.of(name.get());
            if (cell.isEmpty() || cell.get().row() != row || cell.get().column() < next) {
                throw new SheetFault(
                        part + " inside the workbook is damaged: cell \"" + name.get() + "\" in row " + (row + 1));
            }
            return cell.get().column();
        }

        private BookCell cell(int row, int column) throws SheetFault {
            int start = tags.start();
            int end = tags.end();
            boolean selfClosed = xml.startsWith("/>", end - 2);
            int style = tags.number("s", 0);
            String type = tags.attribute("t").orElse("n");
            String value = "";
            Formula formula = Formula.NONE;
            boolean there = false;
            int resultStart = 0;
            int resultEnd = 0;
            while (tags.next() && !tags.ends("c")) {
                if (tags.starts("v")) {
                    resultStart = tags.start();
                    value = textUntilEnd("v");
                    resultEnd = tags.end();
                    there = true;
                } else if (tags.starts("is")) {
                    value = SharedStrings.textUntil(tags, "is");
                    there = true;
                } else if (tags.starts("f")) {
                    formula = formula(new CellReference(row, column));
                }
            }
            if (!selfClosed) {
                end = tags.end();
            }
            Kind kind = there ? kind(type) : Kind.EMPTY;
            return new BookCell(column, start, end, style, kind, shown(type, value), formula, resultStart, resultEnd);
        }

        private static Kind kind(String type) {
            return switch (type) {
                case "s", "str", "inlineStr" -> Kind.TEXT;
                case "n" -> Kind.NUMBER;
                default -> Kind.OTHER;
            };
        }

        private String shown(String type, String value) throws SheetFault {
            if (type.equals("str")) {
                return XmlText.meant(value);
            }
            if (!type.equals("s") || value.isEmpty()) {
                return value;
            }
            try {
                return sharedStrings.get(Integer.parseInt(value.strip()));
            } catch (NumberFormatException | IndexOutOfBoundsException e) {
                throw new SheetFault(
                        part + " inside the workbook is damaged: a cell points at the shared text " + value
                                + ", which is not there",
                        e);
            }
        }

        private String textUntilEnd(String name) throws SheetFault {
            StringBuilder text = new StringBuilder();
            while (tags.next() && !tags.ends(name)) {
                text.append(tags.isText() ? tags.text() : "");
            }
            return text.toString();
        }

        /** One that was filled down stands at the first cell only; the others name its group. */
        private Formula formula(CellReference cell) throws SheetFault {
            String type = tags.attribute("t").orElse("normal");
            String group = tags.attribute("si").orElse("");
            Optional<CellRange> array =
                    type.equals("array") ? tags.attribute("ref").flatMap(CellRange::of) : Optional.empty();
            String text = textUntilEnd("f");
            if (type.equals("shared") && text.isEmpty()) {
                return sharedFormulas.getOrDefault(group, new Formula(UNKNOWN, cell, Optional.empty()));
            }
            Formula formula = new Formula(text.isEmpty() ? UNKNOWN : text, cell, array);
            if (type.equals("shared")) {
                sharedFormulas.put(group, formula);
            }
            return formula;
        }
    }
}

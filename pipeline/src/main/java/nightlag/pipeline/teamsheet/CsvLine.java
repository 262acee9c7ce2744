package nightlag.pipeline.teamsheet;

import java.util.ArrayList;
import java.util.List;

/**
 * One record of a CSV text and where its cells stand in it. Commons CSV tells where a record begins, but not where its cells
 * do, which it takes to leave the others as they are.
 *
 * @param starts where each cell begins
 * @param ends where each cell ends
 * @param lineEnd the line end; empty at the end of the file
 */
record CsvLine(int[] starts, int[] ends, String lineEnd) {
    private static final char QUOTE = '"';

    int cells() {
        return starts.length;
    }

    /** The cells as they stand in the file, quotation marks included. */
    CharSequence raw(String text, int cell) {
        return text.subSequence(starts[cell], ends[cell]);
    }

    /** A cell as it is meant. */
    String cell(String text, int cell) {
        if (cell >= cells()) {
            return "";
        }
        String raw = text.substring(starts[cell], ends[cell]);
        if (raw.isEmpty() || raw.charAt(0) != QUOTE) {
            return raw;
        }
        StringBuilder meant = new StringBuilder(raw.length());
        boolean quoted = true;
        for (int i = 1; i < raw.length(); i++) {
            char c = raw.charAt(i);
            if (c == QUOTE && quoted) {
                if (i + 1 < raw.length() && raw.charAt(i + 1) == QUOTE) {
                    meant.append(QUOTE);
                    i++;
                } else {
                    quoted = false;
                }
            } else {
                meant.append(c);
            }
        }
        return meant.toString();
    }

    /**
     * Takes a text apart. A cell that begins with a quotation mark may hold delimiters and line ends up to the next single
     * one.
     *
     * @throws SheetFault if a quotation mark is never closed
     */
    static List<CsvLine> split(String text, char delimiter) throws SheetFault {
        List<CsvLine> lines = new ArrayList<>();
        List<int[]> cells = new ArrayList<>();
        int at = 0;
        while (at < text.length()) {
            int end = endOfCell(text, at, delimiter, lines.size() + 1);
            cells.add(new int[] {at, end});
            if (end < text.length() && text.charAt(end) == delimiter) {
                at = end + 1;
                if (at == text.length()) {
                    cells.add(new int[] {at, at});
                    lines.add(line(cells, ""));
                }
                continue;
            }
            String lineEnd = lineEnd(text, end);
            lines.add(line(cells, lineEnd));
            at = end + lineEnd.length();
        }
        return lines;
    }

    private static CsvLine line(List<int[]> cells, String lineEnd) {
        CsvLine line = new CsvLine(
                cells.stream().mapToInt(cell -> cell[0]).toArray(),
                cells.stream().mapToInt(cell -> cell[1]).toArray(),
                lineEnd);
        cells.clear();
        return line;
    }

    private static int endOfCell(String text, int start, char delimiter, int line) throws SheetFault {
        int at = start;
        if (text.charAt(at) == QUOTE) {
            at = closingQuote(text, start, line) + 1;
        }
        while (at < text.length()
                && text.charAt(at) != delimiter
                && text.charAt(at) != '\n'
                && text.charAt(at) != '\r') {
            at++;
        }
        return at;
    }

    private static int closingQuote(String text, int open, int line) throws SheetFault {
        int at = open + 1;
        while (true) {
            int close = text.indexOf(QUOTE, at);
            if (close < 0) {
                throw new SheetFault(
                        "row " + line + ": a quotation mark at the start of a cell is never closed; put it right, or in"
                                + " quotation marks and doubled");
            }
            if (close + 1 == text.length() || text.charAt(close + 1) != QUOTE) {
                return close;
            }
            at = close + 2;
        }
    }

    private static String lineEnd(String text, int at) {
        if (at >= text.length()) {
            return "";
        }
        return text.startsWith("\r\n", at) ? "\r\n" : text.substring(at, at + 1);
    }
}

package nightlag.pipeline.decode;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.util.List;
import java.util.Objects;
import org.apache.commons.csv.CSVFormat;
import org.apache.commons.csv.CSVParser;
import org.apache.commons.csv.CSVRecord;
import org.apache.commons.csv.QuoteMode;

/**
 * Cuts a line into cells. A line without a quotation mark is what stands between its delimiters; any other goes to Commons
 * CSV. A space as delimiter stands for any run of spaces, and those around a line mean nothing. A row is a line: a quoted
 * cell cannot go on in the next one.
 */
final class CellSplitter {
    private static final char QUOTE = '"';

    private final char delimiter;
    private final Complaints complaints;
    private final CSVFormat quoted;

    CellSplitter(char delimiter, Complaints complaints) {
        this.delimiter = delimiter;
        this.complaints = complaints;
        this.quoted = CSVFormat.RFC4180
                .builder()
                .setDelimiter(delimiter)
                .setQuote(QUOTE)
                .setIgnoreEmptyLines(false)
                .setIgnoreSurroundingSpaces(true)
                // an empty cell comes as null, a quoted empty one as text: runs of spaces can be told from ""
                .setQuoteMode(QuoteMode.ALL_NON_NULL)
                .get();
    }

    /** Whether a run of spaces is the delimiter. */
    boolean bySpaces() {
        return delimiter == ' ';
    }

    /** Whether the current line holds nothing, not even a delimiter. */
    boolean isBlank(TextLines lines) {
        char[] chars = lines.chars();
        for (int i = 0; i < lines.length(); i++) {
            if (!Cells.blank(chars[i]) || (chars[i] == delimiter && !bySpaces())) {
                return false;
            }
        }
        return true;
    }

    /** Cuts the current line; wrong quotation marks are a complaint. */
    void split(TextLines lines, Cells cells) throws DecodeException {
        if (!hasQuote(lines)) {
            splitPlain(lines, cells);
            return;
        }
        try {
            splitQuoted(lines.line(), cells);
        } catch (IOException | UncheckedIOException e) {
            throw complaints.at(
                    lines.number(),
                    "",
                    "quotation marks that do not pair up in " + Complaints.shown(lines.line()),
                    "a quoted cell that ends on its own line, before a delimiter");
        }
        checkCount(lines, cells);
    }

    /** Cuts a line that need be no table, such as a remark above the header: quotation marks that do not pair up stay. */
    void splitLoosely(TextLines lines, Cells cells) throws DecodeException {
        try {
            split(lines, cells);
        } catch (DecodeException e) {
            splitPlain(lines, cells);
        }
    }

    /** As {@link #splitLoosely} for a piece of a line. */
    List<String> splitLoosely(String text) throws DecodeException {
        Cells cells = new Cells();
        if (text.indexOf(QUOTE) >= 0) {
            try {
                splitQuoted(text, cells);
                return cells.texts();
            } catch (IOException | UncheckedIOException e) {
                // taken as it stands below
            }
        }
        cut(text.toCharArray(), text.length(), cells);
        return cells.texts();
    }

    private static boolean hasQuote(TextLines lines) {
        char[] chars = lines.chars();
        for (int i = 0; i < lines.length(); i++) {
            if (chars[i] == QUOTE) {
                return true;
            }
        }
        return false;
    }

    private void splitPlain(TextLines lines, Cells cells) throws DecodeException {
        cut(lines.chars(), lines.length(), cells);
        checkCount(lines, cells);
    }

    private void checkCount(TextLines lines, Cells cells) throws DecodeException {
        if (cells.count() > Bounds.COLUMNS) {
            throw complaints.at(lines.number(), "", cells.count() + " cells", "at most " + Bounds.COLUMNS);
        }
    }

    private void cut(char[] chars, int length, Cells cells) {
        cells.begin(chars);
        int from = 0;
        for (int i = 0; i <= length; i++) {
            if (i == length || chars[i] == delimiter) {
                if (!bySpaces() || i > from) {
                    cells.add(from, i);
                }
                from = i + 1;
            }
        }
    }

    private void splitQuoted(String line, Cells cells) throws IOException {
        List<CSVRecord> records;
        try (CSVParser parser = CSVParser.parse(line, quoted)) {
            records = parser.getRecords();
        }
        if (records.size() != 1) {
            throw new IOException("one line gave " + records.size() + " rows");
        }
        List<String> texts = records.get(0).stream()
                .filter(text -> !bySpaces() || text != null)
                .map(text -> Objects.requireNonNullElse(text, ""))
                .toList();
        cells.begin(String.join("", texts).toCharArray());
        int from = 0;
        for (String text : texts) {
            cells.add(from, from + text.length());
            from += text.length();
        }
    }
}

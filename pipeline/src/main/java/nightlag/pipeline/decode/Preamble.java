package nightlag.pipeline.decode;

import java.util.Collection;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/**
 * The lines above the header, of which only the first to carry each label asked for is kept: {@code label: value},
 * {@code label = value} or label, delimiter, value. The value ends at the next delimiter; what stands in the cell after it is
 * kept beside it, as it may be its unit. With a space as delimiter the value is the rest of the line.
 */
final class Preamble {
    /**
     * What a labelled line says.
     *
     * @param text the value, trimmed; may be empty
     * @param beside the cell after it
     * @param line its line
     */
    record Entry(String text, Optional<String> beside, int line) {}

    private final Collection<String> labels;
    private final char delimiter;
    private final CellSplitter splitter;
    private final Map<String, Entry> entries = new HashMap<>();

    Preamble(Collection<String> labels, char delimiter, CellSplitter splitter) {
        this.labels = List.copyOf(labels);
        this.delimiter = delimiter;
        this.splitter = splitter;
    }

    /** The first line with a label. */
    Optional<Entry> entry(String label) {
        return Optional.ofNullable(entries.get(label));
    }

    /** Looks at a line above the header. */
    void take(TextLines lines) throws DecodeException {
        if (entries.size() == labels.size()) {
            return;
        }
        String line = lines.line();
        for (String label : labels) {
            if (!entries.containsKey(label)) {
                Optional<Entry> found = plain(label, line, lines.number());
                if (found.isEmpty() && line.indexOf('"') >= 0) {
                    found = quoted(label, line, lines.number());
                }
                found.ifPresent(entry -> entries.put(label, entry));
            }
        }
    }

    private Optional<Entry> plain(String label, String line, int number) throws DecodeException {
        int start = pastBlanks(line, 0);
        if (!line.startsWith(label, start)) {
            return Optional.empty();
        }
        int end = start + label.length();
        int mark = pastBlanks(line, end);
        if (mark < line.length() && (line.charAt(mark) == ':' || line.charAt(mark) == '=')) {
            return Optional.of(marked(line.substring(mark + 1), number));
        }
        if (mark < line.length() && line.charAt(mark) == delimiter) {
            return Optional.of(cells(splitter.splitLoosely(line.substring(mark + 1)), number));
        }
        if (delimiter == ' ' && mark > end) {
            return Optional.of(marked(line.substring(mark), number));
        }
        return Optional.empty();
    }

    private Optional<Entry> quoted(String label, String line, int number) throws DecodeException {
        List<String> cells = splitter.splitLoosely(line);
        if (cells.isEmpty() || !cells.get(0).startsWith(label)) {
            return Optional.empty();
        }
        List<String> others = cells.subList(1, cells.size());
        String rest = Cells.trim(cells.get(0).substring(label.length()));
        if (rest.isEmpty()) {
            return others.isEmpty() ? Optional.empty() : Optional.of(cells(others, number));
        }
        if (rest.charAt(0) != ':' && rest.charAt(0) != '=') {
            return Optional.empty();
        }
        String value = Cells.trim(rest.substring(1));
        return Optional.of(
                value.isEmpty()
                        ? cells(others, number)
                        : new Entry(value, others.stream().findFirst(), number));
    }

    /** What stands behind a colon or an equals sign; a delimiter may follow at once. */
    private Entry marked(String rest, int number) throws DecodeException {
        if (delimiter == ' ') {
            String value = Cells.trim(rest);
            List<String> cells = value.startsWith("\"") ? splitter.splitLoosely(value) : List.of(value);
            return cells(cells, number);
        }
        List<String> cells = splitter.splitLoosely(rest);
        return cells(cells.size() > 1 && cells.get(0).isEmpty() ? cells.subList(1, cells.size()) : cells, number);
    }

    private static Entry cells(List<String> cells, int number) {
        return new Entry(
                cells.isEmpty() ? "" : cells.get(0), cells.stream().skip(1).findFirst(), number);
    }

    private int pastBlanks(String line, int from) {
        int at = from;
        while (at < line.length()
                && Cells.blank(line.charAt(at))
                && (line.charAt(at) != delimiter || delimiter == ' ')) {
            at++;
        }
        return at;
    }
}

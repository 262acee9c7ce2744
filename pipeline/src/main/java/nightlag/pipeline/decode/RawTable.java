package nightlag.pipeline.decode;

import java.io.Closeable;
import java.io.IOException;
import java.nio.charset.Charset;
import java.util.Collection;
import java.util.List;
import nightlag.pipeline.config.ColumnRef;
import nightlag.pipeline.config.FileFormat;
import nightlag.pipeline.config.Instrument;
import nightlag.pipeline.config.TagSource;
import nightlag.pipeline.intake.RawFile;

/**
 * A raw file as a table: what stands above the header, the columns, then row after row. Empty lines are no rows; a line of
 * delimiters alone is a row of empty cells.
 */
final class RawTable implements Closeable {
    private final Complaints complaints;
    private final TextLines lines;
    private final CellSplitter splitter;
    private final Preamble preamble;
    private final Cells cells = new Cells();
    private Columns columns;
    private int width;
    private boolean widthOfHeader;
    private boolean rowWaits;
    private long rows;

    private RawTable(RawFile file, Complaints complaints) throws IOException {
        Instrument instrument = file.intake().instrument();
        FileFormat format = instrument.files();
        this.complaints = complaints;
        this.splitter = new CellSplitter(format.delimiter(), complaints);
        this.preamble = new Preamble(labels(instrument), format.delimiter(), splitter);
        this.columns = Columns.numbered(complaints);
        this.lines = new TextLines(file.path(), format.charset(), complaints);
    }

    /** Opens a file and reads up to its first row. */
    static RawTable open(RawFile file, Complaints complaints) throws IOException, DecodeException {
        Instrument instrument = file.intake().instrument();
        RawTable table = new RawTable(file, complaints);
        try {
            if (instrument.files().header() instanceof FileFormat.Header.None) {
                table.readToFirstNumbers(instrument);
            } else {
                table.readToHeader(instrument.files().header());
                if (instrument.files().unitRow()) {
                    table.readUnits();
                }
            }
            table.setWidth(instrument);
            return table;
        } catch (IOException | DecodeException | RuntimeException e) {
            table.close();
            throw e;
        }
    }

    /** The charset the file is read in. */
    Charset charset() {
        return lines.charset();
    }

    /** Whether a byte-order mark decided the charset. */
    boolean marked() {
        return lines.marked();
    }

    /** What stands above the header. */
    Preamble preamble() {
        return preamble;
    }

    /** The columns. */
    Columns columns() {
        return columns;
    }

    /** Goes to the next row; false at the end. */
    boolean nextRow() throws IOException, DecodeException {
        if (!rowWaits && !nextFilledLine()) {
            return false;
        }
        rowWaits = false;
        rows++;
        splitter.split(lines, cells);
        checkWidth();
        return true;
    }

    /** The cells of the current row; those of the next take their place. */
    Cells cells() {
        return cells;
    }

    /** The line of the current row. */
    int line() {
        return lines.number();
    }

    /** Rows so far. */
    long rows() {
        return rows;
    }

    @Override
    public void close() throws IOException {
        lines.close();
    }

    private static Collection<String> labels(Instrument instrument) {
        return instrument.tags().values().stream()
                .filter(TagSource.Preamble.class::isInstance)
                .map(source -> ((TagSource.Preamble) source).label())
                .distinct()
                .toList();
    }

    private void readToHeader(FileFormat.Header header) throws IOException, DecodeException {
        while (lines.next()) {
            if (isHeader(header)) {
                splitter.split(lines, cells);
                columns = new Columns(complaints, cells.texts(), lines.number(), List.of(), 0);
                return;
            }
            preamble.take(lines);
        }
        if (lines.number() == 0) {
            throw complaints.at(0, "", "an empty file", "a table");
        }
        throw complaints.at(
                0,
                "",
                "no header row in " + lines.number() + " lines",
                header instanceof FileFormat.Header.StartsWith start
                        ? "a line that starts with " + Complaints.shown(start.text())
                        : "it on line " + ((FileFormat.Header.Line) header).number());
    }

    private boolean isHeader(FileFormat.Header header) {
        if (header instanceof FileFormat.Header.StartsWith start) {
            String line = lines.line();
            return line.startsWith(start.text())
                    || (splitter.bySpaces() && line.strip().startsWith(start.text()));
        }
        return header instanceof FileFormat.Header.Line line && line.number() == lines.number();
    }

    private void readUnits() throws IOException, DecodeException {
        if (!lines.next()) {
            throw complaints.at(columns.headerLine(), "", "the last line is the header", "a row of units below it");
        }
        splitter.split(lines, cells);
        columns = new Columns(complaints, columns.headers(), columns.headerLine(), cells.texts(), lines.number());
    }

    private void readToFirstNumbers(Instrument instrument) throws IOException, DecodeException {
        int[] channels = instrument.channels().values().stream()
                .mapToInt(channel -> channel.column().number().orElse(0) - 1)
                .toArray();
        while (nextFilledLine()) {
            splitter.splitLoosely(lines, cells);
            if (isRowOfNumbers(channels, instrument.files().decimal())) {
                rowWaits = true;
                return;
            }
            preamble.take(lines);
        }
        throw complaints.at(
                0,
                "",
                lines.number() == 0 ? "an empty file" : "no line of numbers in " + lines.number() + " lines",
                "numbers with the decimal sign '" + instrument.files().decimal() + "' in the columns of [channels]");
    }

    /** Whether every channel's cell is a number or empty, and one at least a number. */
    private boolean isRowOfNumbers(int[] channels, char decimal) {
        boolean some = false;
        for (int channel : channels) {
            if (channel < 0 || channel >= cells.count()) {
                return false;
            }
            if (!cells.empty(channel)) {
                some = true;
                if (Double.isNaN(cells.number(channel, decimal)) && !Quantities.saysNotFinite(cells.text(channel))) {
                    return false;
                }
            }
        }
        return some;
    }

    /**
     * A row must reach to the last column asked for. Where columns go by their header it must also be as wide as the header:
     * a row cut off in the middle of a number, or cut up by a wrong decimal sign, is never taken for a good one.
     */
    private void setWidth(Instrument instrument) throws DecodeException {
        List<ColumnRef> asked = NeededColumns.of(instrument);
        for (ColumnRef column : asked) {
            width = Math.max(width, columns.indexOf(column) + 1);
        }
        widthOfHeader = asked.stream().anyMatch(column -> column.header().isPresent());
        if (widthOfHeader) {
            width = Math.max(width, columns.filled());
        }
    }

    private void checkWidth() throws DecodeException {
        if (cells.count() < width) {
            throw complaints.at(
                    lines.number(),
                    columns.nameOf(cells.count()),
                    "a row of " + cells.count() + (cells.count() == 1 ? " cell" : " cells"),
                    "at least " + width + (widthOfHeader ? ", as the header has" : ""));
        }
        if (widthOfHeader && cells.count() > columns.headers().size()) {
            int filled = cells.countToLastFilled();
            if (filled > columns.headers().size()) {
                throw complaints.at(
                        lines.number(),
                        "column " + filled,
                        "a row of " + filled + " cells",
                        "at most " + columns.headers().size() + ", as the header has");
            }
        }
    }

    private boolean nextFilledLine() throws IOException, DecodeException {
        while (lines.next()) {
            if (!splitter.isBlank(lines)) {
                return true;
            }
        }
        return false;
    }
}

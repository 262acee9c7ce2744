package nightlag.pipeline.decode;

import java.util.List;
import java.util.Optional;
import java.util.stream.Collectors;
import java.util.stream.IntStream;
import nightlag.pipeline.config.ColumnRef;
import nightlag.pipeline.config.QuantityKind;
import nightlag.pipeline.config.Unit;

/**
 * The columns of a raw file as its header and its unit row name them.
 *
 * @param complaints the file's
 * @param headers header texts; empty without a header row
 * @param headerLine line of the header; 0 without one
 * @param units texts of the unit row; empty without one
 * @param unitLine line of the unit row; 0 without one
 */
record Columns(Complaints complaints, List<String> headers, int headerLine, List<String> units, int unitLine) {
    private static final int LISTED = 30;

    Columns {
        headers = List.copyOf(headers);
        units = List.copyOf(units);
    }

    /** The columns of a file without a header row. */
    static Columns numbered(Complaints complaints) {
        return new Columns(complaints, List.of(), 0, List.of(), 0);
    }

    /** Position from 0 of a column. */
    int indexOf(ColumnRef column) throws DecodeException {
        if (column.number().isPresent()) {
            return column.number().getAsInt() - 1;
        }
        String name = column.header().orElseThrow();
        int[] found = IntStream.range(0, headers.size())
                .filter(i -> headers.get(i).equals(name))
                .toArray();
        if (headerLine == 0) {
            throw complaints.at(0, column.toString(), "no header row", "a column by its number");
        }
        if (found.length == 0) {
            throw complaints.at(headerLine, column.toString(), "no such column", "one of the header's: " + listed());
        }
        if (found.length > 1) {
            throw complaints.at(
                    headerLine,
                    column.toString(),
                    "that header on columns "
                            + IntStream.of(found)
                                    .mapToObj(i -> Integer.toString(i + 1))
                                    .collect(Collectors.joining(" and ")),
                    "one column of that header");
        }
        return found[0];
    }

    /** The unit that the unit row gives a column; empty if it gives none. */
    Optional<Unit> unitOf(int index, ColumnRef column, QuantityKind kind) throws DecodeException {
        if (index >= units.size() || UnitText.bare(units.get(index)).isEmpty()) {
            return Optional.empty();
        }
        return Optional.of(
                UnitText.required(units.get(index), kind, new Spot(complaints, unitLine, column.toString())));
    }

    /** The number of columns up to the last that has a header. */
    int filled() {
        int filled = headers.size();
        while (filled > 0 && headers.get(filled - 1).isEmpty()) {
            filled--;
        }
        return filled;
    }

    /** What the column at a position from 0 is called. */
    String nameOf(int index) {
        return index < headers.size() && !headers.get(index).isEmpty()
                ? "column '" + headers.get(index) + "'"
                : "column " + (index + 1);
    }

    private String listed() {
        return headers.stream().limit(LISTED).map(Complaints::shown).collect(Collectors.joining(", "))
                + (headers.size() > LISTED ? ", …" : "");
    }
}

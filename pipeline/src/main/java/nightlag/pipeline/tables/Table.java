package nightlag.pipeline.tables;

import java.io.IOException;
import java.io.OutputStream;
import java.io.OutputStreamWriter;
import java.io.Writer;
import java.nio.charset.StandardCharsets;
import java.util.Comparator;
import java.util.List;
import org.apache.commons.csv.CSVFormat;
import org.apache.commons.csv.CSVPrinter;

/**
 * A table, declared once.
 *
 * @param name its name; the file is {@code name.csv}
 * @param meaning what a row is, in one sentence without a full stop at its end
 * @param columns its columns from left to right
 * @param order how rows are sorted
 * @param <R> what a row is made of
 */
record Table<R>(String name, String meaning, List<Column<R>> columns, Comparator<R> order) {
    /** Copies the list. */
    Table {
        columns = List.copyOf(columns);
    }

    /** A table sorted by its key columns from left to right. */
    static <R> Table<R> of(String name, String meaning, List<Column<R>> columns) {
        return new Table<>(name, meaning, columns, byKeys(columns));
    }

    /** A table sorted by its key columns from left to right, and where these are equal by something else. */
    static <R> Table<R> of(String name, String meaning, List<Column<R>> columns, Comparator<R> last) {
        return new Table<>(name, meaning, columns, byKeys(columns).thenComparing(last));
    }

    private static <R> Comparator<R> byKeys(List<Column<R>> columns) {
        return columns.stream()
                .filter(Column::key)
                .map(Column::order)
                .reduce(Comparator::thenComparing)
                .orElseThrow(() -> new IllegalArgumentException("a table has at least one key column"));
    }

    /** The file's name. */
    String fileName() {
        return name + ".csv";
    }

    /** Writes header and rows, sorted, as RFC 4180 asks for: CRLF, quotes where needed; UTF-8 without a mark. */
    void write(List<R> rows, OutputStream out) throws IOException {
        Writer writer = new OutputStreamWriter(out, StandardCharsets.UTF_8);
        CSVPrinter printer = new CSVPrinter(writer, CSVFormat.RFC4180);
        printer.printRecord(columns.stream().map(Column::name));
        for (R row : rows.stream().sorted(order).toList()) {
            for (Column<R> column : columns) {
                printer.print(column.cell().apply(row));
            }
            printer.println();
        }
        printer.flush();
    }
}

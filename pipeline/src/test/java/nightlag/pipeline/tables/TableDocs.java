package nightlag.pipeline.tables;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.stream.Collectors;
import java.util.stream.Stream;

/** The part of {@code pipeline/README.md} that says what each column is, made from the declarations of the tables. */
final class TableDocs {
    static final Path README = Path.of("README.md").toAbsolutePath();

    private static final String BEGIN = "<!-- tables: written by TableDocsTest from the declarations, begin -->\n";
    private static final String END = "<!-- tables: end -->\n";

    private TableDocs() {}

    /** The page with its tables as they are declared now. */
    static String withTables(String page) {
        int begin = page.indexOf(BEGIN);
        int end = page.indexOf(END);
        if (begin < 0 || end < begin) {
            throw new IllegalArgumentException("the page has lost the marks that its tables stand between");
        }
        return page.substring(0, begin + BEGIN.length()) + "\n" + tables() + page.substring(end);
    }

    /** Writes the tables into the page. */
    static void write() throws IOException {
        Files.writeString(README, withTables(Files.readString(README)));
    }

    private static String tables() {
        return Stream.concat(LotTables.TABLES.stream().map(LotTables.LotTable::table), Stream.of(FilesTable.TABLE))
                .map(TableDocs::table)
                .collect(Collectors.joining());
    }

    private static <R> String table(Table<R> table) {
        String rows = table.columns().stream().map(TableDocs::row).collect(Collectors.joining());
        return "### `%s`\n\n%s.\n\n| column | unit | meaning |\n|---|---|---|\n%s\n"
                .formatted(table.name(), table.meaning(), rows);
    }

    private static <R> String row(Column<R> column) {
        String words = column.rule().words().isEmpty()
                ? ""
                : column.rule().words().stream().collect(Collectors.joining("`, `", " (`", "`)"));
        return "| `%s` | %s | %s%s |\n".formatted(column.name(), column.unit().orElse(""), column.meaning(), words);
    }
}

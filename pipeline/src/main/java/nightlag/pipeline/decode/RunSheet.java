package nightlag.pipeline.decode;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.LinkOption;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.HashSet;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import nightlag.pipeline.config.FileFormat;
import nightlag.pipeline.config.Problem;

/**
 * One run sheet: a table in the dialect of the raw files it speaks of, its first row that is not empty the header. A row
 * without a file name speaks of no file. What is wrong with one row is a problem of the file it names alone; what is wrong
 * with the whole sheet is one of every file that is looked up in it.
 */
final class RunSheet {
    private final Complaints complaints;
    private final Map<String, List<Row>> rows = new HashMap<>();
    private Optional<Problem> problem = Optional.empty();

    private RunSheet(Complaints complaints) {
        this.complaints = complaints;
    }

    /**
     * Reads a sheet, if there is one.
     *
     * @param name its name as in tables
     */
    static Optional<RunSheet> read(Path path, String name, FileFormat format) {
        if (!Files.isRegularFile(path, LinkOption.NOFOLLOW_LINKS)) {
            return Optional.empty();
        }
        RunSheet sheet = new RunSheet(new Complaints(name));
        try {
            sheet.readAll(path, format);
        } catch (DecodeException e) {
            sheet.problem = Optional.of(e.problem());
        } catch (IOException e) {
            sheet.problem =
                    Optional.of(new Problem(name, 0, "", "cannot be read (" + e.getMessage() + ")", "a run sheet"));
        }
        return Optional.of(sheet);
    }

    /** The row that names a file by its path from the sheet's folder. */
    Optional<RunSheetRow> rowOf(String pathFromHere) throws DecodeException {
        if (problem.isPresent()) {
            throw new DecodeException(problem.get());
        }
        List<Row> named = rows.getOrDefault(pathFromHere, List.of());
        if (named.size() > 1) {
            throw complaints.at(
                    named.get(1).line(),
                    "column '" + RunSheetRow.FILE + "'",
                    "a second row for " + Complaints.shown(pathFromHere) + " after that on line "
                            + named.get(0).line(),
                    "one row a file");
        }
        if (named.isEmpty()) {
            return Optional.empty();
        }
        Row row = named.get(0);
        if (row.wrong().isPresent()) {
            throw new DecodeException(row.wrong().get());
        }
        return Optional.of(new RunSheetRow(complaints.file(), row.line(), row.cells()));
    }

    private void readAll(Path path, FileFormat format) throws IOException, DecodeException {
        if (Files.size(path) > Bounds.RUN_SHEET_BYTES) {
            throw complaints.at(0, "", "a run sheet of more than " + Bounds.RUN_SHEET_BYTES + " bytes", "less");
        }
        CellSplitter splitter = new CellSplitter(format.delimiter(), complaints);
        Cells cells = new Cells();
        List<String> headers = List.of();
        try (TextLines lines = new TextLines(path, format.charset(), complaints)) {
            while (lines.next()) {
                if (splitter.isBlank(lines)) {
                    continue;
                }
                splitter.split(lines, cells);
                if (headers.isEmpty()) {
                    headers = checkedHeaders(cells.texts(), lines.number());
                } else {
                    take(headers, cells, lines.number());
                }
            }
        }
        if (headers.isEmpty()) {
            throw complaints.at(0, "", "an empty run sheet", "a header row with the column '" + RunSheetRow.FILE + "'");
        }
    }

    private List<String> checkedHeaders(List<String> headers, int line) throws DecodeException {
        if (!headers.contains(RunSheetRow.FILE)) {
            throw complaints.at(
                    line,
                    "column '" + RunSheetRow.FILE + "'",
                    "no such column in " + Complaints.shown(String.join(", ", headers)),
                    "the raw file's path from the run sheet's folder");
        }
        Set<String> seen = new HashSet<>();
        for (String header : headers) {
            if (!header.isEmpty() && !seen.add(header)) {
                throw complaints.at(line, "column '" + header + "'", "that header twice", "each header once");
            }
        }
        return headers;
    }

    private void take(List<String> headers, Cells cells, int line) {
        int fileColumn = headers.indexOf(RunSheetRow.FILE);
        if (fileColumn >= cells.count() || cells.empty(fileColumn)) {
            return;
        }
        Map<String, String> facts = new LinkedHashMap<>();
        for (int i = 0; i < Math.min(headers.size(), cells.count()); i++) {
            if (!headers.get(i).isEmpty()) {
                facts.put(headers.get(i), cells.text(i));
            }
        }
        int filledHeaders = headers.size();
        while (headers.get(filledHeaders - 1).isEmpty()) {
            filledHeaders--;
        }
        Optional<Problem> wrong = Optional.empty();
        if (cells.count() < filledHeaders || cells.countToLastFilled() > headers.size()) {
            wrong = Optional.of(new Problem(
                    complaints.file(),
                    line,
                    "",
                    "a row of " + cells.count() + " cells",
                    filledHeaders + ", as the header has"));
        }
        rows.computeIfAbsent(asPath(cells.text(fileColumn)), path -> new ArrayList<>(1))
                .add(new Row(line, facts, wrong));
    }

    /** People write the path in their system's way. */
    private static String asPath(String cell) {
        String path = cell.replace('\\', '/');
        return path.startsWith("./") ? path.substring(2) : path;
    }

    private record Row(int line, Map<String, String> cells, Optional<Problem> wrong) {}
}

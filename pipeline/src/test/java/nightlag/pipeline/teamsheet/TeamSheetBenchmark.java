package nightlag.pipeline.teamsheet;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.IOException;
import java.io.PrintWriter;
import java.lang.management.ManagementFactory;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;
import nightlag.pipeline.teamsheet.SheetOutcome.Written;
import org.apache.poi.ss.usermodel.Row;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** How long an update of a large sheet takes, and how much the file grows by it. It prints; it judges nothing. */
class TeamSheetBenchmark {
    private static final int LOTS = 5000;
    private static final int LIMITS = 10;
    private static final int COLUMNS = 60;
    private static final int UPDATES = 10;
    private static final int CHANGED = 50;
    private static final int ADDED = 20;

    private final Random random = new Random(1);
    private final PrintWriter out = new PrintWriter(System.out, true, StandardCharsets.UTF_8);

    @TempDir
    Path folder;

    @Test
    void workbook() throws IOException {
        Path file = folder.resolve("team.xlsx");
        new TeamSheetFile(file, "lots").update(new SheetUpdate(lots(), List.of(), Rows.MARCH_1));
        XSSFWorkbook book = Books.read(file);
        for (Row row : book.getSheet("lots")) {
            for (int column = 3 + 2 * LIMITS; column < COLUMNS; column++) {
                if (row.getRowNum() == 0) {
                    row.createCell(column).setCellValue("theirs " + column);
                } else if (column < 40) {
                    row.createCell(column).setCellValue(random.nextDouble());
                } else if (column < 58) {
                    row.createCell(column).setCellValue("note " + random.nextInt(LOTS));
                } else {
                    row.createCell(column).setCellFormula("D" + (row.getRowNum() + 1) + "*2");
                }
            }
        }
        Books.write(file, book);
        book.close();
        measure(file);
    }

    @Test
    void csv() throws IOException {
        Path file = folder.resolve("team.csv");
        new TeamSheetFile(file, "lots").update(new SheetUpdate(lots(), List.of(), Rows.MARCH_1));
        StringBuilder text = new StringBuilder();
        for (String line : Files.readAllLines(file)) {
            text.append(line);
            for (int column = 3 + 2 * LIMITS; column < COLUMNS; column++) {
                text.append(text.indexOf("\n") < 0 ? ",theirs " + column : ",\"note " + random.nextInt(LOTS) + "\"");
            }
            text.append("\r\n");
        }
        Files.writeString(file, text);
        measure(file);
    }

    private void measure(Path file) throws IOException {
        TeamSheetFile sheet = new TeamSheetFile(file, "lots");
        for (int i = 0; i < UPDATES; i++) {
            List<SheetRow> due = new ArrayList<>();
            for (int lot = 0; lot < CHANGED; lot++) {
                due.add(row("L-" + (random.nextInt(LOTS / CHANGED) + lot * (LOTS / CHANGED))));
            }
            for (int lot = 0; lot < ADDED; lot++) {
                due.add(row("N-" + i + "-" + lot));
            }
            long before = Files.size(file);
            long start = System.nanoTime();
            long worked = ManagementFactory.getThreadMXBean().getCurrentThreadCpuTime();
            SheetOutcome outcome = sheet.update(new SheetUpdate(due, List.of(), Rows.MARCH_2.plusDays(i)));
            double seconds = (System.nanoTime() - start) / 1e9;
            double atWork = (ManagementFactory.getThreadMXBean().getCurrentThreadCpuTime() - worked) / 1e9;
            assertThat(((Written) outcome).added()).isEqualTo(ADDED);
            out.printf(
                    Locale.ROOT,
                    "%s, %d lots x %d columns: %d rows changed, %d added in %.2f s (%.2f s of a processor); %d bytes, %d more than before%n",
                    file.getFileName(),
                    LOTS,
                    COLUMNS,
                    CHANGED,
                    ADDED,
                    seconds,
                    atWork,
                    Files.size(file),
                    Files.size(file) - before);
        }
    }

    private List<SheetRow> lots() {
        List<SheetRow> rows = new ArrayList<>();
        for (int lot = 0; lot < LOTS; lot++) {
            rows.add(row("L-" + lot));
        }
        return rows;
    }

    private SheetRow row(String lot) {
        List<SheetValue> values = new ArrayList<>();
        for (int limit = 0; limit < LIMITS; limit++) {
            values.add(new SheetValue(
                    "limit " + limit,
                    "kPa",
                    OptionalDouble.of(random.nextDouble()),
                    Optional.of(random.nextBoolean() ? "conforming" : "undecided")));
        }
        return new SheetRow("Heron 3", lot, values);
    }
}

package nightlag.pipeline.teamsheet;

import static nightlag.pipeline.teamsheet.Rows.MARCH_1;
import static nightlag.pipeline.teamsheet.Rows.MARCH_2;
import static nightlag.pipeline.teamsheet.Rows.damping;
import static nightlag.pipeline.teamsheet.Rows.row;
import static nightlag.pipeline.teamsheet.Rows.update;
import static org.assertj.core.api.Assertions.assertThat;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.stream.Stream;
import nightlag.pipeline.NodeCheck;
import org.apache.poi.ss.usermodel.Sheet;
import org.apache.poi.ss.util.AreaReference;
import org.apache.poi.ss.util.CellRangeAddress;
import org.apache.poi.xddf.usermodel.chart.AxisPosition;
import org.apache.poi.xddf.usermodel.chart.ChartTypes;
import org.apache.poi.xddf.usermodel.chart.XDDFChartData;
import org.apache.poi.xddf.usermodel.chart.XDDFDataSourcesFactory;
import org.apache.poi.xssf.usermodel.XSSFChart;
import org.apache.poi.xssf.usermodel.XSSFDrawing;
import org.apache.poi.xssf.usermodel.XSSFSheet;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** A real office program, LibreOffice without its window, opens what was written, calculates and draws it. */
class OfficeProgramTest {
    private static final Pattern CELL =
            Pattern.compile("<table:table-cell[^>]*?(?:/>|>(?:<text:p>(.*?)</text:p>)?.*?</table:table-cell>)");

    private static Optional<Path> office = Optional.empty();

    @TempDir
    static Path profile;

    @TempDir
    Path folder;

    @BeforeAll
    static void needsAnOfficeProgram() {
        office = Stream.of("/usr/bin/soffice", "/usr/bin/libreoffice", "/usr/local/bin/soffice")
                .map(Path::of)
                .filter(Files::isExecutable)
                .findFirst();
        NodeCheck.needs(office.isPresent(), "install LibreOffice Calc to have this checked");
    }

    @Test
    void valuesFormulasAndAChartOfAColleagueAreThere() throws IOException, InterruptedException {
        Path file = folder.resolve("team.xlsx");
        TeamSheetFile sheet = new TeamSheetFile(file, "lots");
        sheet.update(update(MARCH_1, row("A", damping(1.25, "conforming")), row("B", damping(2, "undecided"))));
        colleagueAddsTheirs(file);

        sheet.update(update(MARCH_2, row("B", damping(2.5, "conforming")), row("=1+1", damping(3, "nonconforming"))));

        List<List<String>> lots = table(converted(file), "lots");
        assertThat(lots)
                .contains(
                        List.of("grade", "lot", "updated", "damping [1]", "damping verdict", "twice"),
                        List.of("Heron 3", "A", "2026-03-01", "1.25", "conforming", "2.5"),
                        List.of("Heron 3", "B", "2026-03-02", "2.5", "conforming", "5"),
                        List.of("Heron 3", "=1+1", "2026-03-02", "3", "nonconforming"));
        assertThat(table(converted(file), "summary").get(0)).containsExactly("6.75");
        // the chart has a document of its own inside, with the values it shows
        String chart = chart(file);
        assertThat(chart).contains("<chart:plot-area", "lots.D2:lots.D3").contains(">2.5<");
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3})
    void aBookOfEverythingOpensAfterManyUpdates(long seed) throws IOException, InterruptedException {
        Path file = folder.resolve("team.xlsx");
        Books.write(file, RandomWorkbook.of(seed));
        for (int i = 0; i < 20; i++) {
            new TeamSheetFile(file, "lots")
                    .update(update(MARCH_1.plusDays(i), row("L" + i, damping(i / 4.0, "conforming"))));
        }

        List<List<String>> lots = table(converted(file), "lots");

        assertThat(lots.stream().filter(cells -> cells.contains("Heron 3"))).hasSize(20);
        assertThat(lots.stream().filter(cells -> cells.contains("L19")).findFirst())
                .hasValueSatisfying(cells -> assertThat(cells).contains("4.75", "2026-03-20", "conforming"));
        assertThat(chart(file)).contains("<chart:plot-area");
    }

    private static void colleagueAddsTheirs(Path file) {
        XSSFWorkbook book = Books.read(file);
        XSSFSheet lots = book.getSheet("lots");
        lots.getRow(0).createCell(5).setCellValue("twice");
        lots.getRow(1).createCell(5).setCellFormula("D2*2");
        lots.getRow(2).createCell(5).setCellFormula("D3*2");
        Sheet summary = book.createSheet("summary");
        summary.createRow(0).createCell(0).setCellFormula("SUM(lots!D2:D20)");
        XSSFDrawing drawing = lots.createDrawingPatriarch();
        XSSFChart chart = drawing.createChart(drawing.createAnchor(0, 0, 0, 0, 8, 1, 14, 15));
        XDDFChartData bars = chart.createData(
                ChartTypes.LINE,
                chart.createCategoryAxis(AxisPosition.BOTTOM),
                chart.createValueAxis(AxisPosition.LEFT));
        bars.addSeries(
                XDDFDataSourcesFactory.fromStringCellRange(lots, new CellRangeAddress(1, 2, 1, 1)),
                XDDFDataSourcesFactory.fromNumericCellRange(lots, new CellRangeAddress(1, 2, 3, 3)));
        chart.plot(bars);
        lots.createTable(new AreaReference("A1:F3", book.getSpreadsheetVersion()));
        book.getCreationHelper().createFormulaEvaluator().evaluateAll();
        Books.write(file, book);
    }

    /** The file as LibreOffice understands it, in its own format. */
    private Path converted(Path file) throws IOException, InterruptedException {
        Process process = new ProcessBuilder(
                        office.orElseThrow().toString(),
                        "-env:UserInstallation=" + profile.toUri(),
                        "--headless",
                        "--convert-to",
                        "ods",
                        "--outdir",
                        folder.resolve("converted").toString(),
                        file.toString())
                .redirectErrorStream(true)
                .start();
        String said = new String(process.getInputStream().readAllBytes(), StandardCharsets.UTF_8);
        assertThat(process.waitFor()).as(said).isZero();
        Path converted = folder.resolve("converted/team.ods");
        assertThat(converted).as(said).exists();
        return converted;
    }

    /** The cells of a sheet that show anything, row by row. */
    private static List<List<String>> table(Path document, String sheet) {
        String content = utf8(Books.parts(document).get("content.xml"));
        int start = content.indexOf("<table:table table:name=\"" + sheet + "\"");
        assertThat(start).isPositive();
        String table = content.substring(start, content.indexOf("</table:table>", start));
        List<List<String>> rows = new ArrayList<>();
        for (String row : table.split("<table:table-row", -1)) {
            List<String> cells = new ArrayList<>();
            Matcher cell = CELL.matcher(row);
            while (cell.find()) {
                if (cell.group(1) != null) {
                    cells.add(cell.group(1));
                }
            }
            rows.add(cells);
        }
        rows.removeIf(List::isEmpty);
        return rows;
    }

    private String chart(Path file) throws IOException, InterruptedException {
        return utf8(Books.parts(converted(file)).entrySet().stream()
                .filter(part -> part.getKey().matches("Object \\d+/content.xml"))
                .map(java.util.Map.Entry::getValue)
                .findFirst()
                .orElseThrow());
    }

    private static String utf8(String bytes) {
        return new String(bytes.getBytes(StandardCharsets.ISO_8859_1), StandardCharsets.UTF_8);
    }
}

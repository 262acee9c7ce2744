package nightlag.pipeline.teamsheet;

import static org.assertj.core.api.Assertions.assertThat;

import java.nio.file.Path;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.HashSet;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;
import java.util.Set;
import java.util.TreeMap;
import nightlag.pipeline.teamsheet.SheetOutcome.Written;
import org.apache.poi.ss.usermodel.Cell;
import org.apache.poi.ss.usermodel.CellType;
import org.apache.poi.ss.usermodel.Row;
import org.apache.poi.xssf.usermodel.XSSFCell;
import org.apache.poi.xssf.usermodel.XSSFSheet;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** Whatever a team has in its workbook, two hundred updates in a row leave all of it alone, and put all of ours in. */
class RandomWorkbookTest {
    private static final int UPDATES = 200;
    private static final LocalDate FIRST_DAY = LocalDate.of(2026, 1, 1);

    @TempDir
    Path folder;

    /** What a lot should say in the end. */
    private static final class Lot {
        private double damping = Double.NaN;
        private String verdict = "";
        private OptionalDouble stiff = OptionalDouble.empty();
        private LocalDate changed = FIRST_DAY;
        private boolean known;
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5, 6})
    void foreignCellsAndPartsStayAndOursAreRight(long seed) {
        Path file = folder.resolve("team.xlsx");
        Books.write(file, RandomWorkbook.of(seed));
        Map<String, String> partsBefore = Books.parts(file);
        Map<String, String> cellsBefore = foreignCells(file);
        Random random = new Random(seed);
        Map<String, Lot> lots = new TreeMap<>();

        for (int i = 0; i < UPDATES; i++) {
            update(file, random, lots, FIRST_DAY.plusDays(i));
        }

        assertThat(foreignCells(file)).containsAllEntriesOf(cellsBefore);
        assertThat(partsThatMayNotChange(Books.parts(file))).isEqualTo(partsThatMayNotChange(partsBefore));
        assertRows(file, lots);
        assertThat(new ArrayList<>(Books.parts(file).keySet())).isEqualTo(new ArrayList<>(partsBefore.keySet()));
    }

    private static void update(Path file, Random random, Map<String, Lot> lots, LocalDate day) {
        List<SheetRow> due = new ArrayList<>();
        Set<String> names = new HashSet<>();
        for (int i = 0; i < 1 + random.nextInt(3); i++) {
            names.add("L" + random.nextInt(RandomWorkbook.LOTS + 8));
        }
        for (String name : names) {
            Lot lot = lots.computeIfAbsent(name, any -> new Lot());
            double damping = random.nextInt(4) / 3.0;
            String verdict = random.nextBoolean() ? "conforming" : "nonconforming";
            OptionalDouble stiff =
                    random.nextInt(5) == 0 ? OptionalDouble.empty() : OptionalDouble.of(random.nextInt(3));
            boolean changes = lot.damping != damping || !lot.verdict.equals(verdict) || !lot.stiff.equals(stiff);
            lot.changed = changes ? day : lot.changed;
            lot.known = true;
            lot.damping = damping;
            lot.verdict = verdict;
            lot.stiff = stiff;
            due.add(Rows.row(
                    name,
                    Rows.damping(damping, verdict),
                    new SheetValue("stiff", "kPa", stiff, Optional.of("conforming"))));
        }
        SheetOutcome outcome = new TeamSheetFile(file, "lots").update(new SheetUpdate(due, List.of(), day));
        assertThat(outcome).isInstanceOf(Written.class);
        assertThat(((Written) outcome).notes()).isEmpty();
    }

    private static void assertRows(Path file, Map<String, Lot> lots) {
        XSSFSheet sheet = Books.read(file).getSheet("lots");
        Row headingRow = headingRow(sheet);
        Map<String, Integer> columns = new HashMap<>();
        headingRow.forEach(cell -> columns.put(cell.getStringCellValue(), cell.getColumnIndex()));
        Set<String> found = new HashSet<>();
        for (Row row : sheet) {
            Cell name = row.getCell(columns.get("lot"));
            if (row.getRowNum() > headingRow.getRowNum()
                    && name != null
                    && !name.getStringCellValue().isEmpty()) {
                assertThat(found.add(name.getStringCellValue()))
                        .as("one row a lot")
                        .isTrue();
                Lot lot = lots.get(name.getStringCellValue());
                if (lot != null && lot.known) {
                    assertThat(row.getCell(columns.get("damping [1]")).getNumericCellValue())
                            .isEqualTo(lot.damping);
                    assertThat(row.getCell(columns.get("damping verdict")).getStringCellValue())
                            .isEqualTo(lot.verdict);
                    Cell stiff = row.getCell(columns.get("stiff [kPa]"));
                    assertThat(stiff == null ? 0 : stiff.getNumericCellValue()).isEqualTo(lot.stiff.orElse(0));
                    assertThat(row.getCell(columns.get("updated"))
                                    .getLocalDateTimeCellValue()
                                    .toLocalDate())
                            .isEqualTo(lot.changed);
                }
            }
        }
        assertThat(found).containsAll(lots.keySet());
    }

    private static Row headingRow(XSSFSheet sheet) {
        for (Row row : sheet) {
            for (Cell cell : row) {
                if (cell.toString().equals("grade")) {
                    return row;
                }
            }
        }
        throw new AssertionError("no headings");
    }

    /** Every cell that is not in one of our columns, by sheet and name: its formula, style, type and value. */
    private static Map<String, String> foreignCells(Path file) {
        Map<String, String> cells = new LinkedHashMap<>();
        XSSFWorkbook book = Books.read(file);
        for (int i = 0; i < book.getNumberOfSheets(); i++) {
            XSSFSheet sheet = book.getSheetAt(i);
            Set<Integer> ours = new HashSet<>();
            if (i == 0) {
                headingRow(sheet).forEach(cell -> {
                    if (cell.getStringCellValue().matches("grade|lot|updated|damping .*|stiff .*")) {
                        ours.add(cell.getColumnIndex());
                    }
                });
            }
            for (Row row : sheet) {
                for (Cell cell : row) {
                    if (!ours.contains(cell.getColumnIndex())) {
                        boolean gives = cell.getCellType() == CellType.FORMULA || inArray(sheet, cell);
                        cells.put(sheet.getSheetName() + "!" + cell.getAddress(), told((XSSFCell) cell, gives));
                    }
                }
            }
        }
        return cells;
    }

    private static boolean inArray(XSSFSheet sheet, Cell cell) {
        return sheet.getSheetName().equals("other")
                && List.of("D1", "D2").contains(cell.getAddress().formatAsString());
    }

    private static String told(XSSFCell cell, boolean givenByFormula) {
        var xml = cell.getCTCell();
        String formula = xml.isSetF() ? xml.getF().xmlText() : "";
        // what a formula last gave may be gone, where it no longer holds; an office program then calculates it
        String value = !givenByFormula
                ? xml.getT() + " " + xml.getV() + " "
                        + (xml.isSetIs() ? xml.getIs().xmlText() : "")
                : "";
        return formula + "|" + xml.getS() + "|" + value;
    }

    /** What of the parts has to stay to the last byte. */
    private static Map<String, String> partsThatMayNotChange(Map<String, String> parts) {
        Map<String, String> kept = new LinkedHashMap<>(parts);
        kept.remove("xl/styles.xml");
        kept.computeIfPresent(
                "xl/workbook.xml",
                (name, xml) -> xml.replaceFirst("<calcPr[^>]*/>", "").replaceFirst("</workbook>\\s*$", ""));
        kept.computeIfPresent(
                "xl/worksheets/sheet1.xml",
                (name, xml) ->
                        xml.replaceFirst("(?s)<sheetData>.*</sheetData>", "").replaceFirst("<dimension[^>]*>", ""));
        kept.computeIfPresent(
                "xl/worksheets/sheet2.xml",
                (name, xml) ->
                        xml.replaceAll("</f><v>[^<]*</v>", "</f>").replaceAll("(<c r=\"D2\"[^>]*>)<v>[^<]*</v>", "$1"));
        return kept;
    }
}

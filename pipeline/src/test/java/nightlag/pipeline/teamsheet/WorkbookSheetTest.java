package nightlag.pipeline.teamsheet;

import static nightlag.pipeline.teamsheet.Rows.MARCH_1;
import static nightlag.pipeline.teamsheet.Rows.MARCH_2;
import static nightlag.pipeline.teamsheet.Rows.damping;
import static nightlag.pipeline.teamsheet.Rows.row;
import static nightlag.pipeline.teamsheet.Rows.stiffness;
import static nightlag.pipeline.teamsheet.Rows.update;
import static org.assertj.core.api.Assertions.assertThat;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import nightlag.pipeline.teamsheet.SheetOutcome.Refused;
import nightlag.pipeline.teamsheet.SheetOutcome.Written;
import org.apache.poi.ss.usermodel.CellStyle;
import org.apache.poi.ss.usermodel.CellType;
import org.apache.poi.ss.usermodel.DateUtil;
import org.apache.poi.ss.usermodel.Sheet;
import org.apache.poi.ss.util.AreaReference;
import org.apache.poi.ss.util.CellRangeAddress;
import org.apache.poi.xssf.usermodel.XSSFSheet;
import org.apache.poi.xssf.usermodel.XSSFTable;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** A team sheet in a workbook: what is written, and where. */
class WorkbookSheetTest {
    private static final String[] HEADINGS = {"grade", "lot", "updated", "damping [1]", "damping verdict"};

    @TempDir
    Path folder;

    private Path file() {
        return folder.resolve("team.xlsx");
    }

    private SheetOutcome put(SheetUpdate update) {
        return new TeamSheetFile(file(), "lots").update(update);
    }

    private Sheet lots() {
        return Books.read(file()).getSheet("lots");
    }

    /** A book whose sheet has our headings, one more, and two lots. */
    private static XSSFWorkbook book(String heading, Object first, Object second) {
        XSSFWorkbook book = new XSSFWorkbook();
        Sheet sheet = book.createSheet("lots");
        Books.row(sheet, 0, "grade", "lot", "updated", "damping [1]", "damping verdict", heading);
        Books.row(sheet, 1, "Heron 3", "A", 46000, 1, "conforming", first);
        Books.row(sheet, 2, "Heron 3", "B", 46000, 2, "conforming", second);
        return book;
    }

    @Test
    void aNewFileHasNumbersAndDates() {
        put(update(MARCH_1, row("L-10", damping(1.25, "conforming"), stiffness(12.5, "undecided")), row("L-9")));

        Sheet lots = lots();
        assertThat(lots.getRow(1).getCell(1).getStringCellValue()).isEqualTo("L-9");
        assertThat(lots.getRow(2).getCell(1).getStringCellValue()).isEqualTo("L-10");
        assertThat(lots.getRow(2).getCell(2).getLocalDateTimeCellValue()).isEqualTo(MARCH_1.atStartOfDay());
        assertThat(DateUtil.isCellDateFormatted(lots.getRow(2).getCell(2))).isTrue();
        assertThat(lots.getRow(2).getCell(Books.column(lots, "damping [1]")).getNumericCellValue())
                .isEqualTo(1.25);
        assertThat(lots.getRow(2)
                        .getCell(Books.column(lots, "storage_modulus 190 °C 1 Hz verdict"))
                        .getStringCellValue())
                .isEqualTo("undecided");
        assertThat(lots.getPaneInformation().isFreezePane()).isTrue();
    }

    @Test
    void theDateChangesOnlyWithACellOfTheRow() {
        put(update(MARCH_1, row("A", damping(1, "conforming")), row("B", damping(2, "conforming"))));
        put(update(MARCH_2, row("A", damping(1, "conforming")), row("B", damping(2, "undecided"))));

        assertThat(lots().getRow(1).getCell(2).getLocalDateTimeCellValue()).isEqualTo(MARCH_1.atStartOfDay());
        assertThat(lots().getRow(2).getCell(2).getLocalDateTimeCellValue()).isEqualTo(MARCH_2.atStartOfDay());
    }

    @Test
    void aFileThatSaysEverythingIsNotTouched() throws IOException {
        put(update(MARCH_1, row("A", damping(1, "conforming"))));
        byte[] before = Files.readAllBytes(file());

        assertThat(put(update(MARCH_2, row("A", damping(1, "conforming")))))
                .isEqualTo(new Written(0, 0, List.of(), List.of()));
        assertThat(Files.readAllBytes(file())).isEqualTo(before);
    }

    @Test
    void datesCountFrom1904WhereTheBookSaysSo() {
        XSSFWorkbook book = book("note", "", "");
        book.getCTWorkbook().getWorkbookPr().setDate1904(true);
        Books.write(file(), book);

        put(update(MARCH_1, row("A", damping(3, "conforming"))));

        assertThat(lots().getRow(1).getCell(2).getNumericCellValue()).isEqualTo(46082 - 1462);
        assertThat(lots().getRow(1).getCell(2).getLocalDateTimeCellValue()).isEqualTo(MARCH_1.atStartOfDay());
    }

    @Test
    void theStyleOfADateIsAddedOnce() {
        Books.write(file(), book("note", "", ""));
        put(update(MARCH_1, row("A", damping(3, "conforming"))));
        int styles = Books.read(file()).getNumCellStyles();

        put(update(MARCH_2, row("B", damping(4, "conforming")), row("C", damping(4, "conforming"))));

        assertThat(Books.read(file()).getNumCellStyles()).isEqualTo(styles);
    }

    @Test
    void theTeamsOwnStylesOfOurCellsStayAndNewRowsTakeThemOver() {
        XSSFWorkbook book = book("note", "", "");
        CellStyle date = book.createCellStyle();
        date.setDataFormat(book.createDataFormat().getFormat("dd.mm.yyyy"));
        CellStyle twoPlaces = book.createCellStyle();
        twoPlaces.setDataFormat(book.createDataFormat().getFormat("0.00"));
        for (int row = 1; row <= 2; row++) {
            book.getSheet("lots").getRow(row).getCell(2).setCellStyle(date);
            book.getSheet("lots").getRow(row).getCell(3).setCellStyle(twoPlaces);
        }
        Books.write(file(), book);

        put(update(MARCH_1, row("B", damping(3, "conforming")), row("C", damping(4, "conforming"))));

        for (int row = 2; row <= 3; row++) {
            assertThat(lots().getRow(row).getCell(2).getCellStyle().getDataFormatString())
                    .isEqualTo("dd.mm.yyyy");
            assertThat(lots().getRow(row).getCell(3).getCellStyle().getDataFormatString())
                    .isEqualTo("0.00");
        }
    }

    @Test
    void aNewLimitAddsItsColumnsBehindEverything() {
        XSSFWorkbook book = book("note", "mine", "");
        book.getSheet("lots").getRow(2).createCell(8).setCellValue("without a heading");
        Books.write(file(), book);

        put(update(MARCH_1, row("B", damping(2, "conforming"), stiffness(10, "conforming"))));

        assertThat(Books.column(lots(), "storage_modulus 190 °C 1 Hz [kPa]")).isEqualTo(9);
        assertThat(lots().getRow(2).getCell(8).getStringCellValue()).isEqualTo("without a heading");
        assertThat(lots().getRow(2).getCell(9).getNumericCellValue()).isEqualTo(10);
    }

    @Test
    void headingsMayStandBelowOtherRows() {
        XSSFWorkbook book = new XSSFWorkbook();
        Sheet sheet = book.createSheet("lots");
        Books.row(sheet, 0, "The lots of the year");
        Books.row(sheet, 2, (Object[]) HEADINGS);
        Books.write(file(), book);

        put(update(MARCH_1, row("A", damping(1, "conforming"))));

        assertThat(lots().getRow(3).getCell(1).getStringCellValue()).isEqualTo("A");
    }

    @Test
    void formulasOfOthersAreMarkedForCalculationAndLoseOnlyWhatNoLongerHolds() {
        XSSFWorkbook book = book("twice", "=D2*2", "=D3*2");
        book.createSheet("summary").createRow(0).createCell(0).setCellFormula("SUM(lots!D2:D3)");
        book.getSheet("summary").createRow(1).createCell(0).setCellFormula("1+1");
        book.getCreationHelper().createFormulaEvaluator().evaluateAll();
        Books.write(file(), book);

        put(update(MARCH_1, row("B", damping(5, "conforming"))));

        assertThat(Books.parts(file()).get("xl/workbook.xml")).contains("fullCalcOnLoad=\"1\"");
        Map<String, String> parts = Books.parts(file());
        assertThat(parts.get("xl/worksheets/sheet1.xml"))
                .contains("<f>D2*2</f><v>2.0</v>")
                .contains("<f>D3*2</f></c>");
        assertThat(parts.get("xl/worksheets/sheet2.xml"))
                .contains("<f>SUM(lots!D2:D3)</f></c>")
                .contains("<f>1+1</f><v>2.0</v>");
    }

    @Test
    void aFormulaInOneOfOurCellsStaysAndIsTold() {
        XSSFWorkbook book = book("note", "", "");
        book.getSheet("lots").getRow(1).getCell(3).setCellFormula("1.5*2");
        Books.write(file(), book);

        assertThat(put(update(MARCH_1, row("A", damping(7, "conforming")))))
                .isEqualTo(new Written(
                        0, 0, List.of(), List.of("D2 (damping [1]) holds somebody's formula and was left as it is")));
    }

    @Test
    void formulasFilledDownAheadOfTheLotsWaitForThem() {
        XSSFWorkbook book = book("twice", "=D2*2", "=D3*2");
        Books.row(book.getSheet("lots"), 3, "", "", "", "", "", "=D4*2");
        Books.row(book.getSheet("lots"), 4, "", "", "", "", "", "=D5*2");
        Books.write(file(), book);

        put(update(MARCH_1, row("C", damping(3, "conforming"))));

        assertThat(lots().getRow(3).getCell(1).getStringCellValue()).isEqualTo("C");
        assertThat(lots().getRow(3).getCell(5).getCellFormula()).isEqualTo("D4*2");
    }

    @Test
    void aRowOfTotalsIsNotWrittenInto() {
        XSSFWorkbook book = book("hours", "", "");
        book.getSheet("lots").getRow(1).createCell(5).setCellValue(1.5);
        book.getSheet("lots").getRow(2).createCell(5).setCellValue(2);
        Books.row(book.getSheet("lots"), 3, "", "", "", "", "", "=SUM(F2:F3)");
        Books.write(file(), book);

        put(update(MARCH_1, row("C", damping(3, "conforming"))));

        assertThat(lots().getRow(3).getCell(5).getCellFormula()).isEqualTo("SUM(F2:F3)");
        assertThat(lots().getRow(4).getCell(1).getStringCellValue()).isEqualTo("C");
    }

    @Test
    void rowsThatAreOnlyFormattedAreFilled() {
        XSSFWorkbook book = book("note", "", "");
        CellStyle grey = book.createCellStyle();
        grey.setWrapText(true);
        for (int row = 3; row < 50; row++) {
            book.getSheet("lots").createRow(row).createCell(1).setCellStyle(grey);
        }
        Books.write(file(), book);

        put(update(MARCH_1, row("C", damping(3, "conforming"))));

        assertThat(lots().getRow(3).getCell(1).getStringCellValue()).isEqualTo("C");
        assertThat(lots().getRow(3).getCell(1).getCellStyle().getWrapText()).isTrue();
    }

    @Test
    void aTableThatEndsAtTheLastRowGrows() {
        assertThat(tableAfter(book("note", "", ""))).isEqualTo("A1:F4");
    }

    @Test
    void aTableWithSomethingBelowStaysAsItIs() {
        XSSFWorkbook book = book("note", "", "");
        Books.row(book.getSheet("lots"), 6, "remark");

        assertThat(tableAfter(book)).isEqualTo("A1:F3");
        assertThat(lots().getRow(7).getCell(1).getStringCellValue()).isEqualTo("C");
    }

    private String tableAfter(XSSFWorkbook book) {
        XSSFSheet sheet = book.getSheet("lots");
        XSSFTable table = sheet.createTable(new AreaReference("A1:F3", book.getSpreadsheetVersion()));
        table.getCTTable().addNewAutoFilter().setRef("A1:F3");
        Books.write(file(), book);

        put(update(MARCH_1, row("C", damping(3, "conforming"))));

        XSSFTable after = Books.read(file()).getSheet("lots").getTables().get(0);
        assertThat(after.getCTTable().getAutoFilter().getRef())
                .isEqualTo(after.getCTTable().getRef());
        return after.getCTTable().getRef();
    }

    @Test
    void filtersAndConditionalFormatsStay() {
        XSSFWorkbook book = book("note", "", "");
        book.getSheet("lots").setAutoFilter(new CellRangeAddress(0, 2, 0, 5));
        Books.write(file(), book);
        String before = behindTheRows();

        put(update(MARCH_1, row("C", damping(3, "conforming"))));

        assertThat(behindTheRows()).isEqualTo(before).contains("<autoFilter ref=\"A1:F3\"");
    }

    private String behindTheRows() {
        String part = Books.parts(file()).get("xl/worksheets/sheet1.xml");
        return part.substring(part.indexOf("</sheetData>"));
    }

    @Test
    void aBookWithoutTheSheetGetsOne() {
        XSSFWorkbook book = new XSSFWorkbook();
        Books.row(book.createSheet("mine"), 0, "kept", 1);
        Books.write(file(), book);

        SheetOutcome outcome = put(new SheetUpdate(
                List.of(row("B", damping(2, "conforming"))), List.of(row("A", damping(1, "conforming"))), MARCH_1));

        assertThat(((Written) outcome).added()).isEqualTo(2);
        assertThat(lots().getRow(1).getCell(1).getStringCellValue()).isEqualTo("A");
        assertThat(Books.read(file()).getSheet("mine").getRow(0).getCell(0).getStringCellValue())
                .isEqualTo("kept");
    }

    @Test
    void textIsWrittenAsTextWhateverItIs() {
        String lot = "=1+1 <b>&\"_x0041_\" \u0001\u0007 \ud83d\ude00 ";
        put(update(MARCH_1, row(lot, damping(1, "conforming"))));

        assertThat(lots().getRow(1).getCell(1).getCellType()).isEqualTo(CellType.STRING);
        assertThat(lots().getRow(1).getCell(1).getStringCellValue()).isEqualTo(lot);
        assertThat(put(update(MARCH_2, row(lot, damping(1, "conforming")))))
                .isEqualTo(new Written(0, 0, List.of(), List.of()));
    }

    @Test
    void aLotThatSomebodyTypedAsANumberIsFound() {
        XSSFWorkbook book = new XSSFWorkbook();
        Books.row(book.createSheet("lots"), 0, "lot", "grade");
        Books.row(book.getSheet("lots"), 1, 417, "Heron 3");
        Books.write(file(), book);

        assertThat(put(update(MARCH_1, row("417", damping(1, "conforming")))))
                .isEqualTo(new Written(0, 1, List.of("updated", "damping [1]", "damping verdict"), List.of()));
    }

    @Test
    void twoRowsOfOneLotAreAskedAbout() throws IOException {
        XSSFWorkbook book = book("note", "", "");
        Books.row(book.getSheet("lots"), 5, "Heron 3", "A");
        Books.write(file(), book);
        byte[] before = Files.readAllBytes(file());

        assertThat(put(update(MARCH_1, row("A"))))
                .isEqualTo(new Refused("Heron 3 lot A stands in more than one row (B2, B6);"
                        + " leave one of them, or name the lot differently in the others"));
        assertThat(Files.readAllBytes(file())).isEqualTo(before);
    }

    @ParameterizedTest(name = "{0}")
    @CsvSource(
            delimiter = '|',
            value = {
                "a document type | <sheetData> | <!DOCTYPE x [<!ENTITY y SYSTEM 'file:///etc/hostname'>]>",
                "half a part | </sheetData> | is damaged",
                "rows out of order | <row r=\"2\" | row",
                "a cell in another row | r=\"A2\" | cell \"A9\"",
                "a shared text that is not there | <v>0</v> | is not there"
            })
    void aDamagedBookStaysAsItIs(String damage, String place, String expected) throws IOException {
        Books.write(file(), book("note", "", ""));
        Map<String, String> parts = new LinkedHashMap<>(Books.parts(file()));
        Map<String, String> damaged = new HashMap<>(Map.of(
                "half a part", "",
                "rows out of order", "<row r=\"1\"",
                "a cell in another row", "r=\"A9\"",
                "a shared text that is not there", "<v>777</v>"));
        String part = parts.get("xl/worksheets/sheet1.xml");
        assertThat(part).contains(place);
        parts.put(
                "xl/worksheets/sheet1.xml",
                damage.equals("a document type")
                        ? part.replaceFirst("<worksheet", expected + "<worksheet")
                        : part.replace(place, damaged.get(damage)));
        Books.writeParts(file(), parts);
        byte[] before = Files.readAllBytes(file());

        SheetOutcome outcome = put(update(MARCH_1, row("A", damping(7, "conforming"))));

        assertThat(outcome).isInstanceOf(Refused.class);
        assertThat(((Refused) outcome).reason())
                .contains(damage.equals("a document type") ? "document type" : expected)
                .contains("xl/worksheets/sheet1.xml");
        assertThat(Files.readAllBytes(file())).isEqualTo(before);
    }

    @Test
    void whatIsNoWorkbook() throws IOException {
        Files.writeString(file(), "grade,lot\r\n");
        assertThat(((Refused) put(update(MARCH_1, row("A")))).reason()).startsWith("this is no whole .xlsx (");

        Files.write(file(), new byte[] {(byte) 0xD0, (byte) 0xCF, 0x11, (byte) 0xE0});
        assertThat(((Refused) put(update(MARCH_1, row("A")))).reason()).startsWith("the workbook has a password");

        Books.writeParts(file(), Map.of("mimetype", "application/vnd.oasis.opendocument.spreadsheet"));
        assertThat(((Refused) put(update(MARCH_1, row("A")))).reason()).startsWith("this is no workbook");
    }

    @Test
    void tagsWithAPrefixAndWithoutNamesOfCells() {
        Books.write(file(), book("note", "", ""));
        Map<String, String> parts = new LinkedHashMap<>(Books.parts(file()));
        parts.put(
                "xl/worksheets/sheet1.xml",
                "<x:worksheet xmlns:x=\"http://schemas.openxmlformats.org/spreadsheetml/2006/main\"><x:sheetData>"
                        + "<x:row><x:c t=\"inlineStr\"><x:is><x:t>grade</x:t></x:is></x:c><x:c t=\"inlineStr\"><x:is><x:r>"
                        + "<x:t>lo</x:t></x:r><x:r><x:t>t</x:t></x:r></x:is></x:c></x:row>\n"
                        + "<x:row spans=\"1:2\"><x:c t=\"inlineStr\"><x:is><x:t>Heron 3</x:t></x:is></x:c>"
                        + "<x:c t=\"str\"><x:v>A</x:v></x:c></x:row></x:sheetData></x:worksheet>");
        Books.writeParts(file(), parts);

        put(update(MARCH_1, row("A", damping(7, "conforming")), row("B", damping(8, "conforming"))));

        Sheet lots = lots();
        assertThat(lots.getRow(1).getCell(3).getNumericCellValue()).isEqualTo(7);
        assertThat(lots.getRow(2).getCell(1).getStringCellValue()).isEqualTo("B");
        assertThat(lots.getRow(0).getCell(2).getStringCellValue()).isEqualTo("updated");
    }
}

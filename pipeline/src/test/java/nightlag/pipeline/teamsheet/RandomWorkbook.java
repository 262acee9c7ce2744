package nightlag.pipeline.teamsheet;

import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Random;
import org.apache.poi.common.usermodel.HyperlinkType;
import org.apache.poi.ss.usermodel.BorderStyle;
import org.apache.poi.ss.usermodel.Cell;
import org.apache.poi.ss.usermodel.CellStyle;
import org.apache.poi.ss.usermodel.ClientAnchor;
import org.apache.poi.ss.usermodel.Comment;
import org.apache.poi.ss.usermodel.CreationHelper;
import org.apache.poi.ss.usermodel.Hyperlink;
import org.apache.poi.ss.usermodel.Row;
import org.apache.poi.ss.util.AreaReference;
import org.apache.poi.ss.util.CellRangeAddress;
import org.apache.poi.ss.util.CellRangeAddressList;
import org.apache.poi.ss.util.CellReference;
import org.apache.poi.xddf.usermodel.chart.AxisPosition;
import org.apache.poi.xddf.usermodel.chart.ChartTypes;
import org.apache.poi.xddf.usermodel.chart.XDDFChartData;
import org.apache.poi.xddf.usermodel.chart.XDDFDataSourcesFactory;
import org.apache.poi.xssf.usermodel.XSSFCell;
import org.apache.poi.xssf.usermodel.XSSFChart;
import org.apache.poi.xssf.usermodel.XSSFDrawing;
import org.apache.poi.xssf.usermodel.XSSFSheet;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;
import org.openxmlformats.schemas.spreadsheetml.x2006.main.CTCellFormula;
import org.openxmlformats.schemas.spreadsheetml.x2006.main.STCellFormulaType;

/**
 * A workbook as a team might keep it: our columns among theirs, in any order, some of them missing; their notes, formulas
 * (filled down, across sheets, of whole columns, by name, of arrays), styles, merged cells, comments, links, filters, conditional formats,
 * validation, a table, a chart, a hidden sheet.
 */
final class RandomWorkbook {
    static final int LOTS = 12;

    private final Random random;
    private final XSSFWorkbook book = new XSSFWorkbook();
    private final XSSFSheet sheet = book.createSheet("lots");
    private final List<String> headings = new ArrayList<>();
    private final CellStyle style = book.createCellStyle();
    private final int top;

    private RandomWorkbook(long seed) {
        random = new Random(seed);
        top = random.nextInt(3);
    }

    static XSSFWorkbook of(long seed) {
        return new RandomWorkbook(seed).make();
    }

    private XSSFWorkbook make() {
        style.setBorderBottom(BorderStyle.THIN);
        style.setDataFormat(book.createDataFormat().getFormat("0.000"));
        headings.addAll(List.of("grade", "lot", "who", "note", "twice", "group", "across"));
        for (String ours : List.of("updated", "damping [1]", "damping verdict", "stiff [kPa]")) {
            if (random.nextInt(4) > 0) {
                headings.add(ours);
            }
        }
        Collections.shuffle(headings, random);
        for (int row = 0; row < top; row++) {
            sheet.createRow(row).createCell(random.nextInt(4)).setCellValue("The year's lots " + row);
        }
        Row heading = sheet.createRow(top);
        for (int column = 0; column < headings.size(); column++) {
            cell(heading, column, headings.get(column));
        }
        for (int lot = 0; lot < LOTS; lot++) {
            lot(lot);
        }
        if (random.nextBoolean()) {
            sheet.createRow(top + LOTS + 3).createCell(1).setCellValue("a remark below everything");
        }
        around();
        otherSheets();
        book.getCreationHelper().createFormulaEvaluator().evaluateAll();
        sharedFormulas();
        return book;
    }

    private int column(String heading) {
        return headings.indexOf(heading);
    }

    private void cell(Row row, int column, Object value) {
        if (column < 0) {
            return;
        }
        Cell cell = row.createCell(column);
        if (value instanceof Number number) {
            cell.setCellValue(number.doubleValue());
        } else {
            cell.setCellValue(String.valueOf(value));
        }
        if (random.nextInt(3) == 0) {
            cell.setCellStyle(style);
        }
    }

    private void lot(int lot) {
        int number = top + 1 + lot;
        Row row = sheet.createRow(number);
        cell(row, column("grade"), "Heron 3");
        cell(row, column("lot"), "L" + lot);
        cell(row, column("who"), random.nextInt(1000) / 7.0);
        cell(row, column("note"), " two\nlines & <tags> _x0041_ \u00e4\u20ac " + random.nextInt());
        cell(row, column("damping [1]"), 1);
        cell(row, column("stiff [kPa]"), 2);
        cell(row, column("damping verdict"), "undecided");
        String who = new CellReference(number, column("who")).formatAsString();
        int looked = column("damping [1]") >= 0 ? column("damping [1]") : column("who");
        row.createCell(column("twice")).setCellFormula(new CellReference(number, looked).formatAsString() + "*2");
        row.createCell(column("across")).setCellFormula("other!A1+SUM(" + who + ",$A$1:$A$2)*LEN(\"A1\")");
    }

    /** A formula that is written once and filled down, which POI does not make by itself. */
    private void sharedFormulas() {
        int column = column("group");
        String letter = CellReference.convertNumToColString(column);
        for (int lot = 0; lot < LOTS; lot++) {
            int number = top + 1 + lot;
            XSSFCell cell = sheet.getRow(number).createCell(column);
            cell.setCellValue(lot);
            CTCellFormula formula = cell.getCTCell().addNewF();
            formula.setT(STCellFormulaType.SHARED);
            formula.setSi(0);
            if (lot == 0) {
                formula.setRef(letter + (number + 1) + ":" + letter + (number + LOTS));
                formula.setStringValue(new CellReference(number, column("who")).formatAsString() + "+1");
            }
        }
    }

    private void around() {
        CreationHelper helper = book.getCreationHelper();
        XSSFDrawing drawing = sheet.createDrawingPatriarch();
        ClientAnchor anchor = helper.createClientAnchor();
        Comment comment = drawing.createCellComment(anchor);
        comment.setString(helper.createRichTextString("who measured this?"));
        sheet.getRow(top + 2).getCell(column("note")).setCellComment(comment);
        Hyperlink link = helper.createHyperlink(HyperlinkType.URL);
        link.setAddress("https://example.org/?a=1&b=2");
        sheet.getRow(top + 3).getCell(column("note")).setHyperlink(link);
        int right = headings.size() + 2;
        sheet.addMergedRegion(new CellRangeAddress(top + 2, top + 4, right, right + 1));
        sheet.setAutoFilter(new CellRangeAddress(top, top + LOTS, 0, headings.size() - 1));
        sheet.getSheetConditionalFormatting()
                .addConditionalFormatting(
                        new CellRangeAddress[] {CellRangeAddress.valueOf("A1:A100")},
                        sheet.getSheetConditionalFormatting().createConditionalFormattingRule("A1>1"));
        sheet.addValidationData(sheet.getDataValidationHelper()
                .createValidation(
                        sheet.getDataValidationHelper().createExplicitListConstraint(new String[] {"yes", "no"}),
                        new CellRangeAddressList(1, 50, right, right)));
        sheet.createFreezePane(1, top + 1);
        sheet.setColumnWidth(1, 5000);
        XSSFChart chart = drawing.createChart(drawing.createAnchor(0, 0, 0, 0, right, 6, right + 6, 20));
        XDDFChartData lines = chart.createData(
                ChartTypes.LINE,
                chart.createCategoryAxis(AxisPosition.BOTTOM),
                chart.createValueAxis(AxisPosition.LEFT));
        lines.addSeries(
                XDDFDataSourcesFactory.fromStringCellRange(
                        sheet, new CellRangeAddress(top + 1, top + LOTS, column("lot"), column("lot"))),
                XDDFDataSourcesFactory.fromNumericCellRange(
                        sheet, new CellRangeAddress(top + 1, top + LOTS, column("who"), column("who"))));
        chart.plot(lines);
    }

    private void otherSheets() {
        XSSFSheet other = book.createSheet("other");
        other.createRow(0).createCell(0).setCellFormula("COUNTA(lots!$A$1:$A$400)");
        other.createRow(1).createCell(0).setCellFormula("SUM(lots!B:B)");
        other.getRow(1).createCell(1).setCellFormula("PI()");
        Row names = other.createRow(3);
        names.createCell(0).setCellValue("item");
        names.createCell(1).setCellValue("count");
        other.createRow(4).createCell(0).setCellValue("gloves");
        other.createTable(new AreaReference("A4:B5", book.getSpreadsheetVersion()));
        other.setArrayFormula("A1:A2*2", CellRangeAddress.valueOf("D1:D2"));
        book.createName().setNameName("kept");
        book.getName("kept").setRefersToFormula("other!$A$1");
        other.getRow(1).createCell(2).setCellFormula("kept+1");
        book.createSheet("hidden").createRow(5).createCell(5).setCellValue("do not look");
        book.setSheetHidden(2, true);
    }
}

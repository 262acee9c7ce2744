package nightlag.pipeline.teamsheet;

import java.io.IOException;
import java.io.InputStream;
import java.io.OutputStream;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Collections;
import java.util.LinkedHashMap;
import java.util.Map;
import java.util.zip.ZipEntry;
import java.util.zip.ZipFile;
import java.util.zip.ZipOutputStream;
import org.apache.poi.ss.usermodel.Cell;
import org.apache.poi.ss.usermodel.Row;
import org.apache.poi.ss.usermodel.Sheet;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;

/** Workbooks for tests, made and read by Apache POI, and the parts they are made of. */
final class Books {
    private Books() {}

    static void write(Path file, XSSFWorkbook book) {
        try (OutputStream out = Files.newOutputStream(file)) {
            book.write(out);
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    static XSSFWorkbook read(Path file) {
        try (InputStream in = Files.newInputStream(file)) {
            return new XSSFWorkbook(in);
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    /** Puts texts and numbers into a row from the first column on. */
    static Row row(Sheet sheet, int number, Object... values) {
        Row row = sheet.createRow(number);
        for (int column = 0; column < values.length; column++) {
            if (values[column] instanceof Number value) {
                row.createCell(column).setCellValue(value.doubleValue());
            } else if (values[column] instanceof String text && text.startsWith("=")) {
                row.createCell(column).setCellFormula(text.substring(1));
            } else if (values[column] instanceof String text && !text.isEmpty()) {
                row.createCell(column).setCellValue(text);
            }
        }
        return row;
    }

    /** The column of a heading in the first row. */
    static int column(Sheet sheet, String heading) {
        for (Cell cell : sheet.getRow(0)) {
            if (cell.getStringCellValue().equals(heading)) {
                return cell.getColumnIndex();
            }
        }
        throw new AssertionError("no column " + heading);
    }

    /** Every part of a file as text, in the order of the file. */
    static Map<String, String> parts(Path file) {
        Map<String, String> parts = new LinkedHashMap<>();
        try (ZipFile zip = new ZipFile(file.toFile())) {
            for (ZipEntry entry : Collections.list(zip.entries())) {
                try (InputStream in = zip.getInputStream(entry)) {
                    parts.put(entry.getName(), new String(in.readAllBytes(), StandardCharsets.ISO_8859_1));
                }
            }
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
        return parts;
    }

    /** Writes a file of parts; texts are taken as UTF-8. */
    static void writeParts(Path file, Map<String, String> parts) {
        try (ZipOutputStream zip = new ZipOutputStream(Files.newOutputStream(file))) {
            for (Map.Entry<String, String> part : parts.entrySet()) {
                zip.putNextEntry(new ZipEntry(part.getKey()));
                zip.write(part.getValue().getBytes(StandardCharsets.UTF_8));
                zip.closeEntry();
            }
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }
}

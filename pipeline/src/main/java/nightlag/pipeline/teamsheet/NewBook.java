package nightlag.pipeline.teamsheet;

import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.util.List;
import org.dhatim.fastexcel.Workbook;
import org.dhatim.fastexcel.Worksheet;

/** A workbook that is not there yet, with one empty sheet, its columns as wide as their headings. */
final class NewBook {
    private static final int LEAST_WIDTH = 12;
    private static final int MOST_WIDTH = 50;

    private NewBook() {}

    static byte[] bytes(String sheet, List<String> headings) {
        ByteArrayOutputStream bytes = new ByteArrayOutputStream();
        try (Workbook book = new Workbook(bytes, "Nightlag", "1.0")) {
            Worksheet page = book.newWorksheet(sheet);
            page.freezePane(0, 1);
            for (int column = 0; column < headings.size(); column++) {
                int length = headings.get(column).length() + 2;
                page.width(column, Math.max(LEAST_WIDTH, Math.min(length, MOST_WIDTH)));
            }
        } catch (IOException e) {
            throw new UncheckedIOException("writing to memory cannot fail", e);
        }
        return bytes.toByteArray();
    }
}

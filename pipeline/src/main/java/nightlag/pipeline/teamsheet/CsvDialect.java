package nightlag.pipeline.teamsheet;

import java.util.Comparator;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.OptionalDouble;
import java.util.regex.Pattern;

/**
 * How cells of ours are written into a CSV file, which is how its own are.
 *
 * @param delimiter between cells
 * @param decimal the decimal sign
 * @param lineEnd at the end of a row
 */
record CsvDialect(char delimiter, char decimal, String lineEnd) {
    private static final Pattern NUMBER = Pattern.compile("[+-]?\\d+(\\.\\d*)?([eE][+-]?\\d+)?");
    private static final Pattern WITH_POINT = Pattern.compile("[+-]?\\d+\\.\\d+([eE][+-]?\\d+)?");
    private static final Pattern WITH_COMMA = Pattern.compile("[+-]?\\d+,\\d+([eE][+-]?\\d+)?");

    /**
     * What most cells of the file are written like. Where no number tells the decimal sign, a semicolon as delimiter speaks
     * for a comma.
     */
    static CsvDialect of(String text, List<CsvLine> lines, char delimiter) {
        Map<String, Integer> lineEnds = new HashMap<>();
        int points = 0;
        int commas = 0;
        for (CsvLine line : lines) {
            if (!line.lineEnd().isEmpty()) {
                lineEnds.merge(line.lineEnd(), 1, Integer::sum);
            }
            for (int cell = 0; cell < line.cells(); cell++) {
                String shown = line.cell(text, cell).strip();
                points += WITH_POINT.matcher(shown).matches() ? 1 : 0;
                commas += WITH_COMMA.matcher(shown).matches() ? 1 : 0;
            }
        }
        boolean comma = points == commas ? delimiter == ';' : commas > points;
        String lineEnd = lineEnds.entrySet().stream()
                .max(Comparator.comparingInt(Map.Entry::getValue))
                .map(Map.Entry::getKey)
                .orElse("\r\n");
        return new CsvDialect(delimiter, comma ? ',' : '.', lineEnd);
    }

    /** What a cell is meant to hold, before quotation marks. */
    String text(Value value) {
        if (value instanceof Value.Text text) {
            return harmless(text.text());
        }
        if (value instanceof Value.Figure number) {
            return number.digits().replace('.', decimal);
        }
        if (value instanceof Value.Day day) {
            return day.date().toString();
        }
        return "";
    }

    /** A text as a cell, in quotation marks where it takes them. */
    String cell(String text) {
        boolean plain = text.indexOf(delimiter) < 0
                && text.indexOf('"') < 0
                && text.indexOf('\n') < 0
                && text.indexOf('\r') < 0;
        return plain ? text : "\"" + text.replace("\"", "\"\"") + "\"";
    }

    /**
     * A text that a spreadsheet takes as text: one that begins like a formula gets an apostrophe in front.
     *
     * @see <a href="https://owasp.org/www-community/attacks/CSV_Injection">OWASP, CSV injection</a>
     */
    static String harmless(String text) {
        return !text.isEmpty() && "=+-@\t\r".indexOf(text.charAt(0)) >= 0 ? "'" + text : text;
    }

    /** The number a cell holds, if it holds one. */
    OptionalDouble number(String cell) {
        String plain = decimal == '.' ? cell : cell.replace('.', 'x').replace(decimal, '.');
        return NUMBER.matcher(plain).matches() ? OptionalDouble.of(Double.parseDouble(plain)) : OptionalDouble.empty();
    }
}

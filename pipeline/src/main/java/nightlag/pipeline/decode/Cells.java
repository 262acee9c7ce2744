package nightlag.pipeline.decode;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;

/** The cells of one line, blanks around each left out. One object serves line after line, without a text per cell. */
final class Cells {
    private char[] chars = new char[0];
    private int[] starts = new int[16];
    private int[] ends = new int[16];
    private int count;

    /** The number of cells. */
    int count() {
        return count;
    }

    /** The number of cells up to the last that is not empty. */
    int countToLastFilled() {
        int filled = count;
        while (filled > 0 && empty(filled - 1)) {
            filled--;
        }
        return filled;
    }

    /** Whether a cell is empty. */
    boolean empty(int cell) {
        return starts[cell] == ends[cell];
    }

    /** A cell's text. */
    String text(int cell) {
        return new String(chars, starts[cell], ends[cell] - starts[cell]);
    }

    /** Whether a cell holds this text. */
    boolean holds(int cell, String text) {
        int length = ends[cell] - starts[cell];
        if (length != text.length()) {
            return false;
        }
        for (int i = 0; i < length; i++) {
            if (chars[starts[cell] + i] != text.charAt(i)) {
                return false;
            }
        }
        return true;
    }

    /** A cell's number as {@link Numerals} reads it: NaN if it is none, infinite if it is too large. */
    double number(int cell, char decimal) {
        return Numerals.parse(chars, starts[cell], ends[cell], decimal);
    }

    /** All texts. */
    List<String> texts() {
        List<String> texts = new ArrayList<>(count);
        for (int i = 0; i < count; i++) {
            texts.add(text(i));
        }
        return texts;
    }

    /** Forgets the cells; those to come lie in these characters. */
    void begin(char[] source) {
        chars = source;
        count = 0;
    }

    /** Adds {@code source[from, to)} without the blanks around it. */
    void add(int from, int to) {
        int start = from;
        int end = to;
        while (start < end && blank(chars[start])) {
            start++;
        }
        while (end > start && blank(chars[end - 1])) {
            end--;
        }
        if (count == starts.length) {
            starts = Arrays.copyOf(starts, 2 * count);
            ends = Arrays.copyOf(ends, 2 * count);
        }
        starts[count] = start;
        ends[count] = end;
        count++;
    }

    /** A text without the blanks around it. */
    static String trim(String text) {
        int start = 0;
        int end = text.length();
        while (start < end && blank(text.charAt(start))) {
            start++;
        }
        while (end > start && blank(text.charAt(end - 1))) {
            end--;
        }
        return text.substring(start, end);
    }

    /** Whether a character is blank: white space, or one of the spaces that do not break a line. */
    static boolean blank(char c) {
        return c <= ' ' || (c >= 0x80 && (Character.isWhitespace(c) || Character.isSpaceChar(c)));
    }
}

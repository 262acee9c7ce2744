package nightlag.pipeline.teamsheet;

import java.nio.ByteBuffer;
import java.nio.CharBuffer;
import java.nio.charset.CharacterCodingException;
import java.nio.charset.Charset;
import java.nio.charset.CodingErrorAction;
import java.nio.charset.StandardCharsets;
import java.util.Arrays;
import java.util.List;

/**
 * The bytes of a text file as text, and the way back, on which every byte that is not ours comes out as it went in.
 *
 * @param text the text, without the mark
 * @param charset what it is in
 * @param mark the byte-order mark, or no bytes
 */
record CsvText(String text, Charset charset, byte[] mark) {
    private static final byte[] NO_MARK = {};
    private static final Charset WINDOWS_1252 = Charset.forName("windows-1252");

    private static final List<Mark> MARKS = List.of(
            new Mark(new byte[] {(byte) 0xEF, (byte) 0xBB, (byte) 0xBF}, StandardCharsets.UTF_8),
            new Mark(new byte[] {(byte) 0xFF, (byte) 0xFE}, StandardCharsets.UTF_16LE),
            new Mark(new byte[] {(byte) 0xFE, (byte) 0xFF}, StandardCharsets.UTF_16BE));

    private record Mark(byte[] bytes, Charset charset) {}

    /** A new file: UTF-8 without a mark. */
    static CsvText empty() {
        return new CsvText("", StandardCharsets.UTF_8, NO_MARK);
    }

    /**
     * Reads a file. A byte-order mark says what it is in; without one, it is the first of UTF-8, UTF-16 (where zero bytes
     * say so), Windows-1252 and ISO 8859-1 that gives the same bytes back.
     */
    static CsvText of(byte[] bytes) throws SheetFault {
        for (Mark mark : MARKS) {
            int length = mark.bytes().length;
            if (bytes.length >= length && Arrays.equals(bytes, 0, length, mark.bytes(), 0, length)) {
                byte[] rest = Arrays.copyOfRange(bytes, length, bytes.length);
                if (!comesBack(rest, mark.charset())) {
                    throw new SheetFault("the file says it is " + mark.charset()
                            + " and holds bytes that are not; save it again from the program it is kept in");
                }
                return new CsvText(new String(rest, mark.charset()), mark.charset(), mark.bytes());
            }
        }
        Charset wide = wide(bytes);
        for (Charset charset : List.of(wide, StandardCharsets.UTF_8, WINDOWS_1252)) {
            if (comesBack(bytes, charset)) {
                return new CsvText(new String(bytes, charset), charset, NO_MARK);
            }
        }
        return new CsvText(new String(bytes, StandardCharsets.ISO_8859_1), StandardCharsets.ISO_8859_1, NO_MARK);
    }

    /** UTF-16 where every second of the first bytes is zero, as in any text of a European language; else UTF-8. */
    private static Charset wide(byte[] bytes) {
        int looked = Math.min(bytes.length, 512);
        int[] zeros = new int[2];
        for (int i = 0; i < looked; i++) {
            zeros[i % 2] += bytes[i] == 0 ? 1 : 0;
        }
        if (zeros[0] + zeros[1] <= looked / 4) {
            return StandardCharsets.UTF_8;
        }
        return zeros[0] > zeros[1] ? StandardCharsets.UTF_16BE : StandardCharsets.UTF_16LE;
    }

    private static boolean comesBack(byte[] bytes, Charset charset) {
        try {
            CharBuffer text = charset.newDecoder()
                    .onMalformedInput(CodingErrorAction.REPORT)
                    .onUnmappableCharacter(CodingErrorAction.REPORT)
                    .decode(ByteBuffer.wrap(bytes));
            return Arrays.equals(text.toString().getBytes(charset), bytes);
        } catch (CharacterCodingException notThis) {
            return false;
        }
    }

    boolean canHold(String ours) {
        return charset.newEncoder().canEncode(ours);
    }

    byte[] encode(CharSequence whole) {
        byte[] body = whole.toString().getBytes(charset);
        byte[] bytes = Arrays.copyOf(mark, mark.length + body.length);
        System.arraycopy(body, 0, bytes, mark.length, body.length);
        return bytes;
    }
}

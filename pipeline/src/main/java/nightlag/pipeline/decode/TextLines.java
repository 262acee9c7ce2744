package nightlag.pipeline.decode;

import java.io.Closeable;
import java.io.IOException;
import java.io.InputStream;
import java.nio.ByteBuffer;
import java.nio.CharBuffer;
import java.nio.charset.Charset;
import java.nio.charset.CharsetDecoder;
import java.nio.charset.CoderResult;
import java.nio.charset.CodingErrorAction;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Arrays;

/**
 * The lines of a text file, one at a time, numbered from 1 as an editor numbers them (ended by LF, CR LF or CR). A
 * byte-order mark wins over the charset asked for. Bytes that are no text in the charset, zero characters and endless lines
 * are complaints with their line. Holds one line and one buffer, whatever the file's size.
 */
final class TextLines implements Closeable {
    private static final int BUFFER = 1 << 16;

    private final InputStream stream;
    private final Complaints complaints;
    private final Charset charset;
    private final boolean marked;
    private final CharsetDecoder decoder;
    private final ByteBuffer bytes = ByteBuffer.allocate(BUFFER);
    private final CharBuffer text = CharBuffer.allocate(BUFFER);
    private boolean allBytesIn;
    private boolean drained;
    private boolean broken;
    private boolean afterReturn;

    private char[] line = new char[256];
    private int length;
    private int number;

    TextLines(Path file, Charset asked, Complaints complaints) throws IOException {
        this.complaints = complaints;
        this.stream = Files.newInputStream(file);
        try {
            bytes.limit(0);
            fillBytes();
            ByteOrderMark mark = ByteOrderMark.at(bytes);
            bytes.position(mark.length());
            this.marked = mark.length() > 0;
            this.charset = mark.charset().orElse(asked);
        } catch (IOException | RuntimeException e) {
            stream.close();
            throw e;
        }
        this.decoder = charset.newDecoder()
                .onMalformedInput(CodingErrorAction.REPORT)
                .onUnmappableCharacter(CodingErrorAction.REPORT);
        text.limit(0);
    }

    /** The charset the text is read in. */
    Charset charset() {
        return charset;
    }

    /** Whether a byte-order mark decided the charset. */
    boolean marked() {
        return marked;
    }

    /** Goes to the next line; false at the end. */
    boolean next() throws IOException, DecodeException {
        length = 0;
        boolean begun = false;
        while (true) {
            if (!text.hasRemaining() && !fillText()) {
                if (begun) {
                    number++;
                }
                return begun;
            }
            char[] buffer = text.array();
            int from = text.position();
            if (afterReturn && buffer[from] == '\n') {
                afterReturn = false;
                text.position(from + 1);
                continue;
            }
            afterReturn = false;
            begun = true;
            int end = endOfLine(buffer, from, text.limit());
            append(buffer, from, end);
            if (end < text.limit()) {
                afterReturn = buffer[end] == '\r';
                text.position(end + 1);
                number++;
                return true;
            }
            text.position(end);
        }
    }

    /** The number of the current line, from 1; 0 before the first. */
    int number() {
        return number;
    }

    /** The characters of the current line; only the first {@link #length()} count, and only until the next line. */
    char[] chars() {
        return line;
    }

    /** The length of the current line. */
    int length() {
        return length;
    }

    /** The current line as text. */
    String line() {
        return new String(line, 0, length);
    }

    @Override
    public void close() throws IOException {
        stream.close();
    }

    private int endOfLine(char[] buffer, int from, int limit) throws DecodeException {
        for (int i = from; i < limit; i++) {
            char c = buffer[i];
            if (c < ' ') {
                if (c == '\n' || c == '\r') {
                    return i;
                }
                if (c == 0) {
                    throw complaints.at(
                            number + 1,
                            "",
                            "a zero character",
                            "text in " + charset + ", the charset of the instrument file");
                }
            }
        }
        return limit;
    }

    private void append(char[] buffer, int from, int to) throws DecodeException {
        int needed = length + to - from;
        if (needed > Bounds.LINE_CHARS) {
            throw complaints.at(
                    number + 1, "", "a line of more than " + Bounds.LINE_CHARS + " characters", "lines of a table");
        }
        if (needed > line.length) {
            line = Arrays.copyOf(line, Math.max(needed, 2 * line.length));
        }
        System.arraycopy(buffer, from, line, length, to - from);
        length = needed;
    }

    /** Decodes some more; false when there is no more. */
    private boolean fillText() throws IOException, DecodeException {
        text.clear();
        while (!broken && !drained && text.position() == 0) {
            CoderResult result = decoder.decode(bytes, text, allBytesIn);
            if (result.isError()) {
                // what came before the bad bytes is handed over first, so that the line is known
                broken = true;
            } else if (result.isUnderflow()) {
                if (allBytesIn) {
                    decoder.flush(text);
                    drained = true;
                } else {
                    fillBytes();
                }
            }
        }
        boolean some = text.position() > 0;
        text.flip();
        if (!some && broken) {
            throw complaints.at(
                    number + 1,
                    "",
                    "bytes that are no text in " + charset,
                    "the charset of the instrument file, or a byte-order mark");
        }
        return some;
    }

    private void fillBytes() throws IOException {
        bytes.compact();
        while (bytes.hasRemaining() && !allBytesIn) {
            int read = stream.read(bytes.array(), bytes.position(), bytes.remaining());
            if (read < 0) {
                allBytesIn = true;
            } else {
                bytes.position(bytes.position() + read);
            }
        }
        bytes.flip();
    }
}

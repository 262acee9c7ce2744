package nightlag.pipeline.decode;

import java.nio.ByteBuffer;
import java.nio.charset.Charset;
import java.nio.charset.StandardCharsets;
import java.util.List;
import java.util.Optional;

/**
 * A byte-order mark at the start of a file (The Unicode Standard, chapter 23.8).
 *
 * @param charset what it says the text is in; empty: there is none
 * @param length its bytes
 */
record ByteOrderMark(Optional<Charset> charset, int length) {
    // the four-byte marks go first: FF FE also begins FF FE 00 00
    private static final List<Known> KNOWN = List.of(
            new Known(Charset.forName("UTF-32LE"), List.of(0xFF, 0xFE, 0x00, 0x00)),
            new Known(Charset.forName("UTF-32BE"), List.of(0x00, 0x00, 0xFE, 0xFF)),
            new Known(StandardCharsets.UTF_8, List.of(0xEF, 0xBB, 0xBF)),
            new Known(StandardCharsets.UTF_16LE, List.of(0xFF, 0xFE)),
            new Known(StandardCharsets.UTF_16BE, List.of(0xFE, 0xFF)));

    /** The mark at the start of the bytes, which stay where they are. */
    static ByteOrderMark at(ByteBuffer bytes) {
        return KNOWN.stream()
                .filter(known -> known.begins(bytes))
                .findFirst()
                .map(known -> new ByteOrderMark(
                        Optional.of(known.charset()), known.mark().size()))
                .orElseGet(() -> new ByteOrderMark(Optional.empty(), 0));
    }

    private record Known(Charset charset, List<Integer> mark) {
        boolean begins(ByteBuffer bytes) {
            if (bytes.remaining() < mark.size()) {
                return false;
            }
            for (int i = 0; i < mark.size(); i++) {
                if ((bytes.get(bytes.position() + i) & 0xFF) != mark.get(i)) {
                    return false;
                }
            }
            return true;
        }
    }
}

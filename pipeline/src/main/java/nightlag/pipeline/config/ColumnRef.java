package nightlag.pipeline.config;

import java.util.Optional;
import java.util.OptionalInt;

/**
 * A column of a raw file, by header text or by number from 1; exactly one of the two is there.
 *
 * @param header header text, trimmed
 * @param number number from 1
 */
public record ColumnRef(Optional<String> header, OptionalInt number) {
    /** By header text. */
    public static ColumnRef named(String header) {
        return new ColumnRef(Optional.of(header), OptionalInt.empty());
    }

    /** By number from 1. */
    public static ColumnRef numbered(int number) {
        return new ColumnRef(Optional.empty(), OptionalInt.of(number));
    }

    @Override
    public String toString() {
        return header.map(text -> "column '" + text + "'").orElseGet(() -> "column " + number.getAsInt());
    }
}

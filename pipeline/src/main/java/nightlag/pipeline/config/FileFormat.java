package nightlag.pipeline.config;

import java.nio.charset.Charset;
import java.util.Optional;
import java.util.regex.Pattern;

/**
 * How the raw files of an instrument read: the section {@code [files]}.
 *
 * @param match glob below the intake folder, always with '/'
 * @param charset charset; a byte-order mark always wins
 * @param delimiter one character; a space means any run of spaces
 * @param decimal '.' or ','
 * @param header where the header row is
 * @param unitRow whether the row below the header holds units
 * @param runSheet file name of the run sheet
 * @param pathPattern pattern on the path below the intake folder, with '/'
 */
public record FileFormat(
        String match,
        Charset charset,
        char delimiter,
        char decimal,
        Header header,
        boolean unitRow,
        Optional<String> runSheet,
        Optional<Pattern> pathPattern) {
    /** Where the header row is. */
    public sealed interface Header {
        /**
         * The first line that starts with a text.
         *
         * @param text the text
         */
        record StartsWith(String text) implements Header {}

        /**
         * A line.
         *
         * @param number from 1
         */
        record Line(int number) implements Header {}

        /** No header: columns are numbers from 1 and data begin at the first line of numbers. */
        record None() implements Header {}
    }
}

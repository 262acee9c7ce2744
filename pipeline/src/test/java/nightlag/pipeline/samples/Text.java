package nightlag.pipeline.samples;

import java.math.BigDecimal;
import java.math.MathContext;
import java.math.RoundingMode;

/** Numbers as text, rounded by exact decimal arithmetic so that every machine writes the same digits. */
final class Text {
    private Text() {}

    /** With this many decimals. */
    static String fixed(double value, int decimals) {
        return new BigDecimal(value).setScale(decimals, RoundingMode.HALF_EVEN).toPlainString();
    }

    /** With this many significant digits. */
    static String significant(double value, int digits) {
        return new BigDecimal(value)
                .round(new MathContext(digits, RoundingMode.HALF_EVEN))
                .toPlainString();
    }

    /** With a decimal comma. */
    static String comma(double value, int decimals) {
        return fixed(value, decimals).replace('.', ',');
    }

    /** A time stamp as a recorder rounds it, s. */
    static double stamp(double timeS, int decimals) {
        return Double.parseDouble(fixed(timeS, decimals));
    }
}

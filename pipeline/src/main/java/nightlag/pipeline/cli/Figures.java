package nightlag.pipeline.cli;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.Locale;
import nightlag.pipeline.tables.Decimals;

/** Numbers as a person reads them, few digits and early exponents; those of the tables must read back the same. */
final class Figures {
    private static final MathContext SEVEN = new MathContext(7);

    private static final int SMALLEST_PLAIN = -3;
    private static final int LARGEST_PLAIN = 6;

    private Figures() {}

    /** Seven digits are enough to tell whether a column was read right. */
    static String sevenDigits(double value) {
        return plain(new BigDecimal(value).round(SEVEN));
    }

    /** By a format for significant digits such as {@code %.3g}, without zeros that say nothing. */
    static String digits(String format, double value) {
        return Double.isFinite(value)
                ? plain(new BigDecimal(String.format(Locale.ROOT, format, value)))
                : String.valueOf(value);
    }

    private static String plain(BigDecimal number) {
        return Decimals.text(number, SMALLEST_PLAIN, LARGEST_PLAIN);
    }
}

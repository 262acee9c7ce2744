package nightlag.pipeline.cli;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.Locale;

/** Numbers as a person reads them. */
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
        BigDecimal value = number.stripTrailingZeros();
        int exponent = value.precision() - value.scale() - 1;
        if (value.signum() == 0 || (exponent >= SMALLEST_PLAIN && exponent <= LARGEST_PLAIN)) {
            return value.toPlainString();
        }
        return value.movePointLeft(exponent).toPlainString() + "e" + exponent;
    }
}

package nightlag.pipeline.tables;

import java.math.BigDecimal;
import java.math.MathContext;
import java.math.RoundingMode;

/** How a value is written into a cell of a table, whatever the machine's language. */
final class Cells {
    private static final int FEWEST_DIGITS = 15;
    private static final int MOST_DIGITS = 17;

    /** Powers of ten from which on, and below which, a number is written with an exponent. */
    private static final int HIGHEST_PLAIN = 15;

    private static final int LOWEST_PLAIN = -5;

    private static final double ZERO_CELSIUS_K = 273.15;
    private static final double CELSIUS_STEPS = 1e9;
    private static final double HIGHEST_ROUNDED = 1e6;

    private Cells() {}

    /**
     * A number with the fewest of 15, 16 or 17 significant digits that read back the same, without trailing zeros; empty
     * text where it is not finite. Zero has no sign.
     */
    static String number(double value) {
        if (!Double.isFinite(value)) {
            return "";
        }
        if (value == 0) {
            return "0";
        }
        BigDecimal exact = new BigDecimal(value);
        for (int digits = FEWEST_DIGITS; digits < MOST_DIGITS; digits++) {
            BigDecimal rounded = exact.round(new MathContext(digits, RoundingMode.HALF_EVEN));
            if (rounded.doubleValue() == value) {
                return Decimals.text(rounded, LOWEST_PLAIN, HIGHEST_PLAIN);
            }
        }
        BigDecimal rounded = exact.round(new MathContext(MOST_DIGITS, RoundingMode.HALF_EVEN));
        return Decimals.text(rounded, LOWEST_PLAIN, HIGHEST_PLAIN);
    }

    /**
     * A temperature in °C. The difference is rounded to 1e-9 K, far below what any sensor tells, so that 463.15 K is 190
     * and not 189.99999999999997.
     */
    static double celsius(double kelvin) {
        double difference = kelvin - ZERO_CELSIUS_K;
        return Math.abs(difference) < HIGHEST_ROUNDED
                ? Math.round(difference * CELSIUS_STEPS) / CELSIUS_STEPS
                : difference;
    }

    /**
     * A text that a spreadsheet takes as text: one that begins like a formula gets an apostrophe in front.
     *
     * @see <a href="https://owasp.org/www-community/attacks/CSV_Injection">OWASP, CSV injection</a>
     */
    static String text(String text) {
        return !text.isEmpty() && "=+-@\t\r".indexOf(text.charAt(0)) >= 0 ? "'" + text : text;
    }
}

package nightlag.pipeline.report;

import java.math.BigDecimal;
import java.math.MathContext;
import java.math.RoundingMode;
import java.util.stream.Collectors;

/** Numbers as a person reads them on the page. */
final class Written {
    private static final double KELVIN_AT_ZERO_CELSIUS = 273.15;
    private static final MathContext FOUR = new MathContext(4);
    private static final MathContext TWO = new MathContext(2);
    /** Decades within which a number is written without a power of ten. */
    private static final int SMALLEST_PLAIN = -4;

    private static final int LARGEST_PLAIN = 5;
    private static final String RAISED = "⁰¹²³⁴⁵⁶⁷⁸⁹";

    private Written() {}

    static double toCelsius(double kelvin) {
        return kelvin - KELVIN_AT_ZERO_CELSIUS;
    }

    /** A temperature to a tenth of a degree. */
    static String celsius(double kelvin) {
        return new BigDecimal(toCelsius(kelvin))
                        .setScale(1, RoundingMode.HALF_EVEN)
                        .toPlainString() + " °C";
    }

    /** Four significant digits, without zeros that say nothing. */
    static String fourDigits(double value) {
        BigDecimal number = new BigDecimal(value).round(FOUR).stripTrailingZeros();
        int exponent = exponent(number);
        return number.signum() == 0 || isPlain(exponent)
                ? number.toPlainString()
                : number.movePointLeft(exponent).toPlainString() + "·10" + raised(exponent);
    }

    /** Two digits of the uncertainty, and the value to the same place (JCGM 100:2008, 7.2.6). */
    static String withUncertainty(double value, double u) {
        BigDecimal rounded = new BigDecimal(u).round(TWO);
        BigDecimal same = new BigDecimal(value).setScale(rounded.scale(), RoundingMode.HALF_EVEN);
        int exponent = exponent(same.abs().max(rounded));
        if (isPlain(exponent)) {
            return same.toPlainString() + " ± " + rounded.toPlainString();
        }
        return "(" + same.movePointLeft(exponent).toPlainString() + " ± "
                + rounded.movePointLeft(exponent).toPlainString() + ")·10" + raised(exponent);
    }

    private static String raised(int exponent) {
        return Integer.toString(exponent)
                .chars()
                .mapToObj(sign -> sign == '-' ? "⁻" : RAISED.substring(sign - '0', sign - '0' + 1))
                .collect(Collectors.joining());
    }

    private static boolean isPlain(int exponent) {
        return exponent >= SMALLEST_PLAIN && exponent <= LARGEST_PLAIN;
    }

    private static int exponent(BigDecimal value) {
        return value.precision() - value.scale() - 1;
    }
}

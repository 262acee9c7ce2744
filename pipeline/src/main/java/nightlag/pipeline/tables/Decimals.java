package nightlag.pipeline.tables;

import java.math.BigDecimal;

/** Decimal numbers as text: plain, or with an exponent where plain digits would be hard to read. */
public final class Decimals {
    private Decimals() {}

    /**
     * A number without trailing zeros, such as {@code 0.25} or {@code 2.5e-9}.
     *
     * @param lowestPlain the power of ten of the smallest number written without an exponent
     * @param highestPlain that of the largest
     */
    public static String text(BigDecimal number, int lowestPlain, int highestPlain) {
        BigDecimal stripped = number.stripTrailingZeros();
        int exponent = stripped.precision() - stripped.scale() - 1;
        if (exponent >= lowestPlain && exponent <= highestPlain) {
            return stripped.toPlainString();
        }
        return stripped.movePointLeft(exponent).toPlainString() + "e" + exponent;
    }
}

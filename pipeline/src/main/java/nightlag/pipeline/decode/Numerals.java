package nightlag.pipeline.decode;

/**
 * Numbers as instruments write them: an optional sign (the typographic minus too), digits with at most one decimal sign, an optional exponent after e or
 * E. Nothing else is a number: no thousands separators, no hexadecimal, no {@code NaN}, not the other decimal sign.
 */
final class Numerals {
    /** Beyond this a mantissa is no longer exact as a double. */
    private static final long EXACT = 1L << 53;
    /** One digit more still fits a long. */
    private static final long ROOM = (Long.MAX_VALUE - 9) / 10;
    /** U+2212, as word processors and some instruments write it. */
    private static final char MINUS = '−';

    private static final int NO_EXPONENT = Integer.MIN_VALUE;
    private static final int HUGE_EXPONENT = 100_000;
    /** The powers of ten that are exact as doubles. */
    private static final double[] TENS = {
        1e0, 1e1, 1e2, 1e3, 1e4, 1e5, 1e6, 1e7, 1e8, 1e9, 1e10, 1e11, 1e12, 1e13, 1e14, 1e15, 1e16, 1e17, 1e18, 1e19,
        1e20, 1e21, 1e22
    };

    private Numerals() {}

    /** As {@link #parse(char[], int, int, char)} for a whole text. */
    static double parse(String text, char decimal) {
        return parse(text.toCharArray(), 0, text.length(), decimal);
    }

    /**
     * The double nearest to the number written in {@code chars[from, to)}; NaN if it is no number, infinite if it is too
     * large for one.
     *
     * <p>A mantissa below 2^53 and a power of ten up to 22 are both exact doubles, so one multiplication or division rounds
     * correctly (W. D. Clinger, "How to read floating point numbers accurately", ACM SIGPLAN Notices 25, 1990); everything
     * else goes to the JDK.
     */
    static double parse(char[] chars, int from, int to, char decimal) {
        int at = from;
        boolean negative = false;
        if (at < to && sign(chars[at])) {
            negative = chars[at] != '+';
            at++;
        }
        long mantissa = 0;
        int power = 0;
        boolean exact = true;
        boolean digits = false;
        boolean fraction = false;
        for (; at < to; at++) {
            char c = chars[at];
            if (c >= '0' && c <= '9') {
                digits = true;
                exact &= mantissa < ROOM;
                mantissa = exact ? 10 * mantissa + (c - '0') : mantissa;
                power -= fraction ? 1 : 0;
            } else if (c == decimal && !fraction) {
                fraction = true;
            } else {
                break;
            }
        }
        if (!digits) {
            return Double.NaN;
        }
        if (at < to) {
            int exponent = exponent(chars, at, to);
            if (exponent == NO_EXPONENT) {
                return Double.NaN;
            }
            power += exponent;
        }
        if (exact && mantissa <= EXACT && Math.abs(power) < TENS.length) {
            double size = power < 0 ? mantissa / TENS[-power] : mantissa * TENS[power];
            return negative ? -size : size;
        }
        return Double.parseDouble(
                new String(chars, from, to - from).replace(decimal, '.').replace(MINUS, '-'));
    }

    private static boolean sign(char c) {
        return c == '-' || c == '+' || c == MINUS;
    }

    /** The number after e or E; {@link #NO_EXPONENT} if it is none. */
    private static int exponent(char[] chars, int from, int to) {
        int at = from + 1;
        if (chars[from] != 'e' && chars[from] != 'E') {
            return NO_EXPONENT;
        }
        boolean negative = false;
        if (at < to && sign(chars[at])) {
            negative = chars[at] != '+';
            at++;
        }
        if (at == to) {
            return NO_EXPONENT;
        }
        int exponent = 0;
        for (; at < to; at++) {
            if (chars[at] < '0' || chars[at] > '9') {
                return NO_EXPONENT;
            }
            exponent = Math.min(HUGE_EXPONENT, 10 * exponent + (chars[at] - '0'));
        }
        return negative ? -exponent : exponent;
    }
}

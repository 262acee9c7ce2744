package nightlag.stages.fault;

import java.math.BigDecimal;
import java.math.MathContext;
import java.text.MessageFormat;
import java.util.Arrays;
import java.util.Locale;

/**
 * A stable code for one thing that can go wrong. Each package declares its codes in one enum; tests look at the code,
 * people read the sentence.
 */
public interface ReasonCode {
    /** Digits of a measured figure in a sentence. */
    int ROUNDED_DIGITS = 4;

    /** Whole numbers below it keep all their digits. */
    double WHOLE_IN_FULL = 1e6;

    /** The code itself, as an enum constant's name. */
    String name();

    /** A sentence in {@link MessageFormat} notation, without a full stop at its end; the parts fill {@code {0}}, {@code {1}} … */
    String template();

    /**
     * The reason with its parts filled in. Numbers are written as {@link #rounded} writes them; one that is quoted, as from a
     * file, is given as text.
     */
    default Reason with(Object... parts) {
        Object[] texts = Arrays.stream(parts)
                .map(part -> part instanceof Double number ? rounded(number) : String.valueOf(part))
                .toArray();
        return new Reason(name(), new MessageFormat(template(), Locale.ROOT).format(texts));
    }

    /**
     * A figure with up to four significant digits, all a reader takes in; five from 100 to 1000, so that a temperature in °C keeps
     * its hundredths; a whole number in full.
     */
    static String rounded(double number) {
        if (number == Math.rint(number) && Math.abs(number) < WHOLE_IN_FULL) {
            return shortest(number);
        }
        double magnitude = Math.abs(number);
        return Double.isFinite(number) && magnitude > 0
                ? shortest(new BigDecimal(number)
                        .round(new MathContext(
                                magnitude >= 100 && magnitude < 1000 ? ROUNDED_DIGITS + 1 : ROUNDED_DIGITS))
                        .doubleValue())
                : shortest(number);
    }

    /** A number with up to six significant digits, without trailing zeros, free of the machine's language. */
    static String shortest(double number) {
        String text = String.format(Locale.ROOT, "%.6g", number);
        if (!text.contains(".") && !text.contains("e")) {
            return text;
        }
        int exponent = text.indexOf('e');
        String mantissa = exponent < 0 ? text : text.substring(0, exponent);
        // 1e-5, as a person writes it
        String tail = exponent < 0
                ? ""
                : text.substring(exponent).replaceFirst("e([-+])0", "e$1").replace("+", "");
        return mantissa.replaceAll("0+$", "").replaceAll("\\.$", "") + tail;
    }
}

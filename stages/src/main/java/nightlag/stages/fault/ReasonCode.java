package nightlag.stages.fault;

import java.text.MessageFormat;
import java.util.Arrays;
import java.util.Locale;

/**
 * A stable code for one thing that can go wrong. Each package declares its codes in one enum; tests look at the code,
 * people read the sentence.
 */
public interface ReasonCode {
    /** The code itself, as an enum constant's name. */
    String name();

    /** A sentence in {@link MessageFormat} notation, without a full stop at its end; the parts fill {@code {0}}, {@code {1}} … */
    String template();

    /**
     * The reason with its parts filled in. Numbers are written with up to six significant digits, free of the machine's
     * language.
     */
    default Reason with(Object... parts) {
        Object[] texts = Arrays.stream(parts)
                .map(part -> part instanceof Double number ? shortest(number) : String.valueOf(part))
                .toArray();
        return new Reason(name(), new MessageFormat(template(), Locale.ROOT).format(texts));
    }

    /** A number with up to six significant digits, without trailing zeros, free of the machine's language. */
    static String shortest(double number) {
        String text = String.format(Locale.ROOT, "%.6g", number);
        if (!text.contains(".")) {
            return text;
        }
        int exponent = text.indexOf('e');
        String mantissa = exponent < 0 ? text : text.substring(0, exponent);
        String tail = exponent < 0 ? "" : text.substring(exponent);
        return mantissa.replaceAll("0+$", "").replaceAll("\\.$", "") + tail;
    }
}

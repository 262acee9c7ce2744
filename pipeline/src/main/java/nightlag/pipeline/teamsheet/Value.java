package nightlag.pipeline.teamsheet;

import java.math.BigDecimal;
import java.time.LocalDate;
import java.util.Optional;
import java.util.OptionalDouble;

/** What goes into one cell of ours. */
sealed interface Value {
    /** The value is not available. */
    Value NOTHING = new Nothing();

    /** Text, as text whatever it begins with. */
    record Text(String text) implements Value {}

    /** A finite number. */
    record Figure(double number) implements Value {
        private static final int MOST_PLAIN_DIGITS = 15;
        private static final int MOST_PLAIN_ZEROS = 5;

        /** Its digits, which read back the same; with an exponent where plain digits would be hard to read. */
        String digits() {
            if (number == 0) {
                return "0";
            }
            BigDecimal digits = BigDecimal.valueOf(number).stripTrailingZeros();
            int exponent = digits.precision() - digits.scale() - 1;
            boolean plain = exponent > -MOST_PLAIN_ZEROS && exponent < MOST_PLAIN_DIGITS;
            return plain ? digits.toPlainString() : digits.toString();
        }
    }

    /** A date. */
    record Day(LocalDate date) implements Value {}

    /** An empty cell. */
    record Nothing() implements Value {}

    static Value of(OptionalDouble number) {
        return number.isPresent() ? new Figure(number.getAsDouble()) : NOTHING;
    }

    static Value of(Optional<String> text) {
        return text.isPresent() ? new Text(text.get()) : NOTHING;
    }
}

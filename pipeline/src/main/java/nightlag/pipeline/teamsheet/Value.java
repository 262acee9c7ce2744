package nightlag.pipeline.teamsheet;

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
    record Number(double number) implements Value {}

    /** A date. */
    record Day(LocalDate date) implements Value {}

    /** An empty cell. */
    record Nothing() implements Value {}

    static Value of(OptionalDouble number) {
        return number.isPresent() ? new Number(number.getAsDouble()) : NOTHING;
    }

    static Value of(Optional<String> text) {
        return text.isPresent() ? new Text(text.get()) : NOTHING;
    }
}

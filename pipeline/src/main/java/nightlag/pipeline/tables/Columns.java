package nightlag.pipeline.tables;

import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.DoubleUnaryOperator;
import java.util.function.ToDoubleFunction;

/** Small steps from a value that may be missing to a cell that may be empty. */
final class Columns {
    private Columns() {}

    static <T> OptionalDouble from(Optional<T> source, ToDoubleFunction<T> getter) {
        return source.isPresent() ? OptionalDouble.of(getter.applyAsDouble(source.get())) : OptionalDouble.empty();
    }

    static OptionalDouble map(OptionalDouble value, DoubleUnaryOperator function) {
        return value.isPresent()
                ? OptionalDouble.of(function.applyAsDouble(value.getAsDouble()))
                : OptionalDouble.empty();
    }

    static OptionalDouble celsius(OptionalDouble kelvin) {
        return map(kelvin, Cells::celsius);
    }
}

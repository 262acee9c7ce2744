package nightlag.pipeline.config;

import java.util.Optional;
import java.util.function.Function;

/**
 * What came of reading something a person or an instrument wrote: the value, or what is wrong with it.
 *
 * @param <T> type of the value
 */
public sealed interface Parsed<T> {
    /**
     * It reads.
     *
     * @param value what it says
     * @param <T> type of the value
     */
    record Value<T>(T value) implements Parsed<T> {}

    /**
     * It does not read.
     *
     * @param found what was found, as a clause
     * @param allowed what is allowed, as a clause
     * @param <T> type of the value
     */
    record Refused<T>(String found, String allowed) implements Parsed<T> {}

    /** The value; empty where it does not read. */
    default Optional<T> toOptional() {
        return this instanceof Value<T> read ? Optional.of(read.value()) : Optional.empty();
    }

    /** The next step of reading, taken only where this one went well. */
    default <R> Parsed<R> then(Function<? super T, Parsed<R>> next) {
        if (this instanceof Refused<T> refused) {
            return new Refused<>(refused.found(), refused.allowed());
        }
        return next.apply(((Value<T>) this).value());
    }
}

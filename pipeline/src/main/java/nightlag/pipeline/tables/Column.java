package nightlag.pipeline.tables;

import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.Function;
import java.util.function.Predicate;
import java.util.function.ToDoubleFunction;
import java.util.function.ToLongFunction;
import nightlag.stages.sweep.NaturalOrder;

/**
 * One column of a table, declared once: the table file, the data package and the docs all come from here.
 *
 * @param name its header
 * @param type what its cells hold
 * @param unit its unit; empty where it has none
 * @param meaning what it says, in one sentence without a full stop at its end
 * @param rule what every cell keeps to
 * @param key whether rows are sorted by it
 * @param cell the cell of a row, as written
 * @param order rows by this column; a cell that is empty goes before any other
 * @param <R> what a row is made of
 */
record Column<R>(
        String name,
        Type type,
        Optional<String> unit,
        String meaning,
        Rule rule,
        boolean key,
        Function<R, String> cell,
        Comparator<R> order) {

    /** The field types of Frictionless Table Schema that tables use. */
    enum Type {
        STRING("string"),
        NUMBER("number"),
        INTEGER("integer"),
        BOOLEAN("boolean");

        private final String word;

        Type(String word) {
            this.word = word;
        }

        /** The word in a data package. */
        String word() {
            return word;
        }
    }

    /**
     * What every cell of a column keeps to.
     *
     * @param required never empty
     * @param minimum smallest value
     * @param maximum largest value
     * @param words the only words; empty: any text
     * @param pattern regular expression the text matches
     */
    record Rule(
            boolean required,
            OptionalDouble minimum,
            OptionalDouble maximum,
            List<String> words,
            Optional<String> pattern) {
        private static final Rule NONE =
                new Rule(false, OptionalDouble.empty(), OptionalDouble.empty(), List.of(), Optional.empty());
    }

    /** A column of free text. */
    static <R> Column<R> text(String name, String meaning, Function<R, String> getter) {
        return new Column<>(
                name,
                Type.STRING,
                Optional.empty(),
                meaning,
                Rule.NONE,
                false,
                row -> Cells.text(getter.apply(row)),
                Comparator.comparing(getter, NaturalOrder::compare));
    }

    /** A column that holds one of a few words. */
    static <R> Column<R> word(String name, String meaning, List<String> words, Function<R, String> getter) {
        return text(name, meaning, getter)
                .with(new Rule(true, OptionalDouble.empty(), OptionalDouble.empty(), words, Optional.empty()));
    }

    /** A column of numbers; what is not there, or not finite, is an empty cell. */
    static <R> Column<R> optional(String name, String unit, String meaning, Function<R, OptionalDouble> getter) {
        return new Column<>(
                name,
                Type.NUMBER,
                Optional.of(unit),
                meaning,
                Rule.NONE,
                false,
                row -> Cells.number(getter.apply(row).orElse(Double.NaN)),
                Comparator.comparingDouble(row -> getter.apply(row).orElse(Double.NEGATIVE_INFINITY)));
    }

    /** A column of numbers that are there in every row. */
    static <R> Column<R> number(String name, String unit, String meaning, ToDoubleFunction<R> getter) {
        return optional(name, unit, meaning, row -> OptionalDouble.of(getter.applyAsDouble(row)));
    }

    /** A column of whole numbers that are there in every row. */
    static <R> Column<R> count(String name, String meaning, ToLongFunction<R> getter) {
        Column<R> column = new Column<>(
                name,
                Type.INTEGER,
                Optional.empty(),
                meaning,
                Rule.NONE,
                false,
                row -> Long.toString(getter.applyAsLong(row)),
                Comparator.comparingLong(getter));
        return column.required().atLeast(0);
    }

    /** A column of {@code true} and {@code false}. */
    static <R> Column<R> yesNo(String name, String meaning, Predicate<R> getter) {
        Column<R> column = new Column<>(
                name,
                Type.BOOLEAN,
                Optional.empty(),
                meaning,
                Rule.NONE,
                false,
                row -> Boolean.toString(getter.test(row)),
                Comparator.comparing(getter::test));
        return column.required();
    }

    /** The same, and rows are sorted by it. */
    Column<R> asKey() {
        return new Column<>(name, type, unit, meaning, rule, true, cell, order);
    }

    /** The same, never empty. */
    Column<R> required() {
        return with(new Rule(true, rule.minimum, rule.maximum, rule.words, rule.pattern));
    }

    /** The same, with a smallest value. */
    Column<R> atLeast(double minimum) {
        return with(new Rule(rule.required, OptionalDouble.of(minimum), rule.maximum, rule.words, rule.pattern));
    }

    /** The same, with a largest value. */
    Column<R> atMost(double maximum) {
        return with(new Rule(rule.required, rule.minimum, OptionalDouble.of(maximum), rule.words, rule.pattern));
    }

    /** The same, matching a regular expression. */
    Column<R> matching(String pattern) {
        return with(new Rule(rule.required, rule.minimum, rule.maximum, rule.words, Optional.of(pattern)));
    }

    private Column<R> with(Rule other) {
        return new Column<>(name, type, unit, meaning, other, key, cell, order);
    }
}

package nightlag.pipeline.config;

import java.util.Arrays;
import java.util.List;
import java.util.Locale;

/** What a key may hold. */
sealed interface KeyType {
    /** In words, for messages and for the documentation. */
    String words();

    /** Any text but an empty one. */
    record Text() implements KeyType {
        @Override
        public String words() {
            return "text";
        }
    }

    /** True or false. */
    record Switch() implements KeyType {
        @Override
        public String words() {
            return "true or false";
        }
    }

    /** A whole number. */
    record Whole(int least, int most) implements KeyType {
        @Override
        public String words() {
            return "whole number, " + least + (most == Integer.MAX_VALUE ? " or more" : " to " + most);
        }
    }

    /** A pure number. */
    record Real(Sign sign) implements KeyType {
        @Override
        public String words() {
            return "number" + sign.words();
        }
    }

    /** A quantity; only a pure number may stand without a unit, and that only where {@code bare} says so. */
    record Measured(QuantityKind kind, Sign sign, boolean bare) implements KeyType {
        @Override
        public String words() {
            String noun = kind.bareNoun();
            String units = " (" + String.join(", ", kind.examples()) + ")";
            return (bare ? "number, or quantity" + units : noun + units) + sign.words();
        }
    }

    /** One of a few words. */
    record Word(List<String> allowed) implements KeyType {
        public Word {
            allowed = List.copyOf(allowed);
        }

        @Override
        public String words() {
            return allowed.stream()
                    .map(word -> '"' + word + '"')
                    .reduce((a, b) -> a + ", " + b)
                    .orElse("");
        }
    }

    /** Something that the reader takes apart itself. */
    record Shape(String words) implements KeyType {}

    /** Which side of zero a number lies on. */
    enum Sign {
        ANY(""),
        NOT_NEGATIVE(", 0 or more"),
        POSITIVE(", above 0");

        private final String words;

        Sign(String words) {
            this.words = words;
        }

        String words() {
            return words;
        }

        boolean allows(double value) {
            return switch (this) {
                case ANY -> Double.isFinite(value);
                case NOT_NEGATIVE -> value >= 0;
                case POSITIVE -> value > 0;
            };
        }
    }

    static KeyType quantity(QuantityKind kind, Sign sign) {
        return new Measured(kind, sign, false);
    }

    /** The words of an enumeration: its constants in small letters with '-'. */
    static <E extends Enum<E>> KeyType wordsOf(Class<E> choices) {
        return new Word(
                Arrays.stream(choices.getEnumConstants()).map(KeyType::wordOf).toList());
    }

    static String wordOf(Enum<?> constant) {
        return constant.name().toLowerCase(Locale.ROOT).replace('_', '-');
    }
}

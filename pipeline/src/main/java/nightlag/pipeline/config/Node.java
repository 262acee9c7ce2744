package nightlag.pipeline.config;

import java.util.Collections;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;

/** What stands in a configuration file, each piece with its place, so that pieces of several files can be merged. */
sealed interface Node {
    /** Characters of a text that a message shows. */
    int LONGEST_SHOWN = 80;

    /** Where it stands. */
    At at();

    /** What it is, for a message. */
    String found();

    /**
     * A table.
     *
     * @param at its heading
     * @param entries its keys in the order they stand
     */
    record Table(At at, Map<String, Node> entries) implements Node {
        public Table {
            entries = Collections.unmodifiableMap(new LinkedHashMap<>(entries));
        }

        @Override
        public String found() {
            return "a table";
        }
    }

    /**
     * A list.
     *
     * @param at where it begins
     * @param items its items
     */
    record Sequence(At at, List<Node> items) implements Node {
        public Sequence {
            items = List.copyOf(items);
        }

        @Override
        public String found() {
            return items.isEmpty() ? "an empty list" : "a list of " + items.size();
        }
    }

    /**
     * A single value.
     *
     * @param at where it stands
     * @param value a String, Long, Double, Boolean or a date of java.time
     */
    record Scalar(At at, Object value) implements Node {
        @Override
        public String found() {
            if (value instanceof String text) {
                return "\"" + shown(text) + "\"";
            }
            if (value instanceof Double number) {
                // 1e-4 and 2.5e7, as it is typed
                return number.toString().replace(".0E", "e").replace("E", "e");
            }
            return value instanceof Boolean || value instanceof Number ? value.toString() : "the date " + value;
        }
    }

    /** A text as a message shows it: on one line, and no longer than a line. */
    static String shown(String text) {
        String line = text.replaceAll("\\p{Cntrl}", " ");
        return line.length() <= LONGEST_SHOWN ? line : line.substring(0, LONGEST_SHOWN) + "…";
    }
}

package nightlag.pipeline.config;

import java.util.List;
import java.util.Optional;

/**
 * One section of a configuration file and its keys.
 *
 * @param heading as it stands in the file, such as {@code [files]} or {@code [[intake]]}; empty text: the top of the file
 * @param purpose one sentence for the documentation, as Markdown
 * @param keys its keys in the order of the documentation
 */
record Section(String heading, String purpose, List<Key> keys) {
    Section {
        keys = List.copyOf(keys);
    }

    /** The heading without its brackets. */
    String name() {
        return heading.replace("[", "").replace("]", "");
    }

    /** Whether it may stand several times. */
    boolean repeated() {
        return heading.startsWith("[[");
    }

    List<String> names() {
        return keys.stream().map(Key::name).toList();
    }

    Optional<Key> key(String name) {
        return keys.stream().filter(key -> key.name().equals(name)).findFirst();
    }
}

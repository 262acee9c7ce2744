package nightlag.pipeline.config;

/**
 * One key of a section, declared once: reading, suggestions and the documentation all come from it.
 *
 * @param name the key
 * @param type what it may hold
 * @param fallback what is taken where it is left out, as TOML; empty text: nothing
 * @param required whether it must be there
 * @param meaning one sentence for the documentation, as Markdown
 */
record Key(String name, KeyType type, String fallback, boolean required, String meaning) {
    static Key required(String name, KeyType type, String meaning) {
        return new Key(name, type, "", true, meaning);
    }

    static Key optional(String name, KeyType type, String meaning) {
        return new Key(name, type, "", false, meaning);
    }

    static Key withDefault(String name, KeyType type, String fallback, String meaning) {
        return new Key(name, type, fallback, false, meaning);
    }
}

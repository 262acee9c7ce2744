package nightlag.pipeline.config;

import java.util.Locale;

/** How records stand in a file. */
public enum Layout {
    SINGLE,
    COLUMN,
    ROLLING,
    MODULI,
    MULTISINE,
    CHIRP,
    CREEP;

    /** Whether this version reduces it. */
    public boolean supported() {
        return this == SINGLE || this == COLUMN || this == ROLLING || this == MODULI;
    }

    /** The word in configuration. */
    public String word() {
        return name().toLowerCase(Locale.ROOT);
    }
}

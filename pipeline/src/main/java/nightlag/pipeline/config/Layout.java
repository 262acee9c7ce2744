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

    /** Whether a file is one record, its point named after the file where no tag names it. */
    public boolean oneRecordAFile() {
        return this == SINGLE || this == MULTISINE || this == CHIRP || this == CREEP;
    }

    /** The word in configuration. */
    public String word() {
        return name().toLowerCase(Locale.ROOT);
    }
}

package nightlag.stages.moduli;

import java.util.Locale;

/** What a step of the stress does. */
public enum CreepPart {
    /** The stress moves away from rest. */
    LOAD,
    /** The stress moves back towards rest. */
    RECOVERY;

    /** The word in tables. */
    public String word() {
        return name().toLowerCase(Locale.ROOT);
    }
}

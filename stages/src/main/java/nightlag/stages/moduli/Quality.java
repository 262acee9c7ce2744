package nightlag.stages.moduli;

import java.util.Locale;

/** How far a point can be trusted, best first. */
public enum Quality {
    SOUND,
    DOUBTFUL,
    UNUSABLE;

    /** The word in tables. */
    public String word() {
        return name().toLowerCase(Locale.ROOT);
    }
}

package nightlag.stages.acceptance;

import java.util.Locale;

/** What is said of a lot against a limit. */
public enum Verdict {
    /** Inside the limits by more than the guard band. */
    CONFORMING,
    /** Outside of them by more than the guard band. */
    NONCONFORMING,
    /** So near a limit that the uncertainty leaves it open. */
    UNDECIDED,
    /** There is no value to judge. */
    MISSING;

    /** The word in tables. */
    public String word() {
        return name().toLowerCase(Locale.ROOT);
    }
}

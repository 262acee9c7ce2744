package nightlag.pipeline.night;

/**
 * A night that could not begin, or had to stop. What was done until then is kept, and the same command carries on.
 */
public final class NightFault extends Exception {
    private static final long serialVersionUID = 1L;

    /** Whose matter it is. */
    public enum Kind {
        /** The command line, the configuration, or every intake: nothing was touched. */
        CANNOT_BEGIN,
        /** A full disk, a folder that cannot be written, another run. */
        STOPPED
    }

    private final Kind kind;

    NightFault(Kind kind, String message) {
        super(message);
        this.kind = kind;
    }

    NightFault(Kind kind, String message, Throwable cause) {
        super(message, cause);
        this.kind = kind;
    }

    /** Whose matter it is. */
    public Kind kind() {
        return kind;
    }
}

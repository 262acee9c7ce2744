package nightlag.pipeline.archive;

/** The archive cannot be read or written; the night stops, what was committed is kept. */
public final class ArchiveException extends Exception {
    private static final long serialVersionUID = 1L;

    private final Kind kind;

    /** What went wrong, and what the store said. */
    public ArchiveException(Kind kind, String message, Throwable cause) {
        super(message, cause);
        this.kind = kind;
    }

    /** What went wrong, where the store itself said nothing. */
    public ArchiveException(Kind kind, String message) {
        super(message);
        this.kind = kind;
    }

    /** Which sort of failure it is; it decides what a night can do about it. */
    public Kind kind() {
        return kind;
    }

    /** Sorts of failure. */
    public enum Kind {
        /** The file is no longer whole. */
        DAMAGED,
        /** The file is not an archive of this program. */
        FOREIGN,
        /** The file is an archive laid out by another version of the program. */
        OTHER_VERSION,
        /** Another program holds the file. */
        IN_USE,
        /** There is no room left to write. */
        DISK_FULL,
        /** The file or its folder may not be opened or written. */
        NO_ACCESS,
        /** Anything else. */
        FAILED
    }
}

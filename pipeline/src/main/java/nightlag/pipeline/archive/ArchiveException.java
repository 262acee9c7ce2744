package nightlag.pipeline.archive;

/** The archive cannot be read or written; the night stops, what was committed is kept. */
public final class ArchiveException extends Exception {
    private static final long serialVersionUID = 1L;

    /** What was tried, and what the store said. */
    public ArchiveException(String message, Throwable cause) {
        super(message, cause);
    }
}

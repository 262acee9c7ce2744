package nightlag.pipeline.teamsheet;

/** The file cannot take the rows as it stands; the message says where, what was found and what is expected. */
final class SheetFault extends Exception {
    private static final long serialVersionUID = 1L;

    SheetFault(String message) {
        super(message);
    }

    SheetFault(String message, Throwable cause) {
        super(message, cause);
    }
}

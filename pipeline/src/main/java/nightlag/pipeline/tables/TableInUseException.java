package nightlag.pipeline.tables;

import java.io.IOException;
import java.nio.file.Path;

/**
 * A table is written whole but cannot take its place, nearly always because another program has the old one open, which
 * Windows does not allow to be replaced. What is on the disk is whole; the lot has to be written again later.
 */
public final class TableInUseException extends IOException {
    private static final long serialVersionUID = 1L;

    /** Which table, and what the system said. */
    TableInUseException(Path table, IOException cause) {
        super("cannot replace " + table + "; is it open in another program? (" + cause + ")", cause);
    }
}

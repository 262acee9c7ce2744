package nightlag.pipeline.intake;

import java.io.IOException;
import java.nio.file.Path;

/** SHA-256 of files and texts. */
public final class Digests {
    private Digests() {}

    /** SHA-256 of a file's bytes, hex. */
    public static String ofFile(Path file) throws IOException {
        throw new UnsupportedOperationException();
    }
}

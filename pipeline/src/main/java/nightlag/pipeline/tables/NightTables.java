package nightlag.pipeline.tables;

import java.io.IOException;
import java.nio.file.Path;
import java.util.List;

/** Writes the tables of one night. */
public final class NightTables {
    private NightTables() {}

    /** Writes {@code files.csv} into a night's folder, sorted by file. */
    public static void writeFiles(Path nightFolder, List<NightFileRow> rows) throws IOException {
        throw new UnsupportedOperationException();
    }
}

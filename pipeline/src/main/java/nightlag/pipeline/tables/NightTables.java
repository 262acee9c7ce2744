package nightlag.pipeline.tables;

import java.io.IOException;
import java.nio.file.Path;
import java.util.List;

/** Writes the tables of one night. */
public final class NightTables {
    private NightTables() {}

    /**
     * Writes {@code files.csv} into a night's folder, sorted by file.
     *
     * @throws TableInUseException if it is written but cannot be replaced
     * @throws IOException if it cannot be written
     */
    public static void writeFiles(Path nightFolder, List<NightFileRow> rows) throws IOException {
        try (FolderSwap swap = FolderSwap.into(nightFolder)) {
            swap.write(FilesTable.TABLE.fileName(), out -> FilesTable.TABLE.write(rows, out));
            swap.swap();
        }
    }
}

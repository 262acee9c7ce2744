package nightlag.pipeline.tables;

import java.io.IOException;
import java.nio.file.Path;
import nightlag.stages.LotResult;

/** Writes the tables of one lot. */
public final class LotTables {
    private LotTables() {}

    /**
     * Writes every table and the data package of one lot beside, then swaps each in whole; what a reader sees is always
     * the old or the new one.
     *
     * @param results the results folder
     * @param result what the lot became
     * @param provenance what it was made from
     */
    public static void write(Path results, LotResult result, Provenance provenance) throws IOException {
        throw new UnsupportedOperationException();
    }

    /** The folder of a lot below the results folder. */
    public static Path folder(Path results, String grade, String lot) {
        throw new UnsupportedOperationException();
    }
}

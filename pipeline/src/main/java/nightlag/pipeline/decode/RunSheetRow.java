package nightlag.pipeline.decode;

import java.util.Map;

/**
 * The row of a run sheet that speaks of one raw file.
 *
 * @param sheet the run sheet's name as in tables
 * @param line its line in the sheet
 * @param cells header text to cell, both trimmed
 */
public record RunSheetRow(String sheet, int line, Map<String, String> cells) {
    /** Copies the cells. */
    public RunSheetRow {
        cells = Map.copyOf(cells);
    }

    /** Digest of the cells; it counts as part of the raw file's content. */
    public String digest() {
        throw new UnsupportedOperationException();
    }
}

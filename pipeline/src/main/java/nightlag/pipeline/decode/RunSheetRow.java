package nightlag.pipeline.decode;

import java.util.Map;
import java.util.TreeMap;
import java.util.stream.Collectors;
import org.apache.commons.codec.digest.DigestUtils;

/**
 * The row of a run sheet that speaks of one raw file.
 *
 * @param sheet the run sheet's name as in tables
 * @param line its line in the sheet
 * @param cells header text to cell, both trimmed
 */
public record RunSheetRow(String sheet, int line, Map<String, String> cells) {
    /** The header of the column that names the raw file. */
    static final String FILE = "file";

    /** Copies the cells. */
    public RunSheetRow {
        cells = Map.copyOf(cells);
    }

    /**
     * Digest of the cells; it counts as part of the raw file's content. The name of the file is no part of it, nor is the
     * place of the row: a file that is moved along with its row keeps its content.
     */
    public String digest() {
        Map<String, String> facts = new TreeMap<>(cells);
        facts.remove(FILE);
        // cells hold no zero characters, so the text can be taken apart in one way only
        return DigestUtils.sha256Hex(facts.entrySet().stream()
                .map(entry -> entry.getKey() + "\0" + entry.getValue())
                .collect(Collectors.joining("\0")));
    }
}

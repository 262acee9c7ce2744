package nightlag.pipeline.night;

import java.util.List;
import java.util.Optional;

/**
 * What became of the team sheet.
 *
 * @param line what was done; empty where there was nothing to do
 * @param concerns what a person should look at
 * @param refused whether somebody has to put something right before the rows can go in
 */
public record SheetReport(Optional<String> line, List<String> concerns, boolean refused) {
    /** Nothing was to be done. */
    public static final SheetReport NOTHING = new SheetReport(Optional.empty(), List.of(), false);

    /** Copies the list. */
    public SheetReport {
        concerns = List.copyOf(concerns);
    }
}

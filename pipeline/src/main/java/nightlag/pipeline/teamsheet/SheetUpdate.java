package nightlag.pipeline.teamsheet;

import java.time.LocalDate;
import java.util.List;

/**
 * What the sheet is to say.
 *
 * @param due rows that have to go in; a lot that has none yet gets one
 * @param others rows that went in before: they are written where a column of theirs, or the whole sheet, is new
 * @param today what {@code updated} says in a row that changes
 */
public record SheetUpdate(List<SheetRow> due, List<SheetRow> others, LocalDate today) {
    /** Copies the lists. */
    public SheetUpdate {
        due = List.copyOf(due);
        others = List.copyOf(others);
    }
}

package nightlag.pipeline.teamsheet;

import java.util.List;

/** What became of an update of the sheet. */
public sealed interface SheetOutcome {
    /**
     * All rows are in.
     *
     * @param added rows added
     * @param changed rows of which a cell changed
     * @param columns headings of the columns added
     * @param notes cells that could not be written, each with its place and the reason
     */
    record Written(int added, int changed, List<String> columns, List<String> notes) implements SheetOutcome {
        /** Copies the lists. */
        public Written {
            columns = List.copyOf(columns);
            notes = List.copyOf(notes);
        }

        /** Whether the file was written at all; where every cell says what it should, it is not touched. */
        public boolean touched() {
            return added > 0 || changed > 0 || !columns.isEmpty();
        }
    }

    /**
     * The file is as it was, because it is open elsewhere or cannot be replaced now; the rows have to wait.
     *
     * @param reason one clause
     */
    record Waiting(String reason) implements SheetOutcome {}

    /**
     * The file is as it was, because a person has to put something right in it first; the rows have to wait.
     *
     * @param reason one clause: where, what was found, what is expected
     */
    record Refused(String reason) implements SheetOutcome {}
}

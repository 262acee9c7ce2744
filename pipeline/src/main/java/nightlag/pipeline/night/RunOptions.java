package nightlag.pipeline.night;

import java.util.OptionalInt;
import java.util.Set;
import nightlag.pipeline.archive.LotName;

/**
 * What the command line asks of a run besides its night file.
 *
 * @param grades only these grades; empty: all
 * @param lots only these lots; empty: all
 * @param redo whether what is already reduced is reduced again
 * @param workers takes the place of the night file's workers
 */
public record RunOptions(Set<String> grades, Set<String> lots, boolean redo, OptionalInt workers) {
    /** Copies the sets. */
    public RunOptions {
        grades = Set.copyOf(grades);
        lots = Set.copyOf(lots);
    }

    /** Everything, as the night file says. */
    public static RunOptions all() {
        return new RunOptions(Set.of(), Set.of(), false, OptionalInt.empty());
    }

    /** Whether the run is narrowed to some grades or lots. */
    boolean narrowed() {
        return !grades.isEmpty() || !lots.isEmpty();
    }

    /** Whether a lot is within what is asked. */
    boolean wants(LotName lot) {
        return (grades.isEmpty() || grades.contains(lot.grade())) && (lots.isEmpty() || lots.contains(lot.lot()));
    }
}

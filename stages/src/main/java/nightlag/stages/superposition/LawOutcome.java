package nightlag.stages.superposition;

import java.util.List;
import java.util.Optional;
import nightlag.stages.fault.Reason;

/**
 * What came of fitting a law to shifts.
 *
 * @param law the law at the reference temperature; empty where none was asked for, or none can be had
 * @param notes why there is none, or another one than was asked for
 */
public record LawOutcome(Optional<FittedLaw> law, List<Reason> notes) {
    /** Copies the list. */
    public LawOutcome {
        notes = List.copyOf(notes);
    }
}

package nightlag.stages.superposition;

import java.util.List;
import java.util.Optional;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.Marker;

/**
 * What came of fitting a law to shifts.
 *
 * @param law the law at the reference temperature; empty where none was asked for, or none can be had
 * @param markers the law's constants and the activation energy; where no law was asked for an apparent one
 * @param notes why there is none, or another one than was asked for
 */
public record LawOutcome(Optional<FittedLaw> law, List<Marker> markers, List<Reason> notes) {
    /** Copies the lists. */
    public LawOutcome {
        markers = List.copyOf(markers);
        notes = List.copyOf(notes);
    }
}

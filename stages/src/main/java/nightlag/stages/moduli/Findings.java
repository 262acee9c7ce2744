package nightlag.stages.moduli;

import java.util.Collection;
import java.util.List;
import nightlag.stages.fault.Reason;

/**
 * What was looked for in a sweep or a lot: the figures the data support, and why others are absent.
 *
 * @param markers what was found
 * @param notes what could not be had, and why
 */
public record Findings(List<Marker> markers, List<Reason> notes) {
    /** Nothing looked for. */
    public static final Findings NONE = new Findings(List.of(), List.of());

    /** Copies the lists. */
    public Findings {
        markers = List.copyOf(markers);
        notes = List.copyOf(notes);
    }

    /** One figure that is absent, and why. */
    public static Findings absent(Reason why) {
        return new Findings(List.of(), List.of(why));
    }

    /** All of them together, in this order. */
    public static Findings together(Collection<Findings> parts) {
        return new Findings(
                parts.stream().flatMap(part -> part.markers().stream()).toList(),
                parts.stream().flatMap(part -> part.notes().stream()).toList());
    }
}

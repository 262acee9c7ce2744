package nightlag.stages.superposition;

import java.util.List;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.Marker;

/**
 * All isotherms of a lot as one curve at the reference temperature.
 *
 * @param shifts one an isotherm, temperature rising, those left out included
 * @param points points of the isotherms used, reduced frequency rising
 * @param markers the law's constants, the activation energy, and the misfit with its verdict
 * @param notes isotherms left out, and whatever else is worth knowing
 */
public record MasterCurve(
        List<ShiftFactor> shifts, List<MasterPoint> points, List<Marker> markers, List<Reason> notes) {
    /** Copies the lists. */
    public MasterCurve {
        shifts = List.copyOf(shifts);
        points = List.copyOf(points);
        markers = List.copyOf(markers);
        notes = List.copyOf(notes);
    }
}

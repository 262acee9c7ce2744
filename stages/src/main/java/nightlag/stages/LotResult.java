package nightlag.stages;

import java.util.List;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.spectrum.SpectrumRow;

/**
 * What the points of one lot became. Lists are in the order of the tables.
 *
 * @param points points as published
 * @param markers characteristic figures
 * @param spectrum spectra
 * @param notes what could not be had, and why
 */
public record LotResult(
        List<ModulusPoint> points, List<Marker> markers, List<SpectrumRow> spectrum, List<Reason> notes) {
    /** Copies the lists. */
    public LotResult {
        points = List.copyOf(points);
        markers = List.copyOf(markers);
        spectrum = List.copyOf(spectrum);
        notes = List.copyOf(notes);
    }
}

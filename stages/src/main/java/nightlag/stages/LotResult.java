package nightlag.stages;

import java.util.List;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.moduli.FigureRow;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.response.ResponseRow;
import nightlag.stages.spectrum.RelativeMode;
import nightlag.stages.spectrum.SpectrumRow;
import nightlag.stages.superposition.MasterPoint;
import nightlag.stages.superposition.ShiftFactor;
import nightlag.stages.sweep.Sweep;

/**
 * What the points of one lot became. Lists are in the order of the tables.
 *
 * @param points points as published
 * @param markers characteristic figures
 * @param shiftFactors how far each isotherm is moved onto the master curve
 * @param masterCurve the points moved to the reference temperature
 * @param spectrum spectra
 * @param notes what was asked for and could not be had, or is unusual, and why
 * @param absent characteristic figures that the data do not support, and why; most materials lack some
 * @param derived the grade's own figures of each point
 * @param sweeps the sweeps its points were assembled to
 * @param responses predictions, in the order of the configuration
 * @param prony the relaxation modes as parts of the instantaneous modulus
 * @param creep creep curves
 */
public record LotResult(
        List<ModulusPoint> points,
        List<Marker> markers,
        List<ShiftFactor> shiftFactors,
        List<MasterPoint> masterCurve,
        List<SpectrumRow> spectrum,
        List<Reason> notes,
        List<Reason> absent,
        List<FigureRow> derived,
        List<Sweep> sweeps,
        List<ResponseRow> responses,
        List<RelativeMode> prony,
        List<CreepCurve> creep) {
    /** Nothing is known of the lot, not even a point. */
    public static final LotResult EMPTY =
            new LotResult(List.of(), List.of(), List.of(), List.of(), List.of(), List.of(), List.of());

    /** Copies the lists. */
    public LotResult {
        points = List.copyOf(points);
        markers = List.copyOf(markers);
        shiftFactors = List.copyOf(shiftFactors);
        masterCurve = List.copyOf(masterCurve);
        spectrum = List.copyOf(spectrum);
        notes = List.copyOf(notes);
        absent = List.copyOf(absent);
        derived = List.copyOf(derived);
        sweeps = List.copyOf(sweeps);
        responses = List.copyOf(responses);
        prony = List.copyOf(prony);
        creep = List.copyOf(creep);
    }

    /** A result without sweeps, figures of the grade's own, predictions and creep curves. */
    public LotResult(
            List<ModulusPoint> points,
            List<Marker> markers,
            List<ShiftFactor> shiftFactors,
            List<MasterPoint> masterCurve,
            List<SpectrumRow> spectrum,
            List<Reason> notes,
            List<Reason> absent) {
        this(
                points,
                markers,
                shiftFactors,
                masterCurve,
                spectrum,
                notes,
                absent,
                List.of(),
                List.of(),
                List.of(),
                List.of(),
                List.of());
    }
}

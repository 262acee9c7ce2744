package nightlag.stages.superposition;

import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.SharedErrors;

/**
 * All isotherms of a lot as one curve at the reference temperature.
 *
 * @param shifts one an isotherm, temperature rising, those left out included
 * @param points points of the isotherms used, reduced frequency rising
 * @param sharedErrors what the points of an isotherm are off by together, because of its shifts
 * @param markers the law's constants, the activation energy, and the misfit with its verdict
 * @param law the law of the shifts, at the reference temperature; empty where none was asked for or could be had
 * @param notes isotherms left out, and whatever else is worth knowing
 */
public record MasterCurve(
        List<ShiftFactor> shifts,
        List<MasterPoint> points,
        SharedErrors sharedErrors,
        List<Marker> markers,
        Optional<FittedLaw> law,
        List<Reason> notes) {
    /** Said of each figure that is drawn from a curve whose isotherms do not superpose. */
    public static final String IN_DOUBT = "of a master curve that does not superpose";

    private static final double NEAR_DECADES = 0.25;

    /** Copies the lists. */
    public MasterCurve {
        shifts = List.copyOf(shifts);
        points = List.copyOf(points);
        markers = List.copyOf(markers);
        notes = List.copyOf(notes);
    }

    /** Whether its isotherms were found not to superpose; what is drawn from it is then in doubt. */
    public boolean isInDoubt() {
        return notes.stream().anyMatch(note -> note.code().equals(SuperpositionReason.DOES_NOT_SUPERPOSE.name()));
    }

    /** u of ln a of the curve at a reduced angular frequency, rad/s, from the isotherms whose points lie there. */
    public double lnAU(double reducedFrequency) {
        return Math.sqrt(sharedErrors.variance(shares(reducedFrequency), new double[points.size()]));
    }

    /** u of ln b there, likewise; zero where it is not fitted. */
    public double lnBU(double reducedFrequency) {
        return Math.sqrt(sharedErrors.variance(new double[points.size()], shares(reducedFrequency)));
    }

    /** The part each point has in the curve at a frequency: all within a quarter of a decade alike, else the nearest alone. */
    private double[] shares(double reducedFrequency) {
        double[] distances = points.stream()
                .mapToDouble(point -> Math.abs(Math.log10(point.reduced().angularFrequency() / reducedFrequency)))
                .toArray();
        double reach = Math.max(NEAR_DECADES, Arrays.stream(distances).min().orElse(0));
        double near =
                Arrays.stream(distances).filter(distance -> distance <= reach).count();
        return Arrays.stream(distances)
                .map(distance -> distance <= reach ? 1 / near : 0)
                .toArray();
    }
}

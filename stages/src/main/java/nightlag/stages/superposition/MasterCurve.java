package nightlag.stages.superposition;

import java.util.DoubleSummaryStatistics;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.Function;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.Marker;

/**
 * All isotherms of a lot as one curve at the reference temperature.
 *
 * @param shifts one an isotherm, temperature rising, those left out included
 * @param points points of the isotherms used, reduced frequency rising
 * @param markers the law's constants, the activation energy, and the misfit with its verdict
 * @param law the law of the shifts, at the reference temperature; empty where none was asked for or could be had
 * @param notes isotherms left out, and whatever else is worth knowing
 */
public record MasterCurve(
        List<ShiftFactor> shifts,
        List<MasterPoint> points,
        List<Marker> markers,
        Optional<FittedLaw> law,
        List<Reason> notes) {
    private static final double LN_10 = Math.log(10);

    /** Copies the lists. */
    public MasterCurve {
        shifts = List.copyOf(shifts);
        points = List.copyOf(points);
        markers = List.copyOf(markers);
        notes = List.copyOf(notes);
    }

    /** u of ln a of the isotherms that carry the curve at a reduced angular frequency, rad/s; their rms where there are several. */
    public double lnAU(double reducedFrequency) {
        return LN_10 * rms(reducedFrequency, ShiftFactor::log10AU);
    }

    /** u of ln b there, likewise; zero where it is not fitted. */
    public double lnBU(double reducedFrequency) {
        return LN_10 * rms(reducedFrequency, ShiftFactor::log10BU);
    }

    private double rms(double reducedFrequency, Function<ShiftFactor, OptionalDouble> u) {
        return Math.sqrt(shifts.stream()
                .filter(shift -> shift.used() && carries(shift.temperatureK(), reducedFrequency))
                .mapToDouble(shift -> u.apply(shift).orElse(0))
                .map(one -> one * one)
                .average()
                .orElse(0));
    }

    private boolean carries(double temperatureK, double reducedFrequency) {
        DoubleSummaryStatistics range = points.stream()
                .filter(point -> point.temperatureK() == temperatureK)
                .mapToDouble(point -> point.reduced().angularFrequency())
                .summaryStatistics();
        return range.getMin() <= reducedFrequency && reducedFrequency <= range.getMax();
    }
}

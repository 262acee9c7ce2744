package nightlag.stages.sweep;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.OptionalDouble;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.Findings;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.numeric.SmoothCurve;
import nightlag.stages.sweep.LogModuli.Figure;
import nightlag.stages.sweep.Zeros.Zero;

/**
 * The characteristic figures of moduli over frequency, of one isotherm or of a master curve: where storage and loss modulus
 * cross, and the plateau between terminal and glass zone (Ferry 1980, Viscoelastic Properties of Polymers, chapters 2 and 13).
 *
 * <p>All are read off smooth curves of logarithms over ln ω, so that noise makes neither crossings nor minima of its own, and
 * none is given where the data do not show both of its sides.
 */
public final class FrequencyMarkers {
    private static final int FEWEST = 4;

    private final MarkerPlace place;
    private final LogModuli data;
    private final List<Marker> markers = new ArrayList<>();
    private final List<Reason> notes = new ArrayList<>();

    private FrequencyMarkers(MarkerPlace place, LogModuli data) {
        this.place = place;
        this.data = data;
    }

    /**
     * Looks for {@code crossover_angular_frequency} (rad/s) and {@code crossover_modulus} (Pa), a row each for every crossing,
     * and {@code plateau_modulus} (Pa).
     *
     * @param place whose the moduli are; its temperature is that of the markers
     * @param readings moduli in any order, repeats allowed; those that noise hides are left out
     */
    public static Findings of(MarkerPlace place, List<ModulusReading> readings) {
        List<ModulusReading> clear = readings.stream()
                .filter(reading -> reading.angularFrequency() > 0 && LogModuli.standOut(reading.moduli()))
                .toList();
        LogModuli data = LogModuli.overFrequency(
                clear.stream().mapToDouble(ModulusReading::angularFrequency).toArray(),
                clear.stream().map(ModulusReading::moduli).toList());
        FrequencyMarkers markers = new FrequencyMarkers(place, data);
        if (clear.size() < readings.size()) {
            markers.notes.add(MarkerReason.MARKER_MODULI_HIDDEN.with(place.words(), readings.size() - clear.size()));
        }
        if (data.size() < FEWEST) {
            markers.notes.add(MarkerReason.MARKER_TOO_FEW_FREQUENCIES.with(place.words(), data.size(), FEWEST));
        } else {
            markers.find();
        }
        return new Findings(markers.markers, markers.notes);
    }

    private void find() {
        List<Marker> plateaus = new ArrayList<>();
        List<Zeros> crossings = new ArrayList<>();
        double lowest = Double.POSITIVE_INFINITY;
        for (LogModuli.Stretch stretch : data.stretches()) {
            SmoothCurve lossFactor = stretch.data().curve(Figure.LOSS_FACTOR);
            Zeros zeros =
                    Zeros.of(at -> lossFactor.estimate(at, 0), stretch.data().places());
            crossings.add(zeros);
            zeros.zeros().stream()
                    .filter(zero -> stretch.owns(zero.place()))
                    .forEach(zero -> crossing(stretch.data(), lossFactor, zero));
            for (Zero zero : Zeros.of(
                            at -> lossFactor.estimate(at, 1), stretch.data().places())
                    .zeros()) {
                double depth = lossFactor.derivative(zero.place(), 0);
                if (zero.rising() && stretch.owns(zero.place()) && depth < 0 && depth < lowest) {
                    lowest = depth;
                    plateaus.add(plateau(stretch.data(), zero));
                }
            }
        }
        if (markers.isEmpty()) {
            notes.add(noCrossover(crossings));
        }
        if (plateaus.isEmpty()) {
            notes.add(MarkerReason.MARKER_NO_PLATEAU.with(place.words()));
        } else {
            markers.add(plateaus.get(plateaus.size() - 1));
        }
        markers.sort(Comparator.comparing(Marker::property)
                .thenComparing(marker -> marker.frequencyHz().orElseThrow()));
    }

    private void crossing(LogModuli near, SmoothCurve lossFactor, Zero zero) {
        double angularFrequency = Math.exp(zero.place());
        markers.add(marker(
                "crossover_angular_frequency",
                angularFrequency,
                angularFrequency,
                angularFrequency * zero.u(),
                "rad/s",
                "tan δ = 1, by a smooth curve of ln tan δ over ln ω"));
        SmoothCurve magnitude = near.curve(Figure.MAGNITUDE);
        double modulus = Math.exp(magnitude.derivative(zero.place(), 0)) * Math.sqrt(0.5);
        double u = Crossing.u(near, lossFactor, Figure.MAGNITUDE, magnitude, zero, 0);
        markers.add(marker(
                "crossover_modulus",
                angularFrequency,
                modulus,
                modulus * u,
                "Pa",
                "|G*|/√2 at tan δ = 1, by smooth curves of ln |G*| and ln tan δ over ln ω"));
    }

    private Marker plateau(LogModuli near, Zero zero) {
        SmoothCurve.Local storage = near.curve(Figure.STORAGE).at(zero.place(), 1);
        double modulus = Math.exp(storage.derivatives()[0]);
        double u = Math.hypot(Math.sqrt(storage.peakCovariance(0, 0)), storage.derivatives()[1] * zero.u());
        return marker(
                "plateau_modulus",
                Math.exp(zero.place()),
                modulus,
                modulus * u,
                "Pa",
                "storage modulus at the lowest tan δ, by smooth curves of the logarithms over ln ω");
    }

    private Marker marker(
            String property, double angularFrequency, double value, double u, String unit, String method) {
        return place.marker(
                property,
                OptionalDouble.of(angularFrequency / (2 * Math.PI)),
                value,
                OptionalDouble.of(u),
                unit,
                method);
    }

    private Reason noCrossover(List<Zeros> stretches) {
        double[] logs = data.places();
        double low = Math.exp(logs[0]);
        double high = Math.exp(logs[logs.length - 1]);
        boolean loss = stretches.stream().anyMatch(Zeros::positive);
        boolean storage = stretches.stream().anyMatch(Zeros::negative);
        boolean clear = stretches.get(0).startsClear()
                && stretches.get(stretches.size() - 1).endsClear();
        if (loss == storage || !clear) {
            return MarkerReason.MARKER_CROSSOVER_UNCLEAR.with(place.words(), low, high);
        }
        return MarkerReason.MARKER_NO_CROSSOVER.with(place.words(), larger(loss), low, high);
    }

    /** Which modulus is the larger one, in words. */
    static String larger(boolean loss) {
        return loss ? "the loss modulus exceeds the storage modulus" : "the storage modulus exceeds the loss modulus";
    }
}

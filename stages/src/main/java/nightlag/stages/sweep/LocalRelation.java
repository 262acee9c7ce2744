package nightlag.stages.sweep;

import java.util.ArrayList;
import java.util.List;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.numeric.SmoothCurve;
import nightlag.stages.sweep.LogModuli.Figure;

/**
 * What the storage modulus by itself says of the loss modulus: G'' ≈ (π/2) dG'/d ln ω, the local form of the relation of Kramers
 * and Kronig (Booij &amp; Thoone, Rheol. Acta 21 (1982) 15). A picture, not a test: it comes near where a spectrum is broad,
 * within some 27 % for modes a decade apart. For a single relaxation it is π x/(1 + x²) of G'', x = ωτ: high by π/2 at its
 * place, and low far from it, as in the terminal zone of a liquid.
 */
public final class LocalRelation {
    /** Fewer frequencies do not carry a slope. */
    private static final int FEWEST = 5;

    private LocalRelation() {}

    /**
     * One place of the line.
     *
     * @param angularFrequency ω, rad/s
     * @param lossPa (π/2) dG'/d ln ω there, above zero, Pa
     */
    public record Place(double angularFrequency, double lossPa) {}

    /**
     * The line, from the slope of a smooth curve of ln G' over ln ω, at each frequency and half-way between neighbours.
     *
     * @param readings of one isotherm or a master curve, in any order, repeats allowed; those that noise hides are left out
     * @return frequency rising; without places where the storage modulus does not rise, and empty where there are fewer than
     *     five frequencies
     */
    public static List<Place> of(List<ModulusReading> readings) {
        List<ModulusReading> clear = readings.stream()
                .filter(reading -> reading.angularFrequency() > 0 && LogModuli.standOut(reading.moduli()))
                .toList();
        LogModuli data = LogModuli.overFrequency(
                clear.stream().mapToDouble(ModulusReading::angularFrequency).toArray(),
                clear.stream().map(ModulusReading::moduli).toList());
        List<Place> line = new ArrayList<>();
        if (data.size() < FEWEST) {
            return line;
        }
        for (LogModuli.Stretch stretch : data.stretches()) {
            SmoothCurve storage = stretch.data().curve(Figure.STORAGE);
            double[] places = stretch.data().places();
            for (int i = 0; i < places.length; i++) {
                add(line, stretch, storage, places[i]);
                if (i + 1 < places.length) {
                    add(line, stretch, storage, (places[i] + places[i + 1]) / 2);
                }
            }
        }
        return List.copyOf(line);
    }

    private static void add(List<Place> line, LogModuli.Stretch stretch, SmoothCurve storage, double place) {
        double slope = storage.derivative(place, 1);
        if (stretch.owns(place) && slope > 0) {
            line.add(new Place(Math.exp(place), Math.PI / 2 * slope * Math.exp(storage.derivative(place, 0))));
        }
    }
}

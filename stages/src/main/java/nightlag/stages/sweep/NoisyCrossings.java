package nightlag.stages.sweep;

import java.util.List;
import java.util.OptionalDouble;
import java.util.function.ToDoubleFunction;
import nightlag.stages.fault.ReasonCode;
import nightlag.stages.moduli.Marker;
import nightlag.stages.sweep.FigureMarkerPlan.Along;

/**
 * Several crossings that noise alone can make, as one: where a curve runs along a value, its noise crosses it again and again.
 * The one is at their mean, weighted by 1/u²; its u is the rms of theirs under these weights together with the distance to
 * the farthest of them, so that it covers them all.
 */
final class NoisyCrossings {
    private static final double KELVIN_AT_ZERO_CELSIUS = 273.15;

    private final List<Marker> crossings;
    private final FigureMarkerPlan plan;

    private NoisyCrossings(List<Marker> crossings, FigureMarkerPlan plan) {
        this.crossings = crossings;
        this.plan = plan;
    }

    /** The one marker of crossings along one curve, one at least, each with u where there are several. */
    static Marker merged(List<Marker> crossings, FigureMarkerPlan plan) {
        return crossings.size() == 1 ? crossings.get(0) : new NoisyCrossings(crossings, plan).merged();
    }

    private Marker merged() {
        boolean overFrequency = plan.along() == Along.FREQUENCY;
        Marker first = crossings.get(0);
        boolean log = crossings.stream().allMatch(marker -> marker.value() > 0)
                && (overFrequency || plan.report().isPresent());
        double[] weights = crossings.stream()
                .mapToDouble(marker -> {
                    double u = marker.u().orElseThrow() / (log ? marker.value() : 1);
                    return 1 / (u * u);
                })
                .toArray();
        double middle = mean(weights, marker -> scaled(marker.value(), log));
        double farthest = crossings.stream()
                .mapToDouble(marker -> Math.abs(scaled(marker.value(), log) - middle))
                .max()
                .orElseThrow();
        double place = mean(weights, marker -> scaled(place(marker), overFrequency));
        double sum = 0;
        for (double weight : weights) {
            sum += weight;
        }
        double u = Math.hypot(Math.sqrt(crossings.size() / sum), farthest);
        double value = log ? Math.exp(middle) : middle;
        return new Marker(
                first.specimen(),
                first.sweep(),
                first.property(),
                overFrequency ? first.temperatureK() : OptionalDouble.of(place),
                overFrequency ? OptionalDouble.of(Math.exp(place)) : first.frequencyHz(),
                value,
                OptionalDouble.of(log ? value * u : u),
                first.unit(),
                first.method() + told());
    }

    private String told() {
        boolean overFrequency = plan.along() == Along.FREQUENCY;
        double offset = overFrequency ? 0 : KELVIN_AT_ZERO_CELSIUS;
        return "; the middle of "
                + crossings.size()
                + " crossings that noise alone can make, from there to "
                + ReasonCode.shortest(place(crossings.get(crossings.size() - 1)) - offset)
                + (overFrequency ? " Hz" : " °C");
    }

    /** What to add to the method of a place on a smooth curve that stands for several crossings between two places, Hz or K. */
    static String told(int crossings, double from, double to, FigureMarkerPlan plan) {
        double offset = plan.along() == Along.FREQUENCY ? 0 : KELVIN_AT_ZERO_CELSIUS;
        return "; the one place of "
                + crossings
                + " crossings that noise alone can make, from "
                + ReasonCode.shortest(from - offset)
                + " to "
                + ReasonCode.shortest(to - offset)
                + (plan.along() == Along.FREQUENCY ? " Hz" : " °C");
    }

    private double place(Marker marker) {
        return (plan.along() == Along.FREQUENCY ? marker.frequencyHz() : marker.temperatureK()).orElseThrow();
    }

    private double mean(double[] weights, ToDoubleFunction<Marker> figure) {
        double sum = 0;
        double total = 0;
        for (int i = 0; i < weights.length; i++) {
            sum += weights[i] * figure.applyAsDouble(crossings.get(i));
            total += weights[i];
        }
        return sum / total;
    }

    private static double scaled(double value, boolean log) {
        return log ? Math.log(value) : value;
    }
}

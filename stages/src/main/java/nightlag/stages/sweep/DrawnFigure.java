package nightlag.stages.sweep;

import nightlag.stages.sweep.FigureMarkerPlan.Along;
import nightlag.stages.sweep.FigureMarkerPlan.Scale;

/**
 * How a plan draws its figure: by its logarithm or as it is, over the logarithm of the frequency or over temperature.
 *
 * @param plan the plan
 */
record DrawnFigure(FigureMarkerPlan plan) {
    static final double KELVIN_AT_ZERO_CELSIUS = 273.15;

    boolean log() {
        return plan.scale() == Scale.LOG;
    }

    boolean overFrequency() {
        return plan.along() == Along.FREQUENCY;
    }

    /** The value to reach. */
    double level() {
        return value(plan.reaches());
    }

    double value(double figure) {
        return scaled(figure, log());
    }

    /** How the figure as it is drawn moves with the figure. */
    double perValue(double figure) {
        return log() ? 1 / figure : 1;
    }

    double place(double hertzOrKelvin) {
        return scaled(hertzOrKelvin, overFrequency());
    }

    double fromPlace(double drawn) {
        return unscaled(drawn, overFrequency());
    }

    /** What makes a marker's value of the figure reported: markers have K. */
    double offset() {
        return plan.report().filter(figure -> figure.unit().equals("°C")).isPresent() ? KELVIN_AT_ZERO_CELSIUS : 0;
    }

    /** Whether the figure reported has a logarithm at a place; it is drawn by that where it has one. */
    boolean hasLogReport(FigureCurve.Place place) {
        return plan.report().isPresent() && place.mean(plan.report().get()).orElse(0) > 0;
    }

    static double scaled(double value, boolean log) {
        return log ? Math.log(value) : value;
    }

    static double unscaled(double value, boolean log) {
        return log ? Math.exp(value) : value;
    }
}

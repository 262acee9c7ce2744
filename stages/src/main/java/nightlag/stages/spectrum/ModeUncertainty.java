package nightlag.stages.spectrum;

import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.OptionalDouble;
import nightlag.stages.numeric.Complex;
import nightlag.stages.numeric.LinearisedUncertainty;

/**
 * Uncertainty of figures drawn from fitted modes: the linearised fit's covariance, times the scatter about the fit where
 * that is larger than the readings' own uncertainty, or where these have none.
 *
 * <p>Where the slowest mode lies beyond the window the data support, more could lie there unseen. The fit is then taken to
 * hold one further mode, half a decade further out than any fitted one may go, of strength zero give or take what the
 * readings leave open; its share enters the figures' uncertainty. The same at the fast end.
 */
final class ModeUncertainty {
    /** What a logarithm of a strength or time is known to before the data: within a factor of e¹⁰. */
    private static final double PRIOR_U_OF_LOGARITHM = 10;

    private static final double REACH = Math.pow(10, 1.5);

    private final FittedModes modes;
    private final LinearisedUncertainty linearised;
    private final List<Double> unseenTimes;
    private final OptionalDouble scatter;

    ModeUncertainty(WeightedReadings readings, ModeRefinement refinement, FittedModes modes) {
        this.modes = modes;
        this.unseenTimes = new ArrayList<>();
        RelaxationModes material = RelaxationModes.of(modes.equilibrium(), modes.times(), modes.strengths());
        List<double[]> jacobian = new ArrayList<>(List.of(refinement.jacobian(modes)));
        List<Double> priors = new ArrayList<>(Collections.nCopies(modes.parameters(), PRIOR_U_OF_LOGARITHM));
        int free = readings.rows() - modes.parameters();
        double own = free > 0 ? Math.sqrt(modes.chiSquared() / free) : 0;
        if (readings.scatterKnown()) {
            scatter = OptionalDouble.of(Math.max(1, own));
        } else {
            scatter = free > 0 ? OptionalDouble.of(own) : OptionalDouble.empty();
        }
        double unit = scatter.orElse(1);
        SupportedWindow window = SupportedWindow.of(readings.lowestFrequency(), readings.highestFrequency());
        double slowest = modes.times()[modes.count() - 1];
        if (slowest > window.longestS()) {
            unseenTimes.add(REACH / readings.lowestFrequency());
            jacobian.add(readings.mode(REACH / readings.lowestFrequency()));
            priors.add(material.modulusPa(readings.lowestFrequency()).abs() / unit);
        }
        if (modes.times()[0] < window.shortestS()) {
            Complex fastest = material.modulusPa(readings.highestFrequency());
            unseenTimes.add(1 / (REACH * readings.highestFrequency()));
            jacobian.add(readings.mode(1 / (REACH * readings.highestFrequency())));
            priors.add(fastest.abs() * REACH / unit);
        }
        linearised = new LinearisedUncertainty(
                jacobian.toArray(double[][]::new),
                priors.stream().mapToDouble(Double::doubleValue).toArray());
    }

    /**
     * How a figure changes with the modes.
     *
     * @param value the figure
     * @param byMode its derivative by a mode's strength and by its time, given both
     * @param byEquilibrium its derivative by Ge
     */
    record Figure(double value, ModeDerivatives byMode, double byEquilibrium) {}

    /** Derivatives of a figure by the strength and the time of a mode. */
    interface ModeDerivatives {
        /** ∂/∂g and ∂/∂τ of a mode of strength g and time τ. */
        double[] at(double strength, double time);
    }

    /** Standard uncertainty of a figure; empty where the readings have no uncertainty and leave no scatter to take one from. */
    OptionalDouble of(Figure figure) {
        if (scatter.isEmpty()) {
            return scatter;
        }
        int count = modes.count();
        double[] derivatives = new double[modes.parameters() + unseenTimes.size()];
        for (int i = 0; i < count; i++) {
            double[] byMode = figure.byMode().at(modes.strengths()[i], modes.times()[i]);
            derivatives[i] = byMode[0] * modes.strengths()[i];
            derivatives[count + i] = byMode[1] * modes.times()[i];
        }
        if (modes.equilibrium() > 0) {
            derivatives[2 * count] = figure.byEquilibrium() * modes.equilibrium();
        }
        for (int k = 0; k < unseenTimes.size(); k++) {
            derivatives[modes.parameters() + k] = figure.byMode().at(0, unseenTimes.get(k))[0];
        }
        return OptionalDouble.of(scatter.getAsDouble() * linearised.of(derivatives));
    }
}

package nightlag.stages.spectrum;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.Function;
import java.util.function.ToDoubleFunction;
import nightlag.stages.moduli.SharedErrors;
import nightlag.stages.numeric.LinearisedUncertainty;

/**
 * Uncertainty of figures drawn from fitted modes: the linearised fit's covariance, times the scatter about the fit where
 * that is larger than the readings' own uncertainty, or where these have none.
 *
 * <p>Where the slowest mode lies beyond the window the data support, more could lie there unseen: what the strongest
 * {@link UnseenMode} would change is added in quadrature. The same at the fast end.
 * What several readings are off by together moves the modes as the linearised fit says.
 * Where rounded readings come back, the scatter of one is added too, for all of a plateau err alike.
 */
final class ModeUncertainty {
    /** What a logarithm of a strength or time is known to before the data: within a factor of e¹⁰. */
    private static final double PRIOR_U_OF_LOGARITHM = 10;

    /** Step in a logarithm for a derivative; figures are smooth in them. */
    private static final double STEP = 1e-5;

    private final FittedModes modes;
    private final LinearisedUncertainty linearised;
    private final OptionalDouble scatter;
    private final List<RelaxationModes> alternatives;
    private final double commonError;
    private final SharedErrors shared;
    private final double[][] jacobian;
    private final double[] byLnFrequency;
    private final double[] byLnModulus;

    ModeUncertainty(WeightedReadings readings, SharedErrors shared, boolean solid, FittedModes modes) {
        ModeRefinement refinement = new ModeRefinement(readings, solid);
        this.modes = modes;
        int free = readings.rows() - modes.parameters();
        double own = free > 0 ? Math.sqrt(modes.chiSquared() / free) : 0;
        if (readings.scatterKnown()) {
            scatter = OptionalDouble.of(Math.max(1, own));
        } else {
            scatter = free > 0 ? OptionalDouble.of(own) : OptionalDouble.empty();
        }
        double[] priors = new double[modes.parameters()];
        Arrays.fill(priors, PRIOR_U_OF_LOGARITHM);
        jacobian = refinement.jacobian(modes);
        linearised = new LinearisedUncertainty(jacobian, priors);
        this.shared = shared;
        // frequency and time stand in a mode as their product
        byLnFrequency = sum(modes.count(), 2 * modes.count(), readings.rows());
        double[] strengths = sum(0, modes.count(), readings.rows());
        double[] whole = sum(2 * modes.count(), jacobian.length, readings.rows());
        byLnModulus = new double[whole.length];
        Arrays.setAll(byLnModulus, row -> -strengths[row] - whole[row]);
        commonError = !readings.scatterKnown() && readings.repeating() ? scatter.orElse(0) : 0;
        alternatives = new ArrayList<>();
        if (scatter.isPresent()) {
            double variance = Math.max(readings.leastVariance(), scatter.getAsDouble() * scatter.getAsDouble());
            UnseenMode unseen = new UnseenMode(readings, refinement, modes, variance);
            SupportedWindow window = SupportedWindow.of(readings.lowestFrequency(), readings.highestFrequency());
            if (modes.times()[modes.count() - 1] > window.longestS()) {
                alternatives.add(solid && modes.equilibrium() == 0 ? unseen.nearlySolid() : unseen.slow());
            }
            if (modes.times()[0] < window.shortestS()) {
                alternatives.add(unseen.fast());
            }
        }
    }

    /** Standard deviation of the weighted residuals that counts; empty where there is none to be had. */
    OptionalDouble scatter() {
        return scatter;
    }

    /** Standard uncertainty of a figure; empty where the readings have none and leave no scatter to take one from. */
    OptionalDouble of(ToDoubleFunction<RelaxationModes> figure) {
        Optional<double[]> u = ofEach(modes -> new double[] {figure.applyAsDouble(modes)});
        return u.isPresent() ? OptionalDouble.of(u.get()[0]) : OptionalDouble.empty();
    }

    /** Standard uncertainty of each of several figures; empty likewise. */
    Optional<double[]> ofEach(Function<RelaxationModes, double[]> figures) {
        if (scatter.isEmpty()) {
            return Optional.empty();
        }
        double[] values = figures.apply(moved(0, 0));
        double[][] derivatives = new double[values.length][modes.parameters()];
        for (int i = 0; i < modes.parameters(); i++) {
            double[] above = figures.apply(moved(i, STEP));
            double[] below = figures.apply(moved(i, -STEP));
            for (int k = 0; k < values.length; k++) {
                derivatives[k][i] = (above[k] - below[k]) / (2 * STEP);
            }
        }
        List<double[]> others = alternatives.stream().map(figures).toList();
        double[] u = new double[values.length];
        for (int k = 0; k < values.length; k++) {
            double square = Math.pow(scatter.getAsDouble() * linearised.of(derivatives[k]), 2);
            square += Math.pow(commonError * values[k], 2);
            square += sharedVariance(derivatives[k]);
            for (double[] other : others) {
                square += Math.pow(other[k] - values[k], 2);
            }
            u[k] = Math.sqrt(square);
        }
        return Optional.of(u);
    }

    /** The sum of some columns of the Jacobian. */
    private double[] sum(int from, int to, int rows) {
        double[] sum = new double[rows];
        for (int j = from; j < to; j++) {
            for (int row = 0; row < sum.length; row++) {
                sum[row] += jacobian[j][row];
            }
        }
        return sum;
    }

    /** Of a figure with these derivatives: each reading moves its two residuals, the modes follow. */
    private double sharedVariance(double[] derivatives) {
        if (shared.isNone()) {
            return 0;
        }
        double[] influence = linearised.influence(derivatives);
        double[] figureByLnFrequency = new double[byLnFrequency.length / 2];
        double[] figureByLnModulus = new double[byLnFrequency.length / 2];
        for (int row = 0; row < byLnFrequency.length; row++) {
            double byResidual = 0;
            for (int j = 0; j < influence.length; j++) {
                byResidual -= influence[j] * jacobian[j][row];
            }
            figureByLnFrequency[row / 2] += byResidual * byLnFrequency[row];
            figureByLnModulus[row / 2] += byResidual * byLnModulus[row];
        }
        return shared.variance(figureByLnFrequency, figureByLnModulus);
    }

    /** The material with one fitted number moved by a step of its logarithm. */
    private RelaxationModes moved(int parameter, double step) {
        int count = modes.count();
        double factor = Math.exp(step);
        double[] times = modes.times().clone();
        double[] strengths = modes.strengths().clone();
        double equilibrium = modes.equilibrium();
        if (parameter < count) {
            strengths[parameter] *= factor;
        } else if (parameter < 2 * count) {
            times[parameter - count] *= factor;
        } else {
            equilibrium *= factor;
        }
        return RelaxationModes.of(equilibrium, times, strengths);
    }
}

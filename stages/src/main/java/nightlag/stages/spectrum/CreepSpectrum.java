package nightlag.stages.spectrum;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.OptionalDouble;
import java.util.function.ToDoubleFunction;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.Marker;
import nightlag.stages.numeric.LinearisedUncertainty;

/**
 * The retardation modes fitted to creep curves, or to these and moduli together, the relaxation modes that are their exact
 * inverse, and what follows.
 */
public final class CreepSpectrum {
    /** What a logarithm is known to before the data. */
    private static final double PRIOR_U_OF_LOGARITHM = 10;

    private static final double STEP = 1e-5;
    /** A slowest mode beyond this share of the longest time cannot be told from flow, or from what comes later. */
    private static final double LATEST = 0.5;

    private final FittedCompliance fitted;
    private final RetardationModes retardation;
    private final LinearisedUncertainty linearised;
    private final double scatter;
    private final boolean withModuli;
    private final double longestS;

    CreepSpectrum(ComplianceReadings readings, double[][] jacobian, FittedCompliance fitted, boolean withModuli) {
        this.fitted = fitted;
        this.retardation = modes(fitted);
        double[] priors = new double[fitted.parameters()];
        Arrays.fill(priors, PRIOR_U_OF_LOGARITHM);
        this.linearised = new LinearisedUncertainty(jacobian, priors);
        int free = readings.rows() - fitted.parameters();
        this.scatter = free > 0 ? Math.max(1, Math.sqrt(fitted.chiSquared() / free)) : 1;
        this.withModuli = withModuli;
        this.longestS = readings.longestS();
    }

    /** Where no J0 is seen the fastest mode takes its place: nothing read tells the two apart. */
    private static RetardationModes modes(FittedCompliance fitted) {
        if (fitted.instantaneous() > 0) {
            return RetardationModes.of(fitted.instantaneous(), fitted.fluidity(), fitted.times(), fitted.strengths());
        }
        return RetardationModes.of(
                fitted.strengths()[0],
                fitted.fluidity(),
                Arrays.copyOfRange(fitted.times(), 1, fitted.count()),
                Arrays.copyOfRange(fitted.strengths(), 1, fitted.count()));
    }

    /** The fitted modes. */
    public RetardationModes retardation() {
        return retardation;
    }

    /** Both sets as rows. */
    public List<SpectrumRow> rows(double temperatureK) {
        return SpectrumRow.discrete(temperatureK, retardation.relaxation(), retardation);
    }

    /** The figures that complete the sets: J0 and G(0); of a liquid η0, Je0 and the mean time; of a solid Ge. */
    public List<Marker> markers(double temperatureK) {
        List<Marker> markers = new ArrayList<>();
        markers.add(marker(
                "instantaneous_compliance",
                "1/Pa",
                "fitted together with the modes",
                temperatureK,
                RetardationModes::instantaneousPerPa));
        markers.add(marker(
                "instantaneous_modulus",
                "Pa",
                "one over the instantaneous compliance",
                temperatureK,
                modes -> 1 / modes.instantaneousPerPa()));
        if (!endsInside()) {
            return markers;
        }
        if (retardation.isLiquid()) {
            markers.add(marker(
                    "zero_shear_viscosity",
                    "Pa·s",
                    "one over the slope of the flow",
                    temperatureK,
                    modes -> 1 / modes.fluidityPerPaS()));
            markers.add(marker(
                    "steady_state_compliance",
                    "1/Pa",
                    "instantaneous compliance and sum of j",
                    temperatureK,
                    RetardationModes::recoverablePerPa));
            markers.add(marker(
                    "mean_relaxation_time",
                    "s",
                    "steady-state compliance times viscosity",
                    temperatureK,
                    modes -> modes.recoverablePerPa() / modes.fluidityPerPaS()));
        } else {
            markers.add(marker(
                    "equilibrium_modulus",
                    "Pa",
                    "one over the instantaneous compliance and sum of j",
                    temperatureK,
                    modes -> 1 / modes.recoverablePerPa()));
        }
        return markers;
    }

    /** What the record is too short for. */
    public List<Reason> notes() {
        return endsInside()
                ? List.of()
                : List.of(SpectrumReason.CREEP_END_NOT_REACHED.with(
                        retardation.timesS()[retardation.count() - 1], longestS));
    }

    private boolean endsInside() {
        return retardation.count() == 0 || retardation.timesS()[retardation.count() - 1] <= LATEST * longestS;
    }

    private Marker marker(
            String property,
            String unit,
            String method,
            double temperatureK,
            ToDoubleFunction<RetardationModes> figure) {
        return new Marker(
                "",
                "",
                property,
                OptionalDouble.of(temperatureK),
                OptionalDouble.empty(),
                figure.applyAsDouble(retardation),
                OptionalDouble.of(u(figure)),
                unit,
                String.format(
                        Locale.ROOT,
                        "%s, %d retardation mode%s fitted to %s, u from the fit",
                        method,
                        retardation.count(),
                        retardation.count() == 1 ? "" : "s",
                        withModuli ? "creep and oscillation together" : "creep"));
    }

    private double u(ToDoubleFunction<RetardationModes> figure) {
        double[] place = fitted.logarithms();
        double[] derivatives = new double[place.length];
        for (int i = 0; i < place.length; i++) {
            derivatives[i] =
                    (figure.applyAsDouble(moved(place, i, STEP)) - figure.applyAsDouble(moved(place, i, -STEP)))
                            / (2 * STEP);
        }
        return scatter * linearised.of(derivatives);
    }

    private RetardationModes moved(double[] place, int parameter, double step) {
        double[] there = place.clone();
        there[parameter] += step;
        return modes(fitted.at(there));
    }
}

package nightlag.stages.spectrum;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.Function;
import java.util.function.ToDoubleFunction;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.SharedErrors;

/** The relaxation modes fitted to readings, the retardation modes that are their exact inverse, and what follows from both. */
public final class DiscreteSpectrum implements FittedSpectrum {
    private final RelaxationModes relaxation;
    private final RetardationModes retardation;
    private final SupportedWindow window;
    private final ModeUncertainty uncertainty;
    private final Optional<ErrorModel> model;
    private final boolean unshownSolid;

    /**
     * What a fit gave.
     *
     * @param shared what several of the readings are off by together
     * @param solid whether an equilibrium modulus was looked for
     * @param model how the errors were taken to grow, where the readings had none of their own
     */
    DiscreteSpectrum(
            WeightedReadings readings,
            SharedErrors shared,
            boolean solid,
            FittedModes modes,
            Optional<ErrorModel> model) {
        relaxation = RelaxationModes.of(modes.equilibrium(), modes.times(), modes.strengths());
        retardation = relaxation.retardation();
        window = SupportedWindow.of(readings.lowestFrequency(), readings.highestFrequency());
        uncertainty = new ModeUncertainty(readings, shared, solid, modes);
        unshownSolid = solid && relaxation.isLiquid();
        this.model = model;
    }

    /** The fitted modes. */
    @Override
    public RelaxationModes relaxation() {
        return relaxation;
    }

    /** Their exact inverse. */
    @Override
    public RetardationModes retardation() {
        return retardation;
    }

    /** The times the data support. */
    @Override
    public SupportedWindow window() {
        return window;
    }

    @Override
    public boolean supportsCreep(double timeS) {
        return window.holds(timeS);
    }

    @Override
    public boolean supportsRelaxation(double timeS) {
        return window.holds(timeS);
    }

    /** How the errors were taken to grow, where the readings had none of their own. */
    Optional<ErrorModel> errorModel() {
        return model;
    }

    /** Standard deviation of the weighted residuals that counts; empty where there is none to be had. */
    OptionalDouble scatter() {
        return uncertainty.scatter();
    }

    /**
     * Standard uncertainty of each of several figures drawn from the modes, by the fit's covariance and by modes that the data do
     * not show; empty where the readings came without u and leave no scatter to take one from.
     */
    @Override
    public Optional<double[]> uncertainties(Function<RelaxationModes, double[]> figures) {
        return uncertainty.ofEach(figures);
    }

    /**
     * The figures that complete the two sets, and those that follow: Ge, G(0), J(0) and, for a liquid, η0 = Σ gτ, Je0 =
     * Σ gτ²/η0² and the mean time Σ gτ²/Σ gτ. With the rows they make s·Ĝ(s) and s·Ĵ(s) exact inverses.
     */
    @Override
    public List<Marker> markers(double temperatureK) {
        List<Marker> markers = new ArrayList<>();
        if (relaxation.isLiquid()) {
            markers.add(marker(
                    "zero_shear_viscosity",
                    "Pa·s",
                    "sum of g τ" + counted() + slowEnd(),
                    temperatureK,
                    RelaxationModes::viscosityPaS));
            markers.add(marker(
                    "steady_state_compliance",
                    "1/Pa",
                    "sum of g τ² over the square of the sum of g τ" + counted() + slowEnd(),
                    temperatureK,
                    RelaxationModes::steadyStateCompliancePerPa));
            markers.add(marker(
                    "mean_relaxation_time",
                    "s",
                    "sum of g τ² over the sum of g τ" + counted() + slowEnd(),
                    temperatureK,
                    RelaxationModes::meanTimeS));
        } else {
            markers.add(marker(
                    "equilibrium_modulus",
                    "Pa",
                    "fitted together with the modes" + counted() + slowEnd(),
                    temperatureK,
                    RelaxationModes::equilibriumPa));
        }
        markers.add(marker(
                "instantaneous_modulus",
                "Pa",
                (relaxation.isLiquid() ? "sum of g" : "equilibrium modulus and sum of g") + counted() + fastEnd(),
                temperatureK,
                RelaxationModes::instantaneousModulusPa));
        markers.add(marker(
                "instantaneous_compliance",
                "1/Pa",
                "one over the instantaneous modulus" + counted() + fastEnd(),
                temperatureK,
                modes -> 1 / modes.instantaneousModulusPa()));
        markers.addAll(RetardationMarkers.of(this, temperatureK, counted()).markers());
        return markers;
    }

    @Override
    public List<Reason> notes() {
        List<Reason> notes = new ArrayList<>();
        if (unshownSolid) {
            notes.add(SpectrumReason.EQUILIBRIUM_MODULUS_ZERO.with());
        }
        // why a figure is left out is the same at any temperature
        notes.addAll(RetardationMarkers.of(this, 0, "").notes());
        return notes;
    }

    private Marker marker(
            String property,
            String unit,
            String method,
            double temperatureK,
            ToDoubleFunction<RelaxationModes> figure) {
        return new Marker(
                "",
                "",
                property,
                OptionalDouble.of(temperatureK),
                OptionalDouble.empty(),
                figure.applyAsDouble(relaxation),
                uncertainty.of(figure),
                unit,
                method);
    }

    private String counted() {
        return String.format(
                Locale.ROOT,
                ", %d relaxation mode%s, %s",
                relaxation.count(),
                relaxation.count() == 1 ? "" : "s",
                model.map(this::sourceOfU).orElse("u from the fit"));
    }

    private String sourceOfU(ErrorModel errors) {
        OptionalDouble scatter = uncertainty.scatter();
        return scatter.isPresent()
                ? "the moduli came without u: u from the scatter about the fit, " + errors.words(scatter.getAsDouble())
                : "the moduli came without u and the fit leaves no scatter to take one from";
    }

    private String slowEnd() {
        double slowest = relaxation.timesS()[relaxation.count() - 1];
        return slowest <= window.longestS()
                ? ""
                : String.format(
                        Locale.ROOT,
                        "; the slowest mode, %.3g s, lies beyond the %.3g s the data support: %s",
                        slowest,
                        window.longestS(),
                        unshownSolid
                                ? "it may be a solid whose equilibrium modulus they do not reach"
                                : "slower ones may be missing");
    }

    private String fastEnd() {
        double fastest = relaxation.timesS()[0];
        return fastest >= window.shortestS()
                ? ""
                : String.format(
                        Locale.ROOT,
                        "; the fastest mode, %.3g s, lies before the %.3g s the data support: faster ones may be missing",
                        fastest,
                        window.shortestS());
    }
}

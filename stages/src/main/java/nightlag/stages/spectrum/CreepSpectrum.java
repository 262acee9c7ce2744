package nightlag.stages.spectrum;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalInt;
import java.util.function.Function;
import java.util.function.ToDoubleFunction;
import java.util.stream.Stream;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.Findings;
import nightlag.stages.moduli.Marker;
import nightlag.stages.numeric.LinearisedUncertainty;

/**
 * The retardation modes fitted to creep curves, or to these and moduli together, the relaxation modes that are their exact
 * inverse, and what follows.
 */
public final class CreepSpectrum implements FittedSpectrum {
    private static final double STEP = 1e-5;
    /** A slowest mode beyond this share of the longest time cannot be told from flow, or from what comes later. */
    private static final double LATEST = 0.5;

    /** How far beyond the first or last time an unseen mode sits. */
    private static final double REACH = Math.pow(10, 1.5);
    /** The same of one that would be taken for flow: further out it is flow. */
    private static final double BESIDE_FLOW = 2;

    /** A shift this many of its uncertainties off is said. */
    private static final double SHIFT_OFF = 3;

    private final CreepData data;
    private final ComplianceReadings readings;
    private final FittedCompliance fitted;
    private final RetardationModes retardation;
    private final RelaxationModes relaxation;
    private final LinearisedUncertainty linearised;
    private final double scatter;
    private final Optional<RetardationModes> unseenFast;
    private final Optional<RetardationModes> unseenSlow;
    private final OptionalInt wanted;

    /**
     * What a fit gave.
     *
     * @param wanted the number of relaxation modes asked for
     */
    CreepSpectrum(CreepData data, CreepRows rows, FittedCompliance fitted, OptionalInt wanted) {
        this.data = data;
        this.readings = rows.at(fitted.moves());
        this.fitted = fitted;
        this.wanted = wanted;
        retardation = modes(fitted);
        relaxation = retardation.relaxation();
        linearised = rows.linearised(fitted);
        int free = rows.count() - fitted.parameters();
        scatter = free > 0 ? Math.max(1, Math.sqrt(fitted.chiSquared() / free)) : 1;
        double allowed = fitted.chiSquared() + scatter * scatter;
        unseenFast = beginsInside()
                ? Optional.empty()
                : Optional.of(modes(rows.withUnseenFast(
                        fitted, readings.shortestS() / REACH, CreepFit.FASTEST * readings.shortestS(), allowed)));
        unseenSlow = slowestStandsApart()
                ? Optional.empty()
                : Optional.of(modes(rows.withUnseen(
                        fitted, (fitted.fluidity() > 0 ? BESIDE_FLOW : REACH) * readings.longestS(), allowed)));
    }

    /** Where no J0 is seen the fastest mode takes its place: nothing read tells the two apart. */
    static RetardationModes modes(FittedCompliance fitted) {
        if (fitted.instantaneous() > 0) {
            return RetardationModes.of(fitted.instantaneous(), fitted.fluidity(), fitted.times(), fitted.strengths());
        }
        int fastest = 0;
        while (!(fitted.strengths()[fastest] > 0)) {
            fastest++;
        }
        return RetardationModes.of(
                fitted.strengths()[fastest],
                fitted.fluidity(),
                Arrays.copyOfRange(fitted.times(), fastest + 1, fitted.count()),
                Arrays.copyOfRange(fitted.strengths(), fastest + 1, fitted.count()));
    }

    /** The fitted modes. */
    @Override
    public RetardationModes retardation() {
        return retardation;
    }

    /** Their exact inverse. */
    @Override
    public RelaxationModes relaxation() {
        return relaxation;
    }

    @Override
    public SupportedWindow window() {
        return new SupportedWindow(
                readings.windows().stream()
                        .mapToDouble(SupportedWindow::shortestS)
                        .min()
                        .orElseThrow(),
                readings.windows().stream()
                        .mapToDouble(SupportedWindow::longestS)
                        .max()
                        .orElseThrow());
    }

    @Override
    public boolean supportsCreep(double timeS) {
        return readings.windows().stream().anyMatch(window -> window.holds(timeS));
    }

    @Override
    public boolean supportsRelaxation(double timeS) {
        return readings.windowsOfRelaxation().stream().anyMatch(window -> window.holds(timeS));
    }

    /** The readings it was fitted to, brought to its temperature as the fit found best. */
    ComplianceReadings readings() {
        return readings;
    }

    @Override
    public Optional<double[]> uncertainties(Function<RelaxationModes, double[]> figures) {
        double[] values = figures.apply(relaxation);
        double[][] derivatives = derivatives(values.length, modes -> figures.apply(modes.relaxation()));
        List<double[]> others = Stream.of(unseenFast, unseenSlow)
                .flatMap(Optional::stream)
                .map(other -> figures.apply(other.relaxation()))
                .toList();
        double[] u = new double[values.length];
        for (int k = 0; k < u.length; k++) {
            double square = Math.pow(scatter * linearised.of(derivatives[k]), 2);
            for (double[] other : others) {
                square += Math.pow(other[k] - values[k], 2);
            }
            u[k] = Math.sqrt(square);
        }
        return Optional.of(u);
    }

    /** The figures that complete the sets: J0 and G(0); of a liquid η0, Je0 and the mean time; of a solid Ge. */
    @Override
    public List<Marker> markers(double temperatureK) {
        List<Marker> markers = new ArrayList<>();
        markers.add(marker(
                "instantaneous_compliance",
                "1/Pa",
                "fitted together with the modes" + fastEnd(),
                temperatureK,
                RetardationModes::instantaneousPerPa,
                unseenFast));
        markers.add(marker(
                "instantaneous_modulus",
                "Pa",
                "one over the instantaneous compliance" + fastEnd(),
                temperatureK,
                modes -> 1 / modes.instantaneousPerPa(),
                unseenFast));
        if (!endsInside()) {
            return markers;
        }
        if (retardation.isLiquid()) {
            markers.add(marker(
                    "zero_shear_viscosity",
                    "Pa·s",
                    "one over the slope of the flow" + slowEnd(),
                    temperatureK,
                    modes -> 1 / modes.fluidityPerPaS(),
                    unseenSlow));
            markers.add(marker(
                    "steady_state_compliance",
                    "1/Pa",
                    "instantaneous compliance and sum of j" + slowEnd(),
                    temperatureK,
                    RetardationModes::recoverablePerPa,
                    unseenSlow));
            markers.add(marker(
                    "mean_relaxation_time",
                    "s",
                    "steady-state compliance times viscosity" + slowEnd(),
                    temperatureK,
                    modes -> modes.recoverablePerPa() / modes.fluidityPerPaS(),
                    unseenSlow));
        } else {
            markers.add(marker(
                    "equilibrium_modulus",
                    "Pa",
                    "one over the instantaneous compliance and sum of j" + slowEnd(),
                    temperatureK,
                    modes -> 1 / modes.recoverablePerPa(),
                    unseenSlow));
        }
        markers.addAll(ofRetardation(temperatureK).markers());
        return markers;
    }

    private Findings ofRetardation(double temperatureK) {
        return RetardationMarkers.of(this, temperatureK, fittedTo());
    }

    /** What the record is too short for, and what does not go with what was expected. */
    @Override
    public List<Reason> notes() {
        List<Reason> notes = new ArrayList<>();
        if (!endsInside()) {
            notes.add(SpectrumReason.CREEP_END_NOT_REACHED.with(
                    retardation.timesS()[retardation.count() - 1], readings.longestS()));
        } else {
            // why a figure is left out is the same at any temperature
            notes.addAll(ofRetardation(0).notes());
        }
        if (wanted.isPresent() && wanted.getAsInt() != relaxation.count()) {
            notes.add(SpectrumReason.CREEP_OTHER_NUMBER_OF_MODES.with(wanted.getAsInt(), relaxation.count()));
        }
        data.furthestOff(fitted.moves())
                .filter(off -> Math.abs(off.decades()) > SHIFT_OFF * off.u())
                .ifPresent(off -> notes.add(SpectrumReason.CREEP_SHIFT_OFF.with(off.decades(), off.u())));
        return notes;
    }

    /** Whether the readings begin before the fastest mode, so that what yields at once stands apart from it. */
    private boolean beginsInside() {
        return relaxation.count() == 0 || relaxation.timesS()[0] >= firstSeen();
    }

    /** By a mode's own breadth after the first time; see {@link SupportedWindow}. */
    private double firstSeen() {
        return SupportedWindow.of(1, 1 / readings.shortestS()).shortestS();
    }

    /** Whether the slowest mode is over by the end, so that what may come after it is no part of it. */
    private boolean slowestStandsApart() {
        return retardation.count() == 0 || retardation.timesS()[retardation.count() - 1] <= lastSeen();
    }

    /** By a mode's own breadth before the last time; see {@link SupportedWindow}. */
    private double lastSeen() {
        return SupportedWindow.of(1 / readings.longestS(), 1).longestS();
    }

    private String slowEnd() {
        return slowestStandsApart()
                ? ""
                : String.format(
                        Locale.ROOT,
                        "; the slowest mode, %.3g s, lies beyond the %.3g s the data support: u holds what could hide there",
                        retardation.timesS()[retardation.count() - 1],
                        lastSeen());
    }

    private boolean endsInside() {
        return retardation.count() == 0
                || retardation.timesS()[retardation.count() - 1] <= LATEST * readings.longestS();
    }

    private Marker marker(
            String property,
            String unit,
            String method,
            double temperatureK,
            ToDoubleFunction<RetardationModes> figure,
            Optional<RetardationModes> unseen) {
        double value = figure.applyAsDouble(retardation);
        double hidden = unseen.map(figure::applyAsDouble).orElse(value) - value;
        return new Marker(
                "",
                "",
                property,
                OptionalDouble.of(temperatureK),
                OptionalDouble.empty(),
                value,
                OptionalDouble.of(Math.hypot(u(figure), hidden)),
                unit,
                method + fittedTo());
    }

    private String fittedTo() {
        return String.format(
                Locale.ROOT,
                ", %d retardation mode%s fitted to %s, u from the fit",
                retardation.count(),
                retardation.count() == 1 ? "" : "s",
                data.words());
    }

    private String fastEnd() {
        String counted = String.format(Locale.ROOT, ", what yields before %.3g s counted in", readings.shortestS());
        return beginsInside()
                ? counted
                : String.format(
                        Locale.ROOT,
                        "%s; the fastest mode, %.3g s, lies before the %.3g s the data support: u holds what could hide there",
                        counted,
                        relaxation.timesS()[0],
                        firstSeen());
    }

    private double u(ToDoubleFunction<RetardationModes> figure) {
        return scatter * linearised.of(derivatives(1, modes -> new double[] {figure.applyAsDouble(modes)})[0]);
    }

    /** Of figures by all that was fitted; a shift is in none of them. */
    private double[][] derivatives(int count, Function<RetardationModes, double[]> figures) {
        double[][] derivatives = new double[count][fitted.parameters()];
        for (int i = 0; i < fitted.ofSpectrum(); i++) {
            double[] above = figures.apply(moved(i, STEP));
            double[] below = figures.apply(moved(i, -STEP));
            for (int k = 0; k < count; k++) {
                derivatives[k][i] = (above[k] - below[k]) / (2 * STEP);
            }
        }
        return derivatives;
    }

    private RetardationModes moved(int parameter, double step) {
        double[] there = fitted.place();
        there[parameter] += step;
        return modes(fitted.at(there));
    }
}

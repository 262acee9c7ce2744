package nightlag.stages.sweep;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.DoubleStream;
import nightlag.stages.fault.Reason;
import nightlag.stages.fault.ReasonCode;
import nightlag.stages.moduli.Figure;
import nightlag.stages.moduli.Findings;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.sweep.FigureCurve.Place;
import nightlag.stages.sweep.FigureMarkerPlan.Along;
import nightlag.stages.sweep.FigureMarkerPlan.Scale;

/**
 * Where a figure of the grade's own reaches a value, by interpolation between the two measured places on either side, and
 * never beyond them. Every such step of every curve gives a marker of its own, but for neighbouring ones between which the
 * figure stays as near the value as its noise may take it: these are one. u is that of the points on either side; where they
 * bring none, the scatter of the neighbouring ones about local parabolas takes its place, and of too few there is none. What
 * of it holds the method says.
 */
public final class FigureMarkers {
    private static final double KELVIN_AT_ZERO_CELSIUS = 273.15;

    /** Farther from the value than so many u a figure is not by noise. */
    private static final double NOISE = 3;

    private final FigureMarkerPlan plan;
    private final FigureCurve curve;
    private final List<Marker> markers = new ArrayList<>();
    private final List<Reason> notes = new ArrayList<>();
    private final List<Marker> together = new ArrayList<>();
    private boolean reached;

    private FigureMarkers(FigureMarkerPlan plan, FigureCurve curve) {
        this.plan = plan;
        this.curve = curve;
    }

    /**
     * Looks along every curve of the points.
     *
     * @param points usable points, without those of amplitude sweeps
     */
    public static Findings find(List<ModulusPoint> points, FigureMarkerPlan plan) {
        List<FigureCurve> curves = FigureCurve.of(points, plan);
        if (curves.isEmpty()) {
            return Findings.absent(FigureReason.FIGURE_MARKER_NO_CURVE.with(
                    plan.name(),
                    plan.figure().name(),
                    plan.along().name().toLowerCase(Locale.ROOT),
                    where(plan.temperatureK(), plan.frequencyHz())));
        }
        Map<SweepName, List<FigureMarkers>> sweeps = new LinkedHashMap<>();
        for (FigureCurve curve : curves) {
            FigureMarkers looked = new FigureMarkers(plan, curve);
            looked.look();
            sweeps.computeIfAbsent(curve.name(), name -> new ArrayList<>()).add(looked);
        }
        return Findings.together(
                sweeps.values().stream().map(FigureMarkers::ofOneSweep).toList());
    }

    /** One line for all curves of a sweep on which the value is not reached. */
    private static Findings ofOneSweep(List<FigureMarkers> curves) {
        List<FigureMarkers> without =
                curves.stream().filter(looked -> !looked.reached).toList();
        List<Reason> notes = new ArrayList<>();
        if (without.size() == 1) {
            notes.add(without.get(0).notReached());
        } else if (without.size() > 1) {
            FigureMarkers first = without.get(0);
            notes.add(FigureReason.FIGURE_MARKER_NOT_REACHED_ON.with(
                    first.plan.name(),
                    first.curve.name().specimen(),
                    first.curve.name().sweep(),
                    without.size(),
                    curves.size(),
                    first.plan.figure().name(),
                    first.plan.reaches(),
                    first.plan.figure().unit()));
        }
        List<Marker> markers = new ArrayList<>();
        curves.forEach(looked -> {
            markers.addAll(looked.markers);
            notes.addAll(looked.notes);
        });
        return new Findings(markers, notes);
    }

    private void look() {
        List<Place> places = curve.places();
        for (int i = 0; i + 1 < places.size(); i++) {
            double before = places.get(i).mean() - plan.reaches();
            double after = places.get(i + 1).mean() - plan.reaches();
            boolean endsThere = i + 2 == places.size() && after == 0;
            if (before == 0 || Math.signum(before) * Math.signum(after) < 0 || endsThere) {
                reached = true;
                step(places.get(i), places.get(i + 1));
            }
            if (leaves(places.get(i + 1))) {
                close();
            }
        }
        close();
    }

    /** Crossings so far are apart from those that follow. */
    private void close() {
        if (together.stream().allMatch(marker -> marker.u().isPresent()) && !together.isEmpty()) {
            markers.add(NoisyCrossings.merged(together, plan));
        } else {
            markers.addAll(together);
        }
        together.clear();
    }

    /** Whether the figure is away from the value by more than noise; without a u, whether it is away at all. */
    private boolean leaves(Place place) {
        Weighed mean = new Weighed(place, 1, false, 0, false);
        OptionalDouble variance = ownVariance(mean);
        double u = variance.isPresent()
                ? Math.sqrt(variance.getAsDouble())
                : scatter(mean).orElse(0);
        return Math.abs(place.mean() - plan.reaches()) > NOISE * u;
    }

    private Reason notReached() {
        double[] values =
                curve.places().stream().mapToDouble(Place::mean).sorted().toArray();
        return FigureReason.FIGURE_MARKER_NOT_REACHED.with(
                plan.name(),
                curve.name().specimen(),
                curve.name().sweep(),
                where(curve),
                plan.figure().name(),
                values[0],
                values[values.length - 1],
                plan.figure().unit(),
                plan.reaches());
    }

    private void step(Place from, Place to) {
        boolean log = plan.scale() == Scale.LOG;
        if (log && Math.min(from.mean(), to.mean()) <= 0) {
            absent(FigureReason.FIGURE_MARKER_NO_LOGARITHM, plan.figure());
            return;
        }
        double rise = scaled(to.mean(), log) - scaled(from.mean(), log);
        double part = rise == 0 ? 0 : (scaled(plan.reaches(), log) - scaled(from.mean(), log)) / rise;
        boolean logPlace = plan.along() == Along.FREQUENCY;
        double run = scaled(to.at(), logPlace) - scaled(from.at(), logPlace);
        double place = unscaled(scaled(from.at(), logPlace) + part * run, logPlace);
        if (plan.report().isEmpty()) {
            Uncertainty u = uncertainty(
                    new Weighed(from, -(1 - part) * run / rise, log, 0, false),
                    new Weighed(to, -part * run / rise, log, 0, false));
            add(place, place, u.times(logPlace ? place : 1), from, to);
            return;
        }
        Figure report = plan.report().get();
        OptionalDouble first = from.mean(report);
        OptionalDouble second = to.mean(report);
        if (first.isEmpty() || second.isEmpty()) {
            absent(FigureReason.FIGURE_MARKER_NOT_REPORTED, report);
            return;
        }
        boolean logReport = Math.min(first.getAsDouble(), second.getAsDouble()) > 0;
        double gain = scaled(second.getAsDouble(), logReport) - scaled(first.getAsDouble(), logReport);
        double value = unscaled(scaled(first.getAsDouble(), logReport) + part * gain, logReport);
        Uncertainty u = uncertainty(
                new Weighed(from, -(1 - part) * gain / rise, log, 1 - part, logReport),
                new Weighed(to, -part * gain / rise, log, part, logReport));
        double offset = report.unit().equals("°C") ? KELVIN_AT_ZERO_CELSIUS : 0;
        add(place, value + offset, u.times(logReport ? value : 1), from, to);
    }

    private void add(double place, double value, Uncertainty u, Place from, Place to) {
        boolean overFrequency = plan.along() == Along.FREQUENCY;
        together.add(new Marker(
                curve.name().specimen(),
                curve.name().sweep(),
                plan.name(),
                overFrequency ? curve.temperatureK() : OptionalDouble.of(place),
                overFrequency ? OptionalDouble.of(place) : curve.frequencyHz(),
                value,
                u.value(),
                plan.unit(),
                method(from, to) + curve.leg().map(leg -> "; " + leg.words()).orElse("") + u.source()));
    }

    private String method(Place from, Place to) {
        boolean overFrequency = plan.along() == Along.FREQUENCY;
        double offset = overFrequency ? 0 : KELVIN_AT_ZERO_CELSIUS;
        String report = plan.report()
                .map(figure -> figure.name()
                        + (Math.min(from.mean(figure).orElse(0), to.mean(figure).orElse(0)) > 0
                                ? " (log)"
                                : " (linear)")
                        + " where ")
                .orElse("");
        return report
                + plan.figure().name()
                + (to.mean() < from.mean() ? " falls to " : " rises to ")
                + ReasonCode.shortest(plan.reaches())
                + (plan.figure().unit().equals("1") ? "" : " " + plan.figure().unit())
                + (plan.scale() == Scale.LOG ? ", log over " : ", linear over ")
                + (overFrequency ? "log frequency" : "temperature")
                + ", between "
                + ReasonCode.shortest(from.at() - offset)
                + " and "
                + ReasonCode.shortest(to.at() - offset)
                + (overFrequency ? " Hz" : " °C");
    }

    private void absent(FigureReason why, Figure figure) {
        notes.add(why.with(plan.name(), curve.name().specimen(), curve.name().sweep(), where(curve), figure.name()));
    }

    private static String where(FigureCurve curve) {
        return where(curve.temperatureK(), curve.frequencyHz())
                + curve.leg().map(leg -> " (" + leg.words() + ")").orElse("");
    }

    private static String where(OptionalDouble temperatureK, OptionalDouble frequencyHz) {
        return (temperatureK.isPresent()
                        ? " at " + ReasonCode.shortest(temperatureK.getAsDouble() - KELVIN_AT_ZERO_CELSIUS) + " °C"
                        : "")
                + (frequencyHz.isPresent() ? " at " + ReasonCode.shortest(frequencyHz.getAsDouble()) + " Hz" : "");
    }

    private static double scaled(double value, boolean log) {
        return log ? Math.log(value) : value;
    }

    private static double unscaled(double value, boolean log) {
        return log ? Math.exp(value) : value;
    }

    /**
     * A standard uncertainty.
     *
     * @param value itself, where there is one
     * @param source what the method says of it: nothing where it is the points' own
     */
    private record Uncertainty(OptionalDouble value, String source) {
        Uncertainty times(double factor) {
            return value.isPresent()
                    ? new Uncertainty(OptionalDouble.of(value.getAsDouble() * Math.abs(factor)), source)
                    : this;
        }
    }

    /**
     * A place and how much the result moves with its figure and with the one reported there, both as they are scaled.
     */
    private record Weighed(Place place, double byFigure, boolean log, double byReport, boolean logReport) {}

    /** The errors at two places are independent of one another. */
    private Uncertainty uncertainty(Weighed from, Weighed to) {
        OptionalDouble first = ownVariance(from);
        OptionalDouble second = ownVariance(to);
        if (first.isPresent() && second.isPresent()) {
            double variance = first.getAsDouble() + second.getAsDouble();
            return new Uncertainty(variance > 0 ? OptionalDouble.of(Math.sqrt(variance)) : OptionalDouble.empty(), "");
        }
        OptionalDouble before = scatter(from);
        OptionalDouble after = scatter(to);
        return before.isPresent() && after.isPresent()
                ? new Uncertainty(
                        OptionalDouble.of(Math.hypot(before.getAsDouble(), after.getAsDouble())),
                        "; u from the scatter about neighbouring points")
                : new Uncertainty(
                        OptionalDouble.empty(),
                        "; no u, for the points bring none and are too few to tell their scatter");
    }

    /**
     * From the u of a place's points. Their errors are independent of one another; both figures of one point hang on the same
     * modulus. Empty where a point brings none.
     */
    private OptionalDouble ownVariance(Weighed weighed) {
        Place place = weighed.place();
        double variance = 0;
        double perValue = weighed.byFigure() / place.points().size() / (weighed.log() ? place.mean() : 1);
        double perReport = weighed.byReport()
                / place.points().size()
                / (weighed.logReport() ? place.mean(plan.report().orElseThrow()).orElseThrow() : 1);
        for (int i = 0; i < place.points().size(); i++) {
            ModulusPoint point = place.points().get(i);
            Optional<Figure.Value> reported =
                    perReport == 0 ? Optional.empty() : plan.report().flatMap(report -> report.at(point));
            Figure.Value moved = sum(place.values().get(i), perValue, reported, perReport);
            boolean fixed = DoubleStream.of(moved.byStorage(), moved.byLoss(), moved.byThird())
                    .allMatch(derivative -> derivative == 0);
            OptionalDouble own = fixed ? OptionalDouble.of(0) : moved.variance(point);
            if (own.isEmpty() || !Double.isFinite(own.getAsDouble())) {
                return OptionalDouble.empty();
            }
            variance += own.getAsDouble();
        }
        return OptionalDouble.of(variance);
    }

    /** By how much the result moves with the scatter of a place's figures about those of its neighbours. */
    private OptionalDouble scatter(Weighed weighed) {
        boolean logPlace = plan.along() == Along.FREQUENCY;
        List<double[]> known = new ArrayList<>();
        for (Place place : curve.places()) {
            double moved = weighed.byFigure() * scaled(place.mean(), weighed.log());
            if (weighed.byReport() != 0) {
                OptionalDouble reported = place.mean(plan.report().orElseThrow());
                moved += weighed.byReport() * scaled(reported.orElse(Double.NaN), weighed.logReport());
            }
            if (Double.isFinite(moved)) {
                known.add(new double[] {scaled(place.at(), logPlace), moved});
            }
        }
        return NeighbourScatter.at(
                known.stream().mapToDouble(one -> one[0]).toArray(),
                known.stream().mapToDouble(one -> one[1]).toArray(),
                scaled(weighed.place().at(), logPlace));
    }

    private static Figure.Value sum(
            Figure.Value figure, double perFigure, Optional<Figure.Value> report, double perReport) {
        Figure.Value other = report.orElse(new Figure.Value(0, 0, 0, 0));
        return new Figure.Value(
                0,
                perFigure * figure.byStorage() + perReport * other.byStorage(),
                perFigure * figure.byLoss() + perReport * other.byLoss(),
                perFigure * figure.byThird() + perReport * other.byThird());
    }
}

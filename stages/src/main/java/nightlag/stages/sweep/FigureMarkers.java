package nightlag.stages.sweep;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.IntStream;
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
 * Where a figure of the grade's own reaches a value: between two measured places, on a smooth curve through the places about them,
 * and never beyond the data. Every such passage of every curve gives a marker of its own, but for neighbouring ones between which
 * the figure stays as near the value as its noise may take it: these are one. u is that of the points and of what the curve may
 * do between them; where points bring none, the scatter about neighbouring ones takes its place, and of too few there is none. What of
 * it holds the method says.
 */
public final class FigureMarkers {
    private static final double KELVIN_AT_ZERO_CELSIUS = DrawnFigure.KELVIN_AT_ZERO_CELSIUS;

    /** Farther from the value than so many u a figure is not by noise. */
    private static final double NOISE = 3;

    private final FigureMarkerPlan plan;
    private final FigureCurve curve;
    private final List<Marker> markers = new ArrayList<>();
    private final List<Reason> notes = new ArrayList<>();
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

    /**
     * Steps across the value that noise alone can make.
     *
     * @param steps the places from which they are taken to the next
     * @param first the last place before them that noise alone does not bring near the value, or the first of all
     * @param last the first one after them, or the last of all
     */
    private record Passage(List<Integer> steps, int first, int last) {
        Passage with(Passage next) {
            List<Integer> all = new ArrayList<>(steps);
            all.addAll(next.steps());
            return new Passage(all, first, next.last());
        }
    }

    private void look() {
        List<Passage> passages = new ArrayList<>();
        for (Passage next : passages()) {
            int before = passages.size() - 1;
            if (before >= 0 && !apart(passages.get(before), next)) {
                passages.set(before, passages.get(before).with(next));
            } else {
                passages.add(next);
            }
        }
        reached = !passages.isEmpty();
        passages.forEach(this::read);
    }

    private List<Passage> passages() {
        List<Place> places = curve.places();
        List<Passage> passages = new ArrayList<>();
        List<Integer> steps = new ArrayList<>();
        int left = 0;
        for (int i = 0; i + 1 < places.size(); i++) {
            if (isLeft(places.get(i))) {
                left = i;
            }
            double before = places.get(i).mean() - plan.reaches();
            double after = places.get(i + 1).mean() - plan.reaches();
            boolean endsThere = i + 2 == places.size() && after == 0;
            if (before == 0 || Math.signum(before) * Math.signum(after) < 0 || endsThere) {
                steps.add(i);
            }
            if (!steps.isEmpty() && (isLeft(places.get(i + 1)) || i + 2 == places.size())) {
                passages.add(new Passage(List.copyOf(steps), left, i + 1));
                steps.clear();
            }
        }
        return passages;
    }

    /** Whether the figure is away from the value by more than noise; where nothing tells of noise, whether it is away at all. */
    private boolean isLeft(Place place) {
        // not its logarithm, which it need not have
        double variance = FigureNoise.of(new DrawnFigure(plan.raw()), false, curve.places(), List.of(place))
                .variance(place, 1, 0)
                .orElse(0);
        return Math.abs(place.mean() - plan.reaches()) > NOISE * Math.sqrt(variance);
    }

    /**
     * Whether a smooth curve leaves the value between them as well: among many places some are far away by chance. Without u
     * nobody knows.
     */
    private boolean apart(Passage one, Passage next) {
        List<Place> places = curve.places();
        Optional<LocalFigure> local = LocalFigure.of(
                places, plan, one.first(), next.last(), next.steps().get(0));
        return local.isEmpty()
                || IntStream.rangeClosed(one.last(), next.first())
                        .anyMatch(i -> local.get().standsOut(places.get(i).at()));
    }

    private void read(Passage passage) {
        List<Integer> steps =
                passage.steps().stream().filter(this::canBeReadOff).toList();
        if (steps.size() % 2 == 1) {
            markers.add(crossing(steps, passage.first(), passage.last()));
            return;
        }
        if (!steps.isEmpty() && isNoise(passage, steps.get(0))) {
            byNoise(steps.get(0));
            return;
        }
        List<Marker> each =
                steps.stream().map(i -> marker(i, i, line(i).reached())).toList();
        if (!each.isEmpty() && each.stream().allMatch(marker -> marker.u().isPresent())) {
            markers.add(NoisyCrossings.merged(each, plan));
        } else {
            markers.addAll(each);
        }
    }

    /** Whether a smooth curve stays on one side where the points go there and back again. */
    private boolean isNoise(Passage passage, int step) {
        DrawnFigure drawn = new DrawnFigure(plan);
        return LocalFigure.of(curve.places(), plan, passage.first(), passage.last(), step)
                .filter(local -> local.staysAway(
                        drawn.place(curve.places().get(passage.first()).at()),
                        drawn.place(curve.places().get(passage.last()).at())))
                .isPresent();
    }

    private void byNoise(int step) {
        boolean overFrequency = plan.along() == Along.FREQUENCY;
        double place = curve.places().get(step).at();
        notes.add(FigureReason.FIGURE_MARKER_BY_NOISE.with(
                plan.name(),
                curve.name().specimen(),
                curve.name().sweep(),
                where(curve),
                plan.figure().name(),
                plan.reaches(),
                plan.figure().unit(),
                overFrequency ? place : place - KELVIN_AT_ZERO_CELSIUS,
                overFrequency ? "Hz" : "°C"));
    }

    private Marker crossing(List<Integer> steps, int first, int last) {
        List<Place> places = curve.places();
        int middle = steps.get(steps.size() / 2);
        StraightLine line = line(middle);
        DrawnFigure drawn = new DrawnFigure(plan);
        Reached at = LocalFigure.of(places, plan, first, last, middle)
                .map(local -> local.reached(
                        line,
                        drawn.place(places.get(first).at()),
                        drawn.place(places.get(last).at())))
                .orElseGet(line::reached);
        int from = middle;
        while (from > first && places.get(from).at() > at.place()) {
            from--;
        }
        while (from + 1 < last && places.get(from + 1).at() < at.place()) {
            from++;
        }
        Marker marker = marker(middle, from, at);
        return steps.size() == 1
                ? marker
                : marker.withMethod(marker.method()
                        + NoisyCrossings.told(
                                steps.size(),
                                places.get(steps.get(0)).at(),
                                places.get(steps.get(steps.size() - 1) + 1).at(),
                                plan));
    }

    private StraightLine line(int from) {
        return new StraightLine(plan, curve.places(), from);
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

    /** Whether both ends of a step have what a marker is read off. */
    private boolean canBeReadOff(int step) {
        Place from = curve.places().get(step);
        Place to = curve.places().get(step + 1);
        if (plan.scale() == Scale.LOG && Math.min(from.mean(), to.mean()) <= 0) {
            absent(FigureReason.FIGURE_MARKER_NO_LOGARITHM, plan.figure());
            return false;
        }
        Optional<Figure> missing = plan.report()
                .filter(report -> from.mean(report).isEmpty() || to.mean(report).isEmpty());
        missing.ifPresent(report -> absent(FigureReason.FIGURE_MARKER_NOT_REPORTED, report));
        return missing.isEmpty();
    }

    /** What was reached between two places, in the direction of a step. */
    private Marker marker(int step, int from, Reached at) {
        boolean overFrequency = plan.along() == Along.FREQUENCY;
        return new Marker(
                curve.name().specimen(),
                curve.name().sweep(),
                plan.name(),
                overFrequency ? curve.temperatureK() : OptionalDouble.of(at.place()),
                overFrequency ? OptionalDouble.of(at.place()) : curve.frequencyHz(),
                at.value(),
                at.u(),
                plan.unit(),
                method(step, from, at.how())
                        + curve.leg().map(leg -> "; " + leg.words()).orElse("")
                        + at.source().words());
    }

    private String method(int step, int at, String how) {
        boolean overFrequency = plan.along() == Along.FREQUENCY;
        double offset = overFrequency ? 0 : KELVIN_AT_ZERO_CELSIUS;
        Place before = curve.places().get(step);
        Place after = curve.places().get(step + 1);
        String report = plan.report()
                .map(figure -> figure.name()
                        + (Math.min(
                                                before.mean(figure).orElse(0),
                                                after.mean(figure).orElse(0))
                                        > 0
                                ? " (log)"
                                : " (linear)")
                        + " where ")
                .orElse("");
        return report
                + plan.figure().name()
                + (after.mean() < before.mean() ? " falls to " : " rises to ")
                + ReasonCode.shortest(plan.reaches())
                + (plan.figure().unit().equals("1") ? "" : " " + plan.figure().unit())
                + (plan.scale() == Scale.LOG ? ", log over " : ", linear over ")
                + (overFrequency ? "log frequency" : "temperature")
                + " "
                + how
                + ", between "
                + ReasonCode.shortest(curve.places().get(at).at() - offset)
                + " and "
                + ReasonCode.shortest(curve.places().get(at + 1).at() - offset)
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
}

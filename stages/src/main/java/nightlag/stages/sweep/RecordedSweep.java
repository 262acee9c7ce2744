package nightlag.stages.sweep;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.ToDoubleFunction;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.ModulusPoint;

/**
 * Sorts what was recorded as one sweep, less its amplitude sweeps, by what varies. Where both temperature and frequency do,
 * each isotherm is a frequency sweep; where the temperature never rests, or the isotherms hold too few frequencies, each
 * frequency is a temperature sweep, and heating and cooling are two.
 */
final class RecordedSweep {
    /** Fewer of what varies are no sweep where nobody says so. */
    private static final int LEAST = 3;
    /** Nor fewer where it was asked for. */
    private static final int LEAST_IF_ASKED = 2;

    private final SweepName name;
    private final List<ModulusPoint> points;
    private final List<List<ModulusPoint>> frequencies;
    private final List<List<ModulusPoint>> temperatures;
    private final boolean ramps;
    private final List<Sweep> sweeps = new ArrayList<>();
    private final List<Reason> notes = new ArrayList<>();

    private RecordedSweep(List<ModulusPoint> points) {
        this.name = SweepName.of(points.get(0));
        this.points = points;
        this.frequencies = PointGroups.byFrequency(points);
        this.temperatures = PointGroups.byUnbrokenTemperature(points);
        this.ramps = PointGroups.ramps(points);
    }

    /**
     * What it became.
     *
     * @param sweeps each with one thing that varies
     * @param notes what else might have been meant
     * @param left how many points are part of no sweep, where there are any
     */
    record Sorted(List<Sweep> sweeps, List<Reason> notes, Optional<Reason> left) {}

    /**
     * Sorts the points.
     *
     * @param points usable points of one specimen, sweep and deformation, none of them of an amplitude sweep
     * @param kind what varies, as configured
     */
    static Sorted sorted(List<ModulusPoint> points, SweepPlan.Kind kind) {
        RecordedSweep recorded = new RecordedSweep(points);
        switch (kind) {
            case AUTO -> recorded.findKind();
            case FREQUENCY -> recorded.frequencySweeps(LEAST_IF_ASKED);
            case TEMPERATURE -> recorded.temperatureSweeps(LEAST_IF_ASKED);
            case TIME -> recorded.timeSweeps(recorded.temperatures);
            case AMPLITUDE -> {}
        }
        int left = points.size()
                - recorded.sweeps.stream()
                        .mapToInt(sweep -> sweep.points().size())
                        .sum();
        Optional<Reason> said = left == 0
                ? Optional.empty()
                : Optional.of(SweepReason.SWEEP_POINTS_IN_NONE.with(
                        recorded.name.specimen(), recorded.name.sweep(), left, recorded.lacking(kind)));
        return new Sorted(List.copyOf(recorded.sweeps), List.copyOf(recorded.notes), said);
    }

    private String lacking(SweepPlan.Kind kind) {
        if (kind == SweepPlan.Kind.TIME && !elapsedKnown(points)) {
            return "time sweep, because the tag elapsed is missing";
        }
        if (kind == SweepPlan.Kind.AUTO) {
            return sweeps.isEmpty() ? "sweep, for nothing varies among them or too much" : "sweep";
        }
        return kind.word() + " sweep, the kind that is asked for";
    }

    private void findKind() {
        if (frequencies.size() == 1) {
            if (!ramps && temperatures.stream().allMatch(this::goesOnAtOneTemperature)) {
                timeSweeps(temperatures);
                ambiguousIf(temperatureVaries(), "temperature and time", "a time sweep at each temperature");
            } else {
                temperatureSweeps(LEAST_IF_ASKED);
            }
        } else if (ramps || !isothermal()) {
            temperatureSweeps(LEAST);
            if (sweeps.isEmpty()) {
                frequencySweeps(LEAST_IF_ASKED);
                ambiguousIf(temperatureVaries(), "frequency and temperature", "a frequency sweep at each temperature");
            } else {
                ambiguousIf(true, "frequency and temperature", "a temperature sweep at each frequency");
            }
        } else {
            int least = temperatures.size() == 1 ? LEAST_IF_ASKED : LEAST;
            for (List<ModulusPoint> isotherm : PointGroups.byIsotherm(points)) {
                if (recurs(isotherm)) {
                    timeSweeps(List.of(isotherm));
                    ambiguousIf(true, "frequency and time", "a time sweep at each frequency");
                } else {
                    frequencySweep(isotherm, least);
                    if (repeats(isotherm) && !elapsedKnown(isotherm)) {
                        notes.add(SweepReason.SWEEP_REPEATS_WITHOUT_TIME.with(name.specimen(), name.sweep()));
                    }
                }
            }
            ambiguousIf(
                    PointGroups.byIsotherm(points).size() > frequencies.size(),
                    "frequency and temperature",
                    "a frequency sweep at each temperature");
        }
    }

    private void ambiguousIf(boolean ambiguous, String varying, String taken) {
        if (ambiguous && !sweeps.isEmpty()) {
            Reason note = SweepReason.SWEEP_AMBIGUOUS.with(name.specimen(), name.sweep(), varying, taken);
            if (!notes.contains(note)) {
                notes.add(note);
            }
        }
    }

    private boolean temperatureVaries() {
        return PointGroups.byIsotherm(points).size() > 1;
    }

    /** Whether there is one temperature, or at least half of the points stand in isotherms of several frequencies. */
    private boolean isothermal() {
        int covered = PointGroups.byIsotherm(points).stream()
                .filter(isotherm -> PointGroups.byFrequency(isotherm).size() >= LEAST)
                .mapToInt(List::size)
                .sum();
        return temperatures.size() == 1 || 2 * covered >= points.size();
    }

    /** Whether there are more points at a temperature than temperatures, one after the other. */
    private boolean goesOnAtOneTemperature(List<ModulusPoint> hold) {
        return hold.size() > temperatures.size() && timePasses(hold, LEAST);
    }

    /** Whether each frequency comes more often than there are frequencies, and all of them through most of the time. */
    private static boolean recurs(List<ModulusPoint> isotherm) {
        List<List<ModulusPoint>> groups = PointGroups.byFrequency(isotherm);
        if (!repeats(isotherm) || !timePasses(isotherm, LEAST)) {
            return false;
        }
        double whole = PointGroups.range(isotherm, RecordedSweep::elapsed);
        return groups.stream().allMatch(group -> 2 * PointGroups.range(group, RecordedSweep::elapsed) >= whole);
    }

    /** Whether there are several frequencies, and each comes more often than there are frequencies. */
    private static boolean repeats(List<ModulusPoint> isotherm) {
        int groups = PointGroups.byFrequency(isotherm).size();
        return groups > 1 && isotherm.size() > groups * groups;
    }

    private static boolean elapsedKnown(List<ModulusPoint> points) {
        return points.stream().allMatch(point -> point.elapsedS().isPresent());
    }

    private static boolean timePasses(List<ModulusPoint> points, int least) {
        return elapsedKnown(points)
                && points.stream()
                                .mapToDouble(RecordedSweep::elapsed)
                                .distinct()
                                .count()
                        >= least;
    }

    private void frequencySweeps(int least) {
        PointGroups.byIsotherm(points).forEach(isotherm -> frequencySweep(isotherm, least));
    }

    private void frequencySweep(List<ModulusPoint> isotherm, int least) {
        if (PointGroups.byFrequency(isotherm).size() >= least) {
            add(
                    SweepPlan.Kind.FREQUENCY,
                    meanTemperature(isotherm),
                    OptionalDouble.empty(),
                    PointGroups.rising(isotherm, PointGroups::frequencyHz));
        }
    }

    private void temperatureSweeps(int least) {
        for (List<ModulusPoint> group : frequencies) {
            List<ModulusPoint> known = group.stream()
                    .filter(point -> point.temperatureK().isPresent())
                    .toList();
            boolean varies = known.size() >= least
                    && (PointGroups.byIsotherm(known).size() >= least
                            || PointGroups.range(known, PointGroups::temperatureK) > PointGroups.HOLD_K);
            if (varies) {
                ramp(known, mean(group, PointGroups::frequencyHz));
            }
        }
    }

    /** A specimen is another when it is cooled again, and a thermometer lags behind it from the other side. */
    private void ramp(List<ModulusPoint> known, OptionalDouble frequencyHz) {
        List<TemperatureLegs.Stretch> legs = TemperatureLegs.of(known);
        for (int i = 0; i < legs.size(); i++) {
            sweeps.add(new Sweep(
                    name,
                    SweepPlan.Kind.TEMPERATURE,
                    OptionalDouble.empty(),
                    frequencyHz,
                    PointGroups.rising(legs.get(i).points(), PointGroups::temperatureK),
                    legs.size() == 1
                            ? Optional.empty()
                            : Optional.of(new Sweep.Leg(i + 1, legs.get(i).heating()))));
        }
        if (legs.size() > 1) {
            Reason note = SweepReason.SWEEP_RAMP_TURNS.with(name.specimen(), name.sweep(), legs.size());
            if (!notes.contains(note)) {
                notes.add(note);
            }
        }
    }

    private void timeSweeps(List<List<ModulusPoint>> groups) {
        for (List<ModulusPoint> hold : groups) {
            for (List<ModulusPoint> group : PointGroups.byFrequency(hold)) {
                if (timePasses(group, LEAST_IF_ASKED)) {
                    OptionalDouble temperature =
                            PointGroups.ramps(group) ? OptionalDouble.empty() : meanTemperature(group);
                    add(
                            SweepPlan.Kind.TIME,
                            temperature,
                            mean(group, PointGroups::frequencyHz),
                            PointGroups.rising(group, RecordedSweep::elapsed));
                }
            }
        }
    }

    private void add(
            SweepPlan.Kind kind, OptionalDouble temperatureK, OptionalDouble frequencyHz, List<ModulusPoint> rising) {
        sweeps.add(new Sweep(name, kind, temperatureK, frequencyHz, rising));
    }

    private static double elapsed(ModulusPoint point) {
        return point.elapsedS().orElseThrow();
    }

    /** Empty where a point has none. */
    static OptionalDouble meanTemperature(List<ModulusPoint> points) {
        return points.stream().allMatch(point -> point.temperatureK().isPresent())
                ? mean(points, PointGroups::temperatureK)
                : OptionalDouble.empty();
    }

    /** Summed as departures from the first, so that equal figures have exactly that mean. */
    static OptionalDouble mean(List<ModulusPoint> points, ToDoubleFunction<ModulusPoint> figure) {
        double first = figure.applyAsDouble(points.get(0));
        double departure = points.stream()
                .mapToDouble(point -> figure.applyAsDouble(point) - first)
                .average()
                .orElseThrow();
        return OptionalDouble.of(first + departure);
    }
}

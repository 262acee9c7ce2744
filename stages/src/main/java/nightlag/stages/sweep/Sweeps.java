package nightlag.stages.sweep;

import java.util.ArrayList;
import java.util.Collections;
import java.util.DoubleSummaryStatistics;
import java.util.IdentityHashMap;
import java.util.List;
import java.util.Set;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.Quality;

/**
 * The sweeps of a lot.
 *
 * @param sweeps in the order of their points; each of one deformation and with one thing that varies
 * @param isotherms what can be superposed, pooled over specimens and sweeps
 * @param notes points left out, sweeps that could be taken for others, repeats averaged
 * @param apart points that are part of no sweep, where that is how they were measured and loses nothing
 */
public record Sweeps(List<Sweep> sweeps, LotIsotherms isotherms, List<Reason> notes, List<Reason> apart) {
    /** Copies the lists. */
    public Sweeps {
        sweeps = List.copyOf(sweeps);
        notes = List.copyOf(notes);
        apart = List.copyOf(apart);
    }

    /**
     * Assembles the sweeps.
     *
     * @param published the lot's points as published, in table order, unusable ones included
     * @param amplitudeSweeps the amplitude sweeps among them, holding the same objects
     * @param plan how points become sweeps
     */
    public static Sweeps of(List<ModulusPoint> published, List<List<ModulusPoint>> amplitudeSweeps, SweepPlan plan) {
        return new Assembly(plan).of(published, amplitudeSweeps);
    }

    /** Whether a point can be part of a sweep. A row of zeros is a cell nobody filled in, not a modulus. */
    static boolean canBelong(ModulusPoint point) {
        return point.quality() != Quality.UNUSABLE
                && point.frequencyHz().orElse(0) > 0
                && point.moduli()
                        .filter(moduli -> moduli.complex().isFinite() && moduli.magnitudePa() > 0)
                        .isPresent();
    }

    /** The work of putting a lot's sweeps together. */
    private static final class Assembly {
        /** Strains of repeats differ by less. */
        private static final double SAME_STRAIN = 1.2;

        private final SweepPlan plan;
        private final List<Sweep> sweeps = new ArrayList<>();
        private final List<ModulusPoint> inNone = new ArrayList<>();
        private final List<Reason> notes = new ArrayList<>();
        private final List<Left> left = new ArrayList<>();
        private int singles;

        /** Points of one recorded sweep in none, and the words for it. */
        private record Left(List<ModulusPoint> points, Reason reason) {}

        Assembly(SweepPlan plan) {
            this.plan = plan;
        }

        Sweeps of(List<ModulusPoint> published, List<List<ModulusPoint>> amplitudeSweeps) {
            SweepName.group(published).forEach((name, points) -> recorded(name, points, amplitudeSweeps));
            LotIsotherms isotherms = LotIsotherms.of(sweeps, inNone);
            List<Reason> apart = new ArrayList<>();
            if (singles > 0) {
                apart.add(SweepReason.SWEEP_SINGLE_POINTS.with(singles));
            }
            Set<ModulusPoint> superposed = ofSeveralFrequencies(isotherms);
            for (Left some : left) {
                boolean usual = plan.kind() == SweepPlan.Kind.AUTO
                        && (superposed.containsAll(some.points()) || areRepeats(some.points()));
                (usual ? apart : notes).add(some.reason());
            }
            return new Sweeps(sweeps, isotherms, notes, apart);
        }

        private static Set<ModulusPoint> ofSeveralFrequencies(LotIsotherms isotherms) {
            Set<ModulusPoint> points = Collections.newSetFromMap(new IdentityHashMap<>());
            isotherms.isotherms().stream()
                    .filter(isotherm -> FrequencySweeps.distinctFrequencies(isotherm.points()) > 1)
                    .forEach(isotherm -> points.addAll(isotherm.points()));
            return points;
        }

        /** Whether the same was measured again and again, which was to be no sweep. */
        private static boolean areRepeats(List<ModulusPoint> points) {
            DoubleSummaryStatistics strains = points.stream()
                    .flatMapToDouble(point -> point.strainAmplitude().stream())
                    .summaryStatistics();
            return FrequencySweeps.distinctFrequencies(points) == 1
                    && points.stream().allMatch(point -> point.temperatureK().isPresent())
                    && PointGroups.byIsotherm(points).size() == 1
                    && strains.getMax() <= SAME_STRAIN * strains.getMin();
        }

        private void recorded(SweepName name, List<ModulusPoint> points, List<List<ModulusPoint>> amplitudeSweeps) {
            List<ModulusPoint> usable =
                    points.stream().filter(Sweeps::canBelong).toList();
            if (usable.size() < points.size()) {
                notes.add(SweepReason.SWEEP_UNUSABLE_LEFT_OUT.with(
                        name.specimen(), name.sweep(), points.size() - usable.size(), points.size()));
            }
            List<List<ModulusPoint>> deformations = SweepName.groupByDeformation(usable);
            if (deformations.size() > 1) {
                notes.add(SweepReason.SWEEP_MIXED_DEFORMATION.with(name.specimen(), name.sweep()));
            }
            deformations.forEach(group -> ofOneDeformation(group, amplitudeSweeps));
        }

        private void ofOneDeformation(List<ModulusPoint> points, List<List<ModulusPoint>> amplitudeSweeps) {
            Set<ModulusPoint> free = Collections.newSetFromMap(new IdentityHashMap<>());
            free.addAll(points);
            for (List<ModulusPoint> swept : amplitudeSweeps) {
                List<ModulusPoint> own = swept.stream().filter(free::contains).toList();
                if (!own.isEmpty()) {
                    own.forEach(free::remove);
                    add(new Sweep(
                            SweepName.of(own.get(0)),
                            SweepPlan.Kind.AMPLITUDE,
                            RecordedSweep.meanTemperature(own),
                            RecordedSweep.mean(own, PointGroups::frequencyHz),
                            PointGroups.rising(own, AmplitudeSweeps::strain)));
                }
            }
            List<ModulusPoint> rest = points.stream().filter(free::contains).toList();
            if (points.size() == 1) {
                singles++;
                inNone.addAll(points);
            } else if (!rest.isEmpty()) {
                RecordedSweep.Sorted sorted = RecordedSweep.sorted(rest, plan.kind());
                sorted.sweeps().forEach(sweep -> {
                    sweep.points().forEach(free::remove);
                    add(sweep);
                });
                notes.addAll(sorted.notes());
                List<ModulusPoint> none = rest.stream().filter(free::contains).toList();
                inNone.addAll(none);
                sorted.left().ifPresent(reason -> left.add(new Left(none, reason)));
            }
        }

        private void add(Sweep sweep) {
            if (plan.repeats() == SweepPlan.Repeats.AVERAGED) {
                Repeats repeats = Repeats.of(sweep);
                sweeps.add(repeats.averaged());
                repeats.note().ifPresent(notes::add);
            } else {
                sweeps.add(sweep);
            }
        }
    }
}

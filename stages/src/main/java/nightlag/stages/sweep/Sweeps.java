package nightlag.stages.sweep;

import java.util.ArrayList;
import java.util.Collections;
import java.util.IdentityHashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
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
 */
public record Sweeps(List<Sweep> sweeps, LotIsotherms isotherms, List<Reason> notes) {
    /** Copies the lists. */
    public Sweeps {
        sweeps = List.copyOf(sweeps);
        notes = List.copyOf(notes);
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
        private final SweepPlan plan;
        private final List<Sweep> sweeps = new ArrayList<>();
        private final List<ModulusPoint> inNone = new ArrayList<>();
        private final List<Reason> notes = new ArrayList<>();
        private final Map<String, Integer> singles = new LinkedHashMap<>();

        Assembly(SweepPlan plan) {
            this.plan = plan;
        }

        Sweeps of(List<ModulusPoint> published, List<List<ModulusPoint>> amplitudeSweeps) {
            SweepName.group(published).forEach((name, points) -> recorded(name, points, amplitudeSweeps));
            singles.forEach((specimen, count) -> notes.add(SweepReason.SWEEP_SINGLE_POINTS.with(specimen, count)));
            return new Sweeps(sweeps, LotIsotherms.of(sweeps, inNone), notes);
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
                singles.merge(points.get(0).key().specimen(), 1, Integer::sum);
                inNone.addAll(points);
            } else if (!rest.isEmpty()) {
                RecordedSweep.Sorted sorted = RecordedSweep.sorted(rest, plan.kind());
                sorted.sweeps().forEach(sweep -> {
                    sweep.points().forEach(free::remove);
                    add(sweep);
                });
                notes.addAll(sorted.notes());
                rest.stream().filter(free::contains).forEach(inNone::add);
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

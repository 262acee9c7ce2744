package nightlag.stages.sweep;

import java.util.ArrayList;
import java.util.Collections;
import java.util.IdentityHashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.stream.Collectors;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.ModulusPoint;

/**
 * The isotherms of a lot, pooled over its specimens and sweeps, as superposition and spectra take them.
 *
 * @param isotherms temperature rising, each of at least one point; they may hold points in shear and in extension
 * @param notes points that do not belong to them
 */
public record LotIsotherms(List<Isotherm> isotherms, List<Reason> notes) {
    /** Copies the lists. */
    public LotIsotherms {
        isotherms = List.copyOf(isotherms);
        notes = List.copyOf(notes);
    }

    /**
     * Pools them. Ramps hold no isotherm, and a material that is followed over time is another at each moment. Of amplitude
     * sweeps the point of smallest strain stays at a frequency that would else have none. Where a lot's sweeps vary in
     * frequency, those that do not stand apart; where none does, each record was made as a sweep of its own.
     *
     * @param sweeps the lot's sweeps
     * @param others its usable points in no sweep
     */
    static LotIsotherms of(List<Sweep> sweeps, List<ModulusPoint> others) {
        List<ModulusPoint> pool = new ArrayList<>(others);
        List<List<ModulusPoint>> amplitudeSweeps = new ArrayList<>();
        int unsteady = 0;
        Set<SweepName> restless = restless(sweeps);
        for (Sweep sweep : sweeps) {
            boolean restsNowhere = sweep.kind() == SweepPlan.Kind.TIME
                    || (sweep.kind() == SweepPlan.Kind.TEMPERATURE && restless.contains(sweep.name()));
            if (!restsNowhere) {
                pool.addAll(sweep.points());
            } else {
                unsteady += sweep.points().size();
            }
            if (sweep.kind() == SweepPlan.Kind.AMPLITUDE) {
                amplitudeSweeps.add(sweep.points());
            }
        }
        pool.sort(PointOrder.BY_KEY);
        List<Isotherm> isotherms = new ArrayList<>();
        Set<ModulusPoint> kept = Collections.newSetFromMap(new IdentityHashMap<>());
        for (Isotherm isotherm : Isotherms.group(pool)) {
            List<ModulusPoint> points =
                    FrequencySweeps.withoutAmplitudeSweeps(FrequencySweeps.among(isotherm.points()), amplitudeSweeps);
            if (!points.isEmpty()) {
                isotherms.add(new Isotherm(isotherm.temperatureK(), points));
                kept.addAll(points);
            }
        }
        List<Reason> notes = new ArrayList<>();
        long apart = amplitudeSweeps.stream()
                .flatMap(List::stream)
                .filter(point -> !kept.contains(point))
                .count();
        if (apart > 0) {
            notes.add(SweepReason.SWEEP_AMPLITUDE_NOT_SUPERPOSED.with(apart));
        }
        if (unsteady > 0) {
            notes.add(SweepReason.SWEEP_RAMP_NOT_SUPERPOSED.with(unsteady));
        }
        return new LotIsotherms(isotherms, notes);
    }

    /** Recorded sweeps whose temperature ramps, or changes between one frequency and the next. */
    private static Set<SweepName> restless(List<Sweep> sweeps) {
        Map<SweepName, List<ModulusPoint>> recorded = new LinkedHashMap<>();
        sweeps.stream()
                .filter(sweep -> sweep.kind() == SweepPlan.Kind.TEMPERATURE)
                .forEach(sweep -> recorded.computeIfAbsent(sweep.name(), name -> new ArrayList<>())
                        .addAll(sweep.points()));
        return recorded.entrySet().stream()
                .filter(entry -> PointGroups.ramps(entry.getValue()) || changesWithFrequency(entry.getValue()))
                .map(Map.Entry::getKey)
                .collect(Collectors.toSet());
    }

    private static boolean changesWithFrequency(List<ModulusPoint> points) {
        if (FrequencySweeps.distinctFrequencies(points) < 2) {
            return false;
        }
        int shared = PointGroups.byIsotherm(points).stream()
                .filter(isotherm -> FrequencySweeps.distinctFrequencies(isotherm) > 1)
                .mapToInt(List::size)
                .sum();
        return 2 * shared < points.size();
    }
}

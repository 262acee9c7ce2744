package nightlag.stages;

import java.util.ArrayList;
import java.util.IdentityHashMap;
import java.util.List;
import java.util.function.UnaryOperator;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.Flag;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.Quality;
import nightlag.stages.moduli.ScreeningReason;
import nightlag.stages.sweep.AmplitudeSweeps;
import nightlag.stages.sweep.PlateRim;
import nightlag.stages.sweep.PointOrder;
import nightlag.stages.sweep.SweepName;
import nightlag.stages.sweep.SweepPlan;
import nightlag.stages.sweep.SweepReason;

/**
 * The points of a lot as published: what only their neighbours can say about them is in them.
 *
 * @param points points in table order
 * @param amplitudeSweeps those of them that are in amplitude sweeps, the same objects
 * @param notes what could not be done, and why
 */
record LotPoints(List<ModulusPoint> points, List<List<ModulusPoint>> amplitudeSweeps, List<Reason> notes) {
    /** A sweep with more than this share of negative loss moduli has a wrong sign or delay. */
    private static final double MOST = 0.5;

    private static final double STANDS_OUT = 3;

    /** Publishes the points, given in table order. */
    static LotPoints of(List<ModulusPoint> reduced, SweepPlan plan) {
        AmplitudeSweeps found = AmplitudeSweeps.among(reduced, plan.kind());
        List<Reason> notes = new ArrayList<>();
        List<List<ModulusPoint>> sweeps = found.sweeps().stream()
                .map(sweep -> amplitudeSweep(sweep, notes).stream()
                        .map(LotPoints::nonlinearByDesign)
                        .toList())
                .toList();
        List<ModulusPoint> points = new ArrayList<>(found.others());
        sweeps.forEach(points::addAll);
        IdentityHashMap<ModulusPoint, ModulusPoint> flagged = new IdentityHashMap<>();
        SweepName.group(points).values().forEach(sweep -> flagged.putAll(flaggedForSign(sweep)));
        UnaryOperator<ModulusPoint> published = point -> flagged.getOrDefault(point, point);
        return new LotPoints(
                points.stream().map(published).sorted(PointOrder.BY_KEY).toList(),
                sweeps.stream()
                        .map(sweep -> sweep.stream().map(published).toList())
                        .toList(),
                notes);
    }

    /** A third harmonic is what an amplitude sweep looks for. */
    private static ModulusPoint nonlinearByDesign(ModulusPoint point) {
        return point.unusableOnlyBy().filter(flag -> flag == Flag.NONLINEAR).isPresent()
                ? point.merelyDoubtful(SweepReason.SWEEP_NONLINEAR_BY_DESIGN.with())
                : point;
    }

    private static List<ModulusPoint> amplitudeSweep(List<ModulusPoint> sweep, List<Reason> notes) {
        List<ModulusPoint> plates = sweep.stream().filter(PlateRim::concerns).toList();
        if (plates.isEmpty()) {
            return sweep;
        }
        int strains = PlateRim.strains(plates);
        if (strains < PlateRim.LEAST_STRAINS) {
            SweepName name = SweepName.of(plates.get(0));
            notes.add(ConclusionReason.RIM_TOO_FEW_STRAINS.with(
                    name.specimen(), name.sweep(), strains, PlateRim.LEAST_STRAINS));
            return sweep;
        }
        List<ModulusPoint> points = new ArrayList<>(
                sweep.stream().filter(point -> !PlateRim.concerns(point)).toList());
        points.addAll(PlateRim.corrected(plates));
        return points;
    }

    /**
     * Flags the points of a sweep whose loss modulus is below zero where most of its points are like that. A specimen cannot
     * give back more than was put in, so one such point may be noise or an inertia badly known, but most of a sweep means that
     * a channel is inverted or the load's delay is wrong.
     *
     * @return by point, the flagged one in its place; points that stay as they are have none
     */
    private static IdentityHashMap<ModulusPoint, ModulusPoint> flaggedForSign(List<ModulusPoint> sweep) {
        List<ModulusPoint> usable = sweep.stream()
                .filter(point ->
                        point.quality() != Quality.UNUSABLE && point.moduli().isPresent())
                .toList();
        long negative = usable.stream().filter(LotPoints::givesEnergyBack).count();
        double share = (double) negative / usable.size();
        IdentityHashMap<ModulusPoint, ModulusPoint> flagged = new IdentityHashMap<>();
        if (!(share > MOST)) {
            return flagged;
        }
        Reason why = ScreeningReason.SCREENING_SIGN_OR_DELAY.with(share, MOST, Quality.DOUBTFUL.word());
        sweep.stream()
                .filter(LotPoints::givesEnergyBack)
                .forEach(point -> flagged.put(point, point.flagged(Flag.SIGN_OR_DELAY, why)));
        return flagged;
    }

    /** Below zero by more than noise can make of a loss that is small. */
    private static boolean givesEnergyBack(ModulusPoint point) {
        return point.moduli()
                .filter(moduli -> moduli.lossPa()
                        < -STANDS_OUT
                                * moduli.covariance()
                                        .map(ModuliCovariance::lossU)
                                        .orElse(0.0))
                .isPresent();
    }
}

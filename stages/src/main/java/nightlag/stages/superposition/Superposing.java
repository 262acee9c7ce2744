package nightlag.stages.superposition;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.IntStream;
import nightlag.stages.superposition.LogIsotherm.LogReading;
import nightlag.stages.superposition.OwnCurves.Prepared;
import nightlag.stages.superposition.SuperpositionPlan.VerticalShift;

/** The way from isotherms to shifts: own curves, pairs laid over one another, chains of overlapping isotherms, all at once. */
final class Superposing {
    private static final double UNLIMITED = Double.POSITIVE_INFINITY;

    /** Most of ln b where a larger one would tear isotherms apart: a factor of two. */
    private static final double LIMITED = Math.log(2);

    /** Isotherms of fewer frequencies on average leave smoothness to the common curves. */
    private static final int TELLING_PLACES = 20;

    /** Variance of ln |G*| of whole isotherms from which on pairs may be moved vertically to find where they start: 2 %. */
    private static final double TELLING_LEVEL = 0.02 * 0.02;

    /** How often smoothness is read off common curves where own ones do not tell it. */
    private static final int ROUNDS = 3;

    private final List<LogIsotherm> isotherms;
    private final SpecimenOffsets specimens;
    private final SuperpositionPlan plan;
    private final boolean useGiven;
    private final boolean fitVertical;
    private final double[] vertical;
    private final List<Prepared> prepared;
    private final OwnCurves own;
    private final List<StartingShifts> starts;

    private Superposing(SpecimenOffsets specimens, SuperpositionPlan plan) {
        this.isotherms = specimens.isotherms();
        this.specimens = specimens;
        this.plan = plan;
        this.useGiven = isotherms.stream().allMatch(LogIsotherm::hasCovariances);
        this.fitVertical = plan.verticalShift() == VerticalShift.FITTED;
        this.vertical = isotherms.stream()
                .mapToDouble(isotherm -> knownLnB(isotherm.temperatureK(), plan))
                .toArray();
        this.prepared = isotherms.stream().map(Prepared::of).toList();
        this.own = SmoothnessSearch.likeliest(prepared, useGiven);
        StartingShifts horizontal = StartingShifts.of(isotherms, own, vertical, false);
        boolean levelsDiffer = Arrays.stream(specimens.levelVariances()).anyMatch(variance -> variance > TELLING_LEVEL);
        this.starts = fitVertical || levelsDiffer
                ? List.of(horizontal, StartingShifts.of(isotherms, own, vertical, true))
                : List.of(horizontal);
    }

    /**
     * Superposes isotherms.
     *
     * @param isotherms two or more, temperature rising, each with enough places for curves of its own
     */
    static Superposed of(List<LogIsotherm> isotherms, SuperpositionPlan plan) {
        return new Superposing(SpecimenOffsets.of(isotherms), plan).superposed();
    }

    /** ln b that is known beforehand: ρ0 T0/(ρ T) with ρ0/ρ = 1 + α (T − T0). */
    static double knownLnB(double temperatureK, SuperpositionPlan plan) {
        if (plan.verticalShift() != VerticalShift.DENSITY) {
            return 0;
        }
        double reference = plan.referenceTemperatureK();
        double expansion = plan.expansionPerK().orElse(0) * (temperatureK - reference);
        return Math.log1p(expansion) + Math.log(reference / temperatureK);
    }

    private Superposed superposed() {
        List<Integer> chain = main(starts.get(0).chains());
        double limit = UNLIMITED;
        while (true) {
            JointCurves common = best(chain, limit, own.smoothness());
            List<Integer> overlapping = overlapping(chain, common);
            if (overlapping.size() == chain.size()) {
                return tellsSmoothness()
                        ? Superposed.of(chain, limit == LIMITED, common, own, specimens)
                        : resmoothed(chain, limit, common);
            }
            if (fitVertical && limit == UNLIMITED) {
                limit = LIMITED;
            } else {
                chain = overlapping;
            }
        }
    }

    /** Few points an isotherm may be as good as on a parabola, and say little of how a curve over all of them bends. */
    private boolean tellsSmoothness() {
        return isotherms.stream().mapToInt(LogIsotherm::places).average().orElse(0) >= TELLING_PLACES;
    }

    /** Smoothness and scatter read off the common curves, shifts and curves fitted anew with them. */
    private Superposed resmoothed(List<Integer> chain, double limit, JointCurves first) {
        JointCurves common = first;
        Smoothness smoothness = own.smoothness();
        for (int round = 0; round < ROUNDS; round++) {
            List<LogReading> moved = new ArrayList<>();
            for (int k = 0; k < chain.size(); k++) {
                double a = common.horizontal()[k];
                double b = common.vertical()[k] + common.levels()[k];
                isotherms.get(chain.get(k)).readings().forEach(reading -> moved.add(reading.moved(a, b)));
            }
            moved.sort(Comparator.comparingDouble(LogReading::x));
            smoothness = SmoothnessSearch.likeliest(List.of(Prepared.of(new LogIsotherm(0, moved, 0))), useGiven)
                    .smoothness();
            common = joint(chain, limit, smoothness).from(common.horizontal());
        }
        OwnCurves equallySmooth = OwnCurves.of(prepared, useGiven, smoothness).orElse(own);
        return Superposed.of(chain, limit == LIMITED, common, equallySmooth, specimens);
    }

    /** Of the fits from all starts the best of those that leave most isotherms together: what is apart meets nothing. */
    private JointCurves best(List<Integer> chain, double limit, Smoothness smoothness) {
        JointFit joint = joint(chain, limit, smoothness);
        return starts.stream()
                .map(start -> start.shiftsFrom(chain.get(anchor(chain))))
                .map(shifts ->
                        chain.stream().mapToDouble(i -> shifts[i].orElse(0.0)).toArray())
                .map(joint::from)
                .min(Comparator.<JointCurves>comparingInt(
                                curves -> -overlapping(chain, curves).size())
                        .thenComparingDouble(JointCurves::cost))
                .orElseThrow();
    }

    private JointFit joint(List<Integer> chain, double limit, Smoothness smoothness) {
        List<LogIsotherm> chosen = chain.stream().map(isotherms::get).toList();
        List<LogReading> readings =
                chosen.stream().flatMap(one -> one.readings().stream()).toList();
        return new JointFit(
                chosen,
                anchor(chain),
                chain.stream().mapToDouble(i -> vertical[i]).toArray(),
                fitVertical ? OptionalDouble.of(limit) : OptionalDouble.empty(),
                specimens.ofIsotherms(chain),
                Weights.of(readings, useGiven, smoothness),
                smoothness);
    }

    private static int anchor(List<Integer> chain) {
        return chain.size() / 2;
    }

    /** Of several chains the one with the isotherm at the reference temperature, where there is none the longest. */
    private List<Integer> main(List<List<Integer>> chains) {
        Optional<Integer> atReference = IntStream.range(0, isotherms.size())
                .boxed()
                .filter(i -> ReferencePlace.isAt(isotherms.get(i).temperatureK(), plan.referenceTemperatureK()))
                .min(Comparator.comparingDouble(
                        i -> Math.abs(isotherms.get(i).temperatureK() - plan.referenceTemperatureK())));
        return chains.stream()
                .filter(chain -> atReference.isEmpty() || chain.contains(atReference.get()))
                .max(Comparator.comparingInt(List::size))
                .orElseThrow();
    }

    /** Those of a chain whose reduced frequencies overlap. */
    private List<Integer> overlapping(List<Integer> chain, JointCurves common) {
        List<Integer> byStart = IntStream.range(0, chain.size())
                .boxed()
                .sorted(Comparator.comparingDouble(
                        k -> isotherms.get(chain.get(k)).first() + common.horizontal()[k]))
                .toList();
        List<List<Integer>> groups = new ArrayList<>();
        double end = Double.NEGATIVE_INFINITY;
        for (int k : byStart) {
            LogIsotherm isotherm = isotherms.get(chain.get(k));
            if (isotherm.first() + common.horizontal()[k] >= end) {
                groups.add(new ArrayList<>());
            }
            groups.get(groups.size() - 1).add(chain.get(k));
            end = Math.max(end, isotherm.last() + common.horizontal()[k]);
        }
        return main(
                groups.stream().map(group -> group.stream().sorted().toList()).toList());
    }
}

package nightlag.stages.superposition;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.IntStream;
import nightlag.stages.superposition.OwnCurves.OwnCurve;
import nightlag.stages.superposition.OwnCurves.Prepared;
import nightlag.stages.superposition.SuperpositionPlan.VerticalShift;

/**
 * The isotherms that overlap, about common curves and about their own.
 *
 * @param used which isotherms, rising
 * @param limited whether vertical shifts had to be limited to a factor of two, or isotherms would have come apart
 * @param common all of them about common curves
 * @param ownSquares Σ rᵀ W r of the same points, each isotherm about its own curves
 * @param ownFreedom its degrees of freedom
 */
record Superposed(int[] used, boolean limited, JointCurves common, double ownSquares, Freedom ownFreedom) {
    /** Own curves that leave fewer degrees of freedom say nothing about smoothness and scatter. */
    private static final double LEAST_FREEDOM = 4;

    private static final double UNLIMITED = Double.POSITIVE_INFINITY;

    /** Most of ln b where a larger one would tear isotherms apart: a factor of two. */
    private static final double LIMITED = Math.log(2);

    /**
     * Superposes isotherms.
     *
     * @param isotherms two or more, temperature rising, each with enough places for curves of its own
     */
    static Superposed of(List<LogIsotherm> isotherms, SuperpositionPlan plan) {
        boolean useGiven = isotherms.stream().allMatch(LogIsotherm::hasCovariances);
        OwnCurves own =
                SmoothnessSearch.likeliest(isotherms.stream().map(Prepared::of).toList(), useGiven);
        double[] vertical = isotherms.stream()
                .mapToDouble(one -> lnB(one.temperatureK(), plan))
                .toArray();
        boolean fitVertical = plan.verticalShift() == VerticalShift.FITTED;
        StartingShifts pairs = StartingShifts.of(isotherms, own, vertical, false);
        StartingShifts pairsByPhase = fitVertical ? StartingShifts.of(isotherms, own, vertical, true) : pairs;
        List<Integer> chain = chain(isotherms, pairs, plan);
        boolean limited = false;
        while (true) {
            List<StartingShifts> starts = List.of(pairs, pairsByPhase);
            JointCurves common = best(isotherms, chain, starts, vertical, UNLIMITED, plan, useGiven, own);
            List<Integer> overlapping = overlapping(isotherms, chain, common, plan);
            if (fitVertical && overlapping.size() < chain.size()) {
                common = best(isotherms, chain, starts, vertical, LIMITED, plan, useGiven, own);
                overlapping = overlapping(isotherms, chain, common, plan);
                limited = true;
            }
            if (overlapping.size() == chain.size()) {
                int[] used = chain.stream().mapToInt(Integer::intValue).toArray();
                List<OwnCurve> each =
                        IntStream.of(used).mapToObj(own.curves()::get).toList();
                return new Superposed(
                        used,
                        limited,
                        common,
                        each.stream().mapToDouble(OwnCurve::residualSquares).sum(),
                        each.stream().map(OwnCurve::freedom).reduce(Freedom.NONE, Freedom::plus));
            }
            chain = overlapping;
        }
    }

    /** ln b that is known beforehand: ρ0 T0/(ρ T) with ρ0/ρ = 1 + α (T − T0). */
    static double lnB(double temperatureK, SuperpositionPlan plan) {
        if (plan.verticalShift() != VerticalShift.DENSITY) {
            return 0;
        }
        double reference = plan.referenceTemperatureK();
        double expansion = plan.expansionPerK().orElse(0) * (temperatureK - reference);
        return Math.log1p(expansion) + Math.log(reference / temperatureK);
    }

    /** Of the fits from either start the best of those that leave most isotherms together: what is apart meets nothing. */
    private static JointCurves best(
            List<LogIsotherm> isotherms,
            List<Integer> chain,
            List<StartingShifts> starts,
            double[] vertical,
            double verticalLimit,
            SuperpositionPlan plan,
            boolean useGiven,
            OwnCurves own) {
        List<LogIsotherm> chosen = chain.stream().map(isotherms::get).toList();
        double[] up = chain.stream().mapToDouble(i -> vertical[i]).toArray();
        int anchor = chain.size() / 2;
        JointFit joint = new JointFit(
                chosen,
                anchor,
                up,
                plan.verticalShift() == VerticalShift.FITTED
                        ? OptionalDouble.of(verticalLimit)
                        : OptionalDouble.empty(),
                Weights.of(
                        chosen.stream().flatMap(one -> one.readings().stream()).toList(), useGiven, own.smoothness()),
                own.smoothness());
        return starts.stream()
                .distinct()
                .map(start -> start.shiftsFrom(chain.get(anchor)))
                .map(shifts ->
                        chain.stream().mapToDouble(i -> shifts[i].orElse(0.0)).toArray())
                .map(joint::from)
                .min(Comparator.<JointCurves>comparingInt(curves ->
                                -overlapping(isotherms, chain, curves, plan).size())
                        .thenComparingDouble(JointCurves::cost))
                .orElseThrow();
    }

    /** The isotherms reached from the one at the reference temperature, else the most that reach one another. */
    private static List<Integer> chain(List<LogIsotherm> isotherms, StartingShifts pairs, SuperpositionPlan plan) {
        return best(
                IntStream.range(0, isotherms.size())
                        .mapToObj(pairs::reachedFrom)
                        .toList(),
                isotherms,
                plan);
    }

    private static List<Integer> best(List<List<Integer>> chains, List<LogIsotherm> isotherms, SuperpositionPlan plan) {
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
    private static List<Integer> overlapping(
            List<LogIsotherm> isotherms, List<Integer> chain, JointCurves common, SuperpositionPlan plan) {
        int n = chain.size();
        Integer[] byStart = IntStream.range(0, n).boxed().toArray(Integer[]::new);
        Arrays.sort(
                byStart,
                Comparator.comparingDouble(k -> isotherms.get(chain.get(k)).first() + common.horizontal()[k]));
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
        return best(
                groups.stream().map(group -> group.stream().sorted().toList()).toList(), isotherms, plan);
    }

    /** Degrees of freedom of what common curves add to the squares of own ones. */
    double addedFreedom() {
        return common.freedom().ofAll() - ownFreedom.ofAll();
    }

    /** Whether the two scatters can be compared. */
    boolean canBeCompared() {
        return ownFreedom.ofErrors() >= LEAST_FREEDOM && addedFreedom() > 0;
    }

    /** What common curves add to the squares per degree of freedom, over the scatter about own ones. */
    double varianceRatio() {
        double added = Math.max(0, common.squares() - ownSquares);
        return added / addedFreedom() / (ownSquares / ownFreedom.ofErrors());
    }
}

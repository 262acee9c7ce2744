package nightlag.stages.spectrum;

import java.util.Comparator;
import java.util.List;
import java.util.OptionalInt;
import java.util.stream.IntStream;
import java.util.stream.Stream;

/**
 * The fewest modes the readings carry (after the aim of Baumgaertel &amp; Winter, Rheol. Acta 28 (1989) 511).
 *
 * <p>It starts from non-negative least squares on a fine grid of times, whose neighbours are merged, adds modes while each is
 * worth its two numbers, then takes modes away one at a time, each time the one that is missed least, and keeps the set
 * with the smallest χ²/s² + p ln m (Schwarz, Ann. Stat. 6 (1978) 461; p numbers fitted to m), s² being the variance about
 * the richest set, and not below 1 where the readings' own uncertainties are known.
 */
final class ModeSearch {
    private static final int GRID_PER_DECADE = 10;
    private static final int CANDIDATES_PER_DECADE = 3;
    private static final int CANDIDATES = 2;
    /** Steps down the ladder go on past the best set while they are no worse than this many modes. */
    private static final double PATIENCE_IN_MODES = 3;

    /** Rise of χ², in variances, from which the readings speak against an equilibrium modulus. */
    private static final double AGAINST_A_SOLID = 25;

    private final WeightedReadings readings;
    private final ModeRefinement refinement;
    private final boolean fitEquilibrium;
    private final double priceOfNumber;

    ModeSearch(WeightedReadings readings, ModeRefinement refinement, boolean fitEquilibrium) {
        this.readings = readings;
        this.refinement = refinement;
        this.fitEquilibrium = fitEquilibrium;
        this.priceOfNumber = Math.log(readings.rows());
    }

    /** The best set; of exactly this many modes where a number is given. */
    FittedModes find(OptionalInt wanted) {
        FittedModes richest = enriched(atMost(mostModes(), mergedGrid()));
        return wanted.isPresent() ? withExactly(wanted.getAsInt(), richest) : refinement.polish(best(richest));
    }

    private FittedModes mergedGrid() {
        double[] grid = refinement.grid(GRID_PER_DECADE);
        FittedModes fine = refinement.strengthsAt(grid);
        List<Double> times = MergedGrid.times(grid, fine.strengths());
        if (times.isEmpty()) {
            times.add(Math.sqrt(grid[0] * grid[grid.length - 1]));
        }
        return fitted(times.stream().mapToDouble(Double::doubleValue).toArray());
    }

    private FittedModes fitted(double[] times) {
        FittedModes linear = refinement.strengthsAt(times);
        double[] inUse = linear.timesInUse();
        return refinement.refine(
                inUse.length == 0 || inUse.length == times.length ? linear : refinement.strengthsAt(inUse));
    }

    /** Adds modes while they pay. */
    private FittedModes enriched(FittedModes start) {
        FittedModes current = start;
        while (current.count() < mostModes()) {
            FittedModes richer = withOneMore(current);
            double gain = (current.chiSquared() - richer.chiSquared()) / variance(richer);
            if (!(gain > 2 * priceOfNumber)) {
                break;
            }
            current = richer;
        }
        return current;
    }

    private FittedModes atMost(int most, FittedModes richer) {
        FittedModes current = richer;
        while (current.count() > most) {
            current = withOneLess(current);
        }
        return current;
    }

    private FittedModes withExactly(int wanted, FittedModes richest) {
        FittedModes current = atMost(wanted, richest);
        if (current.count() == wanted) {
            return refinement.polish(current);
        }
        FittedModes natural = best(richest);
        return refinement.spread(wanted, natural, Math.sqrt(variance(natural)));
    }

    /**
     * No more than the readings can pay for, some of them left over for the scatter where that is not known, and no more than
     * three a decade: these follow any smooth spectrum to 1e-5.
     */
    private int mostModes() {
        int spare = readings.scatterKnown() ? 1 : 3;
        double decades = Math.log10(readings.highestFrequency() / readings.lowestFrequency());
        return Math.max(1, Math.min((readings.rows() - spare) / 2, (int) (3 * decades) + 3));
    }

    private FittedModes withOneMore(FittedModes current) {
        return refinement.refine(refinement.strengthsAt(current.timesWith(widestMiss(current))));
    }

    /** The time whose mode would lessen the misfit most, once the modes already there have made room for it. */
    private double widestMiss(FittedModes current) {
        double[] candidates = refinement.grid(CANDIDATES_PER_DECADE);
        return IntStream.range(0, candidates.length)
                .mapToObj(i -> refinement.strengthsAt(current.timesWith(candidates[i])))
                .min(Comparator.comparingDouble(FittedModes::chiSquared))
                .map(best -> addedTime(best, current))
                .orElseThrow();
    }

    private static double addedTime(FittedModes richer, FittedModes current) {
        for (int i = 0; i < current.count(); i++) {
            if (richer.times()[i] != current.times()[i]) {
                return richer.times()[i];
            }
        }
        return richer.times()[current.count()];
    }

    private FittedModes best(FittedModes richest) {
        double variance = variance(richest);
        FittedModes best = richest;
        FittedModes current = richest;
        while (current.count() > 1) {
            current = withOneLess(current);
            if (cost(current, variance) <= cost(best, variance)) {
                best = current;
            } else if (cost(current, variance) > cost(best, variance) + PATIENCE_IN_MODES * 2 * priceOfNumber) {
                break;
            }
        }
        return settled(best, variance);
    }

    /**
     * Where an equilibrium modulus is wanted but the slowest mode took its place, the material is said to be a solid, and the
     * modulus goes before the mode unless the readings speak against it by five standard deviations.
     */
    private FittedModes settled(FittedModes best, double variance) {
        if (!fitEquilibrium || best.equilibrium() > 0 || best.count() < 2) {
            return best;
        }
        FittedModes solid = fitted(best.timesWithout(best.count() - 1));
        double against = (solid.chiSquared() - best.chiSquared()) / variance;
        return solid.equilibrium() > 0 && against <= AGAINST_A_SOLID ? solid : best;
    }

    private double cost(FittedModes modes, double variance) {
        return modes.chiSquared() / variance + modes.parameters() * priceOfNumber;
    }

    /** The variance of the residuals about a set. */
    private double variance(FittedModes modes) {
        int free = readings.rows() - modes.parameters();
        double scatter = free > 0 ? modes.chiSquared() / free : 0;
        return Math.max(readings.leastVariance(), scatter);
    }

    private FittedModes withOneLess(FittedModes current) {
        Stream<double[]> merged = IntStream.range(0, current.count() - 1).mapToObj(current::timesMerged);
        Stream<double[]> dropped = IntStream.range(0, current.count()).mapToObj(current::timesWithout);
        return Stream.concat(merged, dropped)
                .map(refinement::strengthsAt)
                .sorted(Comparator.comparingDouble(FittedModes::chiSquared))
                .limit(CANDIDATES)
                .map(refinement::refine)
                .min(Comparator.comparingDouble(FittedModes::chiSquared))
                .orElseThrow();
    }
}

package nightlag.stages.spectrum;

import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.OptionalInt;
import java.util.stream.IntStream;
import java.util.stream.Stream;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.numeric.LevenbergMarquardt;

/**
 * Creep curves, and complex moduli of the same material, to one discrete retardation spectrum. Strains after any steps of
 * stress and compliances 1/G* are both linear in J0, 1/η0 and the strengths, so both stand in one non-negative least-squares
 * problem (Lawson &amp; Hanson 1974) on a fine grid of times; neighbours are merged, strengths and times refined together, and
 * modes taken away one at a time, each time the one that is missed least, down to the set with the smallest
 * χ²/s² + p ln m (Schwarz, Ann. Stat. 6 (1978) 461). Where curves were shifted here from other temperatures, the errors of
 * the shifts are refined with it, within their own uncertainty.
 */
public final class CreepFit {
    private static final int LEAST_READINGS = 8;
    private static final int GRID_PER_DECADE = 10;
    /** Faster than this share of the first time a mode is part of J0. */
    static final double FASTEST = 0.3;

    private static final double SLOWEST = 3;
    private static final int CANDIDATES = 2;
    /** u of a logarithm that is not told from minus infinity. */
    private static final double UNTOLD = 1;

    private static final double ENOUGH = 1e-9;
    private static final int STEPS_WHILE_SEARCHING = 30;
    private static final int STEPS_AT_LAST = 200;
    private static final double SMALLEST_STRENGTH = 1e-12;
    /** How stiffly neighbours are kept in a smooth row where more modes are asked for than the readings tell apart. */
    private static final double SPRING = 0.3;
    /** Of the way to its neighbour such a mode may go a little less than half, so that it never becomes one with it. */
    private static final double OWN_PLACE = 0.49;
    /** What ln J0 and ln 1/η0 may change by then. */
    private static final double KEPT = Math.log(2);

    private final CreepRows rows;
    private final ComplianceReadings readings;
    private final double shortest;
    private final double longest;

    private CreepFit(CreepRows rows, CreepData data) {
        this.rows = rows;
        this.readings = rows.at(new double[data.moves()]);
        this.shortest = FASTEST * readings.shortestS();
        this.longest = SLOWEST * readings.longestS();
    }

    /** Fits one spectrum to creep curves of one temperature. */
    public static CreepSpectrum fit(List<CreepCurve> curves, SpectrumPlan plan) throws ReductionFault {
        return fit(CreepData.of(ShiftedCreep.unmoved(curves)), plan);
    }

    /**
     * Fits one spectrum to all.
     *
     * @param plan what is wanted; a fixed number of modes is that of the relaxation modes
     * @throws ReductionFault if there are too few readings
     */
    public static CreepSpectrum fit(CreepData data, SpectrumPlan plan) throws ReductionFault {
        CreepRows rows = new CreepRows(data, !plan.fitEquilibrium());
        if (rows.readings() < LEAST_READINGS) {
            throw new ReductionFault(SpectrumReason.CREEP_TOO_FEW_READINGS.with(rows.readings(), LEAST_READINGS));
        }
        int mostModes = rows.readings() / 2;
        if (plan.modes().isPresent() && plan.modes().getAsInt() > mostModes) {
            throw new ReductionFault(
                    SpectrumReason.CREEP_TOO_MANY_MODES.with(plan.modes().getAsInt(), rows.readings(), mostModes));
        }
        FittedCompliance last = new CreepFit(rows, data).find(plan.modes());
        if (!(last.instantaneous() > 0) && last.count() < 2) {
            throw new ReductionFault(SpectrumReason.CREEP_NO_INSTANTANEOUS.with());
        }
        return new CreepSpectrum(data, rows, last, plan.modes());
    }

    private FittedCompliance find(OptionalInt wanted) {
        FittedCompliance best = best(mergedGrid());
        return wanted.isPresent()
                ? withExactly(wanted.getAsInt(), best)
                : withoutUntoldInstantaneous(refined(best, STEPS_AT_LAST));
    }

    /** A J0 that may be nothing, beside a mode that is over by the first reading: that mode is all that is known of it. */
    private FittedCompliance withoutUntoldInstantaneous(FittedCompliance found) {
        if (!(found.instantaneous() > 0)
                || found.count() < 2
                || found.times()[0] > readings.shortestS()
                || rows.uOfLogarithm(found, 2 * found.count()) < UNTOLD) {
            return found;
        }
        FittedCompliance without =
                new FittedCompliance(found.times(), found.strengths(), 0, found.fluidity(), found.moves(), Double.NaN);
        return refined(without, STEPS_AT_LAST);
    }

    private FittedCompliance mergedGrid() {
        int steps = (int) Math.ceil(GRID_PER_DECADE * Math.log10(longest / shortest));
        double[] grid = IntStream.rangeClosed(0, steps)
                .mapToDouble(i -> shortest * Math.pow(longest / shortest, (double) i / steps))
                .toArray();
        double[] moves = rows.aligned(grid);
        FittedCompliance fine = rows.strengthsAt(grid, moves);
        List<Double> times = MergedGrid.times(grid, fine.strengths());
        return refinedInUse(
                rows.strengthsAt(times.stream().mapToDouble(Double::doubleValue).toArray(), moves));
    }

    private FittedCompliance best(FittedCompliance richest) {
        double variance = variance(richest);
        FittedCompliance current = richest;
        FittedCompliance best = current;
        while (current.count() > 0) {
            current = withOneLess(current);
            if (cost(current, variance) <= cost(best, variance)) {
                best = current;
            }
        }
        return best;
    }

    /** Of the residuals; not below that of the readings' own uncertainty. */
    private double variance(FittedCompliance modes) {
        return Math.max(1, modes.chiSquared() / Math.max(1, rows.count() - modes.parameters()));
    }

    private double cost(FittedCompliance modes, double variance) {
        return modes.chiSquared() / variance + modes.parameters() * Math.log(rows.count());
    }

    /** Down from the best set to the number wanted; where that has fewer, more than the readings ask for. */
    private FittedCompliance withExactly(int wanted, FittedCompliance best) {
        FittedCompliance current = best;
        while (current.relaxationModes() > wanted && current.count() > 0) {
            current = withOneLess(current);
        }
        return current.relaxationModes() == wanted ? refined(current, STEPS_AT_LAST) : spread(wanted, best);
    }

    /**
     * More modes than the readings ask for: evenly spread in ln λ over the times of a set that fits, strengths read from that
     * set's loss compliance, then refined with weak springs that keep neighbours in ln j and ln λ in a smooth row, for the
     * readings no longer tell them apart.
     */
    private FittedCompliance spread(int wanted, FittedCompliance fitting) {
        RetardationModes material = CreepSpectrum.modes(fitting);
        double[] ofFitting = material.timesS();
        int count = wanted - (material.isLiquid() ? 1 : 0);
        double fastest = ofFitting.length > 1 ? ofFitting[0] : readings.shortestS();
        double slowest = ofFitting.length > 1 ? ofFitting[ofFitting.length - 1] : readings.longestS();
        double step = count > 1 ? Math.log(slowest / fastest) / (count - 1) : 1;
        double[] times = IntStream.range(0, count)
                .mapToDouble(i -> count > 1 ? fastest * Math.exp(i * step) : Math.sqrt(fastest * slowest))
                .toArray();
        double[] strengths = Arrays.stream(times)
                .map(time -> -material.compliancePerPa(1 / time).im() - material.fluidityPerPaS() * time)
                .map(loss -> Math.max(loss, SMALLEST_STRENGTH * material.recoverablePerPa())
                        * 2
                        / Math.PI
                        * Math.min(step, 1))
                .toArray();
        FittedCompliance start = new FittedCompliance(
                times,
                strengths,
                material.instantaneousPerPa(),
                material.fluidityPerPaS(),
                fitting.moves(),
                Double.NaN);
        return refined(start, SPRING * Math.sqrt(variance(fitting)), OWN_PLACE * step, STEPS_AT_LAST);
    }

    private FittedCompliance withOneLess(FittedCompliance current) {
        Stream<double[]> merged = IntStream.range(0, current.count() - 1).mapToObj(current::timesMerged);
        Stream<double[]> dropped = IntStream.range(0, current.count()).mapToObj(current::timesWithout);
        return Stream.concat(merged, dropped)
                .map(times -> rows.strengthsAt(times, current.moves()))
                .sorted(Comparator.comparingDouble(FittedCompliance::chiSquared))
                .limit(CANDIDATES)
                .map(this::refinedInUse)
                .min(Comparator.comparingDouble(FittedCompliance::chiSquared))
                .orElseThrow();
    }

    private FittedCompliance refinedInUse(FittedCompliance linear) {
        FittedCompliance modes = linear;
        while (modes.timesInUse().length < modes.count()) {
            modes = rows.strengthsAt(modes.timesInUse(), modes.moves());
        }
        return refined(modes, STEPS_WHILE_SEARCHING);
    }

    private FittedCompliance refined(FittedCompliance start, int steps) {
        return refined(start, 0, Double.POSITIVE_INFINITY, steps);
    }

    /**
     * Strengths, times, J0, flow and moves refined together.
     *
     * @param spring stiffness of the springs between neighbours, 0 for none
     * @param reach how far a time may go in ln λ
     */
    private FittedCompliance refined(FittedCompliance start, double spring, double reach, int steps) {
        double[] place = start.place();
        if (place.length == 0 || Arrays.stream(start.strengths()).anyMatch(strength -> !(strength > 0))) {
            return start;
        }
        double most = Arrays.stream(start.strengths()).max().orElse(start.instantaneous());
        double[] lower = new double[place.length];
        double[] upper = new double[place.length];
        Arrays.fill(lower, Double.NEGATIVE_INFINITY);
        Arrays.fill(upper, Double.POSITIVE_INFINITY);
        for (int i = 0; i < start.count(); i++) {
            int time = start.count() + i;
            lower[i] = Math.min(place[i], Math.log(SMALLEST_STRENGTH * most));
            lower[time] = Math.log(shortest);
            upper[time] = Math.log(longest);
            place[time] = Math.min(upper[time], Math.max(lower[time], place[time]));
            lower[time] = Math.max(lower[time], place[time] - reach);
            upper[time] = Math.min(upper[time], place[time] + reach);
        }
        double leastInstantaneous = SMALLEST_STRENGTH * most;
        double leastFluidity = leastInstantaneous / longest;
        int next = 2 * start.count();
        if (start.instantaneous() > 0) {
            lower[next] = Math.min(place[next], Math.log(leastInstantaneous));
            next++;
        }
        if (start.fluidity() > 0) {
            lower[next] = Math.min(place[next], Math.log(leastFluidity));
            next++;
        }
        if (spring > 0) {
            for (int i = 2 * start.count(); i < next; i++) {
                lower[i] = place[i] - KEPT;
                upper[i] = place[i] + KEPT;
            }
        }
        LevenbergMarquardt.Fit fit =
                LevenbergMarquardt.minimise(new Model(start, spring), place, lower, upper, ENOUGH, steps);
        FittedCompliance found = start.at(fit.parameters()).without(2 * leastInstantaneous, 2 * leastFluidity);
        return found.sorted(CreepRows.square(rows.residuals(found)));
    }

    /** Residuals of the readings, followed by those of the springs where there are any. */
    private final class Model implements LevenbergMarquardt.Problem {
        private final FittedCompliance start;
        private final double spring;
        private final int springs;

        Model(FittedCompliance start, double spring) {
            this.start = start;
            this.spring = spring;
            this.springs = spring > 0 ? Math.max(0, start.count() - 2) : 0;
        }

        @Override
        public double[] residuals(double[] p) {
            int count = start.count();
            double[] residuals = Arrays.copyOf(rows.residuals(start.at(p)), rows.count() + 2 * springs);
            for (int k = 0; k < springs; k++) {
                residuals[rows.count() + k] = spring * (p[k] - 2 * p[k + 1] + p[k + 2]);
                residuals[rows.count() + springs + k] =
                        spring * (p[count + k] - 2 * p[count + k + 1] + p[count + k + 2]);
            }
            return residuals;
        }

        @Override
        public double[][] jacobian(double[] p) {
            double[][] jacobian = rows.jacobian(start.at(p));
            if (springs == 0) {
                return jacobian;
            }
            for (int j = 0; j < jacobian.length; j++) {
                jacobian[j] = Arrays.copyOf(jacobian[j], rows.count() + 2 * springs);
            }
            for (int part = 0; part < 2; part++) {
                for (int k = 0; k < springs; k++) {
                    int row = rows.count() + part * springs + k;
                    int first = part * start.count() + k;
                    jacobian[first][row] = spring;
                    jacobian[first + 1][row] = -2 * spring;
                    jacobian[first + 2][row] = spring;
                }
            }
            return jacobian;
        }
    }
}

package nightlag.stages.spectrum;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.OptionalInt;
import java.util.stream.IntStream;
import java.util.stream.Stream;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.numeric.LevenbergMarquardt;
import nightlag.stages.numeric.NonNegativeLeastSquares;

/**
 * Creep curves, and complex moduli of the same material, to one discrete retardation spectrum. Strains after any steps of
 * stress and compliances 1/G* are both linear in J0, 1/η0 and the strengths, so both stand in one non-negative least-squares
 * problem (Lawson &amp; Hanson 1974) on a fine grid of times; neighbours are merged, strengths and times refined together, and
 * modes taken away one at a time, each time the one that is missed least, down to the set with the smallest
 * χ²/s² + p ln m (Schwarz, Ann. Stat. 6 (1978) 461).
 */
public final class CreepFit {
    private static final int LEAST_READINGS = 8;
    private static final int GRID_PER_DECADE = 10;
    /** Faster than this share of the first time a mode is part of J0. */
    private static final double FASTEST = 0.3;

    private static final double SLOWEST = 3;
    private static final int CANDIDATES = 2;
    private static final double ENOUGH = 1e-9;
    private static final int STEPS_WHILE_SEARCHING = 30;
    private static final int STEPS_AT_LAST = 200;
    private static final double SMALLEST_STRENGTH = 1e-12;

    private final ComplianceReadings readings;
    private final boolean liquid;
    private final double shortest;
    private final double longest;
    private final double[] target;

    private CreepFit(ComplianceReadings readings, boolean liquid) {
        this.readings = readings;
        this.liquid = liquid;
        this.shortest = FASTEST * readings.shortestS();
        this.longest = SLOWEST * readings.longestS();
        this.target = readings.target();
    }

    /**
     * Fits one spectrum to all.
     *
     * @param curves usable curves that begin at rest, of one temperature and one kind of deformation
     * @param moduli moduli at that temperature, each with a covariance; may be empty
     * @param plan what is wanted; a fixed number of modes is an upper bound here
     * @throws ReductionFault if there are too few readings
     */
    public static CreepSpectrum fit(List<CreepCurve> curves, List<ModulusReading> moduli, SpectrumPlan plan)
            throws ReductionFault {
        ComplianceReadings readings = ComplianceReadings.of(curves, moduli);
        if (readings.rows() < LEAST_READINGS) {
            throw new ReductionFault(SpectrumReason.CREEP_TOO_FEW_READINGS.with(readings.rows(), LEAST_READINGS));
        }
        CreepFit fit = new CreepFit(readings, !plan.fitEquilibrium());
        FittedCompliance best = fit.best(fit.mergedGrid(), plan.modes());
        FittedCompliance last = fit.refined(best, STEPS_AT_LAST);
        if (!(last.instantaneous() > 0) && last.count() < 2) {
            throw new ReductionFault(SpectrumReason.CREEP_NO_INSTANTANEOUS.with());
        }
        return new CreepSpectrum(readings, fit.jacobian(last), last, !moduli.isEmpty());
    }

    private FittedCompliance mergedGrid() {
        int steps = (int) Math.ceil(GRID_PER_DECADE * Math.log10(longest / shortest));
        double[] grid = IntStream.rangeClosed(0, steps)
                .mapToDouble(i -> shortest * Math.pow(longest / shortest, (double) i / steps))
                .toArray();
        FittedCompliance fine = strengthsAt(grid);
        List<Double> times = MergedGrid.times(grid, fine.strengths());
        return fitted(times.stream().mapToDouble(Double::doubleValue).toArray());
    }

    private FittedCompliance best(FittedCompliance richest, OptionalInt most) {
        double free = Math.max(1, readings.rows() - richest.parameters());
        double variance = Math.max(1, richest.chiSquared() / free);
        FittedCompliance current = richest;
        while (most.isPresent() && current.count() > Math.max(1, most.getAsInt())) {
            current = withOneLess(current);
        }
        FittedCompliance best = current;
        while (current.count() > 0) {
            current = withOneLess(current);
            if (cost(current, variance) <= cost(best, variance)) {
                best = current;
            }
        }
        return best;
    }

    private double cost(FittedCompliance modes, double variance) {
        return modes.chiSquared() / variance + modes.parameters() * Math.log(readings.rows());
    }

    private FittedCompliance withOneLess(FittedCompliance current) {
        Stream<double[]> merged = IntStream.range(0, current.count() - 1).mapToObj(current::timesMerged);
        Stream<double[]> dropped = IntStream.range(0, current.count()).mapToObj(current::timesWithout);
        return Stream.concat(merged, dropped)
                .map(this::strengthsAt)
                .sorted(Comparator.comparingDouble(FittedCompliance::chiSquared))
                .limit(CANDIDATES)
                .map(this::refinedInUse)
                .min(Comparator.comparingDouble(FittedCompliance::chiSquared))
                .orElseThrow();
    }

    private FittedCompliance fitted(double[] times) {
        return refinedInUse(strengthsAt(times));
    }

    private FittedCompliance refinedInUse(FittedCompliance linear) {
        double[] inUse = linear.timesInUse();
        return refined(inUse.length == linear.count() ? linear : strengthsAt(inUse), STEPS_WHILE_SEARCHING);
    }

    private FittedCompliance strengthsAt(double[] times) {
        List<double[]> columns = new ArrayList<>();
        for (double time : times) {
            columns.add(readings.mode(time));
        }
        columns.add(readings.instantaneous());
        if (liquid) {
            columns.add(readings.flow());
        }
        double[] solution = NonNegativeLeastSquares.solve(columns.toArray(new double[0][]), target);
        FittedCompliance modes = new FittedCompliance(
                times.clone(),
                Arrays.copyOf(solution, times.length),
                solution[times.length],
                liquid ? solution[times.length + 1] : 0,
                Double.NaN);
        return modes.sorted(square(residuals(modes)));
    }

    private FittedCompliance refined(FittedCompliance start, int steps) {
        double[] place = start.logarithms();
        if (place.length == 0 || Arrays.stream(start.strengths()).anyMatch(strength -> !(strength > 0))) {
            return start;
        }
        double most = Arrays.stream(start.strengths()).max().orElse(start.instantaneous());
        double[] lower = new double[place.length];
        double[] upper = new double[place.length];
        Arrays.fill(lower, Double.NEGATIVE_INFINITY);
        Arrays.fill(upper, Double.POSITIVE_INFINITY);
        for (int i = 0; i < start.count(); i++) {
            lower[i] = Math.min(place[i], Math.log(SMALLEST_STRENGTH * most));
            lower[start.count() + i] = Math.log(shortest);
            upper[start.count() + i] = Math.log(longest);
            place[start.count() + i] =
                    Math.min(Math.log(longest), Math.max(Math.log(shortest), place[start.count() + i]));
        }
        LevenbergMarquardt.Fit fit = LevenbergMarquardt.minimise(
                new LevenbergMarquardt.Problem() {
                    @Override
                    public double[] residuals(double[] p) {
                        return CreepFit.this.residuals(start.at(p));
                    }

                    @Override
                    public double[][] jacobian(double[] p) {
                        return CreepFit.this.jacobian(start.at(p));
                    }
                },
                place,
                lower,
                upper,
                ENOUGH,
                steps);
        FittedCompliance found = start.at(fit.parameters());
        return found.sorted(square(residuals(found)));
    }

    private double[] residuals(FittedCompliance modes) {
        double[] residuals = Arrays.stream(target).map(value -> -value).toArray();
        for (int i = 0; i < modes.count(); i++) {
            add(residuals, readings.mode(modes.times()[i]), modes.strengths()[i]);
        }
        add(residuals, readings.instantaneous(), modes.instantaneous());
        add(residuals, readings.flow(), modes.fluidity());
        return residuals;
    }

    private static void add(double[] sum, double[] column, double factor) {
        for (int row = 0; row < sum.length; row++) {
            sum[row] += factor * column[row];
        }
    }

    /** Derivatives of the rows by the logarithms of what is fitted. */
    private double[][] jacobian(FittedCompliance modes) {
        int count = modes.count();
        double[][] jacobian = new double[modes.parameters()][];
        for (int i = 0; i < count; i++) {
            jacobian[i] = scaled(readings.mode(modes.times()[i]), modes.strengths()[i]);
            jacobian[count + i] = scaled(readings.modeByLogTime(modes.times()[i]), modes.strengths()[i]);
        }
        int next = 2 * count;
        if (modes.instantaneous() > 0) {
            jacobian[next++] = scaled(readings.instantaneous(), modes.instantaneous());
        }
        if (modes.fluidity() > 0) {
            jacobian[next] = scaled(readings.flow(), modes.fluidity());
        }
        return jacobian;
    }

    private static double[] scaled(double[] column, double factor) {
        return Arrays.stream(column).map(value -> factor * value).toArray();
    }

    private static double square(double[] residuals) {
        return Arrays.stream(residuals).map(r -> r * r).sum();
    }
}

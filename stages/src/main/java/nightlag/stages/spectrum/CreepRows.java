package nightlag.stages.spectrum;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.stream.IntStream;
import nightlag.stages.numeric.LinearisedUncertainty;
import nightlag.stages.numeric.NonNegativeLeastSquares;

/**
 * The residuals of creep curves and moduli about a set of retardation modes, each over its uncertainty: one row a reading, then
 * one row for each move of the shifts, which is known to be 0 within 1.
 */
final class CreepRows {
    private static final int ROUNDS_OF_ALIGNING = 4;
    private static final double FINENESS = 1.1;
    private static final int MAX_TRIALS = 200;
    /** What a logarithm is known to before the data. */
    private static final double PRIOR_U_OF_LOGARITHM = 10;

    /** By what factor a material is tried to be stiffer at once. */
    private static final double FASTER = 1.15;

    private final CreepData data;
    private final boolean liquid;
    private final ComplianceReadings unmoved;
    private final double[] target;

    /**
     * Rows of data.
     *
     * @param liquid whether flow is fitted
     */
    CreepRows(CreepData data, boolean liquid) {
        this.data = data;
        this.liquid = liquid;
        this.unmoved = data.at(new double[data.moves()]);
        this.target = unmoved.target();
    }

    /** How many readings there are, moves counted as such. */
    int count() {
        return readings() + data.moves();
    }

    /** How many there are of strain, storage and loss compliance. */
    int readings() {
        return target.length;
    }

    /** The readings after these moves. */
    ComplianceReadings at(double[] moves) {
        return Arrays.stream(moves).allMatch(move -> move == 0) ? unmoved : data.at(moves);
    }

    /** The best strengths, J0 and flow, none negative, at given times and moves. */
    FittedCompliance strengthsAt(double[] times, double[] moves) {
        double[] solution = NonNegativeLeastSquares.solve(columns(at(moves), times), target);
        return modes(times, solution, moves);
    }

    private double[][] columns(ComplianceReadings readings, double[] times) {
        List<double[]> columns = new ArrayList<>();
        for (double time : times) {
            columns.add(readings.mode(time));
        }
        columns.add(readings.instantaneous());
        if (liquid) {
            columns.add(readings.flow());
        }
        return columns.toArray(new double[0][]);
    }

    private FittedCompliance modes(double[] times, double[] solution, double[] moves) {
        FittedCompliance modes = new FittedCompliance(
                times.clone(),
                Arrays.copyOf(solution, times.length),
                solution[times.length],
                liquid ? solution[times.length + 1] : 0,
                moves.clone(),
                Double.NaN);
        return modes.sorted(square(residuals(modes)));
    }

    /** The moves with which modes at many times fit best: before any are thinned out, lest some of them stand in for a shift. */
    double[] aligned(double[] grid) {
        double[] moves = new double[data.moves()];
        for (int round = 0; round < ROUNDS_OF_ALIGNING && moves.length > 0; round++) {
            double[][] byMove = byMove(strengthsAt(grid, moves));
            double[][] spectrum = columns(at(moves), grid);
            double[][] columns = Arrays.copyOf(spectrum, spectrum.length + 2 * moves.length);
            for (int j = 0; j < spectrum.length; j++) {
                columns[j] = Arrays.copyOf(spectrum[j], count());
            }
            double[] left = Arrays.copyOf(target, count());
            for (int m = 0; m < moves.length; m++) {
                columns[spectrum.length + 2 * m] = byMove[m];
                columns[spectrum.length + 2 * m + 1] = scaled(byMove[m], -1);
                left[readings() + m] = -moves[m];
            }
            double[] solution = NonNegativeLeastSquares.solve(columns, left);
            for (int m = 0; m < moves.length; m++) {
                moves[m] += solution[spectrum.length + 2 * m] - solution[spectrum.length + 2 * m + 1];
            }
        }
        return moves;
    }

    /**
     * A set with the strongest further mode at a time that the readings allow, all strengths, J0 and flow making room for it.
     *
     * @param allowed what χ² may rise to
     */
    FittedCompliance withUnseen(FittedCompliance best, double time, double allowed) {
        ComplianceReadings readings = at(best.moves());
        double[][] columns = columns(readings, best.times());
        double[] unseen = readings.mode(time);
        double prior = square(best.moves());
        double first = Math.sqrt(Math.max(1, allowed - best.chiSquared()) / square(unseen));
        FittedCompliance last = best;
        double lastStrength = 0;
        double ceiling = Double.POSITIVE_INFINITY;
        double strength = first;
        for (int trial = 0; trial < MAX_TRIALS && (lastStrength == 0 || ceiling > FINENESS * lastStrength); trial++) {
            double[] rest = target.clone();
            add(rest, unseen, -strength);
            double[] solution = NonNegativeLeastSquares.solve(columns, rest);
            double[] residuals = scaled(rest, -1);
            for (int j = 0; j < columns.length; j++) {
                add(residuals, columns[j], solution[j]);
            }
            if (square(residuals) + prior <= allowed) {
                last = modes(best.times(), solution, best.moves());
                lastStrength = strength;
            } else {
                ceiling = strength;
            }
            strength = Double.isInfinite(ceiling)
                    ? 4 * strength
                    : lastStrength == 0 ? strength / 4 : Math.sqrt(lastStrength * ceiling);
        }
        if (lastStrength == 0) {
            return best;
        }
        double[] times = Arrays.copyOf(last.times(), last.count() + 1);
        double[] strengths = Arrays.copyOf(last.strengths(), last.count() + 1);
        times[last.count()] = time;
        strengths[last.count()] = lastStrength;
        FittedCompliance more =
                new FittedCompliance(times, strengths, last.instantaneous(), last.fluidity(), last.moves(), Double.NaN);
        return more.sorted(square(residuals(more)));
    }

    /**
     * A set with the strongest unseen fast relaxation mode that the readings allow, all strengths and flow making room for it. It
     * makes the material f times as stiff at once, so that J0 is less by f and comes back f times as late as the mode relaxes.
     *
     * @param time relaxation time of the mode
     * @param latest retardation time up to which it is unseen
     * @param allowed what χ² may rise to
     */
    FittedCompliance withUnseenFast(FittedCompliance best, double time, double latest, double allowed) {
        ComplianceReadings readings = at(best.moves());
        double seen = best.instantaneous() > 0 ? best.instantaneous() : best.strengths()[0];
        double[] instantaneous = readings.instantaneous();
        double[] times = Arrays.copyOf(best.times(), best.count() + 1);
        FittedCompliance last = best;
        for (double factor = FASTER; factor * time <= latest; factor *= FASTER) {
            times[best.count()] = factor * time;
            double[][] all = columns(readings, times);
            double[][] columns = IntStream.range(0, all.length)
                    .filter(j -> j != times.length)
                    .mapToObj(j -> all[j])
                    .toArray(double[][]::new);
            double[] rest = target.clone();
            add(rest, instantaneous, -seen / factor);
            double[] solution = NonNegativeLeastSquares.solve(columns, rest);
            FittedCompliance slower = new FittedCompliance(
                    times.clone(),
                    Arrays.copyOf(solution, times.length),
                    seen / factor,
                    liquid ? solution[times.length] : 0,
                    best.moves(),
                    Double.NaN);
            double chiSquared = square(residuals(slower));
            if (chiSquared <= allowed) {
                last = slower.sorted(chiSquared);
            }
        }
        return last;
    }

    double[] residuals(FittedCompliance modes) {
        double[] residuals = Arrays.copyOf(model(at(modes.moves()), modes), count());
        for (int row = 0; row < target.length; row++) {
            residuals[row] -= target[row];
        }
        System.arraycopy(modes.moves(), 0, residuals, target.length, modes.moves().length);
        return residuals;
    }

    private static double[] model(ComplianceReadings readings, FittedCompliance modes) {
        double[] sum = new double[readings.rows()];
        for (int i = 0; i < modes.count(); i++) {
            add(sum, readings.mode(modes.times()[i]), modes.strengths()[i]);
        }
        add(sum, readings.instantaneous(), modes.instantaneous());
        add(sum, readings.flow(), modes.fluidity());
        return sum;
    }

    /** Derivatives of the residuals by the numbers of {@link FittedCompliance#place()}. */
    double[][] jacobian(FittedCompliance modes) {
        ComplianceReadings readings = at(modes.moves());
        int count = modes.count();
        double[][] jacobian = new double[modes.parameters()][];
        for (int i = 0; i < count; i++) {
            jacobian[i] = padded(readings.mode(modes.times()[i]), modes.strengths()[i]);
            jacobian[count + i] = padded(readings.modeByLogTime(modes.times()[i]), modes.strengths()[i]);
        }
        int next = 2 * count;
        if (modes.instantaneous() > 0) {
            jacobian[next++] = padded(readings.instantaneous(), modes.instantaneous());
        }
        if (modes.fluidity() > 0) {
            jacobian[next++] = padded(readings.flow(), modes.fluidity());
        }
        double[][] byMove = byMove(modes);
        System.arraycopy(byMove, 0, jacobian, next, byMove.length);
        return jacobian;
    }

    /** Derivatives by the moves: ln a makes every λ longer alike and the flow slower, ln b makes the whole compliance larger. */
    private double[][] byMove(FittedCompliance modes) {
        int moves = modes.moves().length;
        double[][] byMove = new double[moves][count()];
        if (moves == 0) {
            return byMove;
        }
        ComplianceReadings readings = at(modes.moves());
        double[] byLnB = model(readings, modes);
        double[] byLnA = new double[readings.rows()];
        for (int i = 0; i < modes.count(); i++) {
            add(byLnA, readings.modeByLogTime(modes.times()[i]), modes.strengths()[i]);
        }
        add(byLnA, readings.flow(), -modes.fluidity());
        for (int m = 0; m < moves; m++) {
            for (int row = 0; row < readings.rows(); row++) {
                int temperature = readings.temperature(row);
                if (temperature >= 0) {
                    byMove[m][row] =
                            data.lnAByMove(temperature, m) * byLnA[row] + data.lnBByMove(temperature, m) * byLnB[row];
                }
            }
            byMove[m][readings() + m] = 1;
        }
        return byMove;
    }

    /** Standard uncertainty of one of the numbers of {@link FittedCompliance#place()}. */
    double uOfLogarithm(FittedCompliance modes, int place) {
        double[] figure = new double[modes.parameters()];
        figure[place] = 1;
        return linearised(modes).of(figure);
    }

    /** What the readings say about the numbers of {@link FittedCompliance#place()}. */
    LinearisedUncertainty linearised(FittedCompliance modes) {
        double[] priors = new double[modes.parameters()];
        Arrays.fill(priors, PRIOR_U_OF_LOGARITHM);
        return new LinearisedUncertainty(jacobian(modes), priors);
    }

    private double[] padded(double[] column, double factor) {
        return Arrays.copyOf(scaled(column, factor), count());
    }

    private static void add(double[] sum, double[] column, double factor) {
        for (int row = 0; row < sum.length; row++) {
            sum[row] += factor * column[row];
        }
    }

    private static double[] scaled(double[] column, double factor) {
        return Arrays.stream(column).map(value -> factor * value).toArray();
    }

    static double square(double[] values) {
        return Arrays.stream(values).map(value -> value * value).sum();
    }
}

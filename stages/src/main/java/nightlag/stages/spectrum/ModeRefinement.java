package nightlag.stages.spectrum;

import java.util.Arrays;
import java.util.Comparator;
import java.util.stream.IntStream;
import nightlag.stages.numeric.LevenbergMarquardt;
import nightlag.stages.numeric.NonNegativeLeastSquares;

/**
 * Fits sets of modes to readings: strengths alone at given times (a linear problem), or strengths and times together from
 * there (in ln g, ln τ and ln Ge, so that all stay positive). Times stay within a decade of the data's ends.
 */
final class ModeRefinement {
    private static final double BEYOND_THE_DATA = 10;
    /** Strengths are not followed below this share of the largest modulus. */
    private static final double SMALLEST_STRENGTH = 1e-15;

    private static final double FIRST_SHARE = 1e-3;
    private static final double SPRING = 0.3;
    private static final double WHILE_SEARCHING = 1e-4;
    private static final double AT_LAST = 1e-10;
    private static final int MAX_STEPS_WHILE_SEARCHING = 25;
    private static final int MAX_STEPS = 100;

    private final WeightedReadings readings;
    private final boolean fitEquilibrium;
    private final double shortest;
    private final double longest;

    ModeRefinement(WeightedReadings readings, boolean fitEquilibrium) {
        this(
                readings,
                fitEquilibrium,
                1 / (BEYOND_THE_DATA * readings.highestFrequency()),
                BEYOND_THE_DATA / readings.lowestFrequency());
    }

    private ModeRefinement(WeightedReadings readings, boolean fitEquilibrium, double shortest, double longest) {
        this.readings = readings;
        this.fitEquilibrium = fitEquilibrium;
        this.shortest = shortest;
        this.longest = longest;
    }

    /**
     * More modes than the readings ask for: evenly spread in ln τ over the times of a set that fits, or over the data if it
     * has but one, strengths read from that set's loss modulus, then refined with weak springs that keep neighbours in ln g
     * and ln τ in a smooth row, for the readings no longer tell them apart.
     *
     * @param wanted how many, at least 2
     * @param fitting a set that fits
     * @param scatter standard deviation of the weighted residuals about it
     */
    FittedModes spread(int wanted, FittedModes fitting, double scatter) {
        double fastest = fitting.count() > 1 ? fitting.times()[0] : 1 / readings.highestFrequency();
        double slowest = fitting.count() > 1 ? fitting.times()[fitting.count() - 1] : 1 / readings.lowestFrequency();
        RelaxationModes material = RelaxationModes.of(fitting.equilibrium(), fitting.times(), fitting.strengths());
        double step = Math.log(slowest / fastest) / (wanted - 1);
        double[] times = IntStream.range(0, wanted)
                .mapToDouble(i -> fastest * Math.exp(i * step))
                .toArray();
        double[] strengths = Arrays.stream(times)
                .map(time -> material.modulusPa(1 / time).im() * 2 / Math.PI * Math.min(step, 1))
                .toArray();
        ModeRefinement inside = new ModeRefinement(readings, fitEquilibrium, fastest, slowest);
        return inside.refine(
                new FittedModes(times, strengths, fitting.equilibrium(), Double.NaN),
                SPRING * scatter,
                AT_LAST,
                MAX_STEPS);
    }

    /** Times spread evenly in ln τ over all that is allowed. */
    double[] grid(int perDecade) {
        double decades = Math.log10(longest / shortest);
        int steps = (int) Math.ceil(decades * perDecade);
        return IntStream.rangeClosed(0, steps)
                .mapToDouble(i -> shortest * Math.pow(longest / shortest, (double) i / steps))
                .toArray();
    }

    /** The best strengths, none negative, at given times. */
    FittedModes strengthsAt(double[] times) {
        int count = times.length;
        double[][] columns = new double[count + (fitEquilibrium ? 1 : 0)][];
        for (int i = 0; i < count; i++) {
            columns[i] = readings.mode(times[i]);
        }
        if (fitEquilibrium) {
            columns[count] = readings.equilibrium();
        }
        double[] target = readings.target();
        double[] solution = NonNegativeLeastSquares.solve(columns, target);
        double chiSquared = 0;
        for (int row = 0; row < target.length; row++) {
            double residual = target[row];
            for (int j = 0; j < columns.length; j++) {
                residual -= columns[j][row] * solution[j];
            }
            chiSquared += residual * residual;
        }
        double[] strengths = Arrays.copyOf(solution, count);
        return new FittedModes(times.clone(), strengths, fitEquilibrium ? solution[count] : 0, chiSquared);
    }

    /** Strengths and times moved to where the fit is best; a mode of no strength starts with a little of the weakest. */
    FittedModes refine(FittedModes start) {
        return refine(start, 0, WHILE_SEARCHING, MAX_STEPS_WHILE_SEARCHING);
    }

    /** The same to the last digit. */
    FittedModes polish(FittedModes start) {
        return refine(start, 0, AT_LAST, MAX_STEPS);
    }

    /** The best fit with a further contribution of given strength that is not fitted; χ² is that of both together. */
    FittedModes refineBeside(FittedModes start, double[] column, double strength) {
        return new ModeRefinement(readings.less(column, strength), fitEquilibrium, shortest, longest).refine(start);
    }

    private FittedModes refine(FittedModes start, double spring, double enough, int maxSteps) {
        double weakest = Arrays.stream(start.strengths())
                .filter(strength -> strength > 0)
                .min()
                .orElse(readings.largestModulus());
        int count = start.count();
        boolean solid = start.equilibrium() > 0;
        int parameters = start.parameters();
        double least = Math.log(SMALLEST_STRENGTH * readings.largestModulus());
        double[] place = new double[parameters];
        double[] lower = new double[parameters];
        double[] upper = new double[parameters];
        for (int i = 0; i < count; i++) {
            double strength = start.strengths()[i] > 0 ? start.strengths()[i] : FIRST_SHARE * weakest;
            place[i] = Math.max(least, Math.log(strength));
            lower[i] = least;
            upper[i] = Double.POSITIVE_INFINITY;
            lower[count + i] = Math.log(shortest);
            upper[count + i] = Math.log(longest);
            place[count + i] = Math.min(upper[count + i], Math.max(lower[count + i], Math.log(start.times()[i])));
        }
        if (solid) {
            place[2 * count] = Math.max(least, Math.log(start.equilibrium()));
            lower[2 * count] = least;
            upper[2 * count] = Double.POSITIVE_INFINITY;
        }
        LevenbergMarquardt.Fit fit =
                LevenbergMarquardt.minimise(new Model(count, solid, spring), place, lower, upper, enough, maxSteps);
        return sorted(fit.parameters(), count, solid && fit.parameters()[2 * count] > least);
    }

    private FittedModes sorted(double[] found, int count, boolean solid) {
        int[] order = IntStream.range(0, count)
                .boxed()
                .sorted(Comparator.comparingDouble(i -> found[count + i]))
                .mapToInt(Integer::intValue)
                .toArray();
        double[] times =
                IntStream.of(order).mapToDouble(i -> Math.exp(found[count + i])).toArray();
        double[] strengths =
                IntStream.of(order).mapToDouble(i -> Math.exp(found[i])).toArray();
        FittedModes modes = new FittedModes(times, strengths, solid ? Math.exp(found[2 * count]) : 0, Double.NaN);
        double chiSquared = Arrays.stream(residuals(modes)).map(r -> r * r).sum();
        return new FittedModes(times, strengths, modes.equilibrium(), chiSquared);
    }

    private double[] residuals(FittedModes modes) {
        double[] residuals = Arrays.stream(readings.target()).map(v -> -v).toArray();
        for (int i = 0; i < modes.count(); i++) {
            add(residuals, readings.mode(modes.times()[i]), modes.strengths()[i]);
        }
        if (modes.equilibrium() > 0) {
            add(residuals, readings.equilibrium(), modes.equilibrium());
        }
        return residuals;
    }

    private static void add(double[] sum, double[] column, double factor) {
        for (int row = 0; row < sum.length; row++) {
            sum[row] += factor * column[row];
        }
    }

    /** Derivatives of the rows by ln g_i, ln τ_i and, for a solid, ln Ge. */
    double[][] jacobian(FittedModes modes) {
        int count = modes.count();
        double[][] jacobian = new double[modes.parameters()][];
        for (int i = 0; i < count; i++) {
            jacobian[i] = scaled(readings.mode(modes.times()[i]), modes.strengths()[i]);
            jacobian[count + i] = scaled(readings.modeByLogTime(modes.times()[i]), modes.strengths()[i]);
        }
        if (modes.equilibrium() > 0) {
            jacobian[2 * count] = scaled(readings.equilibrium(), modes.equilibrium());
        }
        return jacobian;
    }

    private static double[] scaled(double[] column, double factor) {
        for (int i = 0; i < column.length; i++) {
            column[i] *= factor;
        }
        return column;
    }

    /** Residuals of the readings, followed by those of the springs where there are any. */
    private final class Model implements LevenbergMarquardt.Problem {
        private final int count;
        private final boolean solid;
        private final double spring;

        Model(int count, boolean solid, double spring) {
            this.count = count;
            this.solid = solid;
            this.spring = spring;
        }

        private FittedModes at(double[] p) {
            return new FittedModes(
                    IntStream.range(0, count)
                            .mapToDouble(i -> Math.exp(p[count + i]))
                            .toArray(),
                    IntStream.range(0, count).mapToDouble(i -> Math.exp(p[i])).toArray(),
                    solid ? Math.exp(p[2 * count]) : 0,
                    Double.NaN);
        }

        private int springs() {
            return spring > 0 ? Math.max(0, count - 2) : 0;
        }

        @Override
        public double[] residuals(double[] p) {
            double[] residuals = ModeRefinement.this.residuals(at(p));
            int rows = residuals.length;
            residuals = Arrays.copyOf(residuals, rows + 2 * springs());
            for (int k = 0; k < springs(); k++) {
                residuals[rows + k] = spring * (p[k] - 2 * p[k + 1] + p[k + 2]);
                residuals[rows + springs() + k] = spring * (p[count + k] - 2 * p[count + k + 1] + p[count + k + 2]);
            }
            return residuals;
        }

        @Override
        public double[][] jacobian(double[] p) {
            double[][] jacobian = ModeRefinement.this.jacobian(at(p));
            int rows = readings.rows();
            for (int j = 0; j < jacobian.length; j++) {
                jacobian[j] = Arrays.copyOf(jacobian[j], rows + 2 * springs());
            }
            for (int k = 0; k < springs(); k++) {
                for (int part = 0; part < 2; part++) {
                    int row = rows + part * springs() + k;
                    int first = part * count + k;
                    jacobian[first][row] = spring;
                    jacobian[first + 1][row] = -2 * spring;
                    jacobian[first + 2][row] = spring;
                }
            }
            return jacobian;
        }
    }
}

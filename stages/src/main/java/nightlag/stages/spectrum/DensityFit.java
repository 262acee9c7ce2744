package nightlag.stages.spectrum;

import java.util.Arrays;
import java.util.List;
import java.util.function.DoubleFunction;
import java.util.stream.IntStream;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.numeric.PivotedCholesky;

/**
 * The density D of Q(s) = c + η s + ∫ D(τ) sτ/(1 + sτ) d ln τ fitted to values of Q at imaginary s, and the density of 1/Q that
 * follows ({@link GrossRelation}). For moduli D is H; for compliances at inverse frequency it is L at inverse times.
 */
final class DensityFit {
    /** A normal variable's 95 % interval in standard deviations. */
    private static final double COVERAGE = 1.96;

    /**
     * Where ln D is less sure than this, its lower end is the prior's word and not the data's: they do not tell the spectrum
     * from none.
     */
    private static final double UNTOLD = 1;

    /** A figure beside the spectrum is expected this factor below the most it can be. */
    private static final double LOG_BELOW_MOST = 1;

    /** The spectrum is expected about this factor below the largest modulus. */
    private static final double LOG_BELOW_LARGEST = Math.log(10);

    /** What is left out of the variance of ln D in the spread of materials: 0.3 % of the density. */
    private static final double LEAST_VARIANCE = 1e-5;

    /** The furthest a logarithm moves in a step of the spread. */
    private static final double LONGEST_STEP = 0.5;

    /** A part of a sum that is rounding. */
    private static final double TRACE = 1e-16;

    /** What there is beside the density. */
    enum Beside {
        /** c, a constant. */
        CONSTANT,
        /** η, a viscosity. */
        VISCOUS
    }

    private final LogTimes times;
    private final List<Beside> beside;
    private final LogPosterior posterior;

    private DensityFit(LogTimes times, List<Beside> beside, LogPosterior posterior) {
        this.times = times;
        this.beside = beside;
        this.posterior = posterior;
    }

    /**
     * A figure beside the density.
     *
     * @param which which it is
     * @param column what it adds to each row where it is 1
     * @param most about the most it can be
     */
    record Figure(Beside which, double[] column, double most) {}

    /**
     * Fits a density to values of Q.
     *
     * @param weighed values with covariances
     * @param beside what is fitted beside it
     */
    static DensityFit of(List<ModulusReading> weighed, List<Beside> beside) {
        WeightedReadings rows = WeightedReadings.byCovariances(weighed);
        return of(
                LogTimes.around(rows.lowestFrequency(), rows.highestFrequency()),
                rows.target(),
                rows::mode,
                rows.largestModulus(),
                beside.stream()
                        .map(which -> new Figure(
                                which,
                                which == Beside.CONSTANT ? rows.equilibrium() : rows.viscous(),
                                most(weighed, which)))
                        .toList());
    }

    /**
     * Fits a density to whatever is linear in it.
     *
     * @param times where it is sought
     * @param target what was read, a row each, over its uncertainty
     * @param mode what a mode of unit strength at a time adds to each row
     * @param largest about the largest sum of all its strengths
     * @param figures what is fitted beside it
     */
    static DensityFit of(
            LogTimes times, double[] target, DoubleFunction<double[]> mode, double largest, List<Figure> figures) {
        int nodes = times.count();
        double[][] columns = new double[nodes + figures.size()][];
        for (int j = 0; j < nodes; j++) {
            columns[j] = Arrays.stream(mode.apply(times.time(j)))
                    .map(v -> LogTimes.STEP * v)
                    .toArray();
        }
        double[] expected = new double[columns.length];
        Arrays.fill(expected, 0, nodes, Math.log(largest) - LOG_BELOW_LARGEST);
        for (int k = 0; k < figures.size(); k++) {
            columns[nodes + k] = figures.get(k).column();
            expected[nodes + k] = Math.log(figures.get(k).most()) - LOG_BELOW_MOST;
        }
        LogPosterior posterior = LogPosterior.of(InverseProblem.of(target, columns, nodes, expected));
        return new DensityFit(times, figures.stream().map(Figure::which).toList(), posterior);
    }

    /** The most a figure can be beside a positive spectrum, roughly. */
    private static double most(List<ModulusReading> weighed, Beside figure) {
        return weighed.stream()
                .mapToDouble(reading -> figure == Beside.CONSTANT
                        ? reading.moduli().storagePa()
                        : reading.moduli().lossPa() / reading.angularFrequency())
                .filter(value -> value > 0)
                .min()
                .orElse(weighed.get(0).moduli().magnitudePa());
    }

    LogTimes times() {
        return times;
    }

    /** D at every node. */
    double[] density() {
        return IntStream.range(0, times.count())
                .mapToDouble(j -> Math.exp(posterior.mean()[j]))
                .toArray();
    }

    /** c or η; 0 where it was not fitted. */
    double figure(Beside which) {
        int k = beside.indexOf(which);
        return k < 0 ? 0 : Math.exp(posterior.mean()[times.count() + k]);
    }

    /** c + ∫ D d ln τ, what Q comes to at infinite s where it has no viscosity. */
    double sum() {
        return figure(Beside.CONSTANT)
                + LogTimes.STEP * Arrays.stream(density()).sum();
    }

    /** The material that D, as H, and c, as Ge, describe, and what the posterior leaves open of it. */
    MaterialSpread materials() {
        List<MaterialSpread.Pair> pairs = PivotedCholesky.directions(posterior.covariance(), LEAST_VARIANCE).stream()
                .map(this::pair)
                .toList();
        return new MaterialSpread(moved(new double[posterior.mean().length], 0), pairs);
    }

    private MaterialSpread.Pair pair(double[] direction) {
        double longest = Arrays.stream(direction).map(Math::abs).max().orElseThrow();
        double step = Math.min(1, LONGEST_STEP / longest);
        return new MaterialSpread.Pair(moved(direction, step), moved(direction, -step), step);
    }

    private RelaxationModes moved(double[] direction, double steps) {
        int n = times.count();
        double[] strengths = new double[n];
        for (int j = 0; j < n; j++) {
            strengths[j] = LogTimes.STEP * Math.exp(posterior.mean()[j] + steps * direction[j]);
        }
        int constant = beside.indexOf(Beside.CONSTANT);
        double equilibrium =
                constant < 0 ? 0 : Math.exp(posterior.mean()[n + constant] + steps * direction[n + constant]);
        return RelaxationModes.of(equilibrium, times.times(), withoutTraces(strengths));
    }

    /** Modes that change nothing in any digit at any time are left out: the logarithm of a spectrum that ends falls without end. */
    private double[] withoutTraces(double[] strengths) {
        double[] kept = strengths.clone();
        boolean[] counts = new boolean[strengths.length];
        for (int power = 0; power <= 2; power++) {
            double sum = 0;
            for (int j = 0; j < strengths.length; j++) {
                sum += strengths[j] * Math.pow(times.time(j), power);
            }
            for (int j = 0; j < strengths.length; j++) {
                counts[j] |= strengths[j] * Math.pow(times.time(j), power) > TRACE * sum;
            }
        }
        for (int j = 0; j < kept.length; j++) {
            kept[j] = counts[j] ? kept[j] : 0;
        }
        return kept;
    }

    /** D with its band. */
    Band band(double[] bounds) {
        int n = times.count();
        double[] logs = Arrays.copyOf(posterior.mean(), n);
        double[] u = IntStream.range(0, n)
                .mapToDouble(j -> Math.sqrt(posterior.covariance()[j][j]))
                .toArray();
        return Band.of(logs, u, bounds);
    }

    /** D̃, the density of the reciprocal, with the band that follows. */
    Band conjugateBand(double[] bounds) {
        int n = times.count();
        GrossRelation relation = new GrossRelation(times, density(), figure(Beside.CONSTANT), figure(Beside.VISCOUS));
        double[] u = new double[n];
        for (int j = 0; j < n; j++) {
            u[j] = Math.sqrt(variance(relation.byLogs(j)));
        }
        return Band.of(relation.logConjugate(), u, bounds);
    }

    private double variance(double[] derivatives) {
        double[] gradient = Arrays.copyOf(derivatives, times.count() + beside.size());
        for (int k = 0; k < beside.size(); k++) {
            int at = beside.get(k) == Beside.CONSTANT ? times.count() : times.count() + 1;
            gradient[times.count() + k] = derivatives[at];
        }
        double sum = 0;
        for (int i = 0; i < gradient.length; i++) {
            double part = 0;
            for (int j = 0; j < gradient.length; j++) {
                part += posterior.covariance()[i][j] * gradient[j];
            }
            sum += gradient[i] * part;
        }
        return Math.max(0, sum);
    }

    /**
     * A density and its band, over the nodes.
     *
     * @param values the density
     * @param low lower ends
     * @param high upper ends
     */
    record Band(double[] values, double[] low, double[] high) {
        /**
         * From a logarithm and its u, no higher than the bounds.
         *
         * @param logs ln of the density
         * @param u standard uncertainty of it
         * @param bounds what the density cannot be above
         */
        static Band of(double[] logs, double[] u, double[] bounds) {
            int n = logs.length;
            Band band = new Band(new double[n], new double[n], new double[n]);
            for (int j = 0; j < n; j++) {
                double value = Math.exp(logs[j]);
                double high = Math.exp(logs[j] + COVERAGE * u[j]);
                band.values[j] = value;
                band.low[j] = u[j] > UNTOLD ? 0 : Math.exp(logs[j] - COVERAGE * u[j]);
                // a fit through scattered moduli may stand a little above what the lowest of them leaves room for
                band.high[j] = Math.max(value, Math.min(high, bounds[j]));
            }
            return band;
        }

        /** The nodes in the opposite order. */
        Band reversed() {
            return new Band(DensityFit.reversed(values), DensityFit.reversed(low), DensityFit.reversed(high));
        }

        /** The same with the times it stands at. */
        SpectralDensity over(LogTimes times) {
            return new SpectralDensity(times.times(), values, low, high);
        }
    }

    /** Numbers in the opposite order: a node at τ stands where one at 1/τ did. */
    static double[] reversed(double[] array) {
        return IntStream.range(0, array.length)
                .mapToDouble(i -> array[array.length - 1 - i])
                .toArray();
    }
}

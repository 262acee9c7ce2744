package nightlag.stages.spectrum;

import java.util.ArrayList;
import java.util.List;
import java.util.stream.IntStream;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.moduli.CreepReading;
import nightlag.stages.moduli.CreepStep;
import nightlag.stages.numeric.NonNegativeLeastSquares;

/**
 * What the strains of one creep record err by, each by itself and all together. The instant of a step, the levels of the stress
 * and the zero of the strain are read once and stand in every reading: the covariance of the strains is diag(u²) + Σ c cᵀ, with a
 * vector c for each of these, what one standard uncertainty of it changes in each strain. Rows over u are brought to unit
 * covariance by one factor (1 + v vᵀ)^{−1/2} = 1 − v vᵀ (1 − 1/√(1 + |v|²))/|v|² for each. No strain tells where between two
 * samples a step lies, for J(t + δ) is a sum of the same modes as J(t); counted as an error of each reading for itself, the instant
 * would make J0, Je0 and η0 seem several times better known than they are.
 *
 * <p>How a strain changes with an instant or a level needs J and its slope at every time since a step: they are taken from many
 * modes fitted to the same strains.
 */
final class CreepErrors {
    private static final int MODES_PER_DECADE = 10;
    private static final double BEYOND = 3;
    /** Intervals of sampling that differ by less than this factor are the same. */
    private static final double ALIKE = 1.5;

    /** Of the largest strain no other is known to less. */
    private static final double TRACE = 1e-9;

    private final double[] u;
    private final List<double[]> vectors = new ArrayList<>();
    private final double[] factors;

    private CreepErrors(double[] u, List<double[]> columns) {
        this.u = u;
        for (double[] column : columns) {
            double[] vector = over(column);
            for (double[] before : vectors) {
                less(vector, before, factor(before));
            }
            if (square(vector) > 0) {
                vectors.add(vector);
            }
        }
        this.factors = vectors.stream().mapToDouble(CreepErrors::factor).toArray();
    }

    /**
     * Those of a curve.
     *
     * @param leastRelativeU what no strain is taken to be better known than, as a share of it
     */
    static CreepErrors of(CreepCurve curve, double leastRelativeU) {
        double zero = curve.steps().get(0).strainBefore();
        double largest = curve.readings().stream()
                .mapToDouble(reading -> Math.abs(reading.strain() - zero))
                .max()
                .orElse(0);
        double[] u = curve.readings().stream()
                .mapToDouble(reading -> Math.max(
                        Math.hypot(reading.strainU(), leastRelativeU * (reading.strain() - zero)),
                        Math.max(Double.MIN_NORMAL, TRACE * largest)))
                .toArray();
        return new CreepErrors(u, new Sensitivities(curve, u).columns());
    }

    /** How many strains there are. */
    int size() {
        return u.length;
    }

    /** Rows of the strains brought to unit covariance. */
    double[] whitened(double[] strains) {
        double[] rows = over(strains);
        for (int k = 0; k < factors.length; k++) {
            less(rows, vectors.get(k), factors[k]);
        }
        return rows;
    }

    private double[] over(double[] strains) {
        return IntStream.range(0, u.length).mapToDouble(i -> strains[i] / u[i]).toArray();
    }

    private static void less(double[] rows, double[] vector, double factor) {
        double product = 0;
        for (int i = 0; i < rows.length; i++) {
            product += vector[i] * rows[i];
        }
        for (int i = 0; i < rows.length; i++) {
            rows[i] -= factor * product * vector[i];
        }
    }

    private static double factor(double[] vector) {
        double square = square(vector);
        double root = Math.sqrt(1 + square);
        return 1 / (root * (1 + root));
    }

    private static double square(double[] vector) {
        double sum = 0;
        for (double value : vector) {
            sum += value * value;
        }
        return sum;
    }

    /** What one standard uncertainty of each shared error changes in each strain. */
    private static final class Sensitivities {
        private final CreepCurve curve;
        private final List<CreepReading> readings;
        private final double[] times;
        private final double[] found;

        Sensitivities(CreepCurve curve, double[] u) {
            this.curve = curve;
            this.readings = curve.readings();
            double shortest = readings.stream()
                    .mapToDouble(CreepReading::sinceStepS)
                    .min()
                    .orElseThrow();
            double longest =
                    readings.stream().mapToDouble(CreepReading::timeS).max().orElseThrow();
            int steps = (int) Math.ceil(MODES_PER_DECADE * Math.log10(BEYOND * BEYOND * longest / shortest));
            times = IntStream.rangeClosed(0, steps)
                    .mapToDouble(
                            i -> shortest / BEYOND * Math.pow(BEYOND * BEYOND * longest / shortest, (double) i / steps))
                    .toArray();
            found = fit(u);
        }

        private double[] fit(double[] u) {
            double zero = curve.steps().get(0).strainBefore();
            double[] weights = new double[u.length];
            double[] target = new double[u.length];
            for (int i = 0; i < u.length; i++) {
                double change = curve.steps().get(readings.get(i).step() - 1).changePa();
                weights[i] = 1 / Math.max(u[i], Math.abs(readings.get(i).complianceUPerPa() * change));
                target[i] = weights[i] * (readings.get(i).strain() - zero);
            }
            double[][] columns = new double[times.length + 2][u.length];
            for (int j = 0; j < columns.length; j++) {
                for (int i = 0; i < u.length; i++) {
                    int kind = j;
                    columns[j][i] = weights[i]
                            * sum(i, (k, since) -> curve.steps().get(k).changePa() * part(kind, since));
                }
            }
            return NonNegativeLeastSquares.solve(columns, target);
        }

        /** The modes, then J0 and flow, each of strength 1. */
        private double part(int kind, double since) {
            if (kind == times.length) {
                return 1;
            }
            return kind < times.length ? -Math.expm1(-since / times[kind]) : since;
        }

        private double compliance(double since) {
            double sum = 0;
            for (int j = 0; j < found.length; j++) {
                sum += found[j] * part(j, since);
            }
            return sum;
        }

        private double slope(double since) {
            double sum = found[times.length + 1];
            for (int j = 0; j < times.length; j++) {
                sum += found[j] / times[j] * Math.exp(-since / times[j]);
            }
            return sum;
        }

        private double curvature(double since) {
            double sum = 0;
            for (int j = 0; j < times.length; j++) {
                sum -= found[j] / (times[j] * times[j]) * Math.exp(-since / times[j]);
            }
            return sum;
        }

        /** A part of a strain that a step makes. */
        private interface OfStep {
            double at(int step, double sinceS);
        }

        /** Over the steps before a reading. */
        private double sum(int i, OfStep part) {
            CreepReading reading = readings.get(i);
            double sum = 0;
            for (int k = 0; k < reading.step(); k++) {
                sum += part.at(k, reading.timeS() - curve.steps().get(k).atS());
            }
            return sum;
        }

        private double[] column(OfStep part) {
            return IntStream.range(0, readings.size())
                    .mapToDouble(i -> sum(i, part))
                    .toArray();
        }

        List<double[]> columns() {
            List<CreepStep> steps = curve.steps();
            List<double[]> columns = new ArrayList<>();
            double zeroU = steps.get(0).strainBeforeU();
            columns.add(readings.stream().mapToDouble(reading -> zeroU).toArray());
            // what drives the load and what records it often share a clock: steps between samples as far apart lie at
            // like places
            // between them, and every later one may be off by as much again on its own
            columns.add(column((n, since) -> isLikeFirst(steps.get(n)) ? byInstant(steps.get(n), since) : 0));
            for (int k = 0; k < steps.size(); k++) {
                int which = k;
                if (k > 0) {
                    columns.add(column((n, since) -> n == which ? byInstant(steps.get(n), since) : 0));
                }
                columns.add(column((n, since) -> n == which ? byRise(steps.get(n), since) : 0));
            }
            for (int level = 0; level <= steps.size(); level++) {
                int from = level - 1;
                int to = level;
                double levelU = levelU(level);
                columns.add(column((n, since) ->
                        (n == from ? levelU : 0) * compliance(since) - (n == to ? levelU : 0) * compliance(since)));
            }
            return columns;
        }

        private boolean isLikeFirst(CreepStep step) {
            double first = curve.steps().get(0).atUS();
            return step.atUS() >= first / ALIKE && step.atUS() <= first * ALIKE;
        }

        private double byInstant(CreepStep step, double since) {
            return step.changePa() * step.atUS() * slope(since);
        }

        /** A straight rise, or a jump somewhere within it: what the square of the way from its middle does. */
        private double byRise(CreepStep step, double since) {
            return step.changePa() * step.riseS() * step.riseS() / 24 * curvature(since);
        }

        /** Of the stress before a step, or after the last one, Pa. */
        private double levelU(int level) {
            List<CreepStep> steps = curve.steps();
            if (level < steps.size()) {
                CreepStep after = steps.get(level);
                return after.stressBeforeUPa().orElse(after.changeUPa() / Math.sqrt(2));
            }
            CreepStep last = steps.get(steps.size() - 1);
            double before = last.stressBeforeUPa().orElse(last.changeUPa() / Math.sqrt(2));
            return Math.sqrt(Math.max(0, last.changeUPa() * last.changeUPa() - before * before));
        }
    }
}

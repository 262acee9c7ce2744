package nightlag.stages.spectrum;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.function.IntToDoubleFunction;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.moduli.CreepReading;
import nightlag.stages.moduli.CreepStep;

/**
 * What the readings of a creep curve have in common.
 *
 * <p>The strain before the first load, which is taken off all of them: it is a mean of the samples there are before it.
 *
 * <p>The instant of a step, which lies somewhere between two samples: all readings after it come too high together or too low
 * together, by the rate of the strain times what the instant is off. From the readings no other instant can be told from another J0
 * and other strengths: J(t + δ) is a sum of the same modes.
 *
 * <p>Counted as errors of each reading for itself, these would make the flow, J0 and the fastest modes seem several times better known
 * than they are.
 */
final class SharedErrors {
    private final List<CreepReading> readings;
    private final List<CreepStep> steps;
    private final double[] rates;

    private SharedErrors(CreepCurve curve, double[] rates) {
        this.readings = curve.readings();
        this.steps = curve.steps();
        this.rates = rates;
    }

    /** Those of a curve. */
    static SharedErrors of(CreepCurve curve) {
        List<CreepReading> readings = curve.readings();
        double[] rates = new double[readings.size()];
        for (int i = 0; i < rates.length; i++) {
            CreepReading earlier = readings.get(sameStep(readings, i, Math.max(0, i - 1)));
            CreepReading later = readings.get(sameStep(readings, i, Math.min(rates.length - 1, i + 1)));
            double lasts = later.timeS() - earlier.timeS();
            rates[i] = lasts > 0 ? (later.strain() - earlier.strain()) / lasts : 0;
        }
        return new SharedErrors(curve, rates);
    }

    private static int sameStep(List<CreepReading> readings, int here, int other) {
        return readings.get(other).step() == readings.get(here).step() ? other : here;
    }

    /**
     * What of the variance of a reading's strain, as its compliance has it, is shared; the strain before a later step is in the
     * recovered compliance and not in the strain itself.
     */
    double variance(int reading) {
        CreepStep step = steps.get(readings.get(reading).step() - 1);
        double byInstant = byInstant(reading);
        return byInstant * byInstant + step.strainBeforeU() * step.strainBeforeU();
    }

    /** What one u of the instant of its step changes in the strain of a reading. */
    private double byInstant(int reading) {
        return rates[reading] * uOf(readings.get(reading).step());
    }

    private double uOf(int step) {
        return steps.get(step - 1).atUS();
    }

    /**
     * The same for rows of a fit. All instants of a record may be off alike, for what drives the load and what records it often share
     * a clock; every later one may be off by as much again on its own.
     *
     * @param from row of the first reading
     * @param u what each row is divided by
     */
    Shared over(int from, IntToDoubleFunction u) {
        List<Direction> directions = new ArrayList<>();
        for (int k = 0; k <= steps.size(); k++) {
            double[] along = new double[rates.length];
            for (int i = 0; i < rates.length; i++) {
                double strain = k == 0 ? steps.get(0).strainBeforeU() : k == 1 ? byInstant(i) : alone(k, i);
                along[i] = strain / u.applyAsDouble(from + i);
            }
            directions.forEach(earlier -> earlier.whiten(along, 0));
            double square = Arrays.stream(along).map(v -> v * v).sum();
            if (square > 0) {
                directions.add(new Direction(along, square));
            }
        }
        return new Shared(from, directions);
    }

    /** What a later step alone changes: the rate less the one before it, which goes on. */
    private double alone(int step, int reading) {
        int here = readings.get(reading).step();
        double own = here == step ? rates[reading] : lastRate(step);
        return here < step ? 0 : (own - lastRate(step - 1)) * uOf(step);
    }

    private double lastRate(int step) {
        double rate = 0;
        for (int i = 0; i < rates.length && readings.get(i).step() <= step; i++) {
            rate = rates[i];
        }
        return rate;
    }

    /** Errors in units of each row's own u. */
    private record Direction(double[] along, double square) {
        /** Rows times (1 + w wᵀ)^{−1/2}, which leaves all across w as it is. */
        void whiten(double[] rows, int first) {
            double part = 0;
            for (int i = 0; i < along.length; i++) {
                part += along[i] * rows[first + i];
            }
            part *= (1 - 1 / Math.sqrt(1 + square)) / square;
            for (int i = 0; i < along.length; i++) {
                rows[first + i] -= part * along[i];
            }
        }
    }

    /** What rows share. */
    static final class Shared {
        private final int first;
        private final List<Direction> directions;

        private Shared(int first, List<Direction> directions) {
            this.first = first;
            this.directions = List.copyOf(directions);
        }

        /** Makes the errors of rows that were divided by their own u independent and of variance 1. */
        void whiten(double[] rows) {
            directions.forEach(direction -> direction.whiten(rows, first));
        }
    }
}

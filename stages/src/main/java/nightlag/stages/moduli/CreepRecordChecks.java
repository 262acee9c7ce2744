package nightlag.stages.moduli;

import java.util.Arrays;
import java.util.List;
import java.util.OptionalDouble;

/** What may be wrong with the samples of a creep record. */
final class CreepRecordChecks {
    private static final int LEAST_CLIPPED = 8;
    /** Share of a channel's extent over some samples below which it comes to rest. */
    private static final double SLOWED_DOWN = 1e-6;

    private static final double GAP_IN_INTERVALS = 5;
    private static final double GAP_IN_DECADES = 0.1;
    private static final int STRETCHES = 10;

    private CreepRecordChecks() {}

    /**
     * Share of samples that stand at a channel's largest or smallest value, many in a row, all of a sudden: a channel that
     * comes to rest, or is a coarse one, repeats itself or slows down before.
     *
     * @param from the first sample looked at
     */
    static double clippedShare(double[] values, int from) {
        double low = Arrays.stream(values, from, values.length).min().orElse(0);
        double high = Arrays.stream(values, from, values.length).max().orElse(0);
        int clipped = 0;
        int run = 0;
        for (int i = from; i < values.length; i++) {
            run = i > from && values[i] == values[i - 1] ? run + 1 : 1;
            boolean ends = i + 1 == values.length || values[i + 1] != values[i];
            boolean limit = values[i] == low || values[i] == high;
            if (ends && limit && run >= LEAST_CLIPPED && inMotion(values, i - run, from, high - low)) {
                clipped += run;
            }
        }
        return (double) clipped / values.length;
    }

    /** Whether the samples up to one differ from each other by more than the last digits. */
    private static boolean inMotion(double[] values, int last, int from, double extent) {
        int first = Math.max(from, last - LEAST_CLIPPED);
        int same = 0;
        for (int i = first + 1; i <= last; i++) {
            same += values[i] == values[i - 1] ? 1 : 0;
        }
        return last - first >= LEAST_CLIPPED / 2
                && same <= 1
                && Math.abs(values[last] - values[first]) > SLOWED_DOWN * extent;
    }

    /** Share of the decades of time after the steps that lies in gaps: far longer than the intervals around them. */
    static double missingShare(double[] timeS, List<LoadSteps.Step> steps) {
        double missing = 0;
        double whole = 0;
        for (int k = 0; k < steps.size(); k++) {
            int first = steps.get(k).settled();
            int last = k + 1 < steps.size() ? steps.get(k + 1).foot() : timeS.length - 1;
            double at = steps.get(k).atS();
            for (int i = first; i < last; i++) {
                double decades = Math.log10((timeS[i + 1] - at) / (timeS[i] - at));
                whole += decades;
                double before = i > first ? timeS[i] - timeS[i - 1] : Double.POSITIVE_INFINITY;
                double after = i + 2 <= last ? timeS[i + 2] - timeS[i + 1] : Double.POSITIVE_INFINITY;
                double usual = Math.min(i > first ? before : after, i + 2 <= last ? Math.max(before, after) : before);
                if (timeS[i + 1] - timeS[i] > GAP_IN_INTERVALS * usual && decades > GAP_IN_DECADES) {
                    missing += decades;
                }
            }
        }
        return whole > 0 ? missing / whole : 0;
    }

    /** How far the means of tenths of a record differ, K; empty without temperatures. */
    static OptionalDouble wander(double[] temperatureK) {
        double[] there = Arrays.stream(temperatureK).filter(Double::isFinite).toArray();
        if (there.length == 0) {
            return OptionalDouble.empty();
        }
        int stretches = Math.min(STRETCHES, there.length);
        double low = Double.POSITIVE_INFINITY;
        double high = Double.NEGATIVE_INFINITY;
        for (int k = 0; k < stretches; k++) {
            double mean = Arrays.stream(there, there.length * k / stretches, there.length * (k + 1) / stretches)
                    .average()
                    .orElseThrow();
            low = Math.min(low, mean);
            high = Math.max(high, mean);
        }
        return OptionalDouble.of(high - low);
    }
}

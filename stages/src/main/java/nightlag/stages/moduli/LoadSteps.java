package nightlag.stages.moduli;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import nightlag.stages.fault.ReductionFault;

/**
 * The steps of a stress over time, found from the stress alone: it stays within a narrow band, leaves it for good, and
 * settles in another for at least five times as long as it took. The band is a twentieth of the whole extent, or six times
 * the noise; smaller steps are not told from a stress that is not held.
 *
 * <p>A step's instant is the centre of its rise. Where the stress jumps from one sample to the next that is the middle of the two,
 * and the step may lie anywhere between them; no strain tells where, as {@code J(t + δ)} is a compliance like any other. Only the clock
 * may: one that runs through zero there counts from the load.
 */
final class LoadSteps {
    private static final double BAND = 0.05;
    private static final double BAND_IN_NOISE = 6;
    private static final double EXTENT_IN_NOISE = 20;
    private static final int OUTLIERS = 2;
    private static final int LEAST_SAMPLES = 5;
    private static final double LEAST_HOLD = 5;
    private static final double AT_LEVEL = 0.01;
    private static final double AT_LEVEL_IN_NOISE = 3;
    private static final int NEARBY = 25;
    /** From the median of |residual| to the standard deviation of normal noise. */
    private static final double MEDIAN_TO_DEVIATION = 1.4826;

    private static final double COARSEST = 0.01;

    /** What is left of a zero after sums of sampling intervals. */
    private static final double TRACE = 1e-6;

    private final double[] timeS;
    private final double[] stress;
    private final double noise;
    private final double extent;

    /** A stretch of samples within a band. */
    record Hold(int first, int last) {}

    /**
     * A step between two holds.
     *
     * @param foot last sample before it
     * @param settled first sample at the new stress
     * @param atS centre of the rise, s
     * @param atUS its standard uncertainty, s
     */
    record Step(int foot, int settled, double atS, double atUS) {}

    private LoadSteps(double[] timeS, double[] stress) {
        this.timeS = timeS;
        this.stress = stress;
        this.noise = noise(timeS, stress);
        this.extent = extent(stress);
    }

    /**
     * The steps in the order of time.
     *
     * @throws ReductionFault if there is none
     */
    static List<Step> of(double[] timeS, double[] stressPa) throws ReductionFault {
        LoadSteps search = new LoadSteps(timeS, stressPa);
        if (!(search.extent > EXTENT_IN_NOISE * search.noise)) {
            throw new ReductionFault(CreepReason.CREEP_NO_STEP.with(search.extent, search.noise));
        }
        List<Hold> holds = search.holds();
        if (holds.size() < 2) {
            throw new ReductionFault(CreepReason.CREEP_NEVER_SETTLES.with());
        }
        List<Step> steps = new ArrayList<>();
        for (int k = 1; k < holds.size(); k++) {
            steps.add(search.step(holds.get(k - 1), holds.get(k)));
        }
        return steps;
    }

    /**
     * Standard deviation of the noise of a channel, robust against steps: from the median distance of a sample from the line
     * through its neighbours.
     */
    static double noise(double[] timeS, double[] values) {
        double[] distances = new double[values.length - 2];
        double smallest = Double.POSITIVE_INFINITY;
        for (int i = 1; i + 1 < values.length; i++) {
            double share = (timeS[i] - timeS[i - 1]) / (timeS[i + 1] - timeS[i - 1]);
            double off = (values[i] - values[i - 1]) * (1 - share) + (values[i] - values[i + 1]) * share;
            distances[i - 1] = Math.abs(off) / Math.sqrt(1 + (1 - share) * (1 - share) + share * share);
            double step = Math.abs(values[i] - values[i - 1]);
            smallest = step > 0 ? Math.min(smallest, step) : smallest;
        }
        Arrays.sort(distances);
        double deviation = MEDIAN_TO_DEVIATION * distances[distances.length / 2];
        // a channel that rests on one digit: that digit's rounding, where it is small against what the channel does
        double rounding = smallest / Math.sqrt(12);
        return deviation > 0 || !(rounding < COARSEST * extent(values)) ? deviation : rounding;
    }

    /** Largest less smallest value, isolated samples left aside. */
    private static double extent(double[] values) {
        // the first stands for itself: a record may have but one before the load
        double low = values[0];
        double high = values[0];
        for (int i = 1; i < values.length - 1; i++) {
            double middle = Math.max(
                    Math.min(values[i - 1], values[i]), Math.min(Math.max(values[i - 1], values[i]), values[i + 1]));
            low = Math.min(low, middle);
            high = Math.max(high, middle);
        }
        return high - low;
    }

    private double band() {
        return Math.max(BAND_IN_NOISE * noise, BAND * extent);
    }

    private List<Hold> holds() {
        List<Hold> holds = new ArrayList<>();
        int first = 0;
        int left = 0;
        while (first < timeS.length) {
            int last = stays(first);
            if (holds.isEmpty()) {
                // what the record begins with is where it comes from, be it one sample
                holds.add(new Hold(0, last));
            } else if (settles(first, last, timeS[first] - timeS[left])) {
                Hold before = holds.get(holds.size() - 1);
                if (Math.abs(level(first, last) - level(before.first(), before.last())) > band()) {
                    holds.add(new Hold(first, last));
                } else {
                    holds.set(holds.size() - 1, new Hold(before.first(), last));
                }
            } else {
                // through a slow rise by parts of what fits a band, or the search would take the square of its samples
                first += Math.max(1, (last - first) / 8);
                continue;
            }
            left = last;
            first = last + 1;
        }
        return holds;
    }

    /** The last of the samples from one on that stay within the band about their mean. */
    private int stays(int first) {
        double band = band();
        double sum = stress[first];
        int count = 1;
        int last = first;
        for (int i = first + 1; i < stress.length && i - last <= OUTLIERS + 1; i++) {
            if (Math.abs(stress[i] - sum / count) <= band) {
                sum += stress[i];
                count++;
                last = i;
            }
        }
        return last;
    }

    /** Whether a stretch is a hold: long against the time it took to get there, and no part of a slow rise. */
    private boolean settles(int first, int last, double tookS) {
        double lasts = timeS[last] - timeS[first];
        if (last - first + 1 < LEAST_SAMPLES || !(lasts >= LEAST_HOLD * tookS)) {
            return false;
        }
        int third = (last - first + 1) / 3;
        return Math.abs(level(last - third, last) - level(first, first + third)) <= band();
    }

    private double level(int first, int last) {
        double[] some = Arrays.copyOfRange(stress, first, last + 1);
        Arrays.sort(some);
        return some[some.length / 2];
    }

    private Step step(Hold before, Hold after) {
        // as far from the rise as it may last: its ends lie within the bands
        double took = timeS[after.first()] - timeS[before.last()];
        int quiet = before.last();
        while (quiet > before.first() && timeS[before.last()] - timeS[quiet] < took) {
            quiet--;
        }
        double from = level(Math.max(before.first(), quiet - NEARBY), quiet);
        quiet = after.first();
        while (quiet < after.last() && timeS[quiet] - timeS[after.first()] < took) {
            quiet++;
        }
        double to = level(quiet, Math.min(after.last(), quiet + NEARBY));
        double near = Math.max(AT_LEVEL_IN_NOISE * noise, AT_LEVEL * Math.abs(to - from));
        double way = Math.signum(to - from);
        int foot = before.last();
        while (foot > before.first() && way * (stress[foot] - from) > near) {
            foot--;
        }
        int settled = after.first();
        while (settled - 1 > foot && Math.abs(stress[settled - 1] - to) <= near) {
            settled--;
        }
        while (settled < after.last() && Math.abs(stress[settled] - to) > near) {
            settled++;
        }
        double sum = 0;
        double weighted = 0;
        double squares = 0;
        for (int i = foot; i < settled; i++) {
            double part = stress[i + 1] - stress[i];
            double lasts = timeS[i + 1] - timeS[i];
            sum += part;
            weighted += part * (timeS[i] + lasts / 2);
            squares += part * part * lasts * lasts / 12;
        }
        return new Step(
                foot, settled, countsFromLoad(foot, settled) ? 0 : weighted / sum, Math.sqrt(squares) / Math.abs(sum));
    }

    /** Whether the clock runs through zero in a jump, or at the first sample after it. One before it may be anywhere. */
    private boolean countsFromLoad(int foot, int settled) {
        double little = TRACE * (timeS[settled] - timeS[foot]);
        return settled == foot + 1 && timeS[foot] < -little && timeS[settled] > -little;
    }
}

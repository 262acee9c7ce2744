package nightlag.stages.waveform;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;

/**
 * A run of samples that all hold a channel's highest or lowest value: a signal cut off at the channel's limit, or the top of
 * a wave written in coarse steps. Which of the two, only a fit without the run can tell.
 *
 * @param channel the channel
 * @param from its first sample
 * @param to the sample after its last
 * @param limit the value
 * @param upper whether it is the highest
 * @param step the smallest step between different values near the limit
 */
record LimitRun(int channel, int from, int to, double limit, boolean upper, double step) {
    /** A shorter run at an extreme may be chance. */
    private static final int SHORTEST = 3;
    /** A channel that stands at its extremes nearly always is a square wave, not a wave cut off. */
    private static final double SQUARE_WAVE_SHARE = 0.9;
    /** A model of a wave in coarse steps stays within half a step of them, but for its own uncertainty. */
    private static final double BEYOND_DEVIATIONS = 3;

    private static final double BEYOND_STEPS = 2;
    /** The last digits of a file are no limit. */
    private static final double BEYOND_AMPLITUDES = 1e-7;
    /** The top of a wave in coarse steps ends by a step or two. */
    private static final double STEPS_OUT_OF_A_RUN = 3;
    /** Values so near the limit, as part of the range, tell the channel's step there. */
    private static final double NEAR = 0.1;
    /** Values nearer to each other than this part of the range are equal. */
    private static final double EQUAL = 1e-9;

    /** The runs of a record. */
    static List<LimitRun> of(Waveform waveform) {
        List<LimitRun> runs = new ArrayList<>();
        add(waveform.deformation(), Samples.DEFORMATION, runs);
        add(waveform.load(), Samples.LOAD, runs);
        return runs;
    }

    private static void add(double[] values, int channel, List<LimitRun> runs) {
        double low = Double.POSITIVE_INFINITY;
        double high = Double.NEGATIVE_INFINITY;
        int atLow = 0;
        int atHigh = 0;
        for (double value : values) {
            atHigh = value > high ? 0 : atHigh;
            atLow = value < low ? 0 : atLow;
            high = Math.max(high, value);
            low = Math.min(low, value);
            atHigh += value >= high ? 1 : 0;
            atLow += value <= low ? 1 : 0;
        }
        if (atLow + atHigh > SQUARE_WAVE_SHARE * values.length) {
            return;
        }
        if (atHigh >= SHORTEST) {
            addRuns(values, channel, high, true, high - low, runs);
        }
        if (atLow >= SHORTEST) {
            addRuns(values, channel, low, false, high - low, runs);
        }
    }

    private static void addRuns(
            double[] values, int channel, double limit, boolean upper, double range, List<LimitRun> runs) {
        double step = stepNear(values, limit, range);
        int from = 0;
        while (from < values.length) {
            int to = from;
            while (to < values.length && (upper ? values[to] >= limit : values[to] <= limit)) {
                to++;
            }
            if (to - from >= SHORTEST) {
                runs.add(new LimitRun(channel, from, to, limit, upper, step));
            }
            from = to + 1;
        }
    }

    /** The number of samples at the limit. */
    int length() {
        return to - from;
    }

    /** Marks the run and one sample on either side. */
    void mark(boolean[] leftOut) {
        Arrays.fill(leftOut, Math.max(0, from - 1), Math.min(leftOut.length, to + 1), true);
    }

    /**
     * Whether the run is cut off, told by a fit without it: it goes beyond the limit there. The surer of the two rules, for
     * records of one frequency, where there is such a fit.
     */
    boolean cutsOff(Fitted fitted, Waveform waveform) {
        double least = BEYOND_AMPLITUDES * fitted.amplitude(channel);
        for (int i = from; i < to; i++) {
            double timeS = waveform.timeS()[i];
            double beyond = (upper ? 1 : -1) * (fitted.model(channel, timeS) - limit);
            double deviations = fitted.deviation(channel) + fitted.modelU(channel, timeS);
            // noise finer than the steps could not hold a run at one value, so steps set the margin at most
            double margin = Math.min(BEYOND_DEVIATIONS * deviations, BEYOND_STEPS * step);
            if (beyond > Math.max(least, margin)) {
                return true;
            }
        }
        return false;
    }

    /**
     * Whether the run is cut off, told by the samples beside it: the signal leaves the limit at a slope. For records of
     * several frequencies, whose frequencies cannot be looked for before cut-offs are out. It does not mean the same as
     * {@link #cutsOff}: a top cut off so thinly that the wave leaves the limit in small steps is seen by that rule alone.
     */
    boolean isLeftAtASlope(Waveform waveform) {
        double[] values = channel == Samples.DEFORMATION ? waveform.deformation() : waveform.load();
        double before = from > 0 ? Math.abs(values[from - 1] - limit) : 0;
        double after = to < values.length ? Math.abs(values[to] - limit) : 0;
        return Math.max(before, after) > STEPS_OUT_OF_A_RUN * step;
    }

    private static double stepNear(double[] values, double limit, double range) {
        double[] near = Arrays.stream(values)
                .filter(value -> Math.abs(value - limit) <= NEAR * range)
                .sorted()
                .toArray();
        double step = range;
        for (int i = 1; i < near.length; i++) {
            double difference = near[i] - near[i - 1];
            if (difference > EQUAL * range) {
                step = Math.min(step, difference);
            }
        }
        return step;
    }
}

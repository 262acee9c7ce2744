package nightlag.stages.waveform;

import java.util.List;
import nightlag.stages.fault.Reason;

/**
 * The samples at a channel's limit in a record of several frequencies. A run at a channel's extreme counts as cut off where
 * the signal leaves it at a slope; the top of a wave in coarse steps ends by a step or two.
 *
 * @param atLimit how many samples stand at a limit
 * @param leftOut how many were marked to be left out, with one on either side of each run
 */
record CutOffs(int atLimit, int leftOut) {
    private static final double STEPS_OUT_OF_A_RUN = 3;
    /** Where more samples than this stand at a limit, leaving them out would leave no record. */
    private static final double MOST = 0.4;

    /** Marks them. */
    static CutOffs mark(Waveform waveform, boolean[] marks) {
        List<LimitRun> runs = LimitRun.of(waveform).stream()
                .filter(run -> leavesAtASlope(run, waveform))
                .toList();
        int atLimit = 0;
        for (LimitRun run : runs) {
            atLimit += run.length();
        }
        if (atLimit > MOST * waveform.size()) {
            return new CutOffs(atLimit, 0);
        }
        int before = count(marks);
        runs.forEach(run -> run.mark(marks));
        return new CutOffs(atLimit, count(marks) - before);
    }

    private static boolean leavesAtASlope(LimitRun run, Waveform waveform) {
        double[] values = run.channel() == Samples.DEFORMATION ? waveform.deformation() : waveform.load();
        double before = run.from() > 0 ? Math.abs(values[run.from() - 1] - run.limit()) : 0;
        double after = run.to() < values.length ? Math.abs(values[run.to()] - run.limit()) : 0;
        return Math.max(before, after) > STEPS_OUT_OF_A_RUN * run.step();
    }

    private static int count(boolean[] marks) {
        int count = 0;
        for (boolean mark : marks) {
            count += mark ? 1 : 0;
        }
        return count;
    }

    /** Tells of them, where there are any. */
    void addTo(List<Reason> notes) {
        if (leftOut > 0) {
            notes.add(WaveformReason.WAVEFORM_CLIPPED_LEFT_OUT.with(atLimit, leftOut));
        }
    }
}

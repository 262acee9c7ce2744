package nightlag.stages.waveform;

import java.util.List;
import java.util.function.Predicate;
import nightlag.stages.fault.Reason;

/**
 * The runs of a record that are cut off at a channel's limit, or may be. Where there are so many that no record would be
 * left without them, none is left out and they are only counted.
 *
 * @param runs those to leave out
 * @param atLimit how many samples stand at a limit
 */
record CutOffs(List<LimitRun> runs, int atLimit) {
    private static final double MOST = 0.4;

    /** Every run that may be cut off; a fit without them tells which are ({@link #confirmedBy}). */
    static CutOffs suspected(Waveform waveform) {
        return of(waveform, run -> true);
    }

    /** Those that can be told without a fit. */
    static CutOffs leftAtASlope(Waveform waveform) {
        return of(waveform, run -> run.isLeftAtASlope(waveform));
    }

    private static CutOffs of(Waveform waveform, Predicate<LimitRun> counts) {
        List<LimitRun> runs = LimitRun.of(waveform).stream().filter(counts).toList();
        int atLimit = samples(runs);
        return new CutOffs(atLimit > MOST * waveform.size() ? List.of() : runs, atLimit);
    }

    private static int samples(List<LimitRun> runs) {
        return runs.stream().mapToInt(LimitRun::length).sum();
    }

    /** Those that a fit without them goes beyond. */
    CutOffs confirmedBy(Fitted fitted, Waveform waveform) {
        if (runs.isEmpty()) {
            return this;
        }
        List<LimitRun> confirmed =
                runs.stream().filter(run -> run.cutsOff(fitted, waveform)).toList();
        return new CutOffs(confirmed, samples(confirmed));
    }

    /** Marks the runs and one sample on either side of each. */
    void mark(boolean[] leftOut) {
        runs.forEach(run -> run.mark(leftOut));
    }

    /** Tells of them, and how many samples are left out for them. */
    Reason note(int leftOut) {
        return WaveformReason.WAVEFORM_CLIPPED_LEFT_OUT.with(atLimit, leftOut);
    }
}

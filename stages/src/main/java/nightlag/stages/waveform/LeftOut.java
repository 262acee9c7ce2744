package nightlag.stages.waveform;

import java.util.Arrays;
import nightlag.stages.fault.ReductionFault;

/**
 * The samples of a record that enter no fit: spikes ({@link Damage}) and runs at a channel's limit ({@link LimitRun}).
 * Gaps need no mark: fits go by the time stamps.
 */
final class LeftOut {
    /** How often residuals are searched again after spikes were left out. */
    private static final int SPIKE_ROUNDS = 5;
    /** A spike is larger than this part of the amplitude; smaller ones do no harm and may be the file's last digit. */
    private static final double SMALLEST_SPIKE = 1e-6;

    private final Waveform waveform;
    private final boolean[] marks;
    private int spikes;

    LeftOut(Waveform waveform) {
        this.waveform = waveform;
        this.marks = new boolean[waveform.size()];
    }

    /** The number of spikes found so far. */
    int spikes() {
        return spikes;
    }

    /** The samples from {@code first} on that are not left out. */
    Samples samples(int first) {
        return Samples.of(waveform, first, marks);
    }

    /** Leaves out spikes that tower over a channel; left in, they would drown the line in the transform. */
    void leaveOutTowering() {
        spikes = markTowering();
    }

    private int markTowering() {
        return Damage.markTowering(waveform.deformation(), marks) + Damage.markTowering(waveform.load(), marks);
    }

    /**
     * Leaves out what is cut off.
     *
     * @return how many samples more are left out now
     */
    int leaveOut(CutOffs cutOffs) {
        int before = count();
        cutOffs.mark(marks);
        return count() - before;
    }

    private int count() {
        int count = 0;
        for (boolean mark : marks) {
            count += mark ? 1 : 0;
        }
        return count;
    }

    /** Leaves out what is cut off and towering spikes, and takes everything else back in. */
    void leaveOutOnly(CutOffs cutOffs) {
        Arrays.fill(marks, false);
        markTowering();
        cutOffs.mark(marks);
    }

    /** A new fit, of the samples that are left. */
    @FunctionalInterface
    interface Refit<F> {
        F of(Samples rest, F before) throws ReductionFault;
    }

    /**
     * Leaves out the spikes a fit's residuals show, and fits again: without the largest, smaller ones may come to light.
     *
     * @param first the first sample that may enter a fit
     * @return the last fit: the one it starts from, if that has no spikes
     */
    <F extends FitResiduals> F withoutSpikes(F start, int first, Refit<F> refit) throws ReductionFault {
        F fitted = start;
        for (int round = 0; round < SPIKE_ROUNDS; round++) {
            int found = 0;
            for (int c = 0; c < Samples.CHANNELS; c++) {
                found += markSpikes(fitted, c);
            }
            if (found == 0) {
                break;
            }
            spikes += found;
            fitted = refit.of(samples(first), fitted);
        }
        return fitted;
    }

    private int markSpikes(FitResiduals fitted, int channel) {
        double[] residuals = fitted.residuals()[channel];
        if (!Damage.suspicious(residuals)) {
            return 0;
        }
        int found = 0;
        double freedom = residuals.length - fitted.columns();
        for (int place : Damage.spikes(residuals, freedom, SMALLEST_SPIKE * fitted.largestAmplitude(channel))) {
            int index = fitted.samples().indices()[place];
            found += marks[index] ? 0 : 1;
            marks[index] = true;
        }
        return found;
    }
}

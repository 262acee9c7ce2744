package nightlag.stages.waveform;

import java.util.OptionalDouble;
import nightlag.stages.fault.ReductionFault;

/** The cycles at the beginning of a record that are no steady oscillation yet, and where they end. */
final class StartUp {
    private final Waveform waveform;
    private final double cycles;
    private final Samples all;

    /** For a record, so many cycles of it, and all its samples that may enter a fit. */
    StartUp(Waveform waveform, double cycles, Samples all) {
        this.waveform = waveform;
        this.cycles = cycles;
        this.all = all;
    }

    /** The first sample after it. */
    int end(double angularFrequency) {
        if (cycles <= 0) {
            return 0;
        }
        double[] timeS = waveform.timeS();
        double end = endS(angularFrequency) - 0.25 * all.intervalS();
        int index = 0;
        while (index < timeS.length && timeS[index] < end) {
            index++;
        }
        return index;
    }

    /** The time it ends, s. */
    double endS(double angularFrequency) {
        return beginS() + cycles * cycleS(angularFrequency);
    }

    /** What is said where nothing is left after it. */
    ReductionFault holdsAll(double angularFrequency) {
        if (waveform.isWindow()) {
            double endS = waveform.timeS()[waveform.size() - 1];
            return new ReductionFault(WaveformReason.WAVEFORM_WINDOW_IN_START_UP.with(
                    cycles, (endS - beginS()) / cycleS(angularFrequency)));
        }
        return new ReductionFault(
                WaveformReason.WAVEFORM_ALL_START_UP.with(cycles, angularFrequency * all.durationS() / (2 * Math.PI)));
    }

    private double beginS() {
        return waveform.window().map(RecordWindow::recordFromS).orElse(waveform.timeS()[0]);
    }

    /** The length of a start-up cycle; those before a window are not seen here, so their length follows from the tag. */
    private double cycleS(double angularFrequency) {
        OptionalDouble tag = waveform.nominalFrequencyHz();
        return waveform.isWindow() && tag.isPresent() ? 1 / tag.getAsDouble() : 2 * Math.PI / angularFrequency;
    }
}

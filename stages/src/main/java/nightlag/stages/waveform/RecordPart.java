package nightlag.stages.waveform;

import java.util.OptionalDouble;

/**
 * A record from the end of its start-up on, and what is asked of it.
 *
 * @param waveform the whole record
 * @param plan what is asked
 * @param first the first sample after the start-up
 * @param clock how evenly the samples from there on were taken
 */
record RecordPart(Waveform waveform, ExtractionPlan plan, int first, Clock clock) {
    static RecordPart from(int first, Waveform waveform, ExtractionPlan plan) {
        return new RecordPart(waveform, plan, first, Clock.of(waveform.timeS(), first));
    }

    /** The frequency the record is said to have, Hz. */
    OptionalDouble tagHz() {
        return waveform.nominalFrequencyHz();
    }

    /** Whether the tagged frequency is taken as it is. */
    boolean exact() {
        return plan.takesTagOf(waveform);
    }

    /** The number of samples after the start-up, left out or not. */
    int size() {
        return waveform.size() - first;
    }
}

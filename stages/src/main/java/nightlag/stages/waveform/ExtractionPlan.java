package nightlag.stages.waveform;

/**
 * How amplitudes are taken out of a record: the section {@code [extraction]} of a grade.
 *
 * @param startUpCycles cycles left out at the front, zero or more
 * @param harmonics highest order fitted, at least 1
 * @param drift the polynomial under the oscillation
 * @param frequencyFrom whether the tag's frequency is exact or only a start
 */
public record ExtractionPlan(double startUpCycles, int harmonics, Drift drift, FrequencySource frequencyFrom) {
    /** No start-up cycles, seven harmonics, linear drift, frequency refined from the record. */
    public static ExtractionPlan withDefaults() {
        return new ExtractionPlan(0, 7, Drift.LINEAR, FrequencySource.SIGNAL);
    }

    /** Whether this record's tagged frequency is taken as it is. */
    boolean takesTagOf(Waveform waveform) {
        return frequencyFrom == FrequencySource.TAG
                && waveform.nominalFrequencyHz().isPresent();
    }
}

package nightlag.stages.waveform;

/** Where the frequency of a record comes from. */
public enum FrequencySource {
    /** Refined from the record itself. */
    SIGNAL,
    /** The tag is exact. */
    TAG
}

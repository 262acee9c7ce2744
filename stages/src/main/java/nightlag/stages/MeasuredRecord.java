package nightlag.stages;

/** A record: the samples of one point, or one row of given moduli. */
public sealed interface MeasuredRecord permits WaveformRecord, GivenModuli {
    /** What is known about it besides its samples. */
    RecordTags tags();
}

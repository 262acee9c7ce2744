package nightlag.pipeline.decode;

import nightlag.stages.MeasuredRecord;

/** Takes the records of a file, one at a time. */
@FunctionalInterface
public interface RecordSink {
    /** Takes one record; it is not held by the decoder afterwards. */
    void accept(MeasuredRecord record);
}

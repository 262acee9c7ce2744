package nightlag.stages;

import nightlag.stages.geometry.DeformationSignal;
import nightlag.stages.geometry.LoadSignal;
import nightlag.stages.waveform.Waveform;

/**
 * The samples of one point, or of one record of several frequencies.
 *
 * @param tags what is known about it
 * @param deformationSignal what the deformation channel holds
 * @param loadSignal what the load channel holds
 * @param waveform the samples, SI
 * @param kind what they hold
 */
public record WaveformRecord(
        RecordTags tags, DeformationSignal deformationSignal, LoadSignal loadSignal, Waveform waveform, RecordKind kind)
        implements MeasuredRecord {
    /** A record at one frequency. */
    public WaveformRecord(
            RecordTags tags, DeformationSignal deformationSignal, LoadSignal loadSignal, Waveform waveform) {
        this(tags, deformationSignal, loadSignal, waveform, new RecordKind.OneFrequency());
    }
}

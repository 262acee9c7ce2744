package nightlag.stages;

import nightlag.stages.geometry.DeformationSignal;
import nightlag.stages.geometry.LoadSignal;
import nightlag.stages.waveform.Waveform;

/**
 * The samples of one point.
 *
 * @param tags what is known about it
 * @param deformationSignal what the deformation channel holds
 * @param loadSignal what the load channel holds
 * @param waveform the samples, SI
 */
public record WaveformRecord(
        RecordTags tags, DeformationSignal deformationSignal, LoadSignal loadSignal, Waveform waveform)
        implements MeasuredRecord {}

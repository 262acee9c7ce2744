package nightlag.stages.waveform;

/**
 * The samples that enter a fit, both channels with their means taken off and times counted from the middle.
 *
 * @param seconds time after {@code originS}, rising, s
 * @param channels deformation and load less their means
 * @param means what was taken off each channel
 * @param originS the middle of the first and the last time, s
 * @param indices place of each sample in the record
 */
record Samples(double[] seconds, double[][] channels, double[] means, double originS, int[] indices) {
    /** The place of the deformation among the channels. */
    static final int DEFORMATION = 0;

    /** The place of the load among the channels. */
    static final int LOAD = 1;

    /** The number of channels. */
    static final int CHANNELS = 2;

    /** Those samples of a record from {@code first} on that are not left out. */
    static Samples of(Waveform waveform, int first, boolean[] leftOut) {
        int count = 0;
        for (int i = first; i < waveform.size(); i++) {
            count += leftOut[i] ? 0 : 1;
        }
        int[] indices = new int[count];
        int next = 0;
        for (int i = first; i < waveform.size(); i++) {
            if (!leftOut[i]) {
                indices[next++] = i;
            }
        }
        return of(waveform, indices);
    }

    private static Samples of(Waveform waveform, int[] indices) {
        int count = indices.length;
        double[] seconds = new double[count];
        double origin = 0;
        if (count > 0) {
            double begin = waveform.timeS()[indices[0]];
            origin = begin + (waveform.timeS()[indices[count - 1]] - begin) / 2;
        }
        for (int i = 0; i < count; i++) {
            seconds[i] = waveform.timeS()[indices[i]] - origin;
        }
        double[] means = {mean(waveform.deformation(), indices), mean(waveform.load(), indices)};
        double[][] channels = {
            less(waveform.deformation(), means[DEFORMATION], indices), less(waveform.load(), means[LOAD], indices),
        };
        return new Samples(seconds, channels, means, origin, indices);
    }

    private static double mean(double[] values, int[] indices) {
        double sum = 0;
        double reference = indices.length == 0 ? 0 : values[indices[0]];
        for (int index : indices) {
            sum += values[index] - reference;
        }
        return reference + sum / Math.max(1, indices.length);
    }

    private static double[] less(double[] values, double mean, int[] indices) {
        double[] centred = new double[indices.length];
        for (int i = 0; i < centred.length; i++) {
            centred[i] = values[indices[i]] - mean;
        }
        return centred;
    }

    /** Every {@code stride}-th sample. */
    Samples thinned(int stride) {
        int count = (size() + stride - 1) / stride;
        double[] thinSeconds = new double[count];
        double[][] thinChannels = new double[CHANNELS][count];
        int[] thinIndices = new int[count];
        for (int i = 0; i < count; i++) {
            thinSeconds[i] = seconds[i * stride];
            thinIndices[i] = indices[i * stride];
            for (int c = 0; c < CHANNELS; c++) {
                thinChannels[c][i] = channels[c][i * stride];
            }
        }
        double shift = (thinSeconds[0] + thinSeconds[count - 1]) / 2;
        for (int i = 0; i < count; i++) {
            thinSeconds[i] -= shift;
        }
        return new Samples(thinSeconds, thinChannels, means, originS + shift, thinIndices);
    }

    /** The number of samples. */
    int size() {
        return seconds.length;
    }

    /** Half the time from the first to the last sample, s. */
    double halfSpanS() {
        return (seconds[size() - 1] - seconds[0]) / 2;
    }

    /** The mean sampling interval, s. */
    double intervalS() {
        return 2 * halfSpanS() / (size() - 1);
    }

    /** The time all samples stand for, each one interval, s. */
    double durationS() {
        return intervalS() * size();
    }
}

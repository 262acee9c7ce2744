package nightlag.stages.waveform;

import java.util.OptionalDouble;
import nightlag.stages.numeric.RealTransform;
import nightlag.stages.numeric.RealTransform.Bins;

/** The bins of both channels on an even grid, each channel scaled to its own power. */
final class LineSpectrum {
    /** A line near the tagged frequency is preferred to a stronger one elsewhere down to this part of its power. */
    private static final double TAG_PREFERENCE = 0.1;

    private static final double TAG_NEIGHBOURHOOD = 1.5;

    private final Bins[] bins = new Bins[Samples.CHANNELS];
    private final double[] share = new double[Samples.CHANNELS];
    private final double durationS;

    private LineSpectrum(double durationS) {
        this.durationS = durationS;
    }

    /**
     * Transforms both channels.
     *
     * @param values of each channel, of equal length and without their trend
     * @param intervalS the grid's step, s
     */
    static LineSpectrum of(double[][] values, double intervalS) {
        int length = values[0].length;
        LineSpectrum spectrum = new LineSpectrum(intervalS * length);
        RealTransform transform = new RealTransform(length);
        for (int c = 0; c < Samples.CHANNELS; c++) {
            Bins ofChannel = transform.forward(values[c]);
            double total = 0;
            for (int k = 1; k < ofChannel.size(); k++) {
                total += ofChannel.power(k);
            }
            spectrum.bins[c] = ofChannel;
            spectrum.share[c] = total > 0 ? 1 / total : 0;
        }
        return spectrum;
    }

    /** The bin of the strongest line, or of the strongest near the tag where it is not much weaker. */
    int strongest(OptionalDouble taggedHz) {
        int last = bins[0].size() - 1;
        int peak = strongest(1, last);
        if (taggedHz.isPresent()) {
            double expected = taggedHz.getAsDouble() * durationS;
            int near = strongest((int) Math.max(1, Math.floor(expected / TAG_NEIGHBOURHOOD)), (int)
                    Math.min(last, Math.ceil(expected * TAG_NEIGHBOURHOOD)));
            if (near > 0 && power(near) > TAG_PREFERENCE * power(peak)) {
                peak = near;
            }
        }
        return peak;
    }

    private int strongest(int from, int to) {
        int best = 0;
        double most = 0;
        for (int k = from; k <= to; k++) {
            double power = power(k);
            if (power > most) {
                most = power;
                best = k;
            }
        }
        return best;
    }

    private double power(int k) {
        double power = 0;
        for (int c = 0; c < bins.length; c++) {
            power += share[c] * bins[c].power(k);
        }
        return power;
    }

    /** The place of a line between bins from three of them, in the channel that shows it best. */
    double interpolated(int peak) {
        if (peak + 1 >= bins[0].size()) {
            return peak;
        }
        Bins best = share[0] * bins[0].power(peak) >= share[1] * bins[1].power(peak) ? bins[0] : bins[1];
        var outer = best.at(peak - 1).minus(best.at(peak + 1));
        var inner = best.at(peak).times(2).minus(best.at(peak - 1)).minus(best.at(peak + 1));
        double offset = inner.abs() == 0 ? 0 : outer.over(inner).re();
        return peak + Math.max(-0.5, Math.min(0.5, offset));
    }
}

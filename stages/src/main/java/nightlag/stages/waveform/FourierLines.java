package nightlag.stages.waveform;

import java.util.Arrays;
import nightlag.stages.numeric.Complex;
import nightlag.stages.numeric.RealTransform;
import nightlag.stages.numeric.RealTransform.Bins;

/**
 * Lines of the Fourier transform of both channels at whole multiples of 1/duration. An uneven clock, or one with samples
 * left out, is brought to an even one first ({@link EvenGrid}).
 *
 * @param durationS the duration T; line k is at k/T
 * @param samples samples of the transform
 * @param bins the lines of each channel
 * @param size lines from 0 up to the highest frequency wanted
 * @param noise standard deviation of each channel's noise, from the lines far above the sweep
 */
record FourierLines(double durationS, int samples, Bins[] bins, int size, double[] noise) {
    /** A sample of an even clock stands this near its place (in rad of the fastest frequency). */
    private static final double EVEN = 1e-6;
    /** Lines above this part of half the sampling rate are left to the recorder's own filter. */
    private static final double HIGHEST = 0.96;

    private static final int NOISE_LINES = 200;

    /**
     * Transforms a record.
     *
     * @param complete whether no sample was left out
     * @param highestHz lines up to here are wanted
     */
    static FourierLines of(Samples samples, Clock clock, boolean complete, double highestHz) {
        boolean even = complete && clock.largestDeviationS() * 2 * Math.PI * highestHz <= EVEN;
        double span = 2 * samples.halfSpanS();
        int count = even ? samples.size() : (int) Math.rint(span / clock.intervalS()) + 1;
        double duration = span / (count - 1) * count;
        RealTransform transform = new RealTransform(count);
        Bins[] bins = new Bins[Samples.CHANNELS];
        for (int c = 0; c < Samples.CHANNELS; c++) {
            double[] values = samples.channels()[c];
            bins[c] = transform.forward(
                    even ? values : EvenGrid.values(samples.seconds(), values, count, clock.intervalS()));
        }
        int limit = (int) (HIGHEST * count / 2);
        int last = (int) Math.min(limit, Math.ceil(highestHz * duration));
        double[] noise = new double[Samples.CHANNELS];
        for (int c = 0; c < Samples.CHANNELS; c++) {
            noise[c] = deviation(bins[c], limit, Math.min(NOISE_LINES, limit - last));
        }
        return new FourierLines(duration, count, bins, last + 1, noise);
    }

    /** Standard deviation of the noise whose topmost lines these are; 0 where the sweep reaches up to them. */
    private static double deviation(Bins bins, int highest, int lines) {
        double[] powers = new double[lines];
        for (int k = 0; k < lines; k++) {
            powers[k] = bins.power(highest - k);
        }
        Arrays.sort(powers);
        // the median of |noise|² is ln 2 of its mean
        int samples = 2 * (bins.size() - 1);
        return lines == 0 ? 0 : Math.sqrt(powers[lines / 2] / Math.log(2) / samples);
    }

    /** A line of a channel. */
    Complex at(int channel, int k) {
        return bins[channel].at(k);
    }

    /** The power of a line of a channel. */
    double power(int channel, int k) {
        return bins[channel].power(k);
    }
}

package nightlag.stages.waveform;

import nightlag.stages.numeric.Complex;
import nightlag.stages.numeric.RealTransform;
import nightlag.stages.numeric.RealTransform.Bins;

/**
 * The amplitudes of an evenly sampled record of whole cycles at an exact frequency: order n is bin n·c of its transform, as
 * it is. Over whole cycles the columns of the model without drift are orthogonal, so this is the least-squares fit.
 */
final class WholeCycleBins {
    /** So near a whole number the cycles of a record must lie. */
    private static final double WHOLE = 1e-9;
    /** A sample may stand this far (in rad of the fundamental) from its place on an even clock. */
    private static final double EVEN = 1e-10;

    private WholeCycleBins() {}

    /** Whether the bins can be used as they are; drift, exact frequency and left-out samples are the caller's to look at. */
    static boolean applies(Samples samples, Clock clock, double angularFrequency) {
        double cycles = angularFrequency * samples.durationS() / (2 * Math.PI);
        return cycles > 0.5
                && Math.abs(cycles - Math.rint(cycles)) <= WHOLE * cycles
                && clock.largestDeviationS() * angularFrequency <= EVEN;
    }

    /** The coefficients of each channel in the order of {@link Basis}. */
    static double[][] coefficients(Samples samples, Basis basis, double angularFrequency) {
        int count = samples.size();
        int cycles = (int) Math.rint(angularFrequency * samples.durationS() / (2 * Math.PI));
        RealTransform transform = new RealTransform(count);
        double[][] coefficients = new double[Samples.CHANNELS][basis.columns()];
        for (int c = 0; c < Samples.CHANNELS; c++) {
            Bins bins = transform.forward(samples.channels()[c]);
            coefficients[c][0] = bins.re()[0] / count;
            for (int n = 1; n <= basis.harmonics(); n++) {
                // the transform counts phase from the first sample, the model from the middle of the record
                Complex amplitude = bins.at(n * cycles)
                        .times(2.0 / count)
                        .times(Complex.polar(1, -n * angularFrequency * samples.seconds()[0]));
                int column = basis.cosineColumn(n);
                coefficients[c][column] = amplitude.re();
                coefficients[c][column + 1] = -amplitude.im();
            }
        }
        return coefficients;
    }
}

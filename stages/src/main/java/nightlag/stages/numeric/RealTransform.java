package nightlag.stages.numeric;

import org.jtransforms.fft.DoubleFFT_1D;
import org.visnow.jlargearrays.ConcurrencyUtils;

/**
 * The discrete Fourier transform of real values of one length: Y_k = Σ_j y_j e^{−2πi jk/n} for k = 0 … ⌊n/2⌋, unscaled.
 * One instance serves one length and one thread.
 */
public final class RealTransform {
    static {
        // The one place that touches the library's global switches. Records run side by side, each on one thread; the
        // library's own threads would return wrong numbers when the caller is interrupted.
        ConcurrencyUtils.setNumberOfThreads(1);
    }

    private final int length;
    private final DoubleFFT_1D transform;

    /**
     * A transform of this length.
     *
     * @throws IllegalArgumentException if the length is below 1
     */
    public RealTransform(int length) {
        if (length < 1) {
            throw new IllegalArgumentException("a transform of " + length + " values");
        }
        this.length = length;
        this.transform = new DoubleFFT_1D(length);
    }

    /**
     * The bins of a transform.
     *
     * @param re real parts, bin k at index k
     * @param im imaginary parts, bin k at index k
     */
    public record Bins(double[] re, double[] im) {
        /** The number of bins, ⌊n/2⌋ + 1. */
        public int size() {
            return re.length;
        }

        /** Bin k. */
        public Complex at(int k) {
            return new Complex(re[k], im[k]);
        }

        /** |Y_k|². */
        public double power(int k) {
            return re[k] * re[k] + im[k] * im[k];
        }
    }

    /**
     * Transforms values, which stay as they are.
     *
     * @throws IllegalArgumentException if there are not as many values as the transform is long, or one is not finite (it
     *     would spread to every bin)
     */
    public Bins forward(double[] values) {
        if (values.length != length) {
            throw new IllegalArgumentException(values.length + " values for a transform of " + length);
        }
        for (double value : values) {
            if (!Double.isFinite(value)) {
                throw new IllegalArgumentException("a value that is not finite cannot be transformed");
            }
        }
        double[] packed = values.clone();
        transform.realForward(packed);
        int last = length / 2;
        double[] re = new double[last + 1];
        double[] im = new double[last + 1];
        // Packing: Re of bin 0 at 0; then pairs; at 1 stands Re of bin n/2 for even n, Im of bin (n−1)/2 for odd n.
        re[0] = packed[0];
        for (int k = 1; k <= last; k++) {
            boolean middle = 2 * k == length;
            re[k] = middle ? packed[1] : packed[2 * k];
            im[k] = middle ? 0 : 2 * k + 1 == length ? packed[1] : packed[2 * k + 1];
        }
        return new Bins(re, im);
    }

    /** The largest length up to {@code limit} without a prime factor above 5: fast, and at most a few per cent shorter. */
    public static int fastLengthUpTo(int limit) {
        int best = 1;
        for (long five = 1; five <= limit; five *= 5) {
            for (long three = five; three <= limit; three *= 3) {
                long two = three;
                while (2 * two <= limit) {
                    two *= 2;
                }
                best = Math.max(best, (int) two);
            }
        }
        return best;
    }
}

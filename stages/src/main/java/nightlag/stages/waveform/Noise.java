package nightlag.stages.waveform;

import java.util.Arrays;
import java.util.Optional;
import nightlag.stages.numeric.RealTransform;
import nightlag.stages.numeric.RealTransform.Bins;

/**
 * The noise of a record as the residuals show it: of each channel as a whole, and beside each order, because noise need not
 * be white. A bin with the unit vector e holds noise of variance |eᴴr|²/(1 − ‖Qᴴe‖²), where the bracket is what the fit
 * left of it (Q spans the columns of the model, and the direction of ω as far as this channel decides it). The mean of the
 * about twelve nearest bins the fit left mostly alone is the noise at an order.
 */
final class Noise {
    private static final int WANTED_BINS = 12;
    private static final int FEWEST_BINS = 6;
    /** A bin of which the fit took more than this is not free. */
    private static final double LEAST_LEFT = 0.5;
    /** So far from the order a bin may lie, in bins; over few cycles in cycles. */
    private static final int REACH_BINS = 12;

    private static final double REACH_CYCLES = 4;
    /** The level at an order may differ from the mean of its bins by this factor at most. */
    private static final double MOST_TILT = 2;

    /**
     * A noise level.
     *
     * @param variance of a sample
     * @param freedom degrees of freedom behind it
     * @param pooled whether it is that of all residuals together
     */
    record Level(double variance, double freedom, boolean pooled) {}

    private final Samples samples;
    private final Basis basis;
    private final JointFit.Result fit;
    private final Level[] whole;
    private final Level[][] besideOrders;

    private Noise(Samples samples, Basis basis, JointFit.Result fit, boolean frequencyFree) {
        this.samples = samples;
        this.basis = basis;
        this.fit = fit;
        double[] shares = new double[Samples.CHANNELS];
        double[] perSlope = new double[Samples.CHANNELS];
        if (frequencyFree) {
            double sum = 0;
            double[] weights = fit.weights();
            for (int c = 0; c < Samples.CHANNELS; c++) {
                sum += weights[c] * fit.freeSlopeSquares()[c];
            }
            for (int c = 0; c < Samples.CHANNELS; c++) {
                perSlope[c] = sum > 0 ? weights[c] / sum : 0;
                shares[c] = perSlope[c] * fit.freeSlopeSquares()[c];
            }
        }
        this.whole = new Level[Samples.CHANNELS];
        for (int c = 0; c < Samples.CHANNELS; c++) {
            double freedom = samples.size() - basis.columns() - shares[c];
            whole[c] = new Level(fit.residualSquares()[c] / freedom, freedom, true);
        }
        this.besideOrders = besideOrders(frequencyFree, perSlope);
    }

    /** The noise of a fit. */
    static Noise of(Samples samples, Basis basis, JointFit.Result fit, boolean frequencyFree) {
        return new Noise(samples, basis, fit, frequencyFree);
    }

    /** The noise of a channel as a whole. */
    Level whole(int channel) {
        return whole[channel];
    }

    /** The noise of a channel beside an order. */
    Level beside(int channel, int order) {
        return besideOrders[channel][order - 1];
    }

    private Level[][] besideOrders(boolean frequencyFree, double[] perSlope) {
        int length = RealTransform.fastLengthUpTo(samples.size());
        double duration = (samples.seconds()[length - 1] - samples.seconds()[0]) / (length - 1) * length;
        double cycles = fit.angularFrequency() * duration / (2 * Math.PI);
        double reach = Math.max(REACH_BINS, Math.min(REACH_CYCLES * cycles, 3 * REACH_BINS));
        int highestBin = (length - 1) / 2;
        int lastBin = (int) Math.min(highestBin, Math.ceil(basis.harmonics() * cycles + reach));
        boolean[] wanted = new boolean[lastBin + 1];
        for (int n = 1; n <= basis.harmonics(); n++) {
            for (int k = (int) Math.max(1, n * cycles - reach); k <= Math.min(lastBin, n * cycles + reach); k++) {
                wanted[k] = true;
            }
        }
        RealTransform transform = new RealTransform(length);
        double[][][] products = products(transform, length, wanted, frequencyFree);
        double[][] variances = new double[Samples.CHANNELS][lastBin + 1];
        double[][] left = new double[Samples.CHANNELS][lastBin + 1];
        double[] takenByColumns = new double[lastBin + 1];
        for (int k = 1; k <= lastBin; k++) {
            if (wanted[k]) {
                takenByColumns[k] = takenByColumns(products[k]);
            }
        }
        for (int c = 0; c < Samples.CHANNELS; c++) {
            Bins residuals = transform.forward(Arrays.copyOf(fit.residuals()[c], length));
            for (int k = 1; k <= lastBin; k++) {
                if (wanted[k]) {
                    left[c][k] = 1 - (takenByColumns[k] + takenBySlope(products[k], c, perSlope[c])) / length;
                    variances[c][k] = residuals.power(k) / length / left[c][k];
                }
            }
        }
        Level[][] levels = new Level[Samples.CHANNELS][basis.harmonics()];
        for (int c = 0; c < Samples.CHANNELS; c++) {
            for (int n = 1; n <= basis.harmonics(); n++) {
                levels[c][n - 1] = nearest(n * cycles, reach, variances[c], left[c], c);
            }
        }
        return levels;
    }

    private Level nearest(double centre, double reach, double[] variances, double[] left, int channel) {
        int below = (int) Math.floor(centre);
        int above = below + 1;
        int[] bins = new int[WANTED_BINS];
        int found = 0;
        while (found < WANTED_BINS) {
            boolean belowIn = below >= 1 && centre - below <= reach;
            boolean aboveIn = above < left.length && above - centre <= reach;
            if (!belowIn && !aboveIn) {
                break;
            }
            boolean down = belowIn && (!aboveIn || centre - below <= above - centre);
            int k = down ? below-- : above++;
            if (k < left.length && left[k] > LEAST_LEFT) {
                bins[found++] = k;
            }
        }
        return found < FEWEST_BINS
                ? whole[channel]
                : levelAt(centre, Arrays.copyOf(bins, found), variances, left).orElse(whole[channel]);
    }

    /**
     * The level at the order from the bins around it. Where they lie unevenly (near the record's lowest bins more of them
     * are above than below) it is read off a straight line through them, at the price of some degrees of freedom: noise
     * that falls with frequency would else come out too low. Empty where the line is worth fewer bins than are needed.
     */
    private static Optional<Level> levelAt(double centre, int[] bins, double[] variances, double[] left) {
        double mean = 0;
        double middle = 0;
        double freedom = 0;
        for (int k : bins) {
            mean += variances[k] / bins.length;
            middle += (k - centre) / bins.length;
            freedom += 2 * left[k];
        }
        double spread = 0;
        double slope = 0;
        for (int k : bins) {
            double offset = k - centre - middle;
            spread += offset * offset;
            slope += offset * variances[k];
        }
        slope /= spread;
        double worth = 1 / (1 + middle * middle * bins.length / spread);
        if (bins.length * worth < FEWEST_BINS) {
            return Optional.empty();
        }
        double level = Math.max(mean / MOST_TILT, Math.min(mean * MOST_TILT, mean - slope * middle));
        return Optional.of(new Level(level, freedom * worth, false));
    }

    /** n‖Qᴴe‖² of one bin over the columns of the model. */
    private double takenByColumns(double[][] product) {
        double taken = 0;
        for (double[] part : product) {
            taken += fit.normal().inverseForm(Arrays.copyOf(part, basis.columns()));
        }
        return taken;
    }

    /** The same over the direction of ω, as far as one channel decides it. */
    private double takenBySlope(double[][] product, int channel, double perSlope) {
        if (perSlope == 0) {
            return 0;
        }
        double taken = 0;
        for (double[] part : product) {
            double slope = part[basis.columns() + channel];
            for (int j = 0; j < basis.columns(); j++) {
                slope -= part[j] * fit.pull()[channel][j];
            }
            taken += slope * slope * perSlope;
        }
        return taken;
    }

    /** For each wanted bin, Re and Im of its products with the columns of the model and with both channels' slopes. */
    private double[][][] products(RealTransform transform, int length, boolean[] wanted, boolean withSlopes) {
        int columns = basis.columns();
        double[][][] products = new double[wanted.length][][];
        for (int k = 0; k < wanted.length; k++) {
            if (wanted[k]) {
                products[k] = new double[2][columns + Samples.CHANNELS];
            }
        }
        double[][] all = new double[columns][length];
        basis.fill(0, length, all);
        for (int j = 0; j < columns; j++) {
            store(transform.forward(all[j]), j, products);
        }
        if (withSlopes) {
            for (int c = 0; c < Samples.CHANNELS; c++) {
                double[] slope = new double[length];
                basis.phaseSlope(0, length, all, fit.coefficients()[c], slope);
                store(transform.forward(slope), columns + c, products);
            }
        }
        return products;
    }

    private static void store(Bins bins, int column, double[][][] products) {
        for (int k = 0; k < products.length; k++) {
            if (products[k] != null) {
                products[k][0][column] = bins.re()[k];
                products[k][1][column] = bins.im()[k];
            }
        }
    }
}

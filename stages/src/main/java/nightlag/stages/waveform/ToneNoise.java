package nightlag.stages.waveform;

import nightlag.stages.numeric.Cholesky;
import nightlag.stages.numeric.RealTransform;
import nightlag.stages.numeric.RealTransform.Bins;

/**
 * The noise of a record of several tones as the residuals show it: of each channel as a whole, and beside each tone. As in
 * {@link Noise}, a bin e holds noise of variance |eᴴr|²/(1 − ‖Qᴴe‖²), Q spanning the columns of the model and the free
 * frequencies' directions as far as this channel decides them; the mean of the about twelve nearest bins that the fit left
 * mostly alone is the noise at a tone.
 */
final class ToneNoise {
    private static final int WANTED_BINS = 12;
    private static final int FEWEST_BINS = 6;
    private static final double LEAST_LEFT = 0.5;
    /** So far from its tone a bin may lie; between tones there is not always room for twelve. */
    private static final int REACH_BINS = 24;

    private final Noise.Level[] whole = new Noise.Level[Samples.CHANNELS];
    private final Noise.Level[][] beside;

    ToneNoise(Samples samples, ToneBasis basis, ToneFit.Result fit, boolean frequenciesFree) {
        double[] weights = new double[Samples.CHANNELS];
        for (int c = 0; c < Samples.CHANNELS; c++) {
            weights[c] = ToneFit.Result.weight(fit.residualSquares()[c], samples.size());
            double shared = frequenciesFree ? 0.5 * fit.spread().length : 0;
            double freedom = Math.max(1, samples.size() - basis.columns() - shared);
            whole[c] = new Noise.Level(fit.residualSquares()[c] / freedom, freedom, true);
        }
        this.beside = beside(samples, basis, fit, frequenciesFree, weights);
    }

    /** The noise of a channel as a whole. */
    Noise.Level whole(int channel) {
        return whole[channel];
    }

    /** The noise of a channel beside a tone. */
    Noise.Level beside(int channel, int tone) {
        return beside[channel][tone];
    }

    private Noise.Level[][] beside(
            Samples samples, ToneBasis basis, ToneFit.Result fit, boolean frequenciesFree, double[] weights) {
        int length = RealTransform.fastLengthUpTo(samples.size());
        double duration = (samples.seconds()[length - 1] - samples.seconds()[0]) / (length - 1) * length;
        int highest = (length - 1) / 2;
        double[] places = new double[basis.tones()];
        boolean[] wanted = new boolean[highest + 1];
        for (int k = 0; k < places.length; k++) {
            places[k] = fit.angularFrequencies()[k] * duration / (2 * Math.PI);
            for (int bin = (int) Math.max(1, places[k] - REACH_BINS);
                    bin <= Math.min(highest, places[k] + REACH_BINS);
                    bin++) {
                wanted[bin] = true;
            }
        }
        RealTransform transform = new RealTransform(length);
        double[][][] products = products(transform, length, basis, fit, wanted);
        Noise.Level[][] levels = new Noise.Level[Samples.CHANNELS][places.length];
        for (int c = 0; c < Samples.CHANNELS; c++) {
            Bins residuals = transform.forward(java.util.Arrays.copyOf(fit.residuals()[c], length));
            double[] variances = new double[highest + 1];
            double[] left = new double[highest + 1];
            for (int bin = 1; bin <= highest; bin++) {
                if (wanted[bin]) {
                    double taken = taken(products[bin][0], basis, fit, frequenciesFree, c, weights[c])
                            + taken(products[bin][1], basis, fit, frequenciesFree, c, weights[c]);
                    left[bin] = 1 - taken / length;
                    variances[bin] = residuals.power(bin) / length / left[bin];
                }
            }
            for (int k = 0; k < places.length; k++) {
                levels[c][k] = nearest(places[k], variances, left, whole[c]);
            }
        }
        return levels;
    }

    private static double taken(
            double[] product,
            ToneBasis basis,
            ToneFit.Result fit,
            boolean frequenciesFree,
            int channel,
            double weight) {
        double[] columns = java.util.Arrays.copyOf(product, basis.columns());
        double taken = fit.normal().inverseForm(columns);
        if (!frequenciesFree || fit.information().isEmpty()) {
            return taken;
        }
        Cholesky information = fit.information().get();
        double[] free = new double[fit.spread().length];
        for (int p = 0; p < free.length; p++) {
            for (int k = 0; k < basis.tones(); k++) {
                int slope = basis.slopeColumn(k);
                free[p] += fit.spread()[p][k]
                        * (fit.slopes()[channel][k][0] * product[slope]
                                + fit.slopes()[channel][k][1] * product[slope + 1]);
            }
            for (int j = 0; j < columns.length; j++) {
                free[p] -= columns[j] * fit.pull()[channel][p][j];
            }
        }
        return taken + weight * information.inverseForm(free);
    }

    private static Noise.Level nearest(double centre, double[] variances, double[] left, Noise.Level whole) {
        int below = (int) Math.floor(centre);
        int above = below + 1;
        int bins = 0;
        double sum = 0;
        double freedom = 0;
        while (bins < WANTED_BINS) {
            boolean belowIn = below >= 1 && centre - below <= REACH_BINS;
            boolean aboveIn = above < left.length && above - centre <= REACH_BINS;
            if (!belowIn && !aboveIn) {
                break;
            }
            boolean down = belowIn && (!aboveIn || centre - below <= above - centre);
            int bin = down ? below-- : above++;
            if (bin < left.length && left[bin] > LEAST_LEFT) {
                sum += variances[bin];
                freedom += 2 * left[bin];
                bins++;
            }
        }
        return bins < FEWEST_BINS ? whole : new Noise.Level(sum / bins, freedom, false);
    }

    /** For each wanted bin, Re and Im of its products with all columns. */
    private static double[][][] products(
            RealTransform transform, int length, ToneBasis basis, ToneFit.Result fit, boolean[] wanted) {
        int all = basis.allColumns();
        double[][][] products = new double[wanted.length][][];
        for (int bin = 0; bin < wanted.length; bin++) {
            if (wanted[bin]) {
                products[bin] = new double[2][all];
            }
        }
        // one tone at a time: all columns of a long record at once would be large
        ToneBasis single = basis.ofOneTone();
        double[][] columns = new double[single.allColumns()][length];
        for (int k = 0; k < basis.tones(); k++) {
            single.fill(new double[] {fit.angularFrequencies()[k]}, 0, length, columns);
            for (int j = k == 0 ? 0 : single.driftTerms(); j < columns.length; j++) {
                int place = j < single.columns()
                        ? j + (j < single.driftTerms() ? 0 : 2 * k)
                        : j - single.columns() + basis.slopeColumn(k);
                store(transform.forward(columns[j]), place, products);
            }
        }
        return products;
    }

    private static void store(Bins bins, int column, double[][][] products) {
        for (int bin = 0; bin < products.length; bin++) {
            if (products[bin] != null) {
                products[bin][0][column] = bins.re()[bin];
                products[bin][1][column] = bins.im()[bin];
            }
        }
    }
}

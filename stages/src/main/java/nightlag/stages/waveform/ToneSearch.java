package nightlag.stages.waveform;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import nightlag.stages.numeric.RealTransform;
import nightlag.stages.numeric.RealTransform.Bins;

/**
 * The tones of a record as the transform of its deformation shows them. A Blackman window keeps a strong tone from hiding a
 * weak one; its lines are three bins wide to either side, so tones nearer than that to one another or to zero are not told
 * apart here (where they are given, the fit tells them apart down to one bin).
 */
final class ToneSearch {
    /** Half the width of a line, in bins. */
    static final int LINE_BINS = 3;
    /** A tone is at least this part of the largest, in power: 1 % in amplitude. */
    private static final double LEAST_POWER = 1e-4;
    /** A tone stands this far over the noise in power; the highest of 100 000 bins of noise alone reaches 12 times. */
    private static final double OVER_NOISE = 30;
    /** So far a recorder's clock may be off the drive's. */
    private static final double MOST_CLOCK_ERROR = 0.02;

    private static final int MOST_TONES = 64;

    private final double duration;
    private final double[] power;

    ToneSearch(Samples samples) {
        this(samples, samples.channels()[Samples.DEFORMATION]);
    }

    /** Searches other values than the deformation, one a sample. */
    ToneSearch(Samples samples, double[] searched) {
        int length = RealTransform.fastLengthUpTo(samples.size());
        this.duration = (samples.seconds()[length - 1] - samples.seconds()[0]) / (length - 1) * length;
        double[] values = FrequencySearch.detrended(samples, searched, length);
        for (int i = 0; i < length; i++) {
            double x = 2 * Math.PI * (i + 0.5) / length;
            values[i] *= 0.42 - 0.5 * Math.cos(x) + 0.08 * Math.cos(2 * x);
        }
        Bins bins = new RealTransform(length).forward(values);
        this.power = new double[bins.size()];
        for (int k = 0; k < power.length; k++) {
            power[k] = bins.power(k);
        }
    }

    /** Angular frequencies of the tones in rad/s, rising; none where nothing stands out. */
    double[] found() {
        double largest = 0;
        for (int k = LINE_BINS; k < power.length; k++) {
            largest = Math.max(largest, power[k]);
        }
        double[] sorted = power.clone();
        Arrays.sort(sorted);
        double noise = sorted[sorted.length / 2] / Math.log(2);
        double least = Math.max(LEAST_POWER * largest, OVER_NOISE * noise);
        List<Double> tones = new ArrayList<>();
        for (int k = LINE_BINS; k < power.length - 1 && tones.size() < MOST_TONES; k++) {
            if (power[k] > least && highestWithin(k)) {
                tones.add(2 * Math.PI * interpolated(k) / duration);
            }
        }
        return tones.stream().mapToDouble(Double::doubleValue).toArray();
    }

    /** The angular frequency of the highest line, rad/s. */
    double strongest() {
        int best = LINE_BINS;
        for (int k = LINE_BINS; k < power.length; k++) {
            best = power[k] > power[best] ? k : best;
        }
        return 2 * Math.PI * interpolated(best) / duration;
    }

    /** The height of the line nearest to an angular frequency, in a scale of its own. */
    double amplitude(double omega) {
        int nearest = (int) Math.min(power.length - 1.0, Math.rint(omega * duration / (2 * Math.PI)));
        return Math.sqrt(power[nearest]);
    }

    private boolean highestWithin(int k) {
        for (int other = Math.max(1, k - LINE_BINS + 1); other < Math.min(power.length, k + LINE_BINS); other++) {
            if (power[other] > power[k] || (power[other] == power[k] && other < k)) {
                return false;
            }
        }
        return true;
    }

    /** The top of the parabola through the logarithms of three bins. */
    private double interpolated(int k) {
        if (k < 1 || k + 1 >= power.length || power[k - 1] <= 0 || power[k + 1] <= 0) {
            return k;
        }
        double below = Math.log(power[k - 1]);
        double above = Math.log(power[k + 1]);
        double curve = 2 * Math.log(power[k]) - below - above;
        return curve > 0 ? k + Math.max(-0.5, Math.min(0.5, (above - below) / (2 * curve))) : k;
    }

    /**
     * The factor from given frequencies to those in the record, from where the lines nearest to them stand; the recorder's
     * clock may run differently from the drive's.
     */
    double clockFactor(double[] angularFrequencies) {
        double sum = 0;
        double weights = 0;
        for (double omega : angularFrequencies) {
            double place = omega * duration / (2 * Math.PI);
            int from = (int) Math.max(1, Math.floor(place * (1 - MOST_CLOCK_ERROR) - 1));
            int to = (int) Math.min(power.length - 2.0, Math.ceil(place * (1 + MOST_CLOCK_ERROR) + 1));
            int best = from;
            for (int k = from; k <= to; k++) {
                best = power[k] > power[best] ? k : best;
            }
            if (from <= to) {
                double weight = power[best] * place * place;
                sum += weight * interpolated(best) / place;
                weights += weight;
            }
        }
        return weights > 0 ? sum / weights : 1;
    }
}

package nightlag.stages.waveform;

import java.util.Comparator;
import java.util.OptionalDouble;
import java.util.stream.IntStream;
import nightlag.stages.numeric.Cholesky;
import nightlag.stages.numeric.RealTransform;
import nightlag.stages.numeric.RealTransform.Bins;

/**
 * Where the refinement of the frequency starts: the strongest line of both channels together, each scaled to its own
 * power. Records of many cycles show it in their transform; in a record of few cycles line, drift and record length run
 * into one another, and the fit with one order is tried over a grid of frequencies instead.
 */
final class FrequencySearch {
    /** Up to this bin the transform of a record is not trusted to show the line. */
    private static final int LAST_UNSURE_BIN = 3;

    private static final double FEWEST_CYCLES = 0.5;
    private static final double MOST_CYCLES = 5;
    private static final double CYCLE_STEP = 0.1;
    /** More samples a cycle tell a grid of frequencies with one order nothing new. */
    private static final int SAMPLES_PER_CYCLE = 24;
    /** The same with all orders. */
    private static final int SAMPLES_PER_CYCLE_ALL_ORDERS = 48;

    private static final int NEARBY_STEPS = 16;
    private static final double NEARBY_REACH = 0.2;
    private static final int MOST_MINIMA = 3;
    /** A line near the tagged frequency is preferred to a stronger one elsewhere down to this part of its power. */
    private static final double TAG_PREFERENCE = 0.1;

    private static final double TAG_NEIGHBOURHOOD = 1.5;

    private final Samples samples;
    private final int driftDegree;

    FrequencySearch(Samples samples, int driftDegree) {
        this.samples = samples;
        this.driftDegree = driftDegree;
    }

    /** A frequency in rad/s from which the fit finds its way. */
    double start(OptionalDouble taggedHz) {
        int length = RealTransform.fastLengthUpTo(samples.size());
        double interval = (samples.seconds()[length - 1] - samples.seconds()[0]) / (length - 1);
        RealTransform transform = new RealTransform(length);
        Bins[] bins = new Bins[Samples.CHANNELS];
        double[] share = new double[Samples.CHANNELS];
        for (int c = 0; c < Samples.CHANNELS; c++) {
            bins[c] = transform.forward(detrended(samples.channels()[c], length));
            double total = 0;
            for (int k = 1; k < bins[c].size(); k++) {
                total += bins[c].power(k);
            }
            share[c] = total > 0 ? 1 / total : 0;
        }
        int peak = strongest(bins, share, 1, bins[0].size() - 1);
        if (taggedHz.isPresent()) {
            double expected = taggedHz.getAsDouble() * interval * length;
            int near = strongest(bins, share, (int) Math.max(1, Math.floor(expected / TAG_NEIGHBOURHOOD)), (int)
                    Math.min(bins[0].size() - 1.0, Math.ceil(expected * TAG_NEIGHBOURHOOD)));
            if (near > 0 && power(bins, share, near) > TAG_PREFERENCE * power(bins, share, peak)) {
                peak = near;
            }
        }
        return peak <= LAST_UNSURE_BIN
                ? bestOnGrid()
                : 2 * Math.PI * interpolated(bins, share, peak) / (interval * length);
    }

    private static int strongest(Bins[] bins, double[] share, int from, int to) {
        int best = 0;
        double most = 0;
        for (int k = from; k <= to; k++) {
            double power = power(bins, share, k);
            if (power > most) {
                most = power;
                best = k;
            }
        }
        return best;
    }

    private static double power(Bins[] bins, double[] share, int k) {
        double power = 0;
        for (int c = 0; c < bins.length; c++) {
            power += share[c] * bins[c].power(k);
        }
        return power;
    }

    /** The place of a line between bins from three of them, in the channel that shows it best. */
    private static double interpolated(Bins[] bins, double[] share, int peak) {
        if (peak + 1 >= bins[0].size()) {
            return peak;
        }
        Bins best = share[0] * bins[0].power(peak) >= share[1] * bins[1].power(peak) ? bins[0] : bins[1];
        var outer = best.at(peak - 1).minus(best.at(peak + 1));
        var inner = best.at(peak).times(2).minus(best.at(peak - 1)).minus(best.at(peak + 1));
        double offset = inner.abs() == 0 ? 0 : outer.over(inner).re();
        return peak + Math.max(-0.5, Math.min(0.5, offset));
    }

    /** Without its best parabola: low bins would else show the drift. */
    private double[] detrended(double[] values, int length) {
        double[][] gram = new double[3][3];
        double[] moments = new double[3];
        double perSecond = 1 / samples.halfSpanS();
        for (int i = 0; i < length; i++) {
            double u = samples.seconds()[i] * perSecond;
            double curve = u * u - 1.0 / 3;
            gram[1][0] += u;
            gram[1][1] += u * u;
            gram[2][0] += curve;
            gram[2][1] += u * curve;
            gram[2][2] += curve * curve;
            moments[0] += values[i];
            moments[1] += u * values[i];
            moments[2] += curve * values[i];
        }
        gram[0][0] = length;
        double[] trend = Cholesky.of(gram).map(normal -> normal.solve(moments)).orElse(new double[3]);
        double[] rest = new double[length];
        for (int i = 0; i < length; i++) {
            double u = samples.seconds()[i] * perSecond;
            rest[i] = values[i] - trend[0] - trend[1] * u - trend[2] * (u * u - 1.0 / 3);
        }
        return rest;
    }

    private double bestOnGrid() {
        double perCycle = samples.size() / MOST_CYCLES;
        Samples thin = samples.thinned(Math.max(1, (int) (perCycle / SAMPLES_PER_CYCLE)));
        JointFit fit = new JointFit(thin, 1, driftDegree);
        double cycle = 2 * Math.PI / thin.durationS();
        double best = cycle;
        double least = Double.POSITIVE_INFINITY;
        int last = (int) Math.round((MOST_CYCLES - FEWEST_CYCLES) / CYCLE_STEP);
        for (int step = 0; step <= last; step++) {
            double omega = cycle * (FEWEST_CYCLES + step * CYCLE_STEP);
            double misfit = fit.misfitAt(omega);
            if (misfit < least) {
                least = misfit;
                best = omega;
            }
        }
        return best;
    }

    /**
     * The deepest minima on a narrow grid of frequencies with all orders: over few cycles many orders leave several minima,
     * and the refinement must start in the right one.
     *
     * @return at most three frequencies in rad/s, the most likely first
     */
    static double[] minimaNearby(Samples samples, double omega, int harmonics, int driftDegree) {
        double cycles = omega * samples.durationS() / (2 * Math.PI);
        double perCycle = samples.size() / cycles;
        Samples thin = samples.thinned(Math.max(1, (int) (perCycle / SAMPLES_PER_CYCLE_ALL_ORDERS)));
        JointFit fit = new JointFit(thin, harmonics, driftDegree);
        double[] candidates = new double[2 * NEARBY_STEPS + 1];
        double[] misfits = new double[candidates.length];
        for (int i = 0; i < candidates.length; i++) {
            candidates[i] = omega * (1 + NEARBY_REACH * (i - NEARBY_STEPS) / NEARBY_STEPS);
            misfits[i] = fit.misfitAt(candidates[i]);
        }
        // a minimum at the edge belongs to another frequency, such as half of this one
        double[] minima = IntStream.range(1, candidates.length - 1)
                .filter(i -> misfits[i] <= misfits[i - 1] && misfits[i] < misfits[i + 1])
                .boxed()
                .sorted(Comparator.comparingDouble(i -> misfits[i]))
                .limit(MOST_MINIMA)
                .mapToDouble(i -> candidates[i])
                .toArray();
        return minima.length == 0 ? new double[] {omega} : minima;
    }

    /** Whether a refined frequency still is the one that {@link #minimaNearby} looked around. */
    static boolean near(double refined, double omega) {
        return Math.abs(refined / omega - 1) < 1.25 * NEARBY_REACH;
    }
}

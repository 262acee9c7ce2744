package nightlag.stages.waveform;

import java.util.Comparator;
import java.util.OptionalDouble;
import java.util.stream.IntStream;
import nightlag.stages.numeric.Cholesky;
import nightlag.stages.numeric.RealTransform;

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
    static final int SAMPLES_PER_CYCLE = 24;
    /** The same with all orders. */
    private static final int SAMPLES_PER_CYCLE_ALL_ORDERS = 48;

    private static final int NEARBY_STEPS = 16;
    private static final double NEARBY_REACH = 0.2;
    private static final int MOST_MINIMA = 3;
    private final Samples samples;
    private final int driftDegree;

    FrequencySearch(Samples samples, int driftDegree) {
        this.samples = samples;
        this.driftDegree = driftDegree;
    }

    /** Frequencies in rad/s from which the fit finds its way: one, unless gaps leave more to choose from. */
    double[] starts(OptionalDouble taggedHz) {
        return GappedSearch.wanted(samples)
                ? new GappedSearch(samples, driftDegree).starts(taggedHz)
                : new double[] {start(taggedHz)};
    }

    private double start(OptionalDouble taggedHz) {
        int length = RealTransform.fastLengthUpTo(samples.size());
        double interval = (samples.seconds()[length - 1] - samples.seconds()[0]) / (length - 1);
        double[][] values = new double[Samples.CHANNELS][];
        for (int c = 0; c < Samples.CHANNELS; c++) {
            values[c] = detrended(samples, samples.channels()[c], length);
        }
        LineSpectrum spectrum = LineSpectrum.of(values, interval);
        int peak = spectrum.strongest(taggedHz);
        return peak <= LAST_UNSURE_BIN ? bestOnGrid() : 2 * Math.PI * spectrum.interpolated(peak) / (interval * length);
    }

    /** The first samples of a channel without their best parabola: low bins would else show the drift. */
    static double[] detrended(Samples samples, double[] values, int length) {
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

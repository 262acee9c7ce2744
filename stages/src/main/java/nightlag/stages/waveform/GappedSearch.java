package nightlag.stages.waveform;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.OptionalDouble;
import java.util.function.DoubleFunction;
import java.util.stream.IntStream;
import nightlag.stages.numeric.RealTransform;

/**
 * Where the refinement of the frequency starts in a record with gaps. Taken as evenly spaced, its samples would show one
 * wave as two that do not fit together. They are put on an even grid by their time stamps instead, zero where rows are
 * missing. Gaps also leave side minima beside the line, so the fit with one order is tried over a fine grid of frequencies
 * about it; the deepest minima are refined and the best of them handed on.
 */
final class GappedSearch {
    /** A record with its samples this far (in sampling intervals) from an even clock is searched here. */
    private static final double UNEVEN = 0.5;
    /** Of the intervals sorted by length, the one at this share tells the grid's step: few are shorter, and none is a gap. */
    private static final double SHORT_INTERVAL = 0.1;
    /** A grid has at most so many cells a sample; with longer gaps its step is widened. */
    private static final int MOST_CELLS_A_SAMPLE = 64;
    /** The same for long records. */
    private static final int FEWEST_CELLS_A_SAMPLE = 8;

    private static final int MOST_CELLS = 1 << 20;
    /** Up to so many cycles line, drift and record length run into one another: all low frequencies are tried. */
    private static final double UNSURE_CYCLES = 3.5;

    private static final double FEWEST_CYCLES = 0.5;
    private static final double LOW_CYCLES = 5;
    /** Frequencies are tried in steps of this many cycles over the record … */
    private static final double CYCLE_STEP = 0.05;
    /** … so many cycles to either side, counted over what the record holds without its gaps … */
    private static final double REACH = 2.5;
    /** … but no further than this, counted with them. */
    private static final double MOST_REACH = 20;

    private static final int MOST_MINIMA = 5;
    /** A minimum with one order this much (as {@link JointFit.Result#misfit}) above the deepest is not the line's. */
    private static final double CLEARLY_WORSE = 4.6;
    /** Two frequencies nearer than this, in cycles over the record, are one. */
    private static final double SAME = 1e-3;

    private final Samples samples;
    private final int driftDegree;
    private final double stepS;

    GappedSearch(Samples samples, int driftDegree) {
        this.samples = samples;
        this.driftDegree = driftDegree;
        this.stepS = step();
    }

    /** Whether a record needs this search: one pass over its times. */
    static boolean wanted(Samples samples) {
        double[] seconds = samples.seconds();
        double interval = samples.intervalS();
        for (int i = 0; i < seconds.length; i++) {
            if (Math.abs(seconds[i] - seconds[0] - i * interval) > UNEVEN * interval) {
                return true;
            }
        }
        return false;
    }

    private double step() {
        double[] intervals = new double[samples.size() - 1];
        for (int i = 0; i < intervals.length; i++) {
            intervals[i] = samples.seconds()[i + 1] - samples.seconds()[i];
        }
        Arrays.sort(intervals);
        double usual = intervals[(int) (SHORT_INTERVAL * intervals.length)];
        double cells = Math.max(
                (double) FEWEST_CELLS_A_SAMPLE * samples.size(),
                Math.min((double) MOST_CELLS_A_SAMPLE * samples.size(), MOST_CELLS));
        return Math.max(usual, 2 * samples.halfSpanS() / cells);
    }

    /**
     * Frequencies in rad/s from which the fit may find its way, the most likely first; more than one where minima with one
     * order lie so near each other that all orders must decide.
     */
    double[] starts(OptionalDouble taggedHz) {
        double line = 2 * Math.PI * line(taggedHz);
        double perCycle = 2 * Math.PI / line / samples.intervalS();
        Samples thin = samples.thinned(Math.max(1, (int) (perCycle / FrequencySearch.SAMPLES_PER_CYCLE)));
        JointFit fit = new JointFit(thin, 1, driftDegree);
        List<JointFit.Result> found = new ArrayList<>(refined(fit, about(line)));
        double tagged = 2 * Math.PI * taggedHz.orElse(0);
        boolean covered = Math.abs(tagged - line) * samples.durationS() < Math.PI * REACH;
        if (!covered && FrequencySearch.near(tagged, line)) {
            found.addAll(refined(fit, about(tagged)));
        }
        found.sort(Comparator.comparingDouble(JointFit.Result::misfit));
        if (found.isEmpty()) {
            return new double[] {line};
        }
        double best = found.get(0).angularFrequency();
        double same = SAME * 2 * Math.PI / samples.durationS();
        List<Double> kept = new ArrayList<>();
        for (JointFit.Result result : found) {
            double omega = result.angularFrequency();
            boolean possible = result.misfit() < found.get(0).misfit() + CLEARLY_WORSE;
            if (possible
                    && FrequencySearch.near(omega, best)
                    && kept.stream().noneMatch(k -> Math.abs(k - omega) < same)) {
                kept.add(omega);
            }
        }
        return kept.stream().limit(MOST_MINIMA).mapToDouble(Double::doubleValue).toArray();
    }

    /** The strongest line of the record on an even grid, Hz. */
    private double line(OptionalDouble taggedHz) {
        int cells = (int) Math.round(2 * samples.halfSpanS() / stepS) + 1;
        // zeros at the end let more than one bin fall on the line
        int length = RealTransform.fastLengthUpTo(2 * cells);
        double[][] onGrid = new double[Samples.CHANNELS][];
        for (int c = 0; c < Samples.CHANNELS; c++) {
            onGrid[c] = onGrid(FrequencySearch.detrended(samples, samples.channels()[c], samples.size()), length);
        }
        return LineSpectrum.of(onGrid, stepS).strongest(taggedHz) / (stepS * length);
    }

    /** Each cell holds the mean of its samples, or zero. */
    private double[] onGrid(double[] values, int length) {
        double[] grid = new double[length];
        int[] held = new int[length];
        for (int i = 0; i < values.length; i++) {
            int cell = (int) Math.round((samples.seconds()[i] - samples.seconds()[0]) / stepS);
            held[cell]++;
            grid[cell] += (values[i] - grid[cell]) / held[cell];
        }
        return grid;
    }

    /** The frequencies to try about one, rad/s, rising. */
    private double[] about(double omega) {
        double cycle = 2 * Math.PI / samples.durationS();
        double reach = Math.min(MOST_REACH, REACH * samples.durationS() / (samples.size() * stepS));
        double centre = omega / cycle;
        boolean unsure = centre < UNSURE_CYCLES;
        double from = unsure ? FEWEST_CYCLES : Math.max(FEWEST_CYCLES, centre - reach);
        double to = Math.min(unsure ? Math.max(LOW_CYCLES, centre + reach) : centre + reach, Math.PI / stepS / cycle);
        int count = Math.max(1, (int) Math.ceil((to - from) / CYCLE_STEP));
        return IntStream.rangeClosed(0, count)
                .mapToDouble(i -> cycle * (from + (to - from) * i / count))
                .toArray();
    }

    /** The fits from the deepest minima. */
    private static List<JointFit.Result> refined(JointFit fit, double[] candidates) {
        double[] misfits = Arrays.stream(candidates).map(fit::misfitAt).toArray();
        DoubleFunction<List<JointFit.Result>> refine =
                omega -> fit.roughlyRefined(omega).stream().toList();
        int last = candidates.length - 1;
        return IntStream.rangeClosed(0, last)
                .filter(i -> (i == 0 || misfits[i] <= misfits[i - 1]) && (i == last || misfits[i] < misfits[i + 1]))
                .boxed()
                .sorted(Comparator.comparingDouble(i -> misfits[i]))
                .limit(MOST_MINIMA)
                .flatMap(i -> refine.apply(candidates[i]).stream())
                .toList();
    }
}

package nightlag.stages.spectrum;

import java.util.ArrayList;
import java.util.List;

/** Neighbours on a grid of times that share what one mode between them would have. */
final class MergedGrid {
    private MergedGrid() {}

    /** One time for each run of strengths above zero: its mean of ln τ, weighted by strength. The list is the caller's to add to. */
    static List<Double> times(double[] grid, double[] strengths) {
        List<Double> times = new ArrayList<>();
        for (int i = 0; i < grid.length; i++) {
            double weight = 0;
            double logTime = 0;
            while (i < grid.length && strengths[i] > 0) {
                weight += strengths[i];
                logTime += strengths[i] * Math.log(grid[i]);
                i++;
            }
            if (weight > 0) {
                times.add(Math.exp(logTime / weight));
            }
        }
        return times;
    }
}

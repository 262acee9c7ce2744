package nightlag.stages.acceptance;

import java.util.Arrays;
import java.util.OptionalDouble;

/**
 * The mean of values of one and the same thing, weighted by 1/u², its u no smaller than their scatter allows: where χ² is over
 * its degrees of freedom, u grows by its root (Birge, Phys. Rev. 40 (1932) 207). Where one has no u they count alike, and their
 * scatter alone tells.
 *
 * @param mean their mean
 * @param u its standard uncertainty; empty for one value without u
 * @param weights the share of each
 */
record Pooled(double mean, OptionalDouble u, double[] weights) {
    /**
     * Pools values.
     *
     * @param values at least one
     * @param variances u² of each; NaN or zero where none is known
     */
    static Pooled of(double[] values, double[] variances) {
        int n = values.length;
        boolean known = Arrays.stream(variances).allMatch(variance -> variance > 0);
        double[] weights = new double[n];
        Arrays.setAll(weights, i -> known ? 1 / variances[i] : 1);
        double total = Arrays.stream(weights).sum();
        // about one of them, so that no digits are lost
        double off = 0;
        for (int i = 0; i < n; i++) {
            off += weights[i] * (values[i] - values[0]) / total;
        }
        double mean = values[0] + off;
        double squares = 0;
        for (int i = 0; i < n; i++) {
            squares += weights[i] * (values[i] - mean) * (values[i] - mean);
        }
        double scatter = n > 1 ? squares / (n - 1) / total : Double.NaN;
        double own = known ? 1 / total : Double.NaN;
        double variance = Double.isNaN(own) ? scatter : Double.isNaN(scatter) ? own : Math.max(own, scatter);
        Arrays.setAll(weights, i -> weights[i] / total);
        return new Pooled(
                mean,
                Double.isNaN(variance) ? OptionalDouble.empty() : OptionalDouble.of(Math.sqrt(variance)),
                weights);
    }
}

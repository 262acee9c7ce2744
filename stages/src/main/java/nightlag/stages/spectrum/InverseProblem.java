package nightlag.stages.spectrum;

import java.util.Arrays;
import nightlag.stages.numeric.FewerRows;

/**
 * Data that are a sum of positive parts: y = Σ_j e^{u_j} K_j + noise of unit variance, over the nodes of a spectrum and over a
 * few figures beside it.
 *
 * @param target y, one number a row
 * @param columns K_j, first the nodes', times the step of ln τ, then the figures'; each with a number a row
 * @param nodes how many are nodes
 * @param expectedLogs about where each u_j is expected
 * @param rows how many rows the data had, before rows that say nothing new were taken together
 */
record InverseProblem(double[] target, double[][] columns, int nodes, double[] expectedLogs, int rows) {
    /** A problem of data, in no more rows than it has columns, and one. */
    static InverseProblem of(double[] target, double[][] columns, int nodes, double[] expectedLogs) {
        double[][] all = Arrays.copyOf(columns, columns.length + 1);
        all[columns.length] = target;
        double[][] few = FewerRows.of(all);
        return new InverseProblem(
                few[columns.length], Arrays.copyOf(few, columns.length), nodes, expectedLogs, target.length);
    }

    /** How many logarithms are sought. */
    int unknowns() {
        return columns.length;
    }

    /** What a choice of logarithms leaves of the data. */
    double[] residuals(double[] logs) {
        double[] rest = target.clone();
        for (int j = 0; j < columns.length; j++) {
            double strength = Math.exp(logs[j]);
            for (int i = 0; i < rest.length; i++) {
                rest[i] -= strength * columns[j][i];
            }
        }
        return rest;
    }

    /** Derivatives of what they explain, a column a logarithm. */
    double[][] byLogs(double[] logs) {
        double[][] result = new double[columns.length][target.length];
        for (int j = 0; j < columns.length; j++) {
            double strength = Math.exp(logs[j]);
            for (int i = 0; i < target.length; i++) {
                result[j][i] = strength * columns[j][i];
            }
        }
        return result;
    }
}

package nightlag.stages.spectrum;

/**
 * What is taken of a spectrum before any data: that its logarithm over ln τ bends at random, its second derivative white noise
 * of variance 1/α a unit of ln τ, about a straight line of nearly any height and slope. That is Tikhonov's penalty
 * α ∫ (d² ln H/d ln τ²)² d ln τ read as a probability. Beyond the data it goes on along a straight line whose uncertainty
 * grows; no further peak is likely there.
 *
 * <p>The logarithms u at n nodes are a linear function of n standard normal numbers z: z₀ and z₁ set height and slope at the
 * middle node, the others the second differences from there outwards on either side.
 */
final class SmoothPrior {
    /** u of the height: a factor of e¹⁰ either way. */
    private static final double HEIGHT_U = 10;

    /** u of the slope d ln H/d ln τ, whose known values lie between −1 and 2 but in the tails. */
    private static final double SLOPE_U = 5;

    private static final int HEIGHT = 0;
    private static final int SLOPE = 1;
    private static final int FIRST_BEND = 2;

    private final int count;
    private final int middle;
    private final double step;
    private final double bendU;

    /**
     * A prior.
     *
     * @param count number of nodes
     * @param step their distance in ln τ
     * @param logStiffness ln α
     */
    SmoothPrior(int count, double step, double logStiffness) {
        this.count = count;
        this.middle = count / 2;
        this.step = step;
        this.bendU = Math.pow(step, 1.5) * Math.exp(-logStiffness / 2);
    }

    /** The logarithms, less the height they are expected at, of standard numbers. */
    double[] curve(double[] standard) {
        double[] logs = new double[count];
        for (int j = 0; j < count; j++) {
            logs[j] = HEIGHT_U * standard[HEIGHT] + SLOPE_U * step * (j - middle) * standard[SLOPE];
        }
        double rise = 0;
        double bent = 0;
        for (int j = middle + 1; j < count; j++) {
            bent += rise;
            logs[j] += bent;
            rise += j < count - 1 ? bendU * standard[rightOf(j)] : 0;
        }
        rise = 0;
        bent = 0;
        for (int j = middle; j >= 0; j--) {
            bent += rise;
            logs[j] += bent;
            rise += j > 0 ? bendU * standard[leftOf(j)] : 0;
        }
        return logs;
    }

    /** Derivatives by the logarithms to derivatives by the standard numbers, a column each. */
    double[][] byStandard(double[][] byLogs) {
        int rows = byLogs[0].length;
        double[][] result = new double[count][rows];
        for (int j = 0; j < count; j++) {
            add(result[HEIGHT], byLogs[j], HEIGHT_U);
            add(result[SLOPE], byLogs[j], SLOPE_U * step * (j - middle));
        }
        double[] sum = new double[rows];
        double[] weighted = new double[rows];
        for (int j = count - 2; j > middle; j--) {
            add(sum, byLogs[j + 1], bendU);
            add(weighted, sum, 1);
            result[rightOf(j)] = weighted.clone();
        }
        sum = new double[rows];
        weighted = new double[rows];
        for (int j = 1; j <= middle; j++) {
            add(sum, byLogs[j - 1], bendU);
            add(weighted, sum, 1);
            result[leftOf(j)] = weighted.clone();
        }
        return result;
    }

    /** Where the bend at a node right of the middle stands among the standard numbers. */
    private int rightOf(int node) {
        return FIRST_BEND + node - middle - 1;
    }

    /** Where the bend at a node left of the middle, or there, stands among them. */
    private int leftOf(int node) {
        return count - node;
    }

    private static void add(double[] sum, double[] column, double factor) {
        for (int i = 0; i < sum.length; i++) {
            sum[i] += factor * column[i];
        }
    }
}

package nightlag.stages.numeric;

import java.util.Arrays;

/** A least-squares problem of many rows as one of n + 1 that has the same sum of squares for every solution. */
public final class FewerRows {
    private FewerRows() {}

    /**
     * The triangle of a matrix of columns.
     *
     * @param columns n + 1 columns, the right-hand side the last, of m numbers each
     * @return n + 1 columns of the smaller of m and n + 1 numbers each, with the same lengths and angles
     */
    public static double[][] of(double[][] columns) {
        int count = columns.length;
        double[][] work = new double[count][];
        for (int j = 0; j < count; j++) {
            work[j] = columns[j].clone();
        }
        if (work[0].length <= count) {
            return work;
        }
        HouseholderTriangle.reduce(work);
        for (int j = 0; j < count; j++) {
            work[j] = Arrays.copyOf(work[j], count);
            Arrays.fill(work[j], j + 1, count, 0);
        }
        return work;
    }
}

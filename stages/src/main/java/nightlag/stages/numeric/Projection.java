package nightlag.stages.numeric;

import java.util.ArrayList;
import java.util.List;

/**
 * What linear least squares leave of a target: the part of it that no combination of the columns reaches (modified
 * Gram–Schmidt, each column taken clear of the others twice; Björck, BIT 7 (1967) 1). Columns that hang on earlier ones to
 * within a hundred-millionth of their length say nothing new and do not count, so the columns may be as alike as they like.
 *
 * @param residual target less its best fit
 * @param dimensions how many independent columns there are: the numbers fitted
 */
public record Projection(double[] residual, int dimensions) {
    private static final double DEPENDENT = 1e-8;

    /**
     * Fits a target by columns.
     *
     * @param columns arrays of as many finite numbers as the target has
     * @param target finite numbers
     */
    public static Projection of(List<double[]> columns, double[] target) {
        List<double[]> basis = new ArrayList<>();
        double[] residual = target.clone();
        for (double[] column : columns) {
            double[] direction = column.clone();
            double length = HouseholderTriangle.norm(direction, 0);
            clear(direction, basis);
            clear(direction, basis);
            double left = HouseholderTriangle.norm(direction, 0);
            if (left > DEPENDENT * length) {
                for (int i = 0; i < direction.length; i++) {
                    direction[i] /= left;
                }
                basis.add(direction);
            }
        }
        clear(residual, basis);
        clear(residual, basis);
        return new Projection(residual, basis.size());
    }

    /** Sum of the squared residuals. */
    public double squares() {
        double length = HouseholderTriangle.norm(residual, 0);
        return length * length;
    }

    private static void clear(double[] vector, List<double[]> basis) {
        for (double[] direction : basis) {
            double share = 0;
            for (int i = 0; i < vector.length; i++) {
                share += direction[i] * vector[i];
            }
            for (int i = 0; i < vector.length; i++) {
                vector[i] -= share * direction[i];
            }
        }
    }
}

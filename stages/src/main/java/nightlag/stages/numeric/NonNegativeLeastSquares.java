package nightlag.stages.numeric;

import java.util.Arrays;
import java.util.stream.IntStream;

/**
 * The x ≥ 0 that makes |Ax − b| smallest, by the active-set method of Lawson &amp; Hanson (Solving Least Squares Problems,
 * 1974, chapter 23). Columns are scaled to unit length, and the free columns are solved by orthogonal reflections, never by
 * normal equations. A column that hangs on the free ones to within rounding stays out.
 */
public final class NonNegativeLeastSquares {
    private static final double DEPENDENT = 1e-12;

    private final double[][] columns;
    private final double[] target;
    private final double[] norms;
    private final boolean[] free;
    private double[] x;

    private NonNegativeLeastSquares(double[][] columns, double[] target, double[] norms) {
        this.columns = columns;
        this.target = target;
        this.norms = norms;
        this.free = new boolean[columns.length];
        this.x = new double[columns.length];
    }

    /**
     * Solves the problem.
     *
     * @param columns the columns of A, n arrays of m finite numbers each
     * @param target b, m finite numbers
     * @return x, n numbers, none negative
     */
    public static double[] solve(double[][] columns, double[] target) {
        int rows = target.length;
        for (double[] column : columns) {
            if (column.length != rows) {
                throw new IllegalArgumentException("a column of " + column.length + " against " + rows + " rows");
            }
        }
        double[] norms = Arrays.stream(columns)
                .mapToDouble(column -> HouseholderTriangle.norm(column, 0))
                .toArray();
        if (!Arrays.stream(norms).allMatch(Double::isFinite) || !Double.isFinite(HouseholderTriangle.norm(target, 0))) {
            throw new IllegalArgumentException("the numbers must be finite");
        }
        double[][] work = new double[columns.length + 1][];
        for (int j = 0; j < columns.length; j++) {
            double scale = norms[j] == 0 ? 0 : 1 / norms[j];
            work[j] = Arrays.stream(columns[j]).map(a -> a * scale).toArray();
        }
        work[columns.length] = target.clone();
        work = FewerRows.of(work);
        return new NonNegativeLeastSquares(Arrays.copyOf(work, columns.length), work[columns.length], norms).run();
    }

    private double[] run() {
        int n = columns.length;
        Arrays.fill(free, true);
        double[] unbound = solveFree();
        if (unbound.length == n && Arrays.stream(unbound).allMatch(value -> value > 0)) {
            // positive by itself: no bound is at work
            x = unbound;
            return unscaled();
        }
        Arrays.fill(free, false);
        double tolerance = 1e-13 * HouseholderTriangle.norm(target, 0);
        boolean[] refused = new boolean[n];
        for (int round = 0; round < 10 * n + 10; round++) {
            int entering = steepest(refused, tolerance);
            if (entering < 0) {
                break;
            }
            free[entering] = true;
            double[] trial = solveFree();
            if (trial.length == 0 || !(trial[entering] > 0)) {
                free[entering] = false;
                refused[entering] = true;
                continue;
            }
            double before = squaredResidual(x);
            double[] kept = x.clone();
            boolean[] keptFree = free.clone();
            walkTo(trial);
            if (!(squaredResidual(x) < before)) {
                // rounding alone moved it: going on would circle
                x = kept;
                System.arraycopy(keptFree, 0, free, 0, n);
                free[entering] = false;
                refused[entering] = true;
                continue;
            }
            Arrays.fill(refused, false);
        }
        return unscaled();
    }

    private double[] unscaled() {
        return IntStream.range(0, x.length)
                .mapToDouble(j -> norms[j] == 0 ? 0 : x[j] / norms[j])
                .toArray();
    }

    /** The bound column along which the residual falls fastest, or −1. */
    private int steepest(boolean[] refused, double tolerance) {
        double[] residual = residual(x);
        int best = -1;
        double steepest = tolerance;
        for (int j = 0; j < columns.length; j++) {
            if (!free[j] && !refused[j]) {
                double gradient = dot(columns[j], residual);
                if (gradient > steepest) {
                    steepest = gradient;
                    best = j;
                }
            }
        }
        return best;
    }

    /** Moves from x towards the free solution, binding what would turn negative. */
    private void walkTo(double[] firstTrial) {
        double[] trial = firstTrial;
        while (trial.length > 0) {
            double fraction = 1;
            int blocking = -1;
            for (int j = 0; j < x.length; j++) {
                if (free[j] && trial[j] <= 0) {
                    double reach = x[j] / (x[j] - trial[j]);
                    if (blocking < 0 || reach < fraction) {
                        fraction = reach;
                        blocking = j;
                    }
                }
            }
            for (int j = 0; j < x.length; j++) {
                x[j] = free[j] ? x[j] + fraction * (trial[j] - x[j]) : 0;
            }
            if (blocking < 0) {
                x = trial;
                return;
            }
            x[blocking] = 0;
            for (int j = 0; j < x.length; j++) {
                free[j] &= x[j] > 0;
            }
            trial = solveFree();
        }
    }

    /** Least squares over the free columns; empty where they hang on each other. */
    private double[] solveFree() {
        int[] index = IntStream.range(0, free.length).filter(j -> free[j]).toArray();
        double[] result = new double[free.length];
        if (index.length == 0) {
            return result;
        }
        if (index.length > target.length) {
            return new double[0];
        }
        double[][] work = new double[index.length + 1][];
        for (int k = 0; k < index.length; k++) {
            work[k] = columns[index[k]].clone();
        }
        work[index.length] = target.clone();
        HouseholderTriangle.reduce(work);
        for (int k = 0; k < index.length; k++) {
            if (!(Math.abs(work[k][k]) > DEPENDENT)) {
                return new double[0];
            }
        }
        double[] solution = HouseholderTriangle.solve(work, index.length, work[index.length]);
        for (int k = 0; k < index.length; k++) {
            result[index[k]] = solution[k];
        }
        return result;
    }

    private double[] residual(double[] at) {
        double[] residual = target.clone();
        for (int j = 0; j < columns.length; j++) {
            if (at[j] != 0) {
                for (int i = 0; i < residual.length; i++) {
                    residual[i] -= columns[j][i] * at[j];
                }
            }
        }
        return residual;
    }

    private double squaredResidual(double[] at) {
        double[] residual = residual(at);
        return dot(residual, residual);
    }

    private static double dot(double[] a, double[] b) {
        double sum = 0;
        for (int i = 0; i < a.length; i++) {
            sum += a[i] * b[i];
        }
        return sum;
    }
}

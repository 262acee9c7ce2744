package nightlag.stages.sweep;

import java.util.ArrayList;
import java.util.List;
import java.util.function.DoubleUnaryOperator;
import nightlag.stages.numeric.SmoothCurve.Estimate;

/**
 * Where a smooth figure passes zero. It does so only where it stands out from zero by three of its standard uncertainties on
 * either side: what lies between is one zero, however often the figure touches nought there, and there is none at the edge.
 *
 * @param zeros the places, rising
 * @param positive whether the figure stands out above zero anywhere
 * @param negative whether it stands out below
 * @param startsClear whether it stands out at the first place
 * @param endsClear whether it stands out at the last
 */
record Zeros(List<Zero> zeros, boolean positive, boolean negative, boolean startsClear, boolean endsClear) {
    private static final double STANDS_OUT = 3;
    /** What is within one u of zero may be zero. */
    private static final double MAY_BE_ZERO = 1;

    private static final int STEPS = 4;
    private static final int HALVINGS = 36;

    /** Copies the list. */
    Zeros {
        zeros = List.copyOf(zeros);
    }

    /** A figure over a place. */
    interface Figure {
        /** The figure with its standard uncertainty. */
        Estimate at(double place);
    }

    /**
     * One zero.
     *
     * @param place where it is; the middle one where the figure wavers
     * @param u standard uncertainty of the place: half of the stretch in which the figure may be zero by one of its own (as the
     *     limits of Fieller, Q. J. Pharm. Pharmacol. 17 (1944) 117). A longer stretch would reach to where the figure runs
     *     flatter, as it does beyond a step, and the place does not err that far
     * @param rising whether the figure rises there
     */
    record Zero(double place, double u, boolean rising) {}

    /**
     * Finds them.
     *
     * @param figure smooth on the scale of the places
     * @param places where it was observed, strictly rising, two or more; looked at are they and three places in each interval
     */
    static Zeros of(Figure figure, double[] places) {
        double[] grid = grid(places);
        double[] values = new double[grid.length];
        int[] signs = new int[grid.length];
        for (int i = 0; i < grid.length; i++) {
            Estimate there = figure.at(grid[i]);
            values[i] = there.value();
            signs[i] = Math.abs(there.value()) > STANDS_OUT * there.u() ? (int) Math.signum(there.value()) : 0;
        }
        List<Zero> zeros = new ArrayList<>();
        boolean positive = false;
        boolean negative = false;
        int clear = -1;
        for (int i = 0; i < grid.length; i++) {
            if (signs[i] != 0) {
                if (clear >= 0 && signs[clear] != signs[i]) {
                    zeros.add(zero(figure, grid, values, clear, i));
                }
                clear = i;
                positive |= signs[i] > 0;
                negative |= signs[i] < 0;
            }
        }
        return new Zeros(zeros, positive, negative, signs[0] != 0, signs[grid.length - 1] != 0);
    }

    private static double[] grid(double[] places) {
        double[] grid = new double[(places.length - 1) * STEPS + 1];
        for (int i = 0; i < grid.length; i++) {
            int k = i / STEPS;
            double part = (double) (i % STEPS) / STEPS;
            grid[i] = part == 0 ? places[k] : places[k] + part * (places[k + 1] - places[k]);
        }
        return grid;
    }

    /** The zero between two neighbouring places of the grid where the figure stands out with different signs. */
    private static Zero zero(Figure figure, double[] grid, double[] values, int from, int to) {
        List<Integer> changes = new ArrayList<>();
        for (int i = from; i < to; i++) {
            if (values[i] < 0 != values[i + 1] < 0) {
                changes.add(i);
            }
        }
        int middle = changes.get(changes.size() / 2);
        boolean rising = values[from] < 0;
        double sign = values[middle] < 0 ? 1 : -1;
        double place = lastNegative(at -> sign * figure.at(at).value(), grid[middle], grid[middle + 1]);
        double side = rising ? 1 : -1;
        int first = from + 1;
        while (bound(figure.at(grid[first]), side, MAY_BE_ZERO) < 0) {
            first++;
        }
        int last = to - 1;
        while (bound(figure.at(grid[last]), side, -MAY_BE_ZERO) > 0) {
            last--;
        }
        double begin = lastNegative(at -> bound(figure.at(at), side, MAY_BE_ZERO), grid[first - 1], grid[first]);
        double end = lastNegative(at -> bound(figure.at(at), side, -MAY_BE_ZERO), grid[last], grid[last + 1]);
        return new Zero(place, (end - begin) / (2 * MAY_BE_ZERO), rising);
    }

    private static double bound(Estimate figure, double side, double times) {
        return side * figure.value() + times * figure.u();
    }

    /** Where a function that is negative at the low end passes zero. */
    private static double lastNegative(DoubleUnaryOperator function, double low, double high) {
        double below = low;
        double above = high;
        for (int i = 0; i < HALVINGS; i++) {
            double half = (below + above) / 2;
            if (function.applyAsDouble(half) < 0) {
                below = half;
            } else {
                above = half;
            }
        }
        return (below + above) / 2;
    }
}

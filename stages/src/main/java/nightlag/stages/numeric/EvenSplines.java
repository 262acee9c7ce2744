package nightlag.stages.numeric;

/**
 * B-splines of fifth degree on evenly spaced knots, the basis of smooth curves (de Boor, J. Approx. Theory 6 (1972) 50). The
 * roughness of a curve is the sum of the squared third differences of its coefficients (Eilers &amp; Marx, Stat. Sci. 11
 * (1996) 89); parabolas have none.
 *
 * @param origin where the first interval begins
 * @param step length of an interval
 * @param intervals how many there are
 */
public record EvenSplines(double origin, double step, int intervals) {
    /** Degree of the pieces. */
    public static final int DEGREE = 5;

    /** How many splines are not zero at a place. */
    public static final int SUPPORT = DEGREE + 1;

    /** Coefficients of a difference whose square counts as rough. */
    private static final double[] DIFFERENCE = {-1, 3, -3, 1};

    /** How many coefficients a curve may have without being rough. */
    public static final int SMOOTH_COEFFICIENTS = DIFFERENCE.length - 1;

    /** The fewest intervals from one place to another. */
    public static EvenSplines covering(double from, double to, double step) {
        return new EvenSplines(from, step, Math.max(1, (int) Math.ceil((to - from) / step)));
    }

    /** The number of splines. */
    public int size() {
        return intervals + DEGREE;
    }

    /** The first of the {@link #SUPPORT} splines that are not zero at a place; places outside belong to the nearest interval. */
    public int first(double place) {
        return Math.max(0, Math.min(intervals - 1, (int) Math.floor((place - origin) / step)));
    }

    /** The values at a place of the splines from {@link #first} on. */
    public double[] values(double place) {
        return pieces(place, DEGREE);
    }

    /** Their derivatives by the place. */
    public double[] slopes(double place) {
        double[] lower = pieces(place, DEGREE - 1);
        double[] slopes = new double[SUPPORT];
        for (int i = 0; i < SUPPORT; i++) {
            double before = i > 0 ? lower[i - 1] : 0;
            double after = i < DEGREE ? lower[i] : 0;
            slopes[i] = (before - after) / step;
        }
        return slopes;
    }

    private double[] pieces(double place, int degree) {
        double part = (place - origin) / step - first(place);
        double[] values = new double[degree + 1];
        values[0] = 1;
        for (int d = 1; d <= degree; d++) {
            double carried = 0;
            for (int i = 0; i < d; i++) {
                double share = values[i] / d;
                // a place between two knots of those that bear the i-th piece
                values[i] = carried + share * (i + 1 - part);
                carried = share * (part + d - 1 - i);
            }
            values[d] = carried;
        }
        return values;
    }

    /** The third differences of a curve's coefficients. */
    public static double[] differences(double[] coefficients) {
        double[] differences = new double[Math.max(0, coefficients.length - SMOOTH_COEFFICIENTS)];
        for (int i = 0; i < differences.length; i++) {
            for (int k = 0; k < DIFFERENCE.length; k++) {
                differences[i] += DIFFERENCE[k] * coefficients[i + k];
            }
        }
        return differences;
    }

    /** The derivatives of half the roughness by the coefficients, from their third differences. */
    public static double[] transposedDifferences(double[] differences) {
        double[] gradient = new double[differences.length + SMOOTH_COEFFICIENTS];
        for (int i = 0; i < differences.length; i++) {
            for (int k = 0; k < DIFFERENCE.length; k++) {
                gradient[i + k] += DIFFERENCE[k] * differences[i];
            }
        }
        return gradient;
    }

    /**
     * The matrix R of the roughness cᵀ R c.
     *
     * @param size how many coefficients
     * @return a row each of four values: {@code [i][k]} is R(i, i − k); those with k &gt; i mean nothing
     */
    public static double[][] roughness(int size) {
        double[][] band = new double[size][DIFFERENCE.length];
        for (int start = 0; start + SMOOTH_COEFFICIENTS < size; start++) {
            for (int i = 0; i < DIFFERENCE.length; i++) {
                for (int k = 0; k <= i; k++) {
                    band[start + i][k] += DIFFERENCE[i] * DIFFERENCE[i - k];
                }
            }
        }
        return band;
    }
}

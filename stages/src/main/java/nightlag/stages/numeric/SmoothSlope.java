package nightlag.stages.numeric;

/**
 * The slope of a smooth curve through scattered values, with its uncertainty: that of {@link SmoothCurve} of order 3, a
 * spline of fifth degree. Of three or four values there is too little to tell, and order 2, the cubic spline, takes its place.
 */
public final class SmoothSlope {
    private static final int FEWEST = 3;

    private SmoothSlope() {}

    /**
     * What is known about the curves' slopes at each place.
     *
     * @param slope slope of each curve, one array a curve
     * @param variance u² of the slope
     * @param weights how much the slope at a place (row) moves with each value (column)
     */
    public record Slopes(double[][] slope, double[] variance, double[][] weights) {}

    /**
     * The slopes of curves that are equally smooth and known equally well, such as real and imaginary part of one figure.
     *
     * @param x where the values were observed, strictly rising
     * @param y values, one array a curve
     * @param variance u² of the values of each curve, above zero
     * @param places where slopes are wanted, rising
     * @throws IllegalArgumentException if there are fewer than three values
     */
    public static Slopes of(double[] x, double[][] y, double[] variance, double[] places) {
        if (x.length < FEWEST) {
            throw new IllegalArgumentException("fewer than three values");
        }
        SmoothCurve curves = SmoothCurve.through(
                x,
                y,
                variance,
                SmoothCurve.order(x.length),
                Math.min(x[0], places[0]),
                Math.max(x[x.length - 1], places[places.length - 1]));
        int count = places.length;
        double[][] slope = new double[y.length][count];
        double[] slopeVariance = new double[count];
        double[][] weights = new double[count][];
        for (int k = 0; k < count; k++) {
            for (int c = 0; c < y.length; c++) {
                slope[c][k] = curves.derivative(c, places[k], 1);
            }
            slopeVariance[k] = curves.fullVariance(places[k], 1);
            weights[k] = curves.weights(places[k], 1);
        }
        return new Slopes(slope, slopeVariance, weights);
    }
}

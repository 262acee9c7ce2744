package nightlag.stages.numeric;

import java.util.Arrays;

/**
 * What a fit's linearisation says about figures drawn from its parameters: u² = vᵀ(JᵀJ + P)⁻¹v, v the derivatives of the
 * figure, J those of the residuals, P what is known of the parameters beforehand. J is brought to a triangle by
 * orthogonal reflections, so that nothing is squared.
 */
public final class LinearisedUncertainty {
    private final double[][] triangle;
    private final double[] scales;

    /**
     * The linearisation.
     *
     * @param jacobian derivatives of the residuals, each over its uncertainty; one array a parameter
     * @param priorU standard uncertainty of each parameter before the data, positive and finite
     */
    public LinearisedUncertainty(double[][] jacobian, double[] priorU) {
        int n = jacobian.length;
        scales = new double[n];
        triangle = new double[n][];
        for (int j = 0; j < n; j++) {
            double prior = 1 / priorU[j];
            scales[j] = Math.hypot(HouseholderTriangle.norm(jacobian[j], 0), prior);
            int rows = jacobian[j].length;
            double scale = scales[j];
            double[] column = Arrays.copyOf(jacobian[j], rows + n);
            column[rows + j] = prior;
            triangle[j] = Arrays.stream(column).map(v -> v / scale).toArray();
        }
        HouseholderTriangle.reduce(triangle);
    }

    /** Standard uncertainty of a figure with these derivatives by the parameters. */
    public double of(double[] derivatives) {
        return HouseholderTriangle.norm(whitened(derivatives), 0);
    }

    /** (JᵀJ + P)⁻¹v: how each parameter's part of a residual moves a figure with these derivatives by the parameters. */
    public double[] influence(double[] derivatives) {
        double[] solved = HouseholderTriangle.solve(triangle, scales.length, whitened(derivatives));
        for (int j = 0; j < solved.length; j++) {
            solved[j] /= scales[j];
        }
        return solved;
    }

    private double[] whitened(double[] derivatives) {
        double[] scaled = new double[scales.length];
        for (int j = 0; j < scaled.length; j++) {
            scaled[j] = derivatives[j] / scales[j];
        }
        return HouseholderTriangle.solveTransposed(triangle, scaled.length, scaled);
    }
}

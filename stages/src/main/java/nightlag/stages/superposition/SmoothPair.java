package nightlag.stages.superposition;

import java.util.Optional;
import nightlag.stages.numeric.BandedCholesky;
import nightlag.stages.numeric.EvenSplines;

/**
 * Smooth curves of ln G' and ln G'' through weighted points: penalised least squares with given stiffness, which is what is
 * likeliest of curves whose third differences are random (Wahba, J. R. Stat. Soc. B 40 (1978) 364).
 */
final class SmoothPair {
    private final PairDesign design;
    private final Weights weights;
    private final Smoothness smoothness;
    private final BandedCholesky normal;

    private SmoothPair(PairDesign design, Weights weights, Smoothness smoothness, BandedCholesky normal) {
        this.design = design;
        this.weights = weights;
        this.smoothness = smoothness;
        this.normal = normal;
    }

    /** Empty where the points do not fix the curves. */
    static Optional<SmoothPair> of(PairDesign design, Weights weights, Smoothness smoothness) {
        return BandedCholesky.of(design.normalBand(weights, smoothness))
                .map(normal -> new SmoothPair(design, weights, smoothness, normal));
    }

    PairDesign design() {
        return design;
    }

    Weights weights() {
        return weights;
    }

    /**
     * The coefficients that leave least.
     *
     * @param whitened values over their uncertainties, two a point
     */
    double[] coefficients(double[] whitened) {
        return normal.solve(transposed(0, whitened));
    }

    /**
     * The transposed splines times whitened values of some points.
     *
     * @param from the first of the points
     * @param whitened two values each
     */
    double[] transposed(int from, double[] whitened) {
        double[] right = new double[design.coefficients()];
        for (int i = 0; i < whitened.length / 2; i++) {
            design.addTransposed(from + i, weights, whitened[2 * i], whitened[2 * i + 1], right);
        }
        return right;
    }

    /** The coefficients that a right-hand side of the normal equations asks for. */
    double[] solve(double[] right) {
        return normal.solve(right);
    }

    /** Both curves at the points, over the points' uncertainties, two values a point. */
    double[] fitted(double[] coefficients) {
        double[] fitted = new double[2 * design.points()];
        for (int p = 0; p < design.points(); p++) {
            weights.whiten(p, design.value(p, 0, coefficients), design.value(p, 1, coefficients), fitted);
        }
        return fitted;
    }

    /** The roots of what roughness costs, one value a difference. */
    double[] penalties(double[] coefficients) {
        double[] storage = EvenSplines.differences(part(coefficients, 0));
        double[] loss = EvenSplines.differences(part(coefficients, 1));
        double[] penalties = new double[storage.length + loss.length];
        for (int i = 0; i < storage.length; i++) {
            penalties[i] = Math.sqrt(smoothness.penalty(0)) * storage[i];
            penalties[storage.length + i] = Math.sqrt(smoothness.penalty(1)) * loss[i];
        }
        return penalties;
    }

    private static double[] part(double[] coefficients, int modulus) {
        double[] part = new double[coefficients.length / 2];
        for (int i = 0; i < part.length; i++) {
            part[i] = coefficients[2 * i + modulus];
        }
        return part;
    }

    /**
     * Minus twice the logarithm of the restricted likelihood (Harville, J. Am. Stat. Assoc. 72 (1977) 320) of values the curves
     * leave a cost of, up to a constant.
     *
     * @param cost sum of squared residuals and penalties
     */
    double deviance(double cost) {
        int differences = design.coefficients() / 2 - EvenSplines.SMOOTH_COEFFICIENTS;
        double logPenalty = differences * (Math.log(smoothness.penalty(0)) + Math.log(smoothness.penalty(1)));
        return normal.logDeterminant() - logPenalty - weights.logDeterminant() + cost;
    }

    /**
     * Degrees of freedom of the sum of squares the curves leave: n − tr(2H − H²) times the errors' variance is what is left of them,
     * H being the matrix that turns values into fitted ones (Hastie &amp; Tibshirani, Generalized Additive Models (1990), 3.5).
     *
     * @param follow how the coefficients follow each further parameter that is fitted along, one array a parameter
     * @param covariance covariance of these
     */
    double freedom(double[][] follow, double[][] covariance) {
        int n = design.coefficients();
        double[][] shares = new double[n][];
        for (int j = 0; j < n; j++) {
            double[] penalty = penaltyColumn(j);
            shares[j] = normal.solve(penalty);
            double[] projected = new double[follow.length];
            for (int i = 0; i < n; i++) {
                for (int k = 0; penalty[i] != 0 && k < follow.length; k++) {
                    projected[k] += follow[k][i] * penalty[i];
                }
            }
            for (int k = 0; k < follow.length; k++) {
                double weight = 0;
                for (int m = 0; m < follow.length; m++) {
                    weight += covariance[k][m] * projected[m];
                }
                for (int i = 0; i < n; i++) {
                    shares[j][i] += follow[k][i] * weight;
                }
            }
        }
        double square = 0;
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                square += shares[i][j] * shares[j][i];
            }
        }
        return weights.values() - n - follow.length + square;
    }

    private double[] penaltyColumn(int coefficient) {
        double[] unit = new double[design.coefficients() / 2];
        unit[coefficient / 2] = 1;
        int modulus = coefficient % 2;
        double[] gradient = EvenSplines.transposedDifferences(EvenSplines.differences(unit));
        double[] column = new double[design.coefficients()];
        for (int i = 0; i < gradient.length; i++) {
            column[2 * i + modulus] = smoothness.penalty(modulus) * gradient[i];
        }
        return column;
    }
}

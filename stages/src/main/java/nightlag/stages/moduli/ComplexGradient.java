package nightlag.stages.moduli;

import nightlag.stages.numeric.Complex;
import nightlag.stages.waveform.SignalFit;

/**
 * How a complex figure follows small changes of the amplitudes of one record: dz = Σ (∂z/∂d_n) dd_n + (∂z/∂l_n) dl_n over
 * the orders of deformation and load. All maps in question are holomorphic, so one complex number an amplitude says it all.
 * Variances follow by the law of propagation (JCGM 100, 5.2), the covariances of all amplitudes included.
 */
final class ComplexGradient {
    private final int harmonics;
    /** ∂/∂Re and ∂/∂Im of every amplitude, of the real part (row 0) and the imaginary part (row 1) of the figure. */
    private final double[][] rows;

    private ComplexGradient(int harmonics) {
        this.harmonics = harmonics;
        this.rows = new double[2][4 * harmonics];
    }

    /** Of a figure that rests on one order. */
    static ComplexGradient of(SignalFit fit, int order, Complex byDeformation, Complex byLoad) {
        ComplexGradient gradient = new ComplexGradient(fit.harmonics());
        gradient.put(2 * (order - 1), byDeformation);
        gradient.put(2 * (gradient.harmonics + order - 1), byLoad);
        return gradient;
    }

    private void put(int column, Complex derivative) {
        rows[0][column] += derivative.re();
        rows[0][column + 1] -= derivative.im();
        rows[1][column] += derivative.im();
        rows[1][column + 1] += derivative.re();
    }

    /** The gradient of z·factor. */
    ComplexGradient times(Complex factor) {
        ComplexGradient product = new ComplexGradient(harmonics);
        for (int k = 0; k < rows[0].length; k++) {
            product.rows[0][k] = factor.re() * rows[0][k] - factor.im() * rows[1][k];
            product.rows[1][k] = factor.im() * rows[0][k] + factor.re() * rows[1][k];
        }
        return product;
    }

    /** The gradient of a difference. */
    ComplexGradient minus(ComplexGradient other) {
        ComplexGradient difference = new ComplexGradient(harmonics);
        for (int part = 0; part < 2; part++) {
            for (int k = 0; k < rows[part].length; k++) {
                difference.rows[part][k] = rows[part][k] - other.rows[part][k];
            }
        }
        return difference;
    }

    /** u²(Re z). */
    double realVariance(SignalFit fit) {
        return covariance(fit, rows[0], rows[0]);
    }

    /** u²(Im z). */
    double imaginaryVariance(SignalFit fit) {
        return covariance(fit, rows[1], rows[1]);
    }

    /** u(Re z, Im z). */
    double covariance(SignalFit fit) {
        return covariance(fit, rows[0], rows[1]);
    }

    private static double covariance(SignalFit fit, double[] left, double[] right) {
        double sum = 0;
        for (int i = 0; i < left.length; i++) {
            if (left[i] != 0) {
                double[] row = fit.covariance()[i];
                double inner = 0;
                for (int j = 0; j < right.length; j++) {
                    inner += row[j] * right[j];
                }
                sum += left[i] * inner;
            }
        }
        return sum;
    }
}

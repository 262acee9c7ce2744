package nightlag.stages.waveform;

import java.util.Optional;
import nightlag.stages.numeric.Cholesky;

/**
 * The covariance of one tone's amplitudes in both channels. At fixed frequencies that of a channel is σ²(AᵀA)⁻¹ with the
 * noise beside the tone; free frequencies add what their own covariance (the noise beside each tone again) does through
 * the amplitudes' pull.
 */
final class ToneCovariance {
    private final ToneBasis basis;
    private final ToneFit.Result fit;
    private final ToneNoise noise;
    private final boolean exact;
    private final double[][] inverse;
    private final double[][] unknowns;

    /** For a fit; {@code exact}: its frequencies were held. */
    ToneCovariance(ToneBasis basis, ToneFit.Result fit, ToneNoise noise, boolean exact) {
        this.basis = basis;
        this.fit = fit;
        this.noise = noise;
        this.exact = exact;
        this.inverse = fit.normal().inverse();
        Optional<Cholesky> information = fit.information();
        this.unknowns = information.isPresent() ? sandwich(information.get().inverse()) : new double[0][0];
    }

    /** I⁻¹ (Σ_c w_c² Pᵀ S_c P) I⁻¹, S_c the products of what A leaves of the derivatives, with the noise beside each tone. */
    private double[][] sandwich(double[][] inverseInformation) {
        int count = inverseInformation.length;
        double[][] middle = new double[count][count];
        int tones = basis.tones();
        for (int c = 0; c < Samples.CHANNELS; c++) {
            double weight = ToneFit.Result.weight(fit.residualSquares()[c], fit.residuals()[c].length);
            for (int k = 0; k < tones; k++) {
                for (int l = 0; l < tones; l++) {
                    double value = weight * weight * deviation(c, k) * deviation(c, l) * fit.freeProducts()[c][k][l];
                    for (int p = 0; p < count; p++) {
                        for (int q = 0; q < count; q++) {
                            middle[p][q] += fit.spread()[p][k] * value * fit.spread()[q][l];
                        }
                    }
                }
            }
        }
        return product(product(inverseInformation, middle), inverseInformation);
    }

    private static double[][] product(double[][] a, double[][] b) {
        double[][] product = new double[a.length][b.length];
        for (int i = 0; i < a.length; i++) {
            for (int k = 0; k < b.length; k++) {
                for (int j = 0; j < b.length; j++) {
                    product[i][j] += a[i][k] * b[k][j];
                }
            }
        }
        return product;
    }

    private double deviation(int channel, int tone) {
        return Math.sqrt(noise.beside(channel, tone).variance());
    }

    /** Standard uncertainty of a tone's phase at the record's end, rad, were the frequency free. */
    double phaseU(int tone) {
        double variance = 0;
        for (int p = 0; p < unknowns.length; p++) {
            for (int q = 0; q < unknowns.length; q++) {
                variance += fit.spread()[p][tone] * unknowns[p][q] * fit.spread()[q][tone];
            }
        }
        return Math.sqrt(Math.max(0, variance));
    }

    /** The 4 × 4 matrix of {@link SignalFit#covariance()} of one tone. */
    double[][] of(int tone) {
        double[][] matrix = new double[4][4];
        for (int row = 0; row < 4; row++) {
            for (int column = 0; column < 4; column++) {
                double value = exact ? 0 : throughFrequencies(row, column, tone);
                if (row / 2 == column / 2) {
                    value += noise.beside(row / 2, tone).variance() * inverse[place(row, tone)][place(column, tone)];
                }
                // A = a − i b: the imaginary part has the opposite sign of its coefficient
                matrix[row][column] = (row % 2 == column % 2 ? 1 : -1) * value;
            }
        }
        return matrix;
    }

    private double throughFrequencies(int row, int column, int tone) {
        double value = 0;
        for (int p = 0; p < unknowns.length; p++) {
            for (int q = 0; q < unknowns.length; q++) {
                value += fit.pull()[row / 2][p][place(row, tone)]
                        * unknowns[p][q]
                        * fit.pull()[column / 2][q][place(column, tone)];
            }
        }
        return value;
    }

    private int place(int row, int tone) {
        return basis.cosineColumn(tone) + row % 2;
    }

    /** Effective degrees of freedom of a tone's |load / deformation| (Welch–Satterthwaite). */
    double degreesOfFreedom(int tone) {
        double sum = 0;
        double perFreedom = 0;
        double all = 0;
        int column = basis.cosineColumn(tone);
        for (int c = 0; c < Samples.CHANNELS; c++) {
            Noise.Level level = noise.beside(c, tone);
            double a = fit.coefficients()[c][column];
            double b = fit.coefficients()[c][column + 1];
            double share = level.variance() / (a * a + b * b);
            sum += share;
            perFreedom += share * share / level.freedom();
            all += level.freedom();
        }
        return perFreedom > 0 ? sum * sum / perFreedom : all;
    }
}

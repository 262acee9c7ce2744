package nightlag.stages.waveform;

/**
 * The covariance of all amplitudes of both channels. At fixed ω that of a channel is σ²(AᵀA)⁻¹, each row and column with the
 * noise beside its own order; the shared ω adds var(δ) h hᵀ over all of them, h_c = (AᵀA)⁻¹Aᵀg_c. For white noise this is
 * the inverse Fisher matrix of the whole model. Where the amplitudes follow no more than a line in time, what a curve may hide
 * there is added.
 */
final class FitCovariance {
    private final Basis basis;
    private final JointFit.Result fit;
    private final Noise noise;
    private final boolean frequencyFree;

    FitCovariance(Basis basis, JointFit.Result fit, Noise noise, boolean frequencyFree) {
        this.basis = basis;
        this.fit = fit;
        this.noise = noise;
        this.frequencyFree = frequencyFree;
    }

    /** Variance of the phase δ at the record's end, rad²; 0 where the frequency is exact. */
    double phaseVariance() {
        if (!frequencyFree) {
            return 0;
        }
        double variance = 0;
        double information = 0;
        double[] weights = fit.weights();
        for (int c = 0; c < Samples.CHANNELS; c++) {
            double part = weights[c] * fit.freeSlopeSquares()[c];
            information += part;
            variance += weights[c] * part * noise.beside(c, 1).variance();
        }
        return information > 0 ? variance / (information * information) : 0;
    }

    /** The 4H × 4H matrix of {@link SignalFit#covariance()}. */
    double[][] matrix() {
        int orders = basis.harmonics();
        double[][] inverse = fit.normal().inverse();
        double phaseVariance = phaseVariance();
        double[][] matrix = new double[4 * orders][4 * orders];
        for (int row = 0; row < 4 * orders; row++) {
            for (int column = 0; column <= row; column++) {
                double value = factor(row) * pull(row) * factor(column) * pull(column) * phaseVariance;
                if (channel(row) == channel(column)) {
                    value += factor(row)
                            * factor(column)
                            * deviation(row)
                            * deviation(column)
                            * inverse[column(row)][column(column)];
                }
                matrix[row][column] = value;
                matrix[column][row] = value;
            }
        }
        if (basis.trendDegree() == 1) {
            for (int c = 0; c < Samples.CHANNELS; c++) {
                double bend = bend(c);
                for (int row = 2 * orders * c; row < 2 * orders * c + 2; row++) {
                    matrix[row][row] += bend * bend;
                }
            }
        }
        return matrix;
    }

    /**
     * What an amplitude that follows a line may owe in the middle to a curve the line could not follow. A₂ without a parabola is
     * taken for a third of itself, and the size of an A₂ not known is that of |A₁|²/|A₀|: twice that of an exponential change.
     */
    private double bend(int channel) {
        double[] x = fit.coefficients()[channel];
        int middle = basis.cosineColumn(1);
        int line = basis.trendColumn(1);
        double slope = Math.hypot(x[line], x[line + 1]);
        return slope * slope / (3 * Math.hypot(x[middle], x[middle + 1]));
    }

    /** Effective degrees of freedom of |load / deformation| (Welch–Satterthwaite). */
    double degreesOfFreedom() {
        double sum = 0;
        double perFreedom = 0;
        int cosine = basis.cosineColumn(1);
        for (int c = 0; c < Samples.CHANNELS; c++) {
            Noise.Level level = noise.beside(c, 1);
            double a = fit.coefficients()[c][cosine];
            double b = fit.coefficients()[c][cosine + 1];
            double share = level.variance() / (a * a + b * b);
            sum += share;
            perFreedom += share * share / level.freedom();
        }
        if (perFreedom > 0) {
            return sum * sum / perFreedom;
        }
        return noise.beside(Samples.DEFORMATION, 1).freedom()
                + noise.beside(Samples.LOAD, 1).freedom();
    }

    private int channel(int row) {
        return row / (2 * basis.harmonics());
    }

    private int column(int row) {
        return basis.driftTerms() + row % (2 * basis.harmonics());
    }

    /** A_n = a_n − i b_n: the imaginary part has the opposite sign of its coefficient. */
    private static double factor(int row) {
        return row % 2 == 0 ? 1 : -1;
    }

    private double pull(int row) {
        return fit.pull()[channel(row)][column(row)];
    }

    private double deviation(int row) {
        int order = row % (2 * basis.harmonics()) / 2 + 1;
        return Math.sqrt(noise.beside(channel(row), order).variance());
    }
}

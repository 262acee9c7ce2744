package nightlag.stages.waveform;

import nightlag.stages.numeric.Cholesky;
import nightlag.stages.numeric.Complex;

/**
 * The Cramér–Rao bound of a record: the inverse Fisher matrix of the whole model (drift and harmonics of both channels and
 * the frequency they share) at the true values and the record's own time stamps, built here from scratch.
 */
final class FisherBound {
    private FisherBound() {}

    /** Variances of G', G'' and δ, in Pa² and rad². */
    static double[] variances(StudyCondition condition, Waveform waveform) {
        int powers = condition.drift().degree() + 1;
        int own = powers + 2 * condition.orders();
        int size = 2 * own + 1;
        Complex[][] amplitudes = StudyCondition.amplitudes();
        double[][] fisher = new double[size][size];
        for (double t : waveform.timeS()) {
            for (int c = 0; c < 2; c++) {
                add(fisher, row(condition, amplitudes[c], t), c * own, own);
            }
        }
        double perSquare = condition.relativeNoise() * condition.relativeNoise();
        Cholesky inverse = Cholesky.of(fisher).orElseThrow();
        // amplitudes of size 1: G/|G| = load/deformation
        Complex deformation = amplitudes[0][0].times(1 / amplitudes[0][0].abs());
        Complex load = amplitudes[1][0].times(1 / amplitudes[1][0].abs());
        Complex unit = load.over(deformation);
        Complex byLoad = Complex.ONE.over(deformation);
        Complex byDeformation = unit.times(-1).over(deformation);
        double[] re = new double[size];
        double[] im = new double[size];
        put(re, im, powers, byDeformation);
        put(re, im, own + powers, byLoad);
        double[] phase = new double[size];
        for (int i = 0; i < size; i++) {
            phase[i] = -unit.im() * re[i] + unit.re() * im[i];
        }
        double square = Math.pow(StudyCondition.MODULUS.abs(), 2);
        return new double[] {
            square * perSquare * inverse.inverseForm(re),
            square * perSquare * inverse.inverseForm(im),
            perSquare * inverse.inverseForm(phase),
        };
    }

    /** The derivatives of one channel (over its amplitude) at a time: by its own coefficients, then by the frequency. */
    private static double[] row(StudyCondition condition, Complex[] amplitudes, double t) {
        double omega = 2 * Math.PI * StudyCondition.FREQUENCY_HZ;
        double duration = condition.cycles() / StudyCondition.FREQUENCY_HZ;
        int powers = condition.drift().degree() + 1;
        double[] row = new double[powers + 2 * condition.orders() + 1];
        for (int p = 0; p < powers; p++) {
            row[p] = Math.pow(2 * t / duration - 1, p);
        }
        for (int n = 1; n <= condition.orders(); n++) {
            double cosine = Math.cos(n * omega * t);
            double sine = Math.sin(n * omega * t);
            row[powers + 2 * n - 2] = cosine;
            row[powers + 2 * n - 1] = -sine;
            if (n <= amplitudes.length) {
                Complex a = amplitudes[n - 1].times(1 / amplitudes[0].abs());
                row[row.length - 1] += n * omega * t * (-a.re() * sine - a.im() * cosine);
            }
        }
        return row;
    }

    private static void add(double[][] fisher, double[] row, int at, int own) {
        int last = fisher.length - 1;
        for (int i = 0; i < own; i++) {
            for (int j = 0; j <= i; j++) {
                fisher[at + i][at + j] += row[i] * row[j];
            }
            fisher[last][at + i] += row[own] * row[i];
        }
        fisher[last][last] += row[own] * row[own];
    }

    private static void put(double[] re, double[] im, int at, Complex derivative) {
        re[at] = derivative.re();
        re[at + 1] = -derivative.im();
        im[at] = derivative.im();
        im[at + 1] = derivative.re();
    }
}

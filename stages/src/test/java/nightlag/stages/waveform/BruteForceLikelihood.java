package nightlag.stages.waveform;

import nightlag.stages.numeric.Complex;
import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.QRDecomposition;
import org.apache.commons.math3.linear.RealMatrix;
import org.apache.commons.math3.optim.MaxEval;
import org.apache.commons.math3.optim.nonlinear.scalar.GoalType;
import org.apache.commons.math3.optim.univariate.BrentOptimizer;
import org.apache.commons.math3.optim.univariate.SearchInterval;
import org.apache.commons.math3.optim.univariate.UnivariateObjectiveFunction;

/**
 * Maximum likelihood of a record by brute force, with none of the program's own code: drift and harmonics are solved exactly
 * by QR at every frequency of a dense grid around the true one, and the least sum of squares of both channels, each over its
 * true variance, is then refined by Brent's method. It knows the noise and starts at the truth, so no estimator of the same
 * model should do much better.
 */
final class BruteForceLikelihood {
    /**
     * How far from the true frequency is looked, as part of it: as far as the program believes a tag. It decides where noise
     * makes several maxima (1.5 cycles of 16 samples at 20 dB with a curved drift).
     */
    private static final double REACH = 0.1;

    private static final int STEPS_TO_EITHER_SIDE = 10;

    private final StudyCondition condition;
    private final double[] timeS;
    private final RealMatrix channels;

    private BruteForceLikelihood(StudyCondition condition, Waveform waveform) {
        this.condition = condition;
        this.timeS = waveform.timeS();
        // both channels have the same noise relative to their amplitude, so both weigh the same
        this.channels = new Array2DRowRealMatrix(timeS.length, 2);
        for (int i = 0; i < timeS.length; i++) {
            channels.setEntry(i, 0, waveform.deformation()[i] / StudyCondition.STRAIN.abs());
            channels.setEntry(i, 1, waveform.load()[i] / StudyCondition.STRESS.abs());
        }
    }

    /** The modulus that makes the record likeliest. */
    static Complex modulus(StudyCondition condition, Waveform waveform) {
        return new BruteForceLikelihood(condition, waveform).modulus();
    }

    private Complex modulus() {
        double step = REACH / STEPS_TO_EITHER_SIDE;
        double best = 1;
        double least = Double.POSITIVE_INFINITY;
        for (int k = -STEPS_TO_EITHER_SIDE; k <= STEPS_TO_EITHER_SIDE; k++) {
            double misfit = misfit(1 + k * step);
            if (misfit < least) {
                least = misfit;
                best = 1 + k * step;
            }
        }
        double refined = new BrentOptimizer(1e-9, 1e-12)
                .optimize(
                        new MaxEval(200),
                        new UnivariateObjectiveFunction(this::misfit),
                        GoalType.MINIMIZE,
                        new SearchInterval(best - step, best + step, best))
                .getPoint();
        RealMatrix basis = basis(refined);
        RealMatrix x = new QRDecomposition(basis).getSolver().solve(channels);
        int cosine = condition.drift().degree() + 1;
        Complex strain = new Complex(x.getEntry(cosine, 0), -x.getEntry(cosine + 1, 0));
        Complex stress = new Complex(x.getEntry(cosine, 1), -x.getEntry(cosine + 1, 1));
        return stress.over(strain).times(StudyCondition.STRESS.abs() / StudyCondition.STRAIN.abs());
    }

    /** The sum of squares the best drift and harmonics leave at a frequency (as part of the true one). */
    private double misfit(double relativeFrequency) {
        RealMatrix basis = basis(relativeFrequency);
        RealMatrix x = new QRDecomposition(basis).getSolver().solve(channels);
        double norm = channels.subtract(basis.multiply(x)).getFrobeniusNorm();
        return norm * norm;
    }

    private RealMatrix basis(double relativeFrequency) {
        double omega = 2 * Math.PI * StudyCondition.FREQUENCY_HZ * relativeFrequency;
        double first = timeS[0];
        double half = (timeS[timeS.length - 1] - first) / 2;
        int powers = condition.drift().degree() + 1;
        double[][] rows = new double[timeS.length][powers + 2 * condition.orders()];
        for (int i = 0; i < timeS.length; i++) {
            double since = timeS[i] - first - half;
            for (int p = 0; p < powers; p++) {
                rows[i][p] = Math.pow(since / half, p);
            }
            for (int n = 1; n <= condition.orders(); n++) {
                rows[i][powers + 2 * n - 2] = Math.cos(n * omega * since);
                rows[i][powers + 2 * n - 1] = Math.sin(n * omega * since);
            }
        }
        return new Array2DRowRealMatrix(rows, false);
    }
}

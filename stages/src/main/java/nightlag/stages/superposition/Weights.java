package nightlag.stages.superposition;

import java.util.List;
import nightlag.stages.superposition.LogIsotherm.LogReading;

/**
 * The weights of points, W = L Lᵀ the inverse of each one's covariance; Lᵀ r is a residual over its uncertainty. A missing
 * modulus has no weight.
 *
 * @param storage L(0, 0)
 * @param mixed L(1, 0)
 * @param loss L(1, 1)
 * @param logDeterminant Σ ln det W over what is not missing
 * @param values how many moduli are not missing
 */
record Weights(double[] storage, double[] mixed, double[] loss, double logDeterminant, int values) {
    /** Covariances are kept this far from singular. */
    private static final double STRONGEST_CORRELATION = 0.999999;

    static Weights of(List<LogReading> readings, boolean useGiven, Smoothness smoothness) {
        int n = readings.size();
        double[] storage = new double[n];
        double[] mixed = new double[n];
        double[] loss = new double[n];
        double logDeterminant = 0;
        int values = 0;
        for (int i = 0; i < n; i++) {
            LogReading reading = readings.get(i);
            double v0 = smoothness.scatterVariance(0);
            double v1 = smoothness.scatterVariance(1);
            double v01 = 0;
            if (useGiven && reading.covariance().isPresent()) {
                v0 += reading.covariance().get().storageVariance();
                v1 += reading.covariance().get().lossVariance();
                v01 = reading.covariance().get().covariance();
            }
            if (reading.has(0) && reading.has(1)) {
                double most = STRONGEST_CORRELATION * Math.sqrt(v0 * v1);
                v01 = Math.max(-most, Math.min(most, v01));
                double determinant = v0 * v1 - v01 * v01;
                // W = [v1, −v01; −v01, v0]/det
                storage[i] = Math.sqrt(v1 / determinant);
                mixed[i] = -v01 / Math.sqrt(v1 * determinant);
                loss[i] = 1 / Math.sqrt(v1);
                logDeterminant -= Math.log(determinant);
                values += 2;
            } else if (reading.has(0)) {
                storage[i] = 1 / Math.sqrt(v0);
                logDeterminant -= Math.log(v0);
                values++;
            } else {
                loss[i] = 1 / Math.sqrt(v1);
                logDeterminant -= Math.log(v1);
                values++;
            }
        }
        return new Weights(storage, mixed, loss, logDeterminant, values);
    }

    /** Lᵀ (first, second) of a point, into a vector that holds two values a point. */
    void whiten(int point, double first, double second, double[] into) {
        whiten(point, point, first, second, into);
    }

    /** The same, into a vector that holds the point at another place. */
    void whiten(int point, int at, double first, double second, double[] into) {
        into[2 * at] = storage[point] * first + mixed[point] * second;
        into[2 * at + 1] = loss[point] * second;
    }
}

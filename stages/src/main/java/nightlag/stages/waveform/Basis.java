package nightlag.stages.waveform;

/**
 * The columns of the model, one stretch of samples at a time: polynomials 1, u, u² − 1/3 of the scaled time
 * u = t/half span (−1 … 1), then cos nωt, sin nωt for n = 1 … H, then, where the amplitude may change, u^k cos ωt, u^k sin ωt
 * for k = 1 … K. The coefficients of cos ωt and sin ωt are the amplitude in the middle in either case.
 */
final class Basis {
    private final Samples samples;
    private final int driftTerms;
    private final int harmonics;
    private final int trendDegree;
    private final double[] cosine;
    private final double[] sine;
    private double angularFrequency = Double.NaN;

    Basis(Samples samples, int harmonics, int driftDegree, int trendDegree) {
        this.samples = samples;
        this.driftTerms = driftDegree + 1;
        this.harmonics = harmonics;
        this.trendDegree = trendDegree;
        this.cosine = new double[samples.size()];
        this.sine = new double[samples.size()];
    }

    /** The number of columns. */
    int columns() {
        return driftTerms + 2 * harmonics + 2 * trendDegree;
    }

    /** The number of columns of the polynomial. */
    int driftTerms() {
        return driftTerms;
    }

    /** The highest order. */
    int harmonics() {
        return harmonics;
    }

    /** The column of cos nωt; that of sin nωt is the next. */
    int cosineColumn(int order) {
        return driftTerms + 2 * (order - 1);
    }

    /** The degree of the polynomial the amplitude follows; 0 where it is constant. */
    int trendDegree() {
        return trendDegree;
    }

    /** The column of u^k cos ωt; that of u^k sin ωt is the next. */
    int trendColumn(int power) {
        return driftTerms + 2 * harmonics + 2 * (power - 1);
    }

    /** cos ωt of each sample. */
    double[] cosine() {
        return cosine;
    }

    /** sin ωt of each sample. */
    double[] sine() {
        return sine;
    }

    /** Takes up a frequency, rad/s. */
    void at(double newAngularFrequency) {
        if (newAngularFrequency == angularFrequency) {
            return;
        }
        angularFrequency = newAngularFrequency;
        double[] seconds = samples.seconds();
        for (int i = 0; i < seconds.length; i++) {
            double phase = newAngularFrequency * seconds[i];
            cosine[i] = Math.cos(phase);
            sine[i] = Math.sin(phase);
        }
    }

    /** Fills {@code into[column][0 … count)} with the samples from {@code first} on. */
    void fill(int first, int count, double[][] into) {
        double[] seconds = samples.seconds();
        double perSecond = 1 / samples.halfSpanS();
        java.util.Arrays.fill(into[0], 0, count, 1);
        for (int p = 1; p < driftTerms; p++) {
            for (int i = 0; i < count; i++) {
                double u = seconds[first + i] * perSecond;
                into[p][i] = p == 1 ? u : u * u - 1.0 / 3;
            }
        }
        double[] firstCosine = into[driftTerms];
        double[] firstSine = into[driftTerms + 1];
        System.arraycopy(cosine, first, firstCosine, 0, count);
        System.arraycopy(sine, first, firstSine, 0, count);
        for (int n = 2; n <= harmonics; n++) {
            double[] previousCosine = into[cosineColumn(n - 1)];
            double[] previousSine = into[cosineColumn(n - 1) + 1];
            double[] nextCosine = into[cosineColumn(n)];
            double[] nextSine = into[cosineColumn(n) + 1];
            for (int i = 0; i < count; i++) {
                nextCosine[i] = previousCosine[i] * firstCosine[i] - previousSine[i] * firstSine[i];
                nextSine[i] = previousSine[i] * firstCosine[i] + previousCosine[i] * firstSine[i];
            }
        }
        fillTrend(first, count, into);
    }

    private void fillTrend(int first, int count, double[][] into) {
        double[] seconds = samples.seconds();
        double perSecond = 1 / samples.halfSpanS();
        for (int power = 1; power <= trendDegree; power++) {
            int from = power == 1 ? cosineColumn(1) : trendColumn(power - 1);
            for (int part = 0; part < 2; part++) {
                double[] lower = into[from + part];
                double[] raised = into[trendColumn(power) + part];
                for (int i = 0; i < count; i++) {
                    raised[i] = lower[i] * seconds[first + i] * perSecond;
                }
            }
        }
    }

    /**
     * The derivative of the model by the phase at the record's end (δ = Δω · half span), for the coefficients of one
     * channel: u Σ n (b_n cos nωt − a_n sin nωt), the amplitude's trend included.
     *
     * @param columns as filled by {@link #fill}
     */
    void phaseSlope(int first, int count, double[][] columns, double[] coefficients, double[] into) {
        java.util.Arrays.fill(into, 0, count, 0);
        for (int n = 1; n <= harmonics; n++) {
            int column = cosineColumn(n);
            double a = n * coefficients[column];
            double b = n * coefficients[column + 1];
            double[] cos = columns[column];
            double[] sin = columns[column + 1];
            for (int i = 0; i < count; i++) {
                into[i] += b * cos[i] - a * sin[i];
            }
        }
        for (int power = 1; power <= trendDegree; power++) {
            int column = trendColumn(power);
            for (int i = 0; i < count; i++) {
                into[i] +=
                        coefficients[column + 1] * columns[column][i] - coefficients[column] * columns[column + 1][i];
            }
        }
        double[] seconds = samples.seconds();
        double perSecond = 1 / samples.halfSpanS();
        for (int i = 0; i < count; i++) {
            into[i] *= seconds[first + i] * perSecond;
        }
    }
}

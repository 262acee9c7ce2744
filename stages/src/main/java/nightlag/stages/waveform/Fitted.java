package nightlag.stages.waveform;

import java.util.List;
import nightlag.stages.fault.Reason;

/**
 * A fit and what it was made of.
 *
 * @param samples the samples that entered
 * @param basis the columns of the model
 * @param result the fit itself
 * @param notes what the samples did not bear of the model asked for
 */
record Fitted(Samples samples, Basis basis, JointFit.Result result, List<Reason> notes) implements FitResiduals {
    Fitted {
        notes = List.copyOf(notes);
    }

    Fitted(Samples samples, Basis basis, JointFit.Result result) {
        this(samples, basis, result, List.of());
    }

    /** The same fit with these notes. */
    Fitted noting(List<Reason> said) {
        return new Fitted(samples, basis, result, said);
    }

    @Override
    public double[][] residuals() {
        return result.residuals();
    }

    @Override
    public int columns() {
        return basis.columns();
    }

    @Override
    public double largestAmplitude(int channel) {
        return amplitude(channel);
    }

    /** Amplitude of a channel's fundamental. */
    double amplitude(int channel) {
        int column = basis.cosineColumn(1);
        double[] coefficients = result.coefficients()[channel];
        return Math.hypot(coefficients[column], coefficients[column + 1]);
    }

    /** Whether the amplitude may change, so that the frequency is no unknown of the fit itself. */
    boolean hasTrend() {
        return basis.trendDegree() > 0;
    }

    /** Standard deviation of a channel's residuals. */
    double deviation(int channel) {
        double freedom = Math.max(1, samples.size() - basis.columns());
        return Math.sqrt(result.residualSquares()[channel] / freedom);
    }

    /** What the model says of a channel at a time of the record, in s, sampled or not. */
    double model(int channel, double timeS) {
        double[] columns = columnsAt(timeS);
        double value = samples.means()[channel];
        for (int j = 0; j < columns.length; j++) {
            value += result.coefficients()[channel][j] * columns[j];
        }
        return value;
    }

    /** The standard uncertainty of {@link #model}, with the residuals for noise. */
    double modelU(int channel, double timeS) {
        return deviation(channel) * Math.sqrt(result.normal().inverseForm(columnsAt(timeS)));
    }

    private double[] columnsAt(double timeS) {
        double seconds = timeS - samples.originS();
        double u = seconds / samples.halfSpanS();
        double[] columns = new double[basis.columns()];
        double[] polynomials = {1, u, u * u - 1.0 / 3};
        System.arraycopy(polynomials, 0, columns, 0, basis.driftTerms());
        for (int n = 1; n <= basis.harmonics(); n++) {
            double phase = n * result.angularFrequency() * seconds;
            columns[basis.cosineColumn(n)] = Math.cos(phase);
            columns[basis.cosineColumn(n) + 1] = Math.sin(phase);
        }
        double raised = 1;
        for (int power = 1; power <= basis.trendDegree(); power++) {
            raised *= u;
            columns[basis.trendColumn(power)] = raised * columns[basis.cosineColumn(1)];
            columns[basis.trendColumn(power) + 1] = raised * columns[basis.cosineColumn(1) + 1];
        }
        return columns;
    }
}

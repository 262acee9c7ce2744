package nightlag.stages.spectrum;

import java.util.ArrayList;
import java.util.List;
import java.util.OptionalDouble;
import java.util.stream.IntStream;

/**
 * Both continuous spectra of a material: H(τ) in G(t) = Ge + ∫ H e^{−t/τ} d ln τ and L(λ) in
 * J(t) = J0 + ∫ L (1 − e^{−t/λ}) d ln λ + t/η0.
 *
 * <p>The nodes reach two decades beyond the data's times, which of moduli are the inverse of their frequencies; the fit needs
 * that. What is published ends at these: between them and {@link #window()} the band opens, further out no data speak.
 */
public final class ContinuousSpectrum {
    private final SpectralDensity relaxation;
    private final SpectralDensity retardation;
    private final double equilibriumPa;
    private final SupportedWindow window;
    private final SupportedWindow published;

    /**
     * What a fit gave.
     *
     * @param window the times the data support
     * @param published from the shortest to the longest time of the data themselves
     */
    ContinuousSpectrum(
            SpectralDensity relaxation,
            SpectralDensity retardation,
            double equilibriumPa,
            SupportedWindow window,
            SupportedWindow published) {
        this.relaxation = relaxation;
        this.retardation = retardation;
        this.equilibriumPa = equilibriumPa;
        this.window = window;
        this.published = published;
    }

    /** The same with another retardation spectrum. */
    ContinuousSpectrum withRetardation(SpectralDensity other) {
        return new ContinuousSpectrum(relaxation, other, equilibriumPa, window, published);
    }

    /** H(τ) in Pa per unit of ln τ, over all nodes. */
    public SpectralDensity relaxation() {
        return relaxation;
    }

    /** L(λ) in 1/Pa per unit of ln λ, over all nodes. */
    public SpectralDensity retardation() {
        return retardation;
    }

    /** Ge in Pa, 0 for a liquid. */
    public double equilibriumPa() {
        return equilibriumPa;
    }

    /** The times the data support. */
    public SupportedWindow window() {
        return window;
    }

    /** What is published of both, relaxation first, times rising. */
    public List<SpectrumRow> rows(double temperatureK) {
        List<SpectrumRow> rows = new ArrayList<>();
        add(rows, temperatureK, SpectrumRow.Kind.RELAXATION, relaxation);
        add(rows, temperatureK, SpectrumRow.Kind.RETARDATION, retardation);
        return rows;
    }

    private void add(List<SpectrumRow> rows, double temperatureK, SpectrumRow.Kind kind, SpectralDensity density) {
        double[] times = density.timesS();
        double[] values = density.values();
        double[] low = density.low();
        double[] high = density.high();
        IntStream.range(0, times.length)
                .filter(i -> published.holds(times[i]))
                .forEach(i -> rows.add(new SpectrumRow(
                        temperatureK,
                        kind,
                        SpectrumRow.Form.CONTINUOUS,
                        times[i],
                        values[i],
                        OptionalDouble.of(low[i]),
                        OptionalDouble.of(high[i]))));
    }
}

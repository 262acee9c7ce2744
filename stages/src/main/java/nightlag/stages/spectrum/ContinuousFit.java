package nightlag.stages.spectrum;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.moduli.ModulusReading;

/**
 * Readings of the complex modulus to continuous spectra: a positive density, smooth in its logarithm, by Tikhonov's
 * regularisation of the nonlinear problem (Honerkamp &amp; Weese, Rheol. Acta 32 (1993) 65), how smooth by Bayesian evidence, the
 * band from the posterior.
 */
public final class ContinuousFit {
    /** What the window loses at both ends, in decades of frequency. */
    private static final double DECADES_LOST = Math.PI / Math.log(10);

    private ContinuousFit() {}

    /**
     * Fits H to the moduli and L to the compliances 1/G*, each as smooth as its own evidence asks for. Both describe one
     * material: where H is smooth, {@link #ofModuli} and {@link #ofCompliances} give the same within their bands. Where H has
     * gaps, the exact conjugate turns each into a line that no grid holds; then what was fitted is the better spectrum.
     *
     * @param readings finite moduli at positive frequencies, in any order, repeats allowed
     * @param discrete what {@link DiscreteFit} gave for the same readings with as many modes as they carry: it says whether
     *     the material has an equilibrium modulus and, where readings come without u, how they scatter
     * @throws ReductionFault where the data fix no spectrum at any time
     */
    public static ContinuousSpectrum of(List<ModulusReading> readings, DiscreteSpectrum discrete)
            throws ReductionFault {
        return ofModuli(readings, discrete)
                .withRetardation(ofCompliances(readings, discrete).retardation());
    }

    /**
     * Fits H to the moduli; L follows from it by {@link GrossRelation}.
     *
     * @param readings as for {@link #of}
     * @param discrete as for {@link #of}
     * @throws ReductionFault where the data fix no spectrum at any time
     */
    public static ContinuousSpectrum ofModuli(List<ModulusReading> readings, DiscreteSpectrum discrete)
            throws ReductionFault {
        List<ModulusReading> moduli = weighed(readings, discrete);
        List<ModulusReading> compliances = WeighedModuli.inverted(moduli);
        DensityFit fit = fitted(moduli, discrete);
        LogTimes times = fit.times();
        DensityFit.Band relaxation = fit.band(PositivityBound.of(moduli, times));
        DensityFit.Band retardation =
                fit.conjugateBand(DensityFit.reversed(PositivityBound.of(compliances, times.inverted())));
        return spectrum(
                times,
                relaxation,
                retardation,
                fit.figure(DensityFit.Beside.CONSTANT),
                lowest(moduli),
                highest(moduli));
    }

    /**
     * Fits L to the compliances 1/G*, with J0 and, for a liquid, the fluidity 1/η0 beside it; H follows from it.
     *
     * @param readings as for {@link #of}
     * @param discrete as for {@link #of}
     * @throws ReductionFault where the data fix no spectrum at any time
     */
    public static ContinuousSpectrum ofCompliances(List<ModulusReading> readings, DiscreteSpectrum discrete)
            throws ReductionFault {
        List<ModulusReading> moduli = weighed(readings, discrete);
        List<ModulusReading> compliances = WeighedModuli.inverted(moduli);
        List<DensityFit.Beside> beside = new ArrayList<>(List.of(DensityFit.Beside.CONSTANT));
        if (discrete.relaxation().isLiquid()) {
            beside.add(DensityFit.Beside.VISCOUS);
        }
        DensityFit fit = DensityFit.of(compliances, beside);
        LogTimes inverse = fit.times();
        LogTimes times = inverse.inverted();
        DensityFit.Band retardation =
                fit.band(PositivityBound.of(compliances, inverse)).reversed();
        DensityFit.Band relaxation = fit.conjugateBand(DensityFit.reversed(PositivityBound.of(moduli, times)))
                .reversed();
        double equilibriumPa = discrete.relaxation().isLiquid() ? 0 : 1 / fit.sum();
        return spectrum(times, relaxation, retardation, equilibriumPa, lowest(moduli), highest(moduli));
    }

    /**
     * The material fitted to the moduli, as modes, one a node of strength H times the step of ln τ, and what the fit leaves open
     * of it: for predictions with a band. By the trapezoidal rule the modes are on these nodes as good as the integral. Beyond
     * the data they are the prior's guess, and the spread says so.
     *
     * @param readings as for {@link #of}
     * @param discrete as for {@link #of}
     * @throws ReductionFault where the data fix no spectrum at any time
     */
    public static MaterialSpread materials(List<ModulusReading> readings, DiscreteSpectrum discrete)
            throws ReductionFault {
        List<ModulusReading> moduli = weighed(readings, discrete);
        return fitted(moduli, discrete).materials();
    }

    private static DensityFit fitted(List<ModulusReading> moduli, DiscreteSpectrum discrete) {
        return DensityFit.of(
                moduli, discrete.relaxation().isLiquid() ? List.of() : List.of(DensityFit.Beside.CONSTANT));
    }

    private static List<ModulusReading> weighed(List<ModulusReading> readings, DiscreteSpectrum discrete)
            throws ReductionFault {
        double decades = Math.log10(highest(readings) / lowest(readings));
        if (decades <= DECADES_LOST) {
            throw new ReductionFault(SpectrumReason.CONTINUOUS_TOO_NARROW.with(
                    String.format(Locale.ROOT, "%.2f", decades), String.format(Locale.ROOT, "%.2f", DECADES_LOST)));
        }
        return WeighedModuli.of(readings, discrete);
    }

    private static ContinuousSpectrum spectrum(
            LogTimes times,
            DensityFit.Band relaxation,
            DensityFit.Band retardation,
            double equilibriumPa,
            double lowest,
            double highest) {
        return new ContinuousSpectrum(
                relaxation.over(times),
                retardation.over(times),
                equilibriumPa,
                SupportedWindow.of(lowest, highest),
                new SupportedWindow(1 / highest, 1 / lowest));
    }

    private static double lowest(List<ModulusReading> readings) {
        return readings.stream()
                .mapToDouble(ModulusReading::angularFrequency)
                .min()
                .orElseThrow();
    }

    private static double highest(List<ModulusReading> readings) {
        return readings.stream()
                .mapToDouble(ModulusReading::angularFrequency)
                .max()
                .orElseThrow();
    }
}

package nightlag.stages.spectrum;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.function.DoubleUnaryOperator;
import nightlag.stages.fault.ReductionFault;

/**
 * Creep curves, alone or with complex moduli of the same material, to continuous spectra. Strains after any steps of stress
 * and compliances 1/G* are both linear in J0, the density L and 1/η0, so L is fitted as {@link ContinuousFit} fits it to
 * compliances: positive, smooth in its logarithm (Honerkamp &amp; Weese, Rheol. Acta 32 (1993) 65), as smooth as the evidence
 * asks for. H follows by the exact relation of Gross (1953), its band from the posterior of L, J0 and 1/η0.
 */
public final class CreepContinuousFit {
    private CreepContinuousFit() {}

    /**
     * Fits L to the readings of a discrete set, and draws H from it.
     *
     * @param discrete what {@link CreepFit} gave: its readings, at their temperature, and whether the material flows
     * @throws ReductionFault where the readings fix no spectrum at any time
     */
    public static ContinuousSpectrum of(CreepSpectrum discrete) throws ReductionFault {
        return of(discrete.readings(), discrete.retardation().isLiquid());
    }

    /** The same of readings, with or without a flow. */
    static ContinuousSpectrum of(ComplianceReadings readings, boolean flows) throws ReductionFault {
        SupportedWindow window = readings.windowOfDensity();
        if (!(window.shortestS() < window.longestS())) {
            throw new ReductionFault(
                    SpectrumReason.CONTINUOUS_CREEP_TOO_SHORT.with(readings.shortestS(), readings.longestS()));
        }
        List<DensityFit.Figure> beside = new ArrayList<>();
        beside.add(new DensityFit.Figure(
                DensityFit.Beside.CONSTANT, readings.instantaneous(), readings.mostInstantaneous()));
        if (flows) {
            beside.add(new DensityFit.Figure(DensityFit.Beside.VISCOUS, readings.flow(), readings.mostFlow()));
        }
        LogTimes inverse = LogTimes.around(readings.shortestS(), readings.longestS());
        DensityFit fit = DensityFit.of(
                inverse, readings.target(), rate -> readings.mode(1 / rate), readings.largestPerPa(), beside);
        LogTimes times = inverse.inverted();
        DensityFit.Band retardation =
                fit.band(bounds(inverse, rate -> readings.mostOfMode(1 / rate))).reversed();
        DensityFit.Band relaxation = fit.conjugateBand(bounds(inverse, rate -> readings.mostOfRelaxation(1 / rate)))
                .reversed();
        return new ContinuousSpectrum(
                relaxation.over(times),
                retardation.over(times),
                flows ? 0 : 1 / fit.sum(),
                window,
                new SupportedWindow(readings.shortestS(), readings.longestS()));
    }

    /** What a density can be at most where a mode can be that much. */
    private static double[] bounds(LogTimes inverse, DoubleUnaryOperator mostOfMode) {
        return Arrays.stream(inverse.times())
                .map(rate -> mostOfMode.applyAsDouble(rate) / LogTimes.STEP)
                .toArray();
    }
}

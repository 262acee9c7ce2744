package nightlag.stages;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import nightlag.stages.fault.Reason;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.spectrum.DiscreteFit;
import nightlag.stages.spectrum.DiscreteSpectrum;
import nightlag.stages.spectrum.SpectrumPlan;
import nightlag.stages.spectrum.SpectrumReason;
import nightlag.stages.spectrum.SpectrumRow;
import nightlag.stages.superposition.SuperpositionPlan;
import nightlag.stages.sweep.FrequencySweeps;
import nightlag.stages.sweep.Isotherm;
import nightlag.stages.sweep.Isotherms;

/**
 * The discrete spectrum of a lot, from its isothermal frequency sweeps.
 *
 * @param markers what completes it, and what follows from it
 * @param rows its modes
 * @param notes why there is none, or what is unusual about it
 */
record LotSpectrum(List<Marker> markers, List<SpectrumRow> rows, List<Reason> notes) {
    private static final double KELVIN_AT_ZERO_CELSIUS = 273.15;
    private static final double UNNOTED_KELVIN = 0.1;

    /** No spectrum, because none was asked for. */
    static final LotSpectrum NONE = new LotSpectrum(List.of(), List.of(), List.of());

    /**
     * Fits the spectrum at the reference temperature if there is one, else where there is only one temperature with a
     * frequency sweep. It is said to hold at the reference temperature, else at that isotherm's mean temperature; how far a
     * reference is from where the points were measured is noted where it is more than a thermometer would hide.
     *
     * @param usable the lot's usable points, in table order
     * @param amplitudeSweeps the amplitude sweeps among the lot's points, holding the same objects
     */
    static LotSpectrum of(
            List<ModulusPoint> usable,
            List<List<ModulusPoint>> amplitudeSweeps,
            SpectrumPlan plan,
            Optional<SuperpositionPlan> superposition) {
        try {
            Isotherm sweep = chosenIsotherm(usable, superposition);
            List<ModulusPoint> points = FrequencySweeps.withoutAmplitudeSweeps(sweep.points(), amplitudeSweeps);
            if (points.stream().map(ModulusPoint::deformation).distinct().count() > 1) {
                throw new ReductionFault(ConclusionReason.SPECTRUM_MIXED_DEFORMATION.with());
            }
            DiscreteSpectrum spectrum =
                    DiscreteFit.fit(points.stream().map(LotSpectrum::reading).toList(), plan);
            List<Reason> notes = new ArrayList<>();
            int keptOut = sweep.points().size() - points.size();
            if (keptOut > 0) {
                notes.add(ConclusionReason.SPECTRUM_WITHOUT_AMPLITUDE_SWEEPS.with(keptOut));
            }
            if (plan.fitEquilibrium() && spectrum.relaxation().isLiquid()) {
                notes.add(SpectrumReason.EQUILIBRIUM_MODULUS_ZERO.with());
            }
            double temperatureK =
                    superposition.map(SuperpositionPlan::referenceTemperatureK).orElse(sweep.temperatureK());
            if (Math.abs(temperatureK - sweep.temperatureK()) > UNNOTED_KELVIN) {
                notes.add(ConclusionReason.SPECTRUM_MEASURED_BESIDE_REFERENCE.with(
                        sweep.temperatureK() - KELVIN_AT_ZERO_CELSIUS, temperatureK - KELVIN_AT_ZERO_CELSIUS));
            }
            return new LotSpectrum(spectrum.markers(temperatureK), spectrum.rows(temperatureK), List.copyOf(notes));
        } catch (ReductionFault fault) {
            return new LotSpectrum(List.of(), List.of(), List.of(fault.reason()));
        }
    }

    /** The isotherm to fit, its points those of its frequency sweeps. */
    private static Isotherm chosenIsotherm(List<ModulusPoint> usable, Optional<SuperpositionPlan> superposition)
            throws ReductionFault {
        List<Isotherm> isotherms = Isotherms.group(
                        usable.stream().filter(LotSpectrum::canBeFitted).toList())
                .stream()
                .map(isotherm -> new Isotherm(isotherm.temperatureK(), FrequencySweeps.among(isotherm.points())))
                .toList();
        if (isotherms.isEmpty()) {
            throw new ReductionFault(ConclusionReason.SPECTRUM_NO_POINTS.with());
        }
        if (superposition.isPresent()) {
            double reference = superposition.get().referenceTemperatureK();
            Optional<Isotherm> near = Isotherms.near(isotherms, reference);
            return near.orElseThrow(() -> new ReductionFault(
                    ConclusionReason.SPECTRUM_NO_ISOTHERM_AT_REFERENCE.with(reference - KELVIN_AT_ZERO_CELSIUS)));
        }
        List<Isotherm> swept = isotherms.stream()
                .filter(isotherm ->
                        FrequencySweeps.distinctFrequencies(isotherm.points()) >= DiscreteFit.LEAST_FREQUENCIES)
                .toList();
        if (swept.size() > 1) {
            throw new ReductionFault(ConclusionReason.SPECTRUM_SEVERAL_TEMPERATURES.with(swept.size()));
        }
        return swept.isEmpty() ? isotherms.get(0) : swept.get(0);
    }

    private static boolean canBeFitted(ModulusPoint point) {
        return point.frequencyHz().orElse(0) > 0
                && point.moduli().filter(moduli -> moduli.complex().isFinite()).isPresent();
    }

    private static ModulusReading reading(ModulusPoint point) {
        return new ModulusReading(
                2 * Math.PI * point.frequencyHz().orElseThrow(), point.moduli().orElseThrow());
    }
}

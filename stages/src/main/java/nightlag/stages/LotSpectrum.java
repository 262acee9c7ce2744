package nightlag.stages;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalInt;
import nightlag.stages.fault.Reason;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.moduli.Marker;
import nightlag.stages.spectrum.ContinuousFit;
import nightlag.stages.spectrum.DiscreteFit;
import nightlag.stages.spectrum.DiscreteSpectrum;
import nightlag.stages.spectrum.SpectrumPlan;
import nightlag.stages.spectrum.SpectrumReason;
import nightlag.stages.spectrum.SpectrumRow;

/**
 * The discrete and, where wanted, the continuous spectra of a lot.
 *
 * @param discrete the discrete spectrum itself; empty where there is none
 * @param markers what completes it, and what follows from it
 * @param rows modes and nodes
 * @param notes why there is none, or what is unusual about it
 */
record LotSpectrum(
        Optional<DiscreteSpectrum> discrete, List<Marker> markers, List<SpectrumRow> rows, List<Reason> notes) {
    /** No spectrum, because none was asked for, or there is nothing to fit it to. */
    static final LotSpectrum NONE = new LotSpectrum(Optional.empty(), List.of(), List.of(), List.of());

    /** Fits the spectra to the lot's curve; they hold at the curve's temperature. */
    static LotSpectrum of(LotCurve curve, SpectrumPlan plan) {
        try {
            DiscreteSpectrum spectrum = DiscreteFit.fit(curve.readings(), plan);
            List<SpectrumRow> rows = new ArrayList<>(spectrum.rows(curve.temperatureK()));
            List<Reason> notes = new ArrayList<>();
            if (plan.fitEquilibrium() && spectrum.relaxation().isLiquid()) {
                notes.add(SpectrumReason.EQUILIBRIUM_MODULUS_ZERO.with());
            }
            if (plan.continuous()) {
                addContinuous(curve, spectrum, plan, rows, notes);
            }
            return new LotSpectrum(Optional.of(spectrum), spectrum.markers(curve.temperatureK()), rows, notes);
        } catch (ReductionFault fault) {
            return new LotSpectrum(Optional.empty(), List.of(), List.of(), List.of(fault.reason()));
        }
    }

    private static void addContinuous(
            LotCurve curve, DiscreteSpectrum spectrum, SpectrumPlan plan, List<SpectrumRow> rows, List<Reason> notes) {
        try {
            // a fixed number of modes says nothing of how the readings scatter
            DiscreteSpectrum free = plan.modes().isEmpty()
                    ? spectrum
                    : DiscreteFit.fit(
                            curve.readings(), new SpectrumPlan(plan.fitEquilibrium(), OptionalInt.empty(), true));
            rows.addAll(ContinuousFit.of(curve.readings(), free).rows(curve.temperatureK()));
        } catch (ReductionFault fault) {
            notes.add(fault.reason());
        }
    }
}

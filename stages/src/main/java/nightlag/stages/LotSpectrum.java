package nightlag.stages;

import java.util.List;
import nightlag.stages.fault.Reason;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.moduli.Marker;
import nightlag.stages.spectrum.DiscreteFit;
import nightlag.stages.spectrum.DiscreteSpectrum;
import nightlag.stages.spectrum.SpectrumPlan;
import nightlag.stages.spectrum.SpectrumReason;
import nightlag.stages.spectrum.SpectrumRow;

/**
 * The discrete spectrum of a lot.
 *
 * @param markers what completes it, and what follows from it
 * @param rows its modes
 * @param notes why there is none, or what is unusual about it
 */
record LotSpectrum(List<Marker> markers, List<SpectrumRow> rows, List<Reason> notes) {
    /** No spectrum, because none was asked for, or there is nothing to fit it to. */
    static final LotSpectrum NONE = new LotSpectrum(List.of(), List.of(), List.of());

    /** Fits the spectrum to the lot's curve; it holds at the curve's temperature. */
    static LotSpectrum of(LotCurve curve, SpectrumPlan plan) {
        try {
            DiscreteSpectrum spectrum = DiscreteFit.fit(curve.readings(), plan);
            boolean unshownSolid =
                    plan.fitEquilibrium() && spectrum.relaxation().isLiquid();
            return new LotSpectrum(
                    spectrum.markers(curve.temperatureK()),
                    spectrum.rows(curve.temperatureK()),
                    unshownSolid ? List.of(SpectrumReason.EQUILIBRIUM_MODULUS_ZERO.with()) : List.of());
        } catch (ReductionFault fault) {
            return new LotSpectrum(List.of(), List.of(), List.of(fault.reason()));
        }
    }
}

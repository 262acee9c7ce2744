package nightlag.stages;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import nightlag.stages.fault.Reason;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.response.Prediction;
import nightlag.stages.response.ResponsePlan;
import nightlag.stages.response.ResponseReason;
import nightlag.stages.response.ResponseRow;
import nightlag.stages.response.TemperatureShift;
import nightlag.stages.spectrum.DiscreteSpectrum;
import nightlag.stages.spectrum.RelativeMode;

/**
 * What is predicted of a lot from its discrete spectrum.
 *
 * @param rows predictions, in the order they are asked for
 * @param prony the spectrum for a simulation
 * @param notes what could not be predicted, and why
 */
record LotResponses(List<ResponseRow> rows, List<RelativeMode> prony, List<Reason> notes) {
    /**
     * Predicts all that is asked for.
     *
     * @param curve what the spectrum was fitted to, where there is one
     */
    static LotResponses of(List<ResponsePlan> plans, Optional<LotCurve> curve, LotSpectrum spectrum) {
        List<Reason> notes = new ArrayList<>();
        if (curve.isEmpty() || spectrum.discrete().isEmpty()) {
            plans.forEach(plan -> notes.add(ResponseReason.RESPONSE_NO_SPECTRUM.with(plan.name())));
            return new LotResponses(List.of(), List.of(), notes);
        }
        DiscreteSpectrum modes = spectrum.discrete().get();
        double temperatureK = curve.get().temperatureK();
        TemperatureShift shift = TemperatureShift.of(temperatureK, curve.get().master());
        List<ResponseRow> rows = new ArrayList<>();
        for (ResponsePlan plan : plans) {
            try {
                rows.addAll(Prediction.of(plan, modes, shift));
            } catch (ReductionFault fault) {
                notes.add(fault.reason());
            }
        }
        return new LotResponses(rows, modes.relativeModes(temperatureK), notes);
    }
}

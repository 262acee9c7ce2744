package nightlag.stages;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.stream.Collectors;
import nightlag.stages.fault.Reason;
import nightlag.stages.fault.ReasonCode;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.response.Prediction;
import nightlag.stages.response.ResponsePlan;
import nightlag.stages.response.ResponseReason;
import nightlag.stages.response.ResponseRow;
import nightlag.stages.spectrum.RelativeMode;

/**
 * What is predicted of a lot from its discrete spectra.
 *
 * @param rows predictions, in the order they are asked for
 * @param prony the spectra for a simulation, temperatures rising
 * @param notes what could not be predicted, and why
 */
record LotResponses(List<ResponseRow> rows, List<RelativeMode> prony, List<Reason> notes) {
    private static final double SAME_TEMPERATURE_K = 0.5;
    private static final double KELVIN_AT_ZERO_CELSIUS = 273.15;

    /** Predicts all that is asked for. */
    static LotResponses of(List<ResponsePlan> plans, LotSpectrum spectrum) {
        List<Reason> notes = new ArrayList<>();
        List<ResponseRow> rows = new ArrayList<>();
        for (ResponsePlan plan : plans) {
            try {
                PublishedSpectrum source = source(plan, spectrum);
                rows.addAll(Prediction.of(plan, source.modes(), source.shift()));
            } catch (ReductionFault fault) {
                notes.add(fault.reason());
            }
        }
        return new LotResponses(
                rows,
                spectrum.discrete().stream()
                        .sorted(Comparator.comparingDouble(PublishedSpectrum::temperatureK))
                        .flatMap(one -> one.modes().relativeModes(one.temperatureK()).stream())
                        .toList(),
                notes);
    }

    /**
     * The spectrum a programme is predicted from. A programme without a temperature is at that of the lot; where it has some, the
     * first spectrum with data at all of them comes before one that only a law leads to.
     */
    private static PublishedSpectrum source(ResponsePlan plan, LotSpectrum spectrum) throws ReductionFault {
        List<PublishedSpectrum> all = spectrum.discrete();
        if (all.isEmpty()) {
            throw new ReductionFault(ResponseReason.RESPONSE_NO_SPECTRUM.with(plan.name()));
        }
        if (plan.temperaturesK().isEmpty()) {
            return ofTheLot(spectrum)
                    .orElseThrow(() -> new ReductionFault(ResponseReason.RESPONSE_SEVERAL_SPECTRA.with(
                            plan.name(),
                            all.stream()
                                    .map(one -> ReasonCode.shortest(one.temperatureK() - KELVIN_AT_ZERO_CELSIUS))
                                    .collect(Collectors.joining(", ")))));
        }
        return all.stream()
                .filter(one -> Prediction.isWithin(plan, one.shift()))
                .findFirst()
                .or(() -> all.stream()
                        .filter(one -> Prediction.refusal(plan, one.shift()).isEmpty())
                        .findFirst())
                .orElse(all.get(0));
    }

    private static Optional<PublishedSpectrum> ofTheLot(LotSpectrum spectrum) {
        List<PublishedSpectrum> all = spectrum.discrete();
        if (all.size() == 1) {
            return Optional.of(all.get(0));
        }
        return all.stream()
                .filter(one -> spectrum.referenceK().isPresent()
                        && Math.abs(one.temperatureK() - spectrum.referenceK().getAsDouble()) <= SAME_TEMPERATURE_K)
                .findFirst();
    }
}

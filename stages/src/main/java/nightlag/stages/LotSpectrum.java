package nightlag.stages;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalInt;
import java.util.stream.Stream;
import nightlag.stages.fault.Reason;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.moduli.Marker;
import nightlag.stages.response.TemperatureShift;
import nightlag.stages.spectrum.ContinuousFit;
import nightlag.stages.spectrum.DiscreteFit;
import nightlag.stages.spectrum.DiscreteSpectrum;
import nightlag.stages.spectrum.SpectrumPlan;
import nightlag.stages.spectrum.SpectrumRow;

/**
 * The discrete and, where wanted, the continuous spectra of a lot.
 *
 * @param discrete the discrete spectra, no two at one temperature: that of the lot's curve first, then those of creep at other
 *     temperatures, rising
 * @param referenceK the lot's own temperature, K: that of its curve, else its reference temperature; empty where it has none
 * @param continuous nodes of the continuous ones
 * @param notes why there is none, or what is unusual about it
 */
record LotSpectrum(
        List<PublishedSpectrum> discrete, OptionalDouble referenceK, List<SpectrumRow> continuous, List<Reason> notes) {
    /** No spectrum, because none was asked for, or there is nothing to fit it to. */
    static final LotSpectrum NONE = new LotSpectrum(List.of(), OptionalDouble.empty(), List.of(), List.of());

    /** Copies the lists. */
    LotSpectrum {
        discrete = List.copyOf(discrete);
        continuous = List.copyOf(continuous);
        notes = List.copyOf(notes);
    }

    /**
     * Fits the spectra of a lot.
     *
     * @param curve its moduli at one temperature, where there are any
     * @param creep its creep curves
     * @param referenceK its reference temperature, where it has one, K
     */
    static LotSpectrum of(
            Optional<LotCurve> curve, List<CreepCurve> creep, SpectrumPlan plan, OptionalDouble referenceK) {
        OfModuli moduli = curve.map(whole -> OfModuli.of(whole, plan))
                .orElseGet(() -> new OfModuli(Optional.empty(), Optional.empty(), List.of(), List.of(), List.of()));
        LotCreep ofCreep = LotCreep.of(creep, curve, moduli.free(), plan);
        List<PublishedSpectrum> discrete = new ArrayList<>();
        List<Reason> notes = new ArrayList<>();
        if (!ofCreep.replacesModuli()) {
            moduli.discrete()
                    .ifPresent(modes -> discrete.add(new PublishedSpectrum(
                            modes,
                            TemperatureShift.of(
                                    curve.orElseThrow().temperatureK(),
                                    curve.get().master()),
                            curve.get().isInDoubt())));
            notes.addAll(moduli.discreteNotes());
        }
        discrete.addAll(ofCreep.spectra());
        notes.addAll(moduli.continuousNotes());
        notes.addAll(ofCreep.notes());
        return new LotSpectrum(
                discrete,
                curve.isPresent() ? OptionalDouble.of(curve.get().temperatureK()) : referenceK,
                continuous(moduli.continuous(), ofCreep.continuous()),
                notes);
    }

    /** At a temperature of both, what was fitted to both takes the place of what was fitted to the moduli. */
    private static List<SpectrumRow> continuous(List<SpectrumRow> ofModuli, List<SpectrumRow> ofCreep) {
        double[] temperatures = ofCreep.stream()
                .mapToDouble(SpectrumRow::referenceTemperatureK)
                .distinct()
                .toArray();
        return Stream.concat(
                        ofModuli.stream()
                                .filter(row -> Arrays.stream(temperatures)
                                        .noneMatch(temperature -> temperature == row.referenceTemperatureK())),
                        ofCreep.stream())
                .toList();
    }

    /** What completes the discrete spectra, and what follows from them. */
    List<Marker> markers() {
        return discrete.stream().flatMap(one -> one.markers().stream()).toList();
    }

    /** Modes and nodes. */
    List<SpectrumRow> rows() {
        return Stream.concat(
                        discrete.stream().flatMap(one -> one.modes().rows(one.temperatureK()).stream()),
                        continuous.stream())
                .toList();
    }

    /**
     * What the moduli alone give.
     *
     * @param discrete modes
     * @param free as many modes as they carry, whatever number was asked for: it says how they scatter
     */
    private record OfModuli(
            Optional<DiscreteSpectrum> discrete,
            Optional<DiscreteSpectrum> free,
            List<Reason> discreteNotes,
            List<SpectrumRow> continuous,
            List<Reason> continuousNotes) {
        static OfModuli of(LotCurve curve, SpectrumPlan plan) {
            try {
                DiscreteSpectrum spectrum = DiscreteFit.fit(curve.readings(), curve.sharedErrors(), plan);
                // a fixed number of modes says nothing of how the readings scatter
                DiscreteSpectrum free = plan.modes().isEmpty()
                        ? spectrum
                        : DiscreteFit.fit(
                                curve.readings(),
                                curve.sharedErrors(),
                                new SpectrumPlan(plan.fitEquilibrium(), OptionalInt.empty(), true));
                List<SpectrumRow> rows = new ArrayList<>();
                List<Reason> notes = new ArrayList<>();
                if (plan.continuous()) {
                    addContinuous(curve, free, rows, notes);
                }
                return new OfModuli(Optional.of(spectrum), Optional.of(free), spectrum.notes(), rows, notes);
            } catch (ReductionFault fault) {
                return new OfModuli(Optional.empty(), Optional.empty(), List.of(fault.reason()), List.of(), List.of());
            }
        }

        private static void addContinuous(
                LotCurve curve, DiscreteSpectrum free, List<SpectrumRow> rows, List<Reason> notes) {
            try {
                rows.addAll(ContinuousFit.of(curve.readings(), free).rows(curve.temperatureK()));
            } catch (ReductionFault fault) {
                notes.add(fault.reason());
            }
        }
    }
}

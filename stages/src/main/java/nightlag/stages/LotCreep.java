package nightlag.stages;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.stream.Stream;
import nightlag.stages.fault.Reason;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.Quality;
import nightlag.stages.spectrum.CreepFit;
import nightlag.stages.spectrum.CreepSpectrum;
import nightlag.stages.spectrum.SpectrumPlan;
import nightlag.stages.spectrum.SpectrumRow;
import nightlag.stages.sweep.NaturalOrder;

/** The creep curves of a lot. */
final class LotCreep {
    private static final Comparator<CreepCurve> ORDER = Comparator.comparing(
                    (CreepCurve curve) -> curve.key().specimen(), NaturalOrder::compare)
            .thenComparing(curve -> curve.key().sweep(), NaturalOrder::compare)
            .thenComparing(curve -> curve.key().point(), NaturalOrder::compare)
            .thenComparing(curve -> curve.key().sourceFile(), NaturalOrder::compare);

    private static final double SAME_TEMPERATURE_K = 0.5;

    private LotCreep() {}

    /** All of them in an order of their own, whatever that of the reductions. */
    static List<CreepCurve> inOrder(List<Reduction> reductions) {
        return reductions.stream()
                .map(Reduction::creep)
                .flatMap(Optional::stream)
                .sorted(ORDER)
                .toList();
    }

    /**
     * The lot's spectrum with that of its creep curves: beside the one of the moduli at other temperatures, in its place where
     * one was fitted to both.
     */
    static LotSpectrum spectrum(
            List<CreepCurve> curves, Optional<LotCurve> moduli, SpectrumPlan plan, LotSpectrum ofModuli) {
        List<Fitted> fitted = spectra(curves, moduli, plan);
        boolean together = fitted.stream().anyMatch(Fitted::withModuli);
        return new LotSpectrum(
                ofModuli.discrete(),
                Stream.concat(
                                ofModuli.markers().stream().filter(marker -> !together),
                                fitted.stream().flatMap(one -> one.markers().stream()))
                        .toList(),
                Stream.concat(
                                ofModuli.rows().stream()
                                        .filter(row -> !together || row.form() != SpectrumRow.Form.DISCRETE),
                                fitted.stream().flatMap(one -> one.rows().stream()))
                        .toList(),
                Stream.concat(
                                ofModuli.notes().stream().filter(note -> !together),
                                fitted.stream().flatMap(one -> one.notes().stream()))
                        .toList());
    }

    /** The spectrum of the curves of one temperature, and whether the lot's moduli are in it. */
    private record Fitted(List<Marker> markers, List<SpectrumRow> rows, List<Reason> notes, boolean withModuli) {}

    /**
     * A spectrum for each temperature at which there are usable curves that begin at rest; at that of the lot's own curve of
     * moduli one spectrum is fitted to both.
     */
    private static List<Fitted> spectra(List<CreepCurve> curves, Optional<LotCurve> moduli, SpectrumPlan plan) {
        List<CreepCurve> left = new ArrayList<>(curves.stream()
                .filter(curve -> curve.quality() != Quality.UNUSABLE
                        && curve.fromRest()
                        && curve.temperatureK().isPresent())
                .sorted(Comparator.comparingDouble(curve -> curve.temperatureK().getAsDouble()))
                .toList());
        List<Fitted> fitted = new ArrayList<>();
        while (!left.isEmpty()) {
            CreepCurve first = left.get(0);
            double lowestK = first.temperatureK().getAsDouble();
            List<CreepCurve> group = left.stream()
                    .filter(curve -> curve.deformation() == first.deformation()
                            && curve.temperatureK().getAsDouble() - lowestK <= SAME_TEMPERATURE_K)
                    .toList();
            left.removeAll(group);
            fitted.add(fit(group, moduli, plan));
        }
        return fitted;
    }

    private static Fitted fit(List<CreepCurve> group, Optional<LotCurve> moduli, SpectrumPlan plan) {
        double meanK = group.stream()
                .mapToDouble(curve -> curve.temperatureK().getAsDouble())
                .average()
                .orElseThrow();
        Optional<LotCurve> beside = moduli.filter(curve -> Math.abs(curve.temperatureK() - meanK) <= SAME_TEMPERATURE_K
                && curve.deformation() == group.get(0).deformation()
                && curve.readings().stream()
                        .allMatch(reading -> reading.moduli().covariance().isPresent()));
        double temperatureK = beside.map(LotCurve::temperatureK).orElse(meanK);
        try {
            CreepSpectrum spectrum =
                    CreepFit.fit(group, beside.map(LotCurve::readings).orElse(List.of()), plan);
            return new Fitted(
                    spectrum.markers(temperatureK), spectrum.rows(temperatureK), spectrum.notes(), beside.isPresent());
        } catch (ReductionFault fault) {
            return new Fitted(List.of(), List.of(), List.of(fault.reason()), false);
        }
    }
}

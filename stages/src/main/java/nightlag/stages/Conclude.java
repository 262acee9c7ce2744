package nightlag.stages;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.Stream;
import nightlag.stages.fault.Reason;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.moduli.Findings;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.Quality;
import nightlag.stages.spectrum.SpectrumRow;
import nightlag.stages.superposition.MasterCurve;
import nightlag.stages.sweep.NaturalOrder;
import nightlag.stages.sweep.PointOrder;
import nightlag.stages.sweep.Sweeps;

/** All reductions of one lot to what is published about it. */
public final class Conclude {
    private static final Comparator<Marker> MARKER_ORDER = Comparator.comparing(Marker::specimen, NaturalOrder::compare)
            .thenComparing(Marker::sweep, NaturalOrder::compare)
            .thenComparing(Marker::property, NaturalOrder::compare)
            .thenComparingDouble(marker -> marker.temperatureK().orElse(Double.NEGATIVE_INFINITY))
            .thenComparingDouble(marker -> marker.frequencyHz().orElse(Double.NEGATIVE_INFINITY));

    private static final Comparator<SpectrumRow> ROW_ORDER = Comparator.comparingDouble(
                    SpectrumRow::referenceTemperatureK)
            .thenComparing(row -> row.kind().word())
            .thenComparing(row -> row.form().word())
            .thenComparingDouble(SpectrumRow::timeS);

    private Conclude() {}

    /**
     * Concludes one lot. The order of the reductions does not matter: points are put in table order before anything is
     * drawn from them. Unusable points are published with the others and kept out of all else.
     */
    public static LotResult conclude(List<Reduction> reductions, ConclusionPlan plan) {
        LotPoints lot = LotPoints.of(
                reductions.stream()
                        .flatMap(reduction -> reduction.points().stream())
                        .sorted(PointOrder.BY_KEY)
                        .toList(),
                plan.sweeps());
        Sweeps sweeps = Sweeps.of(lot.points(), lot.amplitudeSweeps(), plan.sweeps());
        List<Reason> notes = new ArrayList<>(lot.notes());
        notes.addAll(sweeps.notes());
        List<Reason> absent = new ArrayList<>(sweeps.apart());
        if (isCurveAsked(plan)) {
            absent.addAll(sweeps.isotherms().notes());
        }
        List<CreepCurve> creep = LotCreep.inOrder(reductions);
        boolean creepAlone = !creep.isEmpty() && sweeps.isotherms().isotherms().isEmpty();
        Optional<LotCurve> curve = creepAlone ? Optional.empty() : curve(sweeps, plan, notes);
        Optional<MasterCurve> master = curve.flatMap(LotCurve::master);
        LotSpectrum spectrum = plan.spectrum()
                .map(wanted -> LotSpectrum.of(curve, creep, wanted, referenceK(plan)))
                .orElse(LotSpectrum.NONE);
        notes.addAll(spectrum.notes());
        Findings markers = LotMarkers.of(sweeps.sweeps(), plan.sweeps(), curve);
        List<ModulusPoint> usable = lot.points().stream()
                .filter(point -> point.quality() != Quality.UNUSABLE)
                .toList();
        absent.addAll(markers.notes());
        LotFigures figures = LotFigures.of(usable, lot.amplitudeSweeps(), plan.ownFigures());
        notes.addAll(figures.findings().notes());
        LotResponses responses = LotResponses.of(plan.responses(), spectrum);
        notes.addAll(responses.notes());
        return LotResult.builder()
                .points(lot.points())
                .markers(Stream.of(
                                markers.markers(),
                                spectrum.markers(),
                                figures.findings().markers())
                        .flatMap(List::stream)
                        .sorted(MARKER_ORDER)
                        .toList())
                .shiftFactors(master.map(MasterCurve::shifts).orElse(List.of()))
                .masterCurve(master.map(MasterCurve::points).orElse(List.of()))
                .spectrum(spectrum.rows().stream().sorted(ROW_ORDER).toList())
                .notes(notes)
                .absent(absent)
                .derived(figures.rows())
                .sweeps(sweeps.sweeps())
                .responses(responses.rows())
                .prony(responses.prony())
                .creep(creep)
                .build();
    }

    private static OptionalDouble referenceK(ConclusionPlan plan) {
        return plan.superposition().isPresent()
                ? OptionalDouble.of(plan.superposition().get().referenceTemperatureK())
                : OptionalDouble.empty();
    }

    private static boolean isCurveAsked(ConclusionPlan plan) {
        return plan.superposition().isPresent() || plan.spectrum().isPresent();
    }

    /** The curve that a master curve or a spectrum is asked of; what there is to say of it goes into the notes. */
    private static Optional<LotCurve> curve(Sweeps sweeps, ConclusionPlan plan, List<Reason> notes) {
        if (!isCurveAsked(plan)) {
            return Optional.empty();
        }
        try {
            LotCurve curve = LotCurve.of(sweeps.isotherms(), plan.superposition());
            notes.addAll(curve.notes());
            return Optional.of(curve);
        } catch (ReductionFault fault) {
            notes.add(fault.reason());
            return Optional.empty();
        }
    }
}

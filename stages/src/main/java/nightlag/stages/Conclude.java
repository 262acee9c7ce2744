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
        List<CreepCurve> creep = LotCreep.inOrder(reductions);
        Drawn drawn = Drawn.of(lot, creep, plan);
        List<Reason> notes = new ArrayList<>(lot.notes());
        notes.addAll(drawn.notes());
        LotFigures figures = LotFigures.of(usable(lot), lot.amplitudeSweeps(), plan.ownFigures());
        notes.addAll(figures.findings().notes());
        LotResponses responses = LotResponses.of(plan.responses(), drawn.spectrum());
        notes.addAll(responses.notes());
        notes.addAll(LotNotes.taggedTemperatures(lot.points(), creep));
        List<Reason> absent = drawn.absent(plan);
        notes.addAll(absent.stream().filter(LotNotes::isDoubt).toList());
        Optional<MasterCurve> master = drawn.curve().flatMap(LotCurve::master);
        List<Marker> markers = inOrder(drawn, figures);
        return LotResult.builder()
                .points(lot.points())
                .markers(markers)
                .shiftFactors(master.map(MasterCurve::shifts).orElse(List.of()))
                .masterCurve(master.map(MasterCurve::points).orElse(List.of()))
                .spectrum(drawn.spectrum().rows().stream().sorted(ROW_ORDER).toList())
                .notes(notes)
                .absent(absent.stream()
                        .filter(reason -> !LotNotes.isDoubt(reason))
                        .toList())
                .derived(figures.rows())
                .sweeps(drawn.sweeps().sweeps())
                .responses(responses.rows())
                .prony(responses.prony())
                .creep(creep)
                .acceptance(LotAcceptance.of(lot, markers, plan, moved -> markers(moved, creep, plan)))
                .build();
    }

    /** The markers of a lot whose points were moved. What limits cannot be on is not asked for again. */
    private static List<Marker> markers(LotPoints moved, List<CreepCurve> creep, ConclusionPlan plan) {
        ConclusionPlan asked = plan.forMarkersAlone();
        return inOrder(
                Drawn.of(moved, creep, asked),
                LotFigures.of(usable(moved), moved.amplitudeSweeps(), asked.ownFigures()));
    }

    private static List<Marker> inOrder(Drawn drawn, LotFigures figures) {
        return Stream.of(
                        drawn.markers().markers(),
                        drawn.spectrum().markers(),
                        figures.findings().markers())
                .flatMap(List::stream)
                .sorted(MARKER_ORDER)
                .toList();
    }

    private static List<ModulusPoint> usable(LotPoints lot) {
        return lot.points().stream()
                .filter(point -> point.quality() != Quality.UNUSABLE)
                .toList();
    }

    /** What is drawn from the points of a lot: its sweeps, its curve, the spectrum of the curve, the figures of all of them. */
    private record Drawn(
            Sweeps sweeps, Optional<LotCurve> curve, LotSpectrum spectrum, Findings markers, List<Reason> notes) {
        static Drawn of(LotPoints lot, List<CreepCurve> creep, ConclusionPlan plan) {
            Sweeps sweeps = Sweeps.of(lot.points(), lot.amplitudeSweeps(), plan.sweeps());
            List<Reason> notes = new ArrayList<>(sweeps.notes());
            boolean creepAlone =
                    !creep.isEmpty() && sweeps.isotherms().isotherms().isEmpty();
            Optional<LotCurve> curve = creepAlone ? Optional.empty() : Conclude.curve(sweeps, plan, notes);
            LotSpectrum spectrum = plan.spectrum()
                    .map(wanted -> LotSpectrum.of(curve, creep, wanted, referenceK(plan)))
                    .orElse(LotSpectrum.NONE);
            spectrum.notes().stream()
                    .filter(note -> !LotNotes.isUnsupported(note))
                    .forEach(notes::add);
            return new Drawn(sweeps, curve, spectrum, LotMarkers.of(sweeps.sweeps(), plan.sweeps(), curve), notes);
        }

        /** What the data do not support, and what stands apart from a curve that is asked for. */
        List<Reason> absent(ConclusionPlan plan) {
            return Stream.of(
                            sweeps.apart(),
                            isCurveAsked(plan) ? sweeps.isotherms().notes() : List.<Reason>of(),
                            markers.notes(),
                            spectrum.notes().stream()
                                    .filter(LotNotes::isUnsupported)
                                    .toList())
                    .flatMap(List::stream)
                    .toList();
        }
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

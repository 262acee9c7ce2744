package nightlag.stages;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.Collectors;
import nightlag.stages.geometry.DeformationMode;
import nightlag.stages.moduli.Findings;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.moduli.SharedErrors;
import nightlag.stages.spectrum.KramersKronig;
import nightlag.stages.superposition.MasterCurve;
import nightlag.stages.superposition.ShiftFactor;
import nightlag.stages.sweep.FlowCurve;
import nightlag.stages.sweep.FrequencyMarkers;
import nightlag.stages.sweep.GelPoint;
import nightlag.stages.sweep.GlassTransition;
import nightlag.stages.sweep.Isotherm;
import nightlag.stages.sweep.MarkerPlace;
import nightlag.stages.sweep.Sweep;
import nightlag.stages.sweep.SweepMarkers;
import nightlag.stages.sweep.SweepName;
import nightlag.stages.sweep.SweepPlan;

/** The characteristic figures of a lot: of each sweep, of sweeps that belong together, and of the master curve. */
final class LotMarkers {
    private final List<Sweep> sweeps;
    private final List<Findings> found = new ArrayList<>();

    private LotMarkers(List<Sweep> sweeps) {
        this.sweeps = sweeps;
    }

    /**
     * Looks for them.
     *
     * @param sweeps the lot's sweeps
     * @param plan how points became sweeps
     * @param curve its curve, where one was asked for and could be had
     */
    static Findings of(List<Sweep> sweeps, SweepPlan plan, Optional<LotCurve> curve) {
        LotMarkers markers = new LotMarkers(sweeps);
        sweeps.forEach(sweep -> {
            markers.found.add(SweepMarkers.of(sweep));
            markers.found.add(KramersKronig.of(sweep));
        });
        markers.transitions(plan);
        markers.gelPoints();
        int ofSweeps = markers.found.size();
        // of one isotherm alone its own sweeps already say what the curve would
        Optional<LotCurve> shifted = curve.filter(LotMarkers::isShifted);
        shifted.ifPresentOrElse(markers::ofMasterCurve, markers::flowOfSweeps);
        curve.flatMap(LotCurve::master)
                .ifPresent(master -> markers.found.add(new Findings(master.markers(), List.of())));
        curve.filter(LotCurve::isInDoubt).ifPresent(any -> markers.doubtFrom(ofSweeps));
        return Findings.together(markers.found);
    }

    /** What was found on the master curve itself says that it does not superpose; the misfit says so already. */
    private void doubtFrom(int first) {
        found.subList(first, found.size())
                .replaceAll(some -> new Findings(
                        some.markers().stream()
                                .map(marker -> marker.property().equals("superposition_misfit")
                                        ? marker
                                        : marker.saying(MasterCurve.IN_DOUBT))
                                .toList(),
                        some.notes()));
    }

    private static boolean isShifted(LotCurve curve) {
        return curve.master()
                .map(MasterCurve::shifts)
                .filter(shifts -> shifts.stream().filter(ShiftFactor::used).count() > 1)
                .isPresent();
    }

    private void ofMasterCurve(LotCurve curve) {
        Findings onCurve = FrequencyMarkers.of(MarkerPlace.masterCurve(curve.temperatureK()), curve.readings());
        MasterCurve master = curve.master().orElseThrow();
        found.add(new Findings(
                onCurve.markers().stream()
                        .map(marker -> withShifts(marker, master))
                        .toList(),
                onCurve.notes()));
        flow(new SweepName("", ""), curve.temperatureK(), curve.deformation(), curve.readings(), curve.sharedErrors());
    }

    /**
     * With what is not known of the shifts in its u: the points of an isotherm err together by its shift, which their scatter
     * about a smooth curve does not show.
     */
    private static Marker withShifts(Marker marker, MasterCurve master) {
        if (marker.u().isEmpty()) {
            return marker;
        }
        double place = 2 * Math.PI * marker.frequencyHz().orElseThrow();
        double shift =
                marker.property().equals("crossover_angular_frequency") ? master.lnAU(place) : master.lnBU(place);
        return new Marker(
                marker.specimen(),
                marker.sweep(),
                marker.property(),
                marker.temperatureK(),
                marker.frequencyHz(),
                marker.value(),
                OptionalDouble.of(Math.hypot(marker.u().getAsDouble(), marker.value() * shift)),
                marker.unit(),
                marker.method());
    }

    private void flowOfSweeps() {
        for (Sweep sweep : sweeps) {
            if (sweep.kind() == SweepPlan.Kind.FREQUENCY && sweep.temperatureK().isPresent()) {
                double temperatureK = sweep.temperatureK().getAsDouble();
                flow(
                        sweep.name(),
                        temperatureK,
                        sweep.points().get(0).deformation(),
                        new Isotherm(temperatureK, sweep.points()).readings(),
                        SharedErrors.none());
            }
        }
    }

    /** A viscosity is of shear. */
    private void flow(
            SweepName name,
            double temperatureK,
            DeformationMode deformation,
            List<ModulusReading> readings,
            SharedErrors sharedErrors) {
        if (deformation == DeformationMode.SHEAR) {
            found.add(FlowCurve.of(name, temperatureK, readings, sharedErrors));
        }
    }

    /** The transitions of ramps, at each frequency and together. */
    private void transitions(SweepPlan plan) {
        together(SweepPlan.Kind.TEMPERATURE)
                .forEach((recorded, frequencies) -> found.add(recorded.told(GlassTransition.of(frequencies, plan))));
    }

    /** Where one specimen was followed at several frequencies. */
    private void gelPoints() {
        for (SweepPlan.Kind kind : List.of(SweepPlan.Kind.TIME, SweepPlan.Kind.TEMPERATURE)) {
            together(kind).forEach((recorded, frequencies) -> {
                if (frequencies.size() > 1) {
                    found.add(recorded.told(GelPoint.of(recorded.name(), frequencies, kind)));
                }
            });
        }
    }

    /** What was recorded at once at several frequencies: a sweep, or a leg of it. */
    private record Recorded(SweepName name, Optional<Sweep.Leg> leg) {
        /** The same figures, the leg named in their method. */
        Findings told(Findings findings) {
            return leg.map(own -> new Findings(
                            findings.markers().stream()
                                    .map(marker -> marker.withMethod(marker.method() + "; " + own.words()))
                                    .toList(),
                            findings.notes()))
                    .orElse(findings);
        }
    }

    /** The sweeps of one kind, those that were recorded as one together. */
    private Map<Recorded, List<Sweep>> together(SweepPlan.Kind kind) {
        return sweeps.stream()
                .filter(sweep -> sweep.kind() == kind)
                .collect(Collectors.groupingBy(
                        sweep -> new Recorded(sweep.name(), sweep.leg()), LinkedHashMap::new, Collectors.toList()));
    }
}

package nightlag.stages.sweep;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.OptionalDouble;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.Findings;
import nightlag.stages.moduli.Marker;
import nightlag.stages.sweep.ApparentActivation.Transition;
import nightlag.stages.sweep.TemperatureCurve.Figure;
import nightlag.stages.sweep.TransitionPeaks.Peak;

/**
 * Transition temperatures of temperature sweeps (ISO 6721-11, ASTM E1640): the onset of the fall of the storage modulus, the
 * peaks of the loss modulus, the peaks of tan δ; and over several frequencies the apparent activation energy of each.
 */
public final class GlassTransition {
    private static final double KELVIN_AT_ZERO_CELSIUS = 273.15;
    private static final String CELSIUS = "°C";

    private final Sweep sweep;
    private final SweepPlan.OnsetAxis axis;
    private final List<Marker> markers = new ArrayList<>();
    private final List<Reason> notes = new ArrayList<>();

    private GlassTransition(Sweep sweep, SweepPlan plan) {
        this.sweep = sweep;
        this.axis = plan.onsetAxis();
    }

    private enum Kind {
        ONSET("glass_transition_storage_onset", "storage onsets"),
        LOSS_PEAK("glass_transition_loss_peak", "loss peaks"),
        TAN_DELTA_PEAK("glass_transition_tan_delta_peak", "tan δ peaks");

        private final String property;
        private final String words;

        Kind(String property, String words) {
            this.property = property;
            this.words = words;
        }
    }

    /**
     * The transition temperatures of one sweep.
     *
     * @param sweep a temperature sweep at one frequency
     */
    public static Findings of(Sweep sweep, SweepPlan plan) {
        return new GlassTransition(sweep, plan).find();
    }

    /**
     * The transition temperatures of each sweep, and what they say together.
     *
     * @param sweeps temperature sweeps of one name, one a frequency, as a ramp of several frequencies gives them; of one sweep
     *     there is nothing to be said together
     */
    public static Findings of(List<Sweep> sweeps, SweepPlan plan) {
        List<Findings> each = sweeps.stream().map(sweep -> of(sweep, plan)).toList();
        List<Findings> all = new ArrayList<>(each);
        if (sweeps.size() > 1) {
            for (Kind kind : Kind.values()) {
                all.add(activation(sweeps.get(0).name(), each, kind));
            }
        }
        return Findings.together(all);
    }

    /**
     * Where every sweep has equally many peaks, the first, the second … belong together, each with an energy of its own; else
     * nothing tells which belongs to which.
     */
    private static Findings activation(SweepName name, List<Findings> each, Kind kind) {
        List<List<Marker>> found = each.stream()
                .map(findings -> findings.markers().stream()
                        .filter(marker -> marker.property().equals(kind.property))
                        .filter(marker -> marker.frequencyHz().isPresent())
                        .toList())
                .filter(markers -> !markers.isEmpty())
                .toList();
        if (found.isEmpty()) {
            return Findings.NONE;
        }
        int most = found.stream().mapToInt(List::size).max().orElseThrow();
        int fewest = found.stream().mapToInt(List::size).min().orElseThrow();
        List<Findings> energies = new ArrayList<>();
        for (int rank = 0; rank < (most == fewest ? most : 0); rank++) {
            int of = rank;
            energies.add(ApparentActivation.from(
                    name,
                    found.stream().map(markers -> transition(markers.get(of))).toList(),
                    kind.words));
        }
        if (most != fewest) {
            energies.add(Findings.absent(TransitionReason.TRANSITION_PEAKS_DIFFER.with(
                    name.specimen(), name.sweep(), kind.words, fewest, most)));
        }
        return Findings.together(energies);
    }

    private static Transition transition(Marker marker) {
        return new Transition(
                marker.frequencyHz().orElseThrow(), marker.value(), marker.u().orElseThrow());
    }

    private Findings find() {
        onset();
        peaks(Figure.LOSS, Kind.LOSS_PEAK);
        peaks(Figure.TAN_DELTA, Kind.TAN_DELTA_PEAK);
        return new Findings(markers, notes);
    }

    private void onset() {
        TemperatureCurve curve = TemperatureCurve.of(sweep.points(), Figure.STORAGE);
        if (curve.size() < TransitionPeaks.FEWEST) {
            note(TransitionReason.TRANSITION_TOO_FEW_POINTS, "storage onset", curve.size(), TransitionPeaks.FEWEST);
            return;
        }
        StorageOnset.Outcome outcome = new StorageOnset(curve, axis).find();
        if (outcome instanceof StorageOnset.Found found) {
            add(
                    Kind.ONSET,
                    found.temperatureK(),
                    found.u(),
                    String.format(
                            Locale.ROOT,
                            "%s axis: glassy line through %d temperatures from %.1f to %.1f °C meets the tangent at the steepest fall, %.1f °C%s",
                            axis == SweepPlan.OnsetAxis.LOG ? "logarithmic" : "linear",
                            found.line().size(),
                            celsius(found.line().first()),
                            celsius(found.line().last()),
                            celsius(found.steepestK()),
                            curve.sourceOfU()));
        } else if (outcome instanceof StorageOnset.FallsAtTheEdge edge) {
            note(TransitionReason.TRANSITION_FALL_AT_THE_EDGE, celsius(edge.temperatureK()));
        } else if (outcome instanceof StorageOnset.NoGlassyLine line) {
            note(
                    TransitionReason.TRANSITION_NO_GLASSY_LINE,
                    line.values(),
                    celsius(line.endK()),
                    StorageOnset.FEWEST_ON_THE_LINE);
        } else {
            note(TransitionReason.TRANSITION_NO_FALL, StorageOnset.STANDS_OUT);
        }
    }

    private void peaks(Figure figure, Kind kind) {
        String what = figure.words() + " peak";
        TemperatureCurve curve = TemperatureCurve.of(sweep.points(), figure);
        if (curve.size() < TransitionPeaks.FEWEST) {
            note(TransitionReason.TRANSITION_TOO_FEW_POINTS, what, curve.size(), TransitionPeaks.FEWEST);
            return;
        }
        List<Peak> peaks = new TransitionPeaks(curve).find();
        for (Peak peak : peaks) {
            if (peak.placed()) {
                add(
                        kind,
                        peak.temperatureK(),
                        peak.u(),
                        String.format(
                                Locale.ROOT,
                                "maximum of a smooth curve through the logarithm at %d temperatures from %.1f to %.1f °C%s",
                                peak.window().size(),
                                celsius(peak.window().first()),
                                celsius(peak.window().last()),
                                curve.sourceOfU()));
            } else {
                note(TransitionReason.TRANSITION_PEAK_TOO_FLAT, celsius(peak.temperatureK()));
            }
        }
        if (peaks.isEmpty()) {
            int highest = curve.highest();
            if (highest < TransitionPeaks.FROM_THE_END || highest >= curve.size() - TransitionPeaks.FROM_THE_END) {
                note(TransitionReason.TRANSITION_PEAK_AT_THE_EDGE, what, celsius(curve.temperatures()[highest]));
            } else {
                note(TransitionReason.TRANSITION_PEAK_NOT_CLEAR, what, TransitionPeaks.STANDS_OUT);
            }
        }
    }

    private void add(Kind kind, double temperatureK, double u, String method) {
        markers.add(new Marker(
                sweep.name().specimen(),
                sweep.name().sweep(),
                kind.property,
                OptionalDouble.of(temperatureK),
                sweep.frequencyHz(),
                temperatureK,
                OptionalDouble.of(u),
                CELSIUS,
                method));
    }

    private void note(TransitionReason reason, Object... parts) {
        List<Object> all = new ArrayList<>(List.of(sweep.name().specimen(), sweep.title()));
        all.add(sweep.frequencyHz().isPresent() ? (Object) sweep.frequencyHz().getAsDouble() : "?");
        all.addAll(List.of(parts));
        notes.add(reason.with(all.toArray()));
    }

    private static double celsius(double kelvin) {
        return kelvin - KELVIN_AT_ZERO_CELSIUS;
    }
}

package nightlag.stages.acceptance;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashSet;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import java.util.function.Function;
import java.util.function.Predicate;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.Quality;
import nightlag.stages.superposition.MasterCurve;
import nightlag.stages.sweep.FigureMarkerPlan;
import nightlag.stages.sweep.OwnFigures;
import nightlag.stages.sweep.SweepName;

/**
 * Values of limits on a marker. Of several, those at the place the limit names count, and of these one that is drawn from the
 * whole lot goes before those of single sweeps. What is then left of different sweeps at one place is averaged like points;
 * anything else (other places, several peaks of one sweep) stays apart.
 */
final class MarkerLimits {
    private static final Set<String> FOUND_ALONG_FREQUENCY = Set.of("crossover_angular_frequency", "crossover_modulus");

    private static final String CELSIUS = "°C";

    private final LimitPlan limit;
    private final Lot lot;
    private final List<Lot.Moved> moved;
    private final boolean temperatureFound;
    private final boolean frequencyFound;

    private MarkerLimits(LimitPlan limit, OwnFigures own, Lot lot, List<Lot.Moved> moved) {
        this.limit = limit;
        this.lot = lot;
        this.moved = moved;
        Optional<FigureMarkerPlan> plan = own.markers().stream()
                .filter(marker -> marker.name().equals(limit.property()))
                .findFirst();
        this.temperatureFound = plan.map(marker -> marker.along() == FigureMarkerPlan.Along.TEMPERATURE)
                .orElse(limit.unit().equals(CELSIUS));
        this.frequencyFound = plan.map(marker -> marker.along() == FigureMarkerPlan.Along.FREQUENCY)
                .orElse(FOUND_ALONG_FREQUENCY.contains(limit.property()));
    }

    /** Values, or why there is none. */
    record Outcome(List<Estimate> estimates, String missing) {}

    static Outcome of(LimitPlan limit, OwnFigures own, Lot lot, List<Lot.Moved> moved) {
        return new MarkerLimits(limit, own, lot, moved).outcome();
    }

    private Outcome outcome() {
        List<Marker> all = named(lot);
        if (all.isEmpty()) {
            return new Outcome(
                    List.of(),
                    AcceptanceReason.ACCEPTANCE_NO_MARKER.with(limit.property()).sentence());
        }
        List<Marker> there = all.stream().filter(this::isThere).toList();
        if (there.isEmpty()) {
            return new Outcome(
                    List.of(),
                    AcceptanceReason.ACCEPTANCE_MARKER_ELSEWHERE
                            .with(all.size(), limit.property())
                            .sentence());
        }
        List<Marker> ofLot =
                there.stream().filter(marker -> marker.specimen().isEmpty()).toList();
        List<Marker> counting = ofLot.isEmpty() ? there : ofLot;
        return new Outcome(
                areOfOnePlace(counting)
                        ? List.of(mean(counting))
                        : counting.stream().map(marker -> mean(List.of(marker))).toList(),
                "");
    }

    private List<Marker> named(Lot of) {
        return of.markers().get().stream()
                .filter(marker -> marker.property().equals(limit.property()) && Double.isFinite(marker.value()))
                .toList();
    }

    private boolean isThere(Marker marker) {
        return (limit.temperatureK().isEmpty() || near(marker.temperatureK(), limit.temperatureK(), LocalFigure.SAME_K))
                && (limit.frequencyHz().isEmpty()
                        || near(ln(marker.frequencyHz()), ln(limit.frequencyHz()), LocalFigure.SAME_LN_FREQUENCY));
    }

    /** One of a sweep, all at the temperature and frequency of the first, as far as these are not what was found. */
    private boolean areOfOnePlace(List<Marker> markers) {
        Marker first = markers.get(0);
        Set<SweepName> sweeps = new HashSet<>();
        return markers.stream()
                .allMatch(marker -> sweeps.add(new SweepName(marker.specimen(), marker.sweep()))
                        && (temperatureFound || alike(marker, first, Marker::temperatureK, LocalFigure.SAME_K))
                        && (frequencyFound
                                || alike(marker, first, one -> ln(one.frequencyHz()), LocalFigure.SAME_LN_FREQUENCY)));
    }

    private static boolean alike(Marker one, Marker other, Function<Marker, OptionalDouble> place, double within) {
        OptionalDouble here = place.apply(one);
        OptionalDouble there = place.apply(other);
        return (here.isEmpty() && there.isEmpty()) || near(here, there, within);
    }

    private static boolean near(OptionalDouble one, OptionalDouble other, double within) {
        return one.isPresent() && other.isPresent() && Math.abs(one.getAsDouble() - other.getAsDouble()) <= within;
    }

    private static OptionalDouble ln(OptionalDouble value) {
        return value.isPresent() ? OptionalDouble.of(Math.log(value.getAsDouble())) : value;
    }

    private Estimate mean(List<Marker> markers) {
        Pooled pooled = Pooled.of(
                markers.stream().mapToDouble(Marker::value).toArray(),
                markers.stream()
                        .mapToDouble(marker -> Node.square(marker.u().orElse(Double.NaN)))
                        .toArray());
        SharedPart shared = new SharedPart();
        for (Lot.Moved one : moved) {
            boolean held = one.kelvin().isPresent() && areHeldAtATemperature(markers);
            shared.add(
                    one.influence(),
                    held
                            ? effectOfTemperature(
                                    markers, pooled.mean(), one.kelvin().getAsDouble())
                            : effect(markers, pooled.weights(), one.lot()));
        }
        List<String> notes = new ArrayList<>();
        if (markers.size() > 1) {
            notes.add("mean of " + markers.size() + " sweeps");
        } else {
            where(markers.get(0)).ifPresent(notes::add);
        }
        doubtful(markers).ifPresent(notes::add);
        if (markers.stream().anyMatch(marker -> marker.method().endsWith(MasterCurve.IN_DOUBT))) {
            notes.add(MasterCurve.IN_DOUBT);
        }
        return shared.with(pooled.mean(), pooled.u(), notes);
    }

    /** Whether they are of single sweeps, each at one temperature: moved with it, such a sweep gives the same figure. */
    private boolean areHeldAtATemperature(List<Marker> markers) {
        return !temperatureFound
                && markers.stream()
                        .allMatch(marker -> !marker.specimen().isEmpty()
                                && marker.temperatureK().isPresent());
    }

    /** By the slope of the figure's logarithm between its neighbours at other temperatures; empty where it was found at no other. */
    private OptionalDouble effectOfTemperature(List<Marker> markers, double mean, double kelvin) {
        double here = markers.get(0).temperatureK().orElseThrow();
        List<Marker> others = named(lot).stream()
                .filter(marker ->
                        !marker.specimen().isEmpty() && marker.temperatureK().isPresent() && marker.value() / mean > 0)
                .filter(marker -> Math.abs(marker.temperatureK().getAsDouble() - here) > LocalFigure.SAME_K)
                .toList();
        Optional<Marker> below = nearest(others, here, -1);
        Optional<Marker> above = nearest(others, here, 1);
        if (below.isEmpty() && above.isEmpty()) {
            return OptionalDouble.empty();
        }
        double cold = below.map(marker -> marker.temperatureK().getAsDouble()).orElse(here);
        double hot = above.map(marker -> marker.temperatureK().getAsDouble()).orElse(here);
        double ratio =
                above.map(Marker::value).orElse(mean) / below.map(Marker::value).orElse(mean);
        return OptionalDouble.of(mean * Math.log(ratio) / (hot - cold) * kelvin);
    }

    private static Optional<Marker> nearest(List<Marker> markers, double kelvin, int side) {
        return markers.stream()
                .filter(marker -> side * (marker.temperatureK().getAsDouble() - kelvin) > 0)
                .min(Comparator.comparingDouble(
                        marker -> Math.abs(marker.temperatureK().getAsDouble() - kelvin)));
    }

    /** How much the mean moves; empty where one of the markers is no longer there. */
    private OptionalDouble effect(List<Marker> markers, double[] weights, Lot movedLot) {
        List<Marker> before = named(lot);
        List<Marker> after = named(movedLot);
        double effect = 0;
        for (int i = 0; i < markers.size(); i++) {
            Optional<Marker> there = counterpart(markers.get(i), before, after);
            if (there.isEmpty()) {
                return OptionalDouble.empty();
            }
            effect += weights[i] * (there.get().value() - markers.get(i).value());
        }
        return OptionalDouble.of(effect);
    }

    /** Of the same sweep the one at the same place of their order; where their number changed there is no telling. */
    private static Optional<Marker> counterpart(Marker marker, List<Marker> before, List<Marker> after) {
        Predicate<Marker> ofTheSame = other ->
                other.specimen().equals(marker.specimen()) && other.sweep().equals(marker.sweep());
        List<Marker> own = before.stream().filter(ofTheSame).toList();
        List<Marker> others = after.stream().filter(ofTheSame).toList();
        return own.size() == others.size() ? Optional.of(others.get(own.indexOf(marker))) : Optional.empty();
    }

    private Optional<String> where(Marker marker) {
        List<String> words = new ArrayList<>();
        if (!marker.specimen().isEmpty()) {
            words.add("specimen " + marker.specimen());
            words.add("sweep " + marker.sweep());
        }
        if (!temperatureFound) {
            marker.temperatureK().ifPresent(kelvin -> words.add("at " + LocalFigure.celsius(kelvin)));
        }
        return words.isEmpty() ? Optional.empty() : Optional.of(String.join(", ", words));
    }

    private Optional<String> doubtful(List<Marker> markers) {
        Predicate<ModulusPoint> behind = point -> point.quality() != Quality.UNUSABLE
                && markers.stream()
                        .anyMatch(marker -> marker.specimen().isEmpty()
                                || (marker.specimen().equals(point.key().specimen())
                                        && marker.sweep().equals(point.key().sweep())));
        List<ModulusPoint> points = lot.points().stream().filter(behind).toList();
        long doubtful = points.stream()
                .filter(point -> point.quality() == Quality.DOUBTFUL)
                .count();
        return doubtful == 0
                ? Optional.empty()
                : Optional.of("doubtful: " + doubtful + " of the " + points.size() + " points behind it");
    }
}

package nightlag.stages;

import java.util.ArrayList;
import java.util.Collections;
import java.util.HashMap;
import java.util.IdentityHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import java.util.TreeSet;
import java.util.function.Function;
import java.util.function.Supplier;
import java.util.function.UnaryOperator;
import nightlag.stages.acceptance.Acceptance;
import nightlag.stages.acceptance.Judgement;
import nightlag.stages.acceptance.Lot;
import nightlag.stages.geometry.Dimension;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.SharedEffect;
import nightlag.stages.moduli.SharedInfluences;

/** A lot against its limits, with what many records share in the uncertainty. */
final class LotAcceptance {
    private static final String TEMPERATURE = "temperature";
    private static final String LINEAR_LIMIT = "linear_strain_limit";

    private final LotPoints lot;
    private final List<Marker> markers;
    private final Function<LotPoints, List<Marker>> draw;

    private LotAcceptance(LotPoints lot, List<Marker> markers, Function<LotPoints, List<Marker>> draw) {
        this.lot = lot;
        this.markers = markers;
        this.draw = draw;
    }

    /**
     * Judges a lot.
     *
     * @param lot its points as published
     * @param markers its markers
     * @param draw the markers of a lot with other points; asked once for each influence, and only where a limit is on a marker
     */
    static List<Judgement> of(
            LotPoints lot, List<Marker> markers, ConclusionPlan plan, Function<LotPoints, List<Marker>> draw) {
        if (plan.limits().isEmpty()) {
            return List.of();
        }
        LotAcceptance acceptance = new LotAcceptance(lot, markers, draw);
        return Acceptance.of(
                plan.limits(),
                plan.ownFigures(),
                new Lot(acceptance.linear(lot.points(), UnaryOperator.identity()), () -> markers),
                acceptance.moved(plan.dimensionUncertainty()));
    }

    /** The lot as each influence would have it. */
    private List<Lot.Moved> moved(Map<Dimension, Double> dimensionUncertainty) {
        List<Lot.Moved> moved = new ArrayList<>();
        Set<String> signals = new TreeSet<>();
        shared().forEach(own -> signals.addAll(own.signals().keySet()));
        for (String signal : signals) {
            moved.add(off(signal, own -> Optional.ofNullable(own.signals().get(signal))));
        }
        dimensionUncertainty.entrySet().stream()
                .sorted(Map.Entry.comparingByKey())
                .filter(entry -> entry.getValue() > 0
                        && shared().stream().anyMatch(own -> own.dimensions().containsKey(entry.getKey())))
                .forEach(entry -> moved.add(off(
                        entry.getKey().word(),
                        own -> Optional.ofNullable(own.dimensions().get(entry.getKey()))
                                .map(effect -> effect.times(entry.getValue())))));
        OptionalDouble kelvin = shared().stream()
                .flatMapToDouble(own -> own.temperatureUK().stream())
                .filter(u -> u > 0)
                .max();
        if (kelvin.isPresent()) {
            moved.add(warmer(kelvin));
        }
        return moved;
    }

    private List<SharedInfluences> shared() {
        return lot.points().stream().flatMap(point -> point.shared().stream()).toList();
    }

    /** Every point by an effect on it. */
    private Lot.Moved off(String influence, Function<SharedInfluences, Optional<SharedEffect>> effect) {
        return moved(
                influence,
                OptionalDouble.empty(),
                point -> point.shared().flatMap(effect).map(point::moved).orElse(point));
    }

    /** Every point by the uncertainty of its own instrument. */
    private Lot.Moved warmer(OptionalDouble kelvin) {
        return moved(
                TEMPERATURE,
                kelvin,
                point -> point.shared().stream()
                        .flatMapToDouble(own -> own.temperatureUK().stream())
                        .mapToObj(point::warmer)
                        .findFirst()
                        .orElse(point));
    }

    private Lot.Moved moved(String influence, OptionalDouble kelvin, UnaryOperator<ModulusPoint> move) {
        return new Lot.Moved(influence, kelvin, new Lot(linear(lot.points(), move), once(() -> {
            IdentityHashMap<ModulusPoint, ModulusPoint> there = new IdentityHashMap<>();
            lot.points().forEach(point -> there.put(point, move.apply(point)));
            return draw.apply(new LotPoints(
                    lot.points().stream().map(there::get).toList(),
                    lot.amplitudeSweeps().stream()
                            .map(sweep -> sweep.stream().map(there::get).toList())
                            .toList(),
                    List.of()));
        })));
    }

    /** Asks a supplier when it is first asked, and never again. */
    private static Supplier<List<Marker>> once(Supplier<List<Marker>> supplier) {
        Map<Boolean, List<Marker>> kept = new HashMap<>();
        return () -> kept.computeIfAbsent(true, any -> supplier.get());
    }

    /** The points without those of amplitude sweeps that are beyond the linear range, each moved. */
    private List<ModulusPoint> linear(List<ModulusPoint> points, UnaryOperator<ModulusPoint> move) {
        Set<ModulusPoint> strained = Collections.newSetFromMap(new IdentityHashMap<>());
        lot.amplitudeSweeps().forEach(strained::addAll);
        return points.stream()
                .filter(point -> !strained.contains(point) || isLinear(point))
                .map(move)
                .toList();
    }

    /** Whether its strain is below every linear limit found in its sweep; where none was found nothing speaks against it. */
    private boolean isLinear(ModulusPoint point) {
        return markers.stream()
                .filter(marker -> marker.property().equals(LINEAR_LIMIT)
                        && marker.specimen().equals(point.key().specimen())
                        && marker.sweep().equals(point.key().sweep()))
                .noneMatch(marker -> point.strainAmplitude().orElse(0) > marker.value());
    }
}

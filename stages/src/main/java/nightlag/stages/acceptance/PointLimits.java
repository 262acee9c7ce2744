package nightlag.stages.acceptance;

import java.util.ArrayList;
import java.util.IdentityHashMap;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.Figure;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.Quality;
import nightlag.stages.sweep.Isotherm;
import nightlag.stages.sweep.Isotherms;

/** Values of limits on a figure of the points. */
final class PointLimits {
    private static final double KELVIN_AT_ZERO_CELSIUS = 273.15;

    private final LimitPlan limit;
    private final Figure figure;
    private final double offset;

    private PointLimits(LimitPlan limit, Figure figure) {
        this.limit = limit;
        this.figure = figure;
        this.offset = figure.unit().equals("°C") ? KELVIN_AT_ZERO_CELSIUS : 0;
    }

    /** A value, or why there is none. */
    record Outcome(Optional<Estimate> estimate, String missing) {
        static Outcome of(Estimate estimate) {
            return new Outcome(Optional.of(estimate), "");
        }

        static Outcome missing(Reason why) {
            return new Outcome(Optional.empty(), why.sentence());
        }
    }

    static Outcome of(LimitPlan limit, Figure figure, Lot lot, List<Lot.Moved> moved) {
        return new PointLimits(limit, figure).outcome(lot, moved);
    }

    private Outcome outcome(Lot lot, List<Lot.Moved> moved) {
        long unusableHere = lot.points().stream()
                .filter(point -> point.quality() == Quality.UNUSABLE && isHere(point))
                .count();
        boolean usableHere =
                lot.points().stream().anyMatch(point -> point.quality() != Quality.UNUSABLE && isHere(point));
        if (unusableHere > 0 && !usableHere) {
            return Outcome.missing(AcceptanceReason.ACCEPTANCE_ONLY_UNUSABLE.with(unusableHere));
        }
        Optional<LocalFigure.Found> found = found(lot);
        if (found.isEmpty()) {
            return Outcome.missing(AcceptanceReason.ACCEPTANCE_OUTSIDE_THE_POINTS.with(figure.name()));
        }
        SharedPart shared = new SharedPart();
        for (Lot.Moved one : moved) {
            if (one.kelvin().isPresent()) {
                shared.add(
                        one.influence(),
                        times(found.get().perKelvin(), one.kelvin().getAsDouble()));
            } else {
                Optional<LocalFigure.Found> there = found(one.lot());
                shared.add(
                        one.influence(),
                        there.isPresent()
                                ? OptionalDouble.of(
                                        there.get().value() - found.get().value())
                                : OptionalDouble.empty());
            }
        }
        return Outcome.of(shared.with(
                found.get().value() + offset, found.get().u(), found.get().notes()));
    }

    private static OptionalDouble times(OptionalDouble value, double factor) {
        return value.isPresent() ? OptionalDouble.of(value.getAsDouble() * factor) : value;
    }

    private boolean isHere(ModulusPoint point) {
        return point.temperatureK().isPresent()
                && point.frequencyHz().isPresent()
                && Math.abs(point.temperatureK().getAsDouble()
                                - limit.temperatureK().orElseThrow())
                        <= LocalFigure.SAME_K
                && Math.abs(Math.log(point.frequencyHz().getAsDouble()
                                / limit.frequencyHz().orElseThrow()))
                        <= LocalFigure.SAME_LN_FREQUENCY;
    }

    private Optional<LocalFigure.Found> found(Lot lot) {
        return LocalFigure.at(
                readings(lot.points()),
                limit.temperatureK().orElseThrow(),
                limit.frequencyHz().orElseThrow());
    }

    private List<Reading> readings(List<ModulusPoint> points) {
        List<ModulusPoint> placed = points.stream()
                .filter(point -> point.quality() != Quality.UNUSABLE
                        && point.temperatureK().isPresent()
                        && point.frequencyHz().isPresent())
                .toList();
        IdentityHashMap<ModulusPoint, Double> isotherms = new IdentityHashMap<>();
        for (Isotherm isotherm : Isotherms.group(placed)) {
            isotherm.points().forEach(point -> isotherms.put(point, isotherm.temperatureK()));
        }
        List<Reading> readings = new ArrayList<>();
        for (ModulusPoint point : placed) {
            figure.at(point)
                    .ifPresent(value -> readings.add(new Reading(
                            isotherms.get(point),
                            point.temperatureK().getAsDouble(),
                            Math.log(point.frequencyHz().getAsDouble()),
                            value.value(),
                            value.variance(point).orElse(Double.NaN),
                            point.quality() == Quality.DOUBTFUL)));
        }
        return readings;
    }
}

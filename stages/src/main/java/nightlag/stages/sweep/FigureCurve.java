package nightlag.stages.sweep;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.ToDoubleFunction;
import nightlag.stages.moduli.Figure;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.sweep.FigureMarkerPlan.Along;

/**
 * A figure of one specimen and sweep over frequency at one temperature, or over temperature at one frequency.
 *
 * @param name specimen and sweep
 * @param temperatureK the temperature of a curve over frequency, K
 * @param frequencyHz the frequency of a curve over temperature, Hz
 * @param leg which part of a ramp that turns; empty for all others
 * @param places where the figure is known, rising
 */
record FigureCurve(
        SweepName name,
        OptionalDouble temperatureK,
        OptionalDouble frequencyHz,
        Optional<Sweep.Leg> leg,
        List<Place> places) {
    private static final double SAME_FREQUENCY = 0.01;
    private static final Figure.Value NOTHING = new Figure.Value(0, 0, 0, 0);

    /**
     * One place on a curve and the figure there, the mean of all points at that place.
     *
     * @param at Hz or K, the mean of its points
     * @param points points that have a value
     * @param values their values
     */
    record Place(double at, List<ModulusPoint> points, List<Figure.Value> values) {
        double mean() {
            return values.stream().mapToDouble(Figure.Value::value).average().orElseThrow();
        }

        /** The mean of another figure here; empty where one of the points has none. */
        OptionalDouble mean(Figure other) {
            double sum = 0;
            for (ModulusPoint point : points) {
                var value = other.at(point);
                if (value.isEmpty()) {
                    return OptionalDouble.empty();
                }
                sum += value.get().value();
            }
            return OptionalDouble.of(sum / points.size());
        }

        /**
         * u² of a sum of the figure and another one here: the points' errors are independent of one another, and both figures
         * of one point hang on the same modulus. Zero where they hang on nothing that was measured; empty where they hang on
         * something without u.
         */
        OptionalDouble variance(double perFigure, Optional<Figure> other, double perOther) {
            double variance = 0;
            for (int i = 0; i < points.size(); i++) {
                Figure.Value sum = sum(i, perFigure, other, perOther);
                if (sum.byStorage() != 0 || sum.byLoss() != 0 || sum.byThird() != 0) {
                    OptionalDouble known = sum.variance(points.get(i));
                    if (known.isEmpty() || !Double.isFinite(known.getAsDouble())) {
                        return OptionalDouble.empty();
                    }
                    variance += known.getAsDouble();
                }
            }
            return OptionalDouble.of(variance / points.size() / points.size());
        }

        private Figure.Value sum(int i, double perFigure, Optional<Figure> other, double perOther) {
            Figure.Value own = values.get(i);
            Figure.Value added = perOther == 0
                    ? NOTHING
                    : other.flatMap(figure -> figure.at(points.get(i))).orElse(NOTHING);
            return new Figure.Value(
                    0,
                    perFigure * own.byStorage() + perOther * added.byStorage(),
                    perFigure * own.byLoss() + perOther * added.byLoss(),
                    perFigure * own.byThird() + perOther * added.byThird());
        }
    }

    /** The curves along which a plan looks, of usable points. */
    static List<FigureCurve> of(List<ModulusPoint> points, FigureMarkerPlan plan) {
        List<ModulusPoint> placed = points.stream()
                .filter(point -> point.frequencyHz().orElse(0) > 0)
                .filter(point ->
                        plan.along() == Along.FREQUENCY || point.temperatureK().isPresent())
                .toList();
        List<FigureCurve> curves = new ArrayList<>();
        SweepName.group(placed).forEach((name, sweep) -> {
            for (List<ModulusPoint> alike : byDeformation(sweep)) {
                curves.addAll(
                        plan.along() == Along.FREQUENCY
                                ? overFrequency(name, alike, plan)
                                : overTemperature(name, alike, plan));
            }
        });
        return curves.stream().filter(curve -> curve.places().size() > 1).toList();
    }

    private static List<List<ModulusPoint>> byDeformation(List<ModulusPoint> points) {
        return points.stream()
                .map(ModulusPoint::deformation)
                .distinct()
                .map(kind -> points.stream()
                        .filter(point -> point.deformation() == kind)
                        .toList())
                .toList();
    }

    /** One for each isotherm; points that nobody gave a temperature are taken to be at one. */
    private static List<FigureCurve> overFrequency(SweepName name, List<ModulusPoint> points, FigureMarkerPlan plan) {
        List<FigureCurve> curves = new ArrayList<>();
        for (Isotherm isotherm : Isotherms.group(points)) {
            double kelvin = isotherm.temperatureK();
            if (Math.abs(plan.temperatureK().orElse(kelvin) - kelvin) <= Isotherms.TOLERANCE_K) {
                curves.add(new FigureCurve(
                        name,
                        OptionalDouble.of(kelvin),
                        OptionalDouble.empty(),
                        Optional.empty(),
                        places(byFrequency(isotherm.points()), FigureCurve::frequency, plan.figure())));
            }
        }
        List<ModulusPoint> nowhere =
                points.stream().filter(point -> point.temperatureK().isEmpty()).toList();
        if (plan.temperatureK().isEmpty() && !nowhere.isEmpty()) {
            curves.add(new FigureCurve(
                    name,
                    OptionalDouble.empty(),
                    OptionalDouble.empty(),
                    Optional.empty(),
                    places(byFrequency(nowhere), FigureCurve::frequency, plan.figure())));
        }
        return curves;
    }

    /**
     * One for each frequency, and where the ramp turns for each of its legs; points within 0.5 K, such as those of one isotherm,
     * are one place at their mean.
     */
    private static List<FigureCurve> overTemperature(SweepName name, List<ModulusPoint> points, FigureMarkerPlan plan) {
        List<FigureCurve> curves = new ArrayList<>();
        for (List<ModulusPoint> alike : byFrequency(points)) {
            double hertz = mean(alike, FigureCurve::frequency);
            double wanted = plan.frequencyHz().orElse(hertz);
            if (Math.abs(hertz - wanted) <= SAME_FREQUENCY * wanted) {
                List<TemperatureLegs.Stretch> legs = TemperatureLegs.of(alike);
                for (int i = 0; i < legs.size(); i++) {
                    List<List<ModulusPoint>> near = grouped(
                            legs.get(i).points(), FigureCurve::temperature, first -> first + Isotherms.TOLERANCE_K);
                    curves.add(new FigureCurve(
                            name,
                            OptionalDouble.empty(),
                            OptionalDouble.of(hertz),
                            legs.size() == 1
                                    ? Optional.empty()
                                    : Optional.of(
                                            new Sweep.Leg(i + 1, legs.get(i).heating())),
                            places(near, FigureCurve::temperature, plan.figure())));
                }
            }
        }
        return curves;
    }

    private static List<List<ModulusPoint>> byFrequency(List<ModulusPoint> points) {
        return grouped(points, FigureCurve::frequency, first -> first * (1 + SAME_FREQUENCY));
    }

    /** Groups that begin with the smallest and reach as far as is said. */
    private static List<List<ModulusPoint>> grouped(
            List<ModulusPoint> points,
            ToDoubleFunction<ModulusPoint> of,
            java.util.function.DoubleUnaryOperator reach) {
        List<List<ModulusPoint>> groups = new ArrayList<>();
        double end = Double.NEGATIVE_INFINITY;
        for (ModulusPoint point :
                points.stream().sorted(Comparator.comparingDouble(of)).toList()) {
            if (of.applyAsDouble(point) > end) {
                groups.add(new ArrayList<>());
                end = reach.applyAsDouble(of.applyAsDouble(point));
            }
            groups.get(groups.size() - 1).add(point);
        }
        return groups;
    }

    private static List<Place> places(
            List<List<ModulusPoint>> groups, ToDoubleFunction<ModulusPoint> of, Figure figure) {
        List<Place> places = new ArrayList<>();
        for (List<ModulusPoint> group : groups) {
            List<ModulusPoint> known = new ArrayList<>();
            List<Figure.Value> values = new ArrayList<>();
            for (ModulusPoint point : group) {
                figure.at(point).ifPresent(value -> {
                    known.add(point);
                    values.add(value);
                });
            }
            if (!known.isEmpty()) {
                places.add(new Place(mean(known, of), known, values));
            }
        }
        return places;
    }

    private static double mean(List<ModulusPoint> points, ToDoubleFunction<ModulusPoint> of) {
        // summed as departures from one of them, so that equal numbers have exactly that mean
        double first = of.applyAsDouble(points.get(0));
        return first
                + points.stream()
                        .mapToDouble(point -> of.applyAsDouble(point) - first)
                        .average()
                        .orElseThrow();
    }

    private static double frequency(ModulusPoint point) {
        return point.frequencyHz().orElseThrow();
    }

    private static double temperature(ModulusPoint point) {
        return point.temperatureK().orElseThrow();
    }
}

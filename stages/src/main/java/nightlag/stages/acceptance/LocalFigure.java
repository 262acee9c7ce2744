package nightlag.stages.acceptance;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.TreeMap;
import java.util.stream.Collectors;
import nightlag.stages.acceptance.Node.Slope;
import nightlag.stages.fault.ReasonCode;

/**
 * A figure of the points at one temperature and frequency.
 *
 * <p>Points within 0.5 K and 1 % are moved there by the local slopes of ln X and averaged by weight; where there are none, ln X
 * is interpolated, over ln f within the isotherm at that temperature, else between the isotherms on either side; never
 * beyond them. What a move or a straight line between points leaves open is in u: of a slope, noise and half of what it
 * changes by over the place (taken as evenly spread between both ends); of a straight line, all of what a parabola would be
 * beside it.
 */
final class LocalFigure {
    /** Points this close are at one temperature, K. */
    static final double SAME_K = 0.5;
    /** ln of frequencies this close: 1 %. */
    static final double SAME_LN_FREQUENCY = Math.log1p(0.01);

    private static final double KELVIN_AT_ZERO_CELSIUS = 273.15;
    /** A place so near in temperature, K, or in ln f needs no slope. */
    private static final double NOTED_K = 0.05;

    private static final double NOTED_LN_FREQUENCY = 1e-3;

    private final List<Reading> readings;
    private final double temperatureK;
    private final double lnFrequency;

    private LocalFigure(List<Reading> readings, double temperatureK, double lnFrequency) {
        this.readings = readings;
        this.temperatureK = temperatureK;
        this.lnFrequency = lnFrequency;
    }

    /**
     * What was found.
     *
     * @param value the figure there
     * @param u its standard uncertainty from the points' own; empty where none can be had
     * @param perKelvin how much it changes with temperature; empty where that is not known
     * @param notes how it was had, a clause each
     */
    record Found(double value, OptionalDouble u, OptionalDouble perKelvin, List<String> notes) {}

    /** Empty where there is no point at that place, nor points on either side. */
    static Optional<Found> at(List<Reading> readings, double temperatureK, double frequencyHz) {
        double lnFrequency = Math.log(frequencyHz);
        List<Reading> told = CurveScatter.told(readings, temperatureK, lnFrequency);
        LocalFigure figure = new LocalFigure(told, temperatureK, lnFrequency);
        List<Reading> here = told.stream().filter(figure::isHere).toList();
        return here.isEmpty() ? figure.interpolated() : Optional.of(figure.mean(here));
    }

    private boolean isHere(Reading reading) {
        return Math.abs(reading.temperatureK() - temperatureK) <= SAME_K
                && Math.abs(reading.lnFrequency() - lnFrequency) <= SAME_LN_FREQUENCY;
    }

    private Found mean(List<Reading> here) {
        Scale scale = here.stream().allMatch(Scale.LOG::has) ? Scale.LOG : Scale.LINEAR;
        List<String> notes = new ArrayList<>();
        if (here.size() > 1) {
            notes.add("mean of " + here.size() + " points");
        }
        List<Reading> isotherm = readings.stream()
                .filter(reading -> Math.abs(reading.temperatureK() - temperatureK) <= SAME_K)
                .toList();
        Node atFrequency = Node.along(here, Reading::lnFrequency, Double.POSITIVE_INFINITY, scale)
                .get(0);
        Node atTemperature = Node.along(here, Reading::temperatureK, Double.POSITIVE_INFINITY, scale)
                .get(0);
        Optional<Slope> perLnFrequency = atFrequency.slope(
                Node.along(isotherm, Reading::lnFrequency, SAME_LN_FREQUENCY, scale), SAME_LN_FREQUENCY);
        double offLnFrequency = lnFrequency - atFrequency.x();
        // the other isotherms are at this frequency already
        Optional<Slope> perKelvin = atTemperature
                .raised(perLnFrequency.map(Slope::value).orElse(0.0) * offLnFrequency)
                .slope(otherIsotherms(here, scale), 0);
        double[] moved = here.stream()
                .mapToDouble(reading -> scale.of(reading)
                        + perLnFrequency.map(Slope::value).orElse(0.0) * (lnFrequency - reading.lnFrequency())
                        + perKelvin.map(Slope::value).orElse(0.0) * (temperatureK - reading.temperatureK()))
                .toArray();
        Pooled pooled =
                Pooled.of(moved, here.stream().mapToDouble(scale::variance).toArray());
        double offK = temperatureK - atTemperature.x();
        if (perKelvin.isEmpty() && Math.abs(offK) > NOTED_K) {
            notes.add(
                    "measured at " + celsius(atTemperature.x()) + " and not moved, as no other temperature tells how");
        }
        if (perLnFrequency.isEmpty() && Math.abs(offLnFrequency) > NOTED_LN_FREQUENCY) {
            notes.add("measured at " + hertz(atFrequency.x()) + " and not moved, as no other frequency tells how");
        }
        double ofMove = Math.hypot(
                perKelvin.map(Slope::u).orElse(0.0) * offK,
                perLnFrequency.map(Slope::u).orElse(0.0) * offLnFrequency);
        doubtful((int) here.stream().filter(Reading::doubtful).count(), here.size(), notes);
        return found(
                scale,
                pooled.mean(),
                pooled.u().isPresent() ? Node.square(pooled.u().getAsDouble()) + ofMove * ofMove : Double.NaN,
                perKelvin.map(slope -> OptionalDouble.of(slope.value())).orElseGet(OptionalDouble::empty),
                notes);
    }

    /** The figure at this frequency on the isotherms that none of these readings is on. */
    private List<Node> otherIsotherms(List<Reading> here, Scale scale) {
        List<Double> own = here.stream().map(Reading::isothermK).distinct().toList();
        return isotherms().entrySet().stream()
                .filter(isotherm -> !own.contains(isotherm.getKey()))
                .flatMap(isotherm -> level(isotherm.getKey(), isotherm.getValue(), scale).stream())
                .map(Level::node)
                .toList();
    }

    private Map<Double, List<Reading>> isotherms() {
        return readings.stream().collect(Collectors.groupingBy(Reading::isothermK, TreeMap::new, Collectors.toList()));
    }

    /** The figure at this frequency on an isotherm, over its temperature; with the line it comes from if it was interpolated. */
    private record Level(Node node, Optional<Chord> over) {}

    private Optional<Level> level(double isothermK, List<Reading> isotherm, Scale scale) {
        List<Node> nodes = Node.along(isotherm, Reading::lnFrequency, SAME_LN_FREQUENCY, scale);
        Optional<Node> at = nodes.stream()
                .filter(node -> Math.abs(node.x() - lnFrequency) <= SAME_LN_FREQUENCY)
                .min(Comparator.comparingDouble(node -> Math.abs(node.x() - lnFrequency)));
        if (at.isPresent()) {
            Node node = at.get();
            double off = lnFrequency - node.x();
            Slope slope = node.slope(nodes, SAME_LN_FREQUENCY).orElse(new Slope(0, 0));
            return Optional.of(new Level(
                    new Node(
                            isothermK,
                            node.y() + slope.value() * off,
                            node.variance() + Node.square(slope.u() * off),
                            node.points(),
                            node.doubtful()),
                    Optional.empty()));
        }
        return Chord.at(nodes, lnFrequency).map(chord -> new Level(over(isothermK, chord), Optional.of(chord)));
    }

    private static Node over(double x, Chord chord) {
        return new Node(
                x,
                chord.y(),
                chord.variance(),
                chord.from().points() + chord.to().points(),
                chord.from().doubtful() + chord.to().doubtful());
    }

    private Optional<Found> interpolated() {
        Optional<Found> log = interpolated(Scale.LOG);
        return log.isPresent() ? log : interpolated(Scale.LINEAR);
    }

    private Optional<Found> interpolated(Scale scale) {
        if (scale == Scale.LINEAR && readings.stream().allMatch(Scale.LOG::has)) {
            return Optional.empty();
        }
        List<Level> levels = new ArrayList<>();
        isotherms()
                .forEach((isothermK, isotherm) ->
                        level(isothermK, isotherm, scale).ifPresent(levels::add));
        List<Node> nodes = levels.stream().map(Level::node).toList();
        Optional<Level> own = levels.stream()
                .filter(level -> Math.abs(level.node().x() - temperatureK) <= SAME_K)
                .min(Comparator.comparingDouble(level -> Math.abs(level.node().x() - temperatureK)));
        if (own.isPresent()) {
            return Optional.of(withinIsotherm(own.get(), nodes, scale));
        }
        return Chord.at(nodes, temperatureK).map(chord -> betweenIsotherms(chord, levels, scale));
    }

    private Found withinIsotherm(Level level, List<Node> nodes, Scale scale) {
        List<String> notes = new ArrayList<>();
        level.over().ifPresent(chord -> {
            notes.add("interpolated over frequency between "
                    + hertz(chord.from().x()) + " and " + hertz(chord.to().x()));
            straight(chord, notes);
        });
        Node node = level.node();
        doubtful(node.doubtful(), node.points(), notes);
        Optional<Slope> perKelvin = node.slope(nodes, 0);
        double off = temperatureK - node.x();
        return found(
                scale,
                node.y() + perKelvin.map(Slope::value).orElse(0.0) * off,
                node.variance() + Node.square(perKelvin.map(Slope::u).orElse(0.0) * off),
                perKelvin.map(slope -> OptionalDouble.of(slope.value())).orElseGet(OptionalDouble::empty),
                notes);
    }

    private Found betweenIsotherms(Chord chord, List<Level> levels, Scale scale) {
        List<String> notes = new ArrayList<>();
        notes.add("interpolated between the isotherms at "
                + celsius(chord.from().x()) + " and " + celsius(chord.to().x()));
        straight(chord, notes);
        boolean alsoOverFrequency = levels.stream()
                .filter(level ->
                        level.node().equals(chord.from()) || level.node().equals(chord.to()))
                .anyMatch(level -> level.over().isPresent());
        if (alsoOverFrequency) {
            notes.add("and within them over frequency");
        }
        Node both = over(temperatureK, chord);
        doubtful(both.doubtful(), both.points(), notes);
        return found(scale, chord.y(), chord.variance(), OptionalDouble.of(chord.slope()), notes);
    }

    private static void straight(Chord chord, List<String> notes) {
        if (!chord.curvatureKnown()) {
            notes.add("what a straight line leaves open is not in u");
        }
    }

    private static void doubtful(int doubtful, int points, List<String> notes) {
        if (doubtful > 0) {
            notes.add("doubtful: " + doubtful + " of " + points + " points");
        }
    }

    private static Found found(Scale scale, double y, double variance, OptionalDouble perKelvin, List<String> notes) {
        double perScaled = scale.perScaled(y);
        return new Found(
                scale.value(y),
                Double.isNaN(variance) ? OptionalDouble.empty() : OptionalDouble.of(perScaled * Math.sqrt(variance)),
                perKelvin.isPresent() ? OptionalDouble.of(perScaled * perKelvin.getAsDouble()) : perKelvin,
                notes);
    }

    static String celsius(double kelvin) {
        return ReasonCode.shortest(kelvin - KELVIN_AT_ZERO_CELSIUS) + " °C";
    }

    private static String hertz(double lnFrequency) {
        return ReasonCode.shortest(Math.exp(lnFrequency)) + " Hz";
    }
}

package nightlag.stages.acceptance;

import java.util.Optional;
import java.util.OptionalDouble;

/** Limits for tests, built up from one on the storage modulus at 190 °C and 1 Hz. */
public record Limits(
        String property, OptionalDouble temperatureK, OptionalDouble frequencyHz, double min, double max, String unit) {
    public static final double ZERO_C = 273.15;

    /** On a figure of the points, with no bound yet. */
    public static Limits on(String property) {
        return new Limits(
                property,
                OptionalDouble.of(190 + ZERO_C),
                OptionalDouble.of(1),
                Double.NEGATIVE_INFINITY,
                Double.POSITIVE_INFINITY,
                "Pa");
    }

    /** On a marker, wherever it was found. */
    public static Limits onMarker(String property) {
        return new Limits(
                property,
                OptionalDouble.empty(),
                OptionalDouble.empty(),
                Double.NEGATIVE_INFINITY,
                Double.POSITIVE_INFINITY,
                "Pa");
    }

    public Limits at(double celsius, double hertz) {
        return new Limits(property, OptionalDouble.of(celsius + ZERO_C), OptionalDouble.of(hertz), min, max, unit);
    }

    public Limits atTemperature(double celsius) {
        return new Limits(property, OptionalDouble.of(celsius + ZERO_C), frequencyHz, min, max, unit);
    }

    public Limits from(double lowest) {
        return new Limits(property, temperatureK, frequencyHz, lowest, max, unit);
    }

    public Limits to(double highest) {
        return new Limits(property, temperatureK, frequencyHz, min, highest, unit);
    }

    public Limits in(String other) {
        return new Limits(property, temperatureK, frequencyHz, min, max, other);
    }

    /** With a guard band of so many u. */
    public LimitPlan guarded(double coverage) {
        return new LimitPlan(
                Optional.empty(),
                property,
                temperatureK,
                frequencyHz,
                "",
                finite(min),
                finite(max),
                unit,
                ShownUnit.plain(unit),
                coverage);
    }

    private static OptionalDouble finite(double bound) {
        return Double.isFinite(bound) ? OptionalDouble.of(bound) : OptionalDouble.empty();
    }
}

package nightlag.pipeline.config;

import java.util.Arrays;
import java.util.List;
import nightlag.stages.acceptance.ShownUnit;

/**
 * What a limit of one grade can be set on: what every grade has, and what this one defines for itself.
 *
 * @param word its name
 * @param kind the kind of its quantity
 * @param ofPoints whether it is a figure of every point, which needs a temperature and a frequency
 * @param unit the unit of a limit's values
 */
record LimitSubject(String word, QuantityKind kind, boolean ofPoints, String unit) {
    /** What every grade has. */
    static List<LimitSubject> known() {
        return Arrays.stream(LimitProperty.values())
                .map(property ->
                        new LimitSubject(property.word(), property.kind(), property.ofPoints(), property.unit()))
                .toList();
    }

    /** A figure of the grade's own. */
    static LimitSubject own(String name, OwnUnit unit, boolean ofPoints) {
        return new LimitSubject(name, unit.kind(), ofPoints, unit.symbol());
    }

    /** A limit in {@link #unit()}, but in K for a temperature. */
    double value(Quantity quantity) {
        return scale() * quantity.si();
    }

    /** The unit that a limit is written in. */
    ShownUnit shown(Quantity limit) {
        Unit unit = limit.unit();
        return new ShownUnit(unit.symbol(), scale() * unit.factor(), scale() * unit.offset());
    }

    /** What one of the SI unit is in {@link #unit()}: a frequency is read in Hz, an angle in rad. */
    private double scale() {
        return switch (unit) {
            case "rad/s" -> 2 * Math.PI;
            case "°" -> Math.toDegrees(1);
            default -> 1;
        };
    }
}

package nightlag.pipeline.config;

import java.util.Arrays;
import java.util.List;
import java.util.Optional;

/**
 * What a limit of one grade can be set on: what every grade has, and what this one defines for itself.
 *
 * @param word its name
 * @param kind the kind of its quantity
 * @param ofPoints whether it is a figure of every point, which needs a temperature and a frequency
 * @param unit the unit of a limit's values
 * @param own the unit of a grade's own figure, which decides how a limit is converted
 */
record LimitSubject(String word, QuantityKind kind, boolean ofPoints, String unit, Optional<OwnUnit> own) {
    /** What every grade has. */
    static List<LimitSubject> known() {
        return Arrays.stream(LimitProperty.values())
                .map(property -> new LimitSubject(
                        property.word(), property.kind(), property.ofPoints(), property.unit(), Optional.empty()))
                .toList();
    }

    /** A figure of the grade's own. */
    static LimitSubject own(String name, OwnUnit unit, boolean ofPoints) {
        return new LimitSubject(name, unit.kind(), ofPoints, unit.symbol(), Optional.of(unit));
    }

    /** A limit in {@link #unit()}, but in K for a temperature. */
    double value(Quantity quantity) {
        if (own.isPresent() && own.get() != OwnUnit.CELSIUS) {
            return own.get().number(quantity);
        }
        return kind == QuantityKind.FREQUENCY ? 2 * Math.PI * quantity.si() : quantity.si();
    }
}

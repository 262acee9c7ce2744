package nightlag.pipeline.config;

import java.util.Arrays;
import java.util.Optional;
import java.util.stream.Collectors;

/** A unit that a grade's own figure can be in: SI without prefix, and the °C and ° of the tables. */
enum OwnUnit {
    NUMBER("1", QuantityKind.RATIO),
    PASCAL("Pa", QuantityKind.STRESS),
    PASCAL_SECOND("Pa·s", QuantityKind.VISCOSITY),
    PER_PASCAL("1/Pa", QuantityKind.COMPLIANCE_OF_MATERIAL),
    SECOND("s", QuantityKind.TIME),
    HERTZ("Hz", QuantityKind.FREQUENCY),
    RADIAN_PER_SECOND("rad/s", QuantityKind.FREQUENCY),
    DEGREE("°", QuantityKind.ANGLE),
    CELSIUS("°C", QuantityKind.TEMPERATURE),
    KELVIN("K", QuantityKind.TEMPERATURE_DIFFERENCE);

    private static final double KELVIN_AT_ZERO_CELSIUS = 273.15;

    private final String symbol;
    private final QuantityKind kind;

    OwnUnit(String symbol, QuantityKind kind) {
        this.symbol = symbol;
        this.kind = kind;
    }

    static Optional<OwnUnit> of(String written) {
        String plain = written.strip().replace('*', '·').replace('.', '·');
        return Arrays.stream(values()).filter(unit -> unit.symbol.equals(plain)).findFirst();
    }

    static String all() {
        return Arrays.stream(values()).map(OwnUnit::symbol).collect(Collectors.joining(", "));
    }

    String symbol() {
        return symbol;
    }

    QuantityKind kind() {
        return kind;
    }

    /** A quantity of this kind as a number in this unit. */
    double number(Quantity quantity) {
        return switch (this) {
            case RADIAN_PER_SECOND -> 2 * Math.PI * quantity.si();
            case DEGREE -> Math.toDegrees(quantity.si());
            case CELSIUS -> quantity.si() - KELVIN_AT_ZERO_CELSIUS;
            default -> quantity.si();
        };
    }
}

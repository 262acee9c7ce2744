package nightlag.pipeline.config;

import java.math.BigDecimal;
import java.util.List;
import java.util.Optional;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/**
 * A number with its unit, as somebody wrote it.
 *
 * @param number the number
 * @param unit its unit
 */
public record Quantity(double number, Unit unit) {
    private static final Pattern NUMBER_THEN_UNIT =
            Pattern.compile("([+-]?(?:\\d++(?:[.]\\d*+)?|[.]\\d++)(?:[eE][+-]?\\d++)?)\\s*+(.*+)");

    /**
     * The value in SI; frequencies in Hz, temperatures in K. It is worked out in decimal and rounded once, so that
     * "10 µm" and "0.01 mm" are one and the same number.
     */
    public double si() {
        return Double.isFinite(number)
                ? BigDecimal.valueOf(number)
                        .multiply(BigDecimal.valueOf(unit.factor()))
                        .add(BigDecimal.valueOf(unit.offset()))
                        .doubleValue()
                : number;
    }

    /** Reads a quantity that must carry its unit, with a decimal point, such as {@code 0.5 mN·m}. */
    public static Parsed<Quantity> parse(String text, QuantityKind kind) {
        return parse(text, kind, '.', Optional.empty());
    }

    /**
     * Reads a quantity that may be a bare number.
     *
     * @param text the text
     * @param kind what it is to be
     * @param decimal the decimal sign, '.' or ','
     * @param bareUnit the unit of a bare number; empty: a bare number is refused
     */
    public static Parsed<Quantity> parse(String text, QuantityKind kind, char decimal, Optional<Unit> bareUnit) {
        // A minus sign proper (U+2212) comes out of word processors and some instruments.
        String written = text.strip().replace('−', '-');
        String pointed = decimal == ',' ? written.replace(',', '.') : written;
        Matcher matcher = NUMBER_THEN_UNIT.matcher(pointed);
        if (!matcher.matches()) {
            return new Parsed.Refused<>("\"" + Node.shown(text) + "\" does not begin with a number", example(kind));
        }
        if (decimal == ',' && written.substring(0, matcher.end(1)).indexOf('.') >= 0) {
            return new Parsed.Refused<>("\"" + Node.shown(text) + "\" holds a decimal point", "a decimal comma here");
        }
        double number = Double.parseDouble(matcher.group(1));
        String symbol = written.substring(matcher.start(2));
        if (symbol.startsWith(",")) {
            return new Parsed.Refused<>(
                    "\"" + Node.shown(text) + "\" holds a decimal comma", "a decimal point here: " + example(kind));
        }
        if (symbol.isEmpty() && bareUnit.isEmpty()) {
            return new Parsed.Refused<>("\"" + Node.shown(text) + "\" has no unit", example(kind));
        }
        Parsed<Unit> unit = symbol.isEmpty() ? new Parsed.Value<>(bareUnit.get()) : Units.parse(symbol, kind);
        return unit.then(known -> {
            Quantity quantity = new Quantity(number, known);
            return Double.isFinite(quantity.si())
                    ? new Parsed.Value<>(quantity)
                    : new Parsed.Refused<>("\"" + Node.shown(text) + "\" is too large a number", example(kind));
        });
    }

    /** Reads the sensitivity of a transducer of some kind, such as {@code 20 mN·m/V}. */
    static Parsed<Quantity> parseSensitivity(String text, QuantityKind kind) {
        Matcher matcher = NUMBER_THEN_UNIT.matcher(text.strip().replace('−', '-'));
        String allowed = "a number and " + kind.noun() + " over a voltage, such as \"20 " + kind.si() + "/V\"";
        if (!matcher.matches()) {
            return new Parsed.Refused<>("\"" + Node.shown(text) + "\" does not begin with a number", allowed);
        }
        double number = Double.parseDouble(matcher.group(1));
        return Units.parseSensitivity(matcher.group(2), kind).then(unit -> {
            Quantity quantity = new Quantity(number, unit);
            return Double.isFinite(quantity.si())
                    ? new Parsed.Value<>(quantity)
                    : new Parsed.Refused<>("\"" + Node.shown(text) + "\" is too large a number", allowed);
        });
    }

    /** A clause with an example of a quantity of some kind. */
    static String example(QuantityKind kind) {
        List<String> units = kind.examples();
        String usual = kind == QuantityKind.RATIO ? units.get(units.size() - 1) : units.get(0);
        return "a number with its unit, such as \"1 " + usual + "\"";
    }
}

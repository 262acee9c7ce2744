package nightlag.pipeline.config;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.Arrays;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/**
 * The one table of units. Every unit has a dimension, so a unit of the wrong kind is refused rather than converted.
 *
 * <p>The angle and the cycle are dimensions of their own: {@code Hz} is a cycle in a second and {@code rad/s} an angle in
 * a second, so neither can be mistaken for the other, nor for {@code 1/s}, which says neither and is refused where a
 * frequency is asked. Only there are both accepted, and rad/s divided by 2π. Factors are worked out in decimal, so that
 * "g/cm³" is 1000 kg/m³ exactly. A product, {@code ·}, {@code *} or {@code .}, may not follow a {@code /} without brackets.
 */
public final class Units {
    /** 34 significant digits of π; a factor is rounded to a double only once. */
    private static final BigDecimal PI = new BigDecimal("3.141592653589793238462643383279503");

    private static final int LONGEST = 40;
    private static final int LENGTH = 0;
    private static final int MASS = 1;
    private static final int TIME = 2;
    private static final int TEMPERATURE = 3;
    private static final int AMOUNT = 4;
    private static final int VOLT = 5;
    private static final int ANGLE = 6;
    private static final int CYCLE = 7;
    private static final int BASES = 8;

    private static final BigDecimal CELSIUS_ZERO = new BigDecimal("273.15");
    private static final List<String> CELSIUS = List.of("°C", "degC", "Cel");
    private static final Map<String, BigDecimal> PREFIXES = prefixes();

    /** Units that take prefixes, and units that stand as they are. */
    private static final Map<String, Measure> PREFIXED = prefixed();

    private static final Map<String, Measure> PLAIN = plain();

    private Units() {}

    /**
     * Reads a unit where a quantity of some kind is asked.
     *
     * @param symbol the unit as written; letters' case counts
     * @param kind what it is to be a unit of
     */
    public static Parsed<Unit> parse(String symbol, QuantityKind kind) {
        String written = normal(symbol);
        if (CELSIUS.contains(written) && kind == QuantityKind.TEMPERATURE) {
            return new Parsed.Value<>(new Unit(symbol.strip(), 1, CELSIUS_ZERO.doubleValue()));
        }
        if (CELSIUS.contains(written) && kind == QuantityKind.TEMPERATURE_DIFFERENCE) {
            return refused("'" + Node.shown(symbol.strip()) + "' is a reading of temperature, not a difference", kind);
        }
        Optional<Measure> measure = measure(written);
        if (measure.isEmpty()) {
            return refused(unknown(symbol.strip(), kind), kind);
        }
        Measure found = measure.get();
        if (kind == QuantityKind.FREQUENCY
                && found.sameAs(Measure.of(BigDecimal.ONE, ANGLE).over(second()))) {
            BigDecimal cycle = PI.add(PI);
            return new Parsed.Value<>(found.divided(cycle).unit(symbol.strip()));
        }
        if (kind == QuantityKind.FREQUENCY && found.sameAs(Measure.NUMBER.over(second()))) {
            return refused("'" + Node.shown(symbol.strip()) + "' could mean either Hz or rad/s", kind);
        }
        // N·m·s/rad and the like: rotary friction is a torque per angular speed, so an explicit radian is right there.
        Measure asked = dimensionOf(kind);
        boolean perRadian =
                kind == QuantityKind.FRICTION && found.sameAs(asked.over(Measure.of(BigDecimal.ONE, ANGLE)));
        if (!found.sameAs(asked) && !perRadian) {
            return refused(otherKind(symbol.strip(), found, kind), kind);
        }
        return new Parsed.Value<>(found.unit(symbol.strip()));
    }

    /**
     * Reads the unit of a transducer's sensitivity: a unit of some kind over a voltage, such as {@code mN·m/V}.
     *
     * @param symbol the unit as written
     * @param kind what the transducer measures
     */
    public static Parsed<Unit> parseSensitivity(String symbol, QuantityKind kind) {
        Measure asked = dimensionOf(kind).over(dimensionOf(QuantityKind.VOLTAGE));
        String allowed = kind.noun() + " over a voltage, such as " + kind.si() + "/V";
        Optional<Measure> found = measure(normal(symbol));
        if (found.isEmpty()) {
            return new Parsed.Refused<>("'" + Node.shown(symbol.strip()) + "' is not a unit known here", allowed);
        }
        if (!found.get().sameAs(asked)) {
            return new Parsed.Refused<>(
                    "'" + Node.shown(symbol.strip()) + "' is not " + kind.noun() + " over a voltage", allowed);
        }
        return new Parsed.Value<>(found.get().unit(symbol.strip()));
    }

    /** Whether a text is a unit of any kind. */
    public static boolean isUnit(String text) {
        String written = normal(text);
        return CELSIUS.contains(written) || measure(written).isPresent();
    }

    /** A clause that says what units a kind takes. */
    public static String allowed(QuantityKind kind) {
        List<String> examples = kind.examples();
        String last = examples.get(examples.size() - 1);
        String listed = examples.size() == 1
                ? last
                : String.join(", ", examples.subList(0, examples.size() - 1)) + " or " + last;
        return kind == QuantityKind.RATIO
                ? "no unit but " + listed
                : "a unit of " + kind.bareNoun() + ", such as " + listed;
    }

    private static Parsed<Unit> refused(String found, QuantityKind kind) {
        return new Parsed.Refused<>(found, allowed(kind));
    }

    private static String unknown(String symbol, QuantityKind kind) {
        String clause = symbol.isEmpty() ? "there is no unit" : "'" + Node.shown(symbol) + "' is not a unit known here";
        return kind.examples().stream()
                .filter(example -> normal(example).equalsIgnoreCase(normal(symbol)))
                .findFirst()
                .map(example -> clause + " (did you mean " + example + "? capitals count)")
                .orElse(clause);
    }

    private static String otherKind(String symbol, Measure found, QuantityKind asked) {
        return Arrays.stream(QuantityKind.values())
                .filter(kind -> found.sameAs(dimensionOf(kind)))
                .findFirst()
                .map(kind -> "'" + symbol + (kind == QuantityKind.RATIO ? "' makes " : "' is a unit of ")
                        + (kind == QuantityKind.RATIO ? kind.noun() : kind.bareNoun())
                        + ", where " + asked.noun() + " belongs")
                .orElse("'" + symbol + "' is no unit of " + asked.bareNoun());
    }

    private static Measure dimensionOf(QuantityKind kind) {
        return measure(normal(kind.si())).orElseThrow();
    }

    private static Measure second() {
        return Measure.of(BigDecimal.ONE, TIME);
    }

    /** One spelling for the characters that look alike. */
    private static String normal(String symbol) {
        return symbol.strip()
                .replace('μ', 'µ')
                .replace('⋅', '·')
                .replace('*', '·')
                .replace('.', '·')
                .replace('º', '°')
                .replace("℃", "°C")
                .replaceAll("\\s*([·/()])\\s*", "$1");
    }

    private static Optional<Measure> measure(String written) {
        if (written.isEmpty() || written.length() > LONGEST) {
            return Optional.empty();
        }
        Reader reader = new Reader(written);
        Optional<Measure> measure = reader.expression();
        return reader.atEnd() ? measure : Optional.empty();
    }

    private static Optional<Measure> symbol(String text) {
        if (PLAIN.containsKey(text)) {
            return Optional.of(PLAIN.get(text));
        }
        if (PREFIXED.containsKey(text)) {
            return Optional.of(PREFIXED.get(text));
        }
        if (text.length() > 1
                && PREFIXED.containsKey(text.substring(1))
                && PREFIXES.containsKey(text.substring(0, 1))) {
            return Optional.of(PREFIXED.get(text.substring(1)).times(PREFIXES.get(text.substring(0, 1))));
        }
        return Optional.empty();
    }

    private static Map<String, BigDecimal> prefixes() {
        Map<String, BigDecimal> prefixes = new HashMap<>();
        String[] names = {"f", "p", "n", "µ", "m", "k", "M", "G", "T"};
        int[] powers = {-15, -12, -9, -6, -3, 3, 6, 9, 12};
        for (int i = 0; i < names.length; i++) {
            prefixes.put(names[i], BigDecimal.ONE.scaleByPowerOfTen(powers[i]));
        }
        prefixes.put("u", prefixes.get("µ"));
        prefixes.put("c", new BigDecimal("0.01"));
        prefixes.put("d", new BigDecimal("0.1"));
        return Map.copyOf(prefixes);
    }

    private static Map<String, Measure> prefixed() {
        Measure metre = Measure.of(BigDecimal.ONE, LENGTH);
        Measure newton = Measure.of(BigDecimal.ONE, MASS).and(metre).over(second().power(2));
        return Map.ofEntries(
                Map.entry("m", metre),
                Map.entry("g", Measure.of(new BigDecimal("0.001"), MASS)),
                Map.entry("s", second()),
                Map.entry("K", Measure.of(BigDecimal.ONE, TEMPERATURE)),
                Map.entry("mol", Measure.of(BigDecimal.ONE, AMOUNT)),
                Map.entry("V", Measure.of(BigDecimal.ONE, VOLT)),
                Map.entry("rad", Measure.of(BigDecimal.ONE, ANGLE)),
                Map.entry("Hz", Measure.of(BigDecimal.ONE, CYCLE).over(second())),
                Map.entry("N", newton),
                Map.entry("J", newton.and(metre)),
                Map.entry("Nm", newton.and(metre)),
                Map.entry("Pa", newton.over(metre.power(2))),
                Map.entry("Pas", newton.over(metre.power(2)).and(second())),
                Map.entry("bar", newton.over(metre.power(2)).times(new BigDecimal("1e5"))));
    }

    private static Map<String, Measure> plain() {
        BigDecimal degree = PI.divide(BigDecimal.valueOf(180), MathContext.DECIMAL128);
        Measure newton = PREFIXED.get("N");
        // Standard gravity and the pound are exact by definition (CGPM 1901; international yard and pound, 1959).
        Measure gramForce = newton.times(new BigDecimal("0.00980665"));
        Measure poundForce = newton.times(new BigDecimal("4.4482216152605"));
        Measure inch = PREFIXED.get("m").times(new BigDecimal("0.0254"));
        return Map.ofEntries(
                Map.entry("1", Measure.NUMBER),
                Map.entry("%", Measure.NUMBER.times(new BigDecimal("0.01"))),
                Map.entry("min", second().times(BigDecimal.valueOf(60))),
                Map.entry("h", second().times(BigDecimal.valueOf(3600))),
                Map.entry("d", second().times(BigDecimal.valueOf(86_400))),
                Map.entry("a", second().times(BigDecimal.valueOf(31_557_600))),
                Map.entry("°", Measure.of(degree, ANGLE)),
                Map.entry("deg", Measure.of(degree, ANGLE)),
                Map.entry("in", inch),
                Map.entry("dyn", newton.times(new BigDecimal("1e-5"))),
                Map.entry("gf", gramForce),
                Map.entry("kgf", gramForce.times(BigDecimal.valueOf(1000))),
                Map.entry("lbf", poundForce),
                Map.entry("psi", poundForce.over(inch.power(2))));
    }

    /** A factor to SI and a power of each base. */
    private record Measure(BigDecimal factor, List<Integer> powers) {
        static final Measure NUMBER = new Measure(BigDecimal.ONE, List.of(0, 0, 0, 0, 0, 0, 0, 0));

        static Measure of(BigDecimal factor, int base) {
            Integer[] powers = new Integer[BASES];
            Arrays.fill(powers, 0);
            powers[base] = 1;
            return new Measure(factor, List.of(powers));
        }

        Measure and(Measure other) {
            return combine(other, 1);
        }

        Measure over(Measure other) {
            return combine(other, -1);
        }

        private Measure combine(Measure other, int sign) {
            Integer[] sum = new Integer[BASES];
            for (int i = 0; i < BASES; i++) {
                sum[i] = powers.get(i) + sign * other.powers.get(i);
            }
            BigDecimal product = sign > 0
                    ? factor.multiply(other.factor, MathContext.DECIMAL128)
                    : factor.divide(other.factor, MathContext.DECIMAL128);
            return new Measure(product, List.of(sum));
        }

        Measure power(int exponent) {
            Measure result = NUMBER;
            for (int i = 0; i < Math.abs(exponent); i++) {
                result = exponent > 0 ? result.and(this) : result.over(this);
            }
            return result;
        }

        Measure times(BigDecimal number) {
            return new Measure(factor.multiply(number, MathContext.DECIMAL128), powers);
        }

        Measure divided(BigDecimal number) {
            return new Measure(factor.divide(number, MathContext.DECIMAL128), powers);
        }

        boolean sameAs(Measure other) {
            return powers.equals(other.powers);
        }

        Unit unit(String symbol) {
            return new Unit(symbol, factor.doubleValue(), 0);
        }
    }

    /** Recursive descent over a normalised text; an empty answer is "not a unit". */
    private static final class Reader {
        private static final String SUPERSCRIPTS = "⁰¹²³⁴⁵⁶⁷⁸⁹";

        private final String text;
        private int at;

        Reader(String text) {
            this.text = text;
        }

        boolean atEnd() {
            return at == text.length();
        }

        private char peek() {
            return atEnd() ? '\0' : text.charAt(at);
        }

        Optional<Measure> expression() {
            Optional<Measure> result = term();
            boolean divided = false;
            while (result.isPresent() && (peek() == '·' || peek() == '/')) {
                boolean divide = text.charAt(at++) == '/';
                if (divided && !divide) {
                    return Optional.empty(); // a/b·c reads either way
                }
                divided |= divide;
                Measure left = result.get();
                result = term().map(right -> divide ? left.over(right) : left.and(right));
            }
            return result;
        }

        private Optional<Measure> term() {
            if (peek() == '(') {
                at++;
                Optional<Measure> inside = expression();
                if (peek() != ')') {
                    return Optional.empty();
                }
                at++;
                return inside.flatMap(this::raised);
            }
            if (peek() == '1') {
                at++;
                return Optional.of(Measure.NUMBER);
            }
            int start = at;
            while (Character.isLetter(peek()) || peek() == '°' || peek() == '%') {
                at++;
            }
            return symbol(text.substring(start, at)).flatMap(this::raised);
        }

        /** A power written as ², ^2, 2, ⁻², ^-2 or -2. */
        private Optional<Measure> raised(Measure base) {
            boolean caret = peek() == '^';
            if (caret) {
                at++;
            }
            boolean minus = peek() == '-' || peek() == '⁻' || peek() == '−';
            if (minus) {
                at++;
            }
            int digit = peek() >= '1' && peek() <= '9' ? peek() - '0' : SUPERSCRIPTS.indexOf(peek());
            if (digit < 1) {
                return caret || minus ? Optional.empty() : Optional.of(base);
            }
            at++;
            return Optional.of(base.power(minus ? -digit : digit));
        }
    }
}

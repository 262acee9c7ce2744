package nightlag.pipeline.decode;

import java.util.Locale;
import java.util.Optional;
import java.util.Set;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import nightlag.pipeline.config.QuantityKind;
import nightlag.pipeline.config.Unit;
import nightlag.pipeline.config.Units;

/** Numbers and quantities in the text of a raw file, and what to say of those that are none. */
final class Quantities {
    private static final Set<String> NOT_FINITE = Set.of("nan", "inf", "infinity", "1.#inf", "1.#qnan", "1.#ind");
    private static final Pattern NUMBER_THEN_UNIT = Pattern.compile("([-+−]?[0-9.,]++(?:[eE][-+−]?[0-9]++)?+)(.*+)");

    private Quantities() {}

    /**
     * The SI value of a quantity tag.
     *
     * @param text a number, or a number and its unit
     * @param unit the unit of a bare number
     */
    static double si(String text, QuantityKind kind, Optional<Unit> unit, char decimal, Spot spot)
            throws DecodeException {
        Matcher parts = NUMBER_THEN_UNIT.matcher(text);
        if (!parts.matches()) {
            throw notANumber(text, decimal, spot);
        }
        double number = Numerals.parse(parts.group(1), decimal);
        String written = Cells.trim(parts.group(2));
        if (!written.isEmpty()) {
            double si = finite(UnitText.required(written, kind, spot).toSi(number), text, decimal, spot);
            return possible(si, kind, text, spot);
        }
        Unit known =
                unit.orElseThrow(() -> spot.complaint(Complaints.shown(text) + " without a unit", Units.allowed(kind)));
        return possible(finite(known.toSi(number), text, decimal, spot), kind, text, spot);
    }

    /** A value that can be, of its kind: no temperature below absolute zero, no frequency that is not above zero. */
    static double possible(double si, QuantityKind kind, String text, Spot spot) throws DecodeException {
        if (kind == QuantityKind.TEMPERATURE && si < 0) {
            throw spot.complaint(
                    Complaints.shown(text) + ", which is below absolute zero", "a temperature above −273.15 °C");
        }
        if (kind == QuantityKind.FREQUENCY && si <= 0) {
            throw spot.complaint(Complaints.shown(text) + ", which is no frequency", "a frequency above 0");
        }
        return si;
    }

    /** A value that was read from a text, if it is one. */
    static double finite(double value, String text, char decimal, Spot spot) throws DecodeException {
        if (!Double.isFinite(value)) {
            throw notANumber(text, decimal, spot);
        }
        return value;
    }

    /** The complaint about a text that is no finite number. */
    static DecodeException notANumber(String text, char decimal, Spot spot) {
        if (saysNotFinite(text) || !Double.isNaN(Numerals.parse(text, decimal))) {
            return spot.complaint(Complaints.shown(text) + ", which is not finite", "a finite number");
        }
        return spot.complaint(
                Complaints.shown(text),
                "a number such as 1" + decimal + "5 (its decimal sign '" + decimal + "', no thousands separators)");
    }

    /** Whether a text is one of the usual ways to write a number that is not finite. */
    static boolean saysNotFinite(String text) {
        String word = text.toLowerCase(Locale.ROOT);
        return NOT_FINITE.contains(word.startsWith("-") || word.startsWith("+") ? word.substring(1) : word);
    }
}

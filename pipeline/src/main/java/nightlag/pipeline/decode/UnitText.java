package nightlag.pipeline.decode;

import java.util.Optional;
import nightlag.pipeline.config.Parsed;
import nightlag.pipeline.config.QuantityKind;
import nightlag.pipeline.config.Unit;
import nightlag.pipeline.config.Units;

/** Units as raw files write them: brackets round them are dropped, and a dash is the unit of a pure number. */
final class UnitText {
    private static final String BRACKETS = "()[]";

    private UnitText() {}

    /** The unit that a text must be. */
    static Unit required(String text, QuantityKind kind, Spot spot) throws DecodeException {
        Parsed<Unit> parsed = Units.parse(bare(text), kind);
        if (parsed instanceof Parsed.Refused<Unit> refused) {
            throw spot.complaint(refused.found(), refused.allowed());
        }
        return parsed.toOptional().orElseThrow();
    }

    /**
     * The unit that a cell beside a value is, if it is a unit at all.
     *
     * @throws DecodeException if it is a unit of something else
     */
    static Optional<Unit> beside(String text, QuantityKind kind, Spot spot) throws DecodeException {
        boolean isNumber = !Double.isNaN(Numerals.parse(text, '.')) || !Double.isNaN(Numerals.parse(text, ','));
        return isNumber || !Units.isUnit(bare(text)) ? Optional.empty() : Optional.of(required(text, kind, spot));
    }

    /** The text without brackets round it. */
    static String bare(String text) {
        String symbol = Cells.trim(text);
        for (int i = 0; i < BRACKETS.length(); i += 2) {
            if (symbol.length() >= 2
                    && symbol.charAt(0) == BRACKETS.charAt(i)
                    && symbol.charAt(symbol.length() - 1) == BRACKETS.charAt(i + 1)) {
                symbol = Cells.trim(symbol.substring(1, symbol.length() - 1));
            }
        }
        return symbol.equals("-") || symbol.equals("–") ? "1" : symbol;
    }
}

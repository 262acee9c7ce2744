package nightlag.stages.acceptance;

/**
 * A unit as a grade file writes a limit, and the way to it: value = factor · shown + offset.
 *
 * @param symbol as written; "1" for none
 * @param factor what one of it is in the unit of the limit's values
 * @param offset what its zero is in the unit of the limit's values
 */
public record ShownUnit(String symbol, double factor, double offset) {
    /** The unit that values are in anyway. */
    public static ShownUnit plain(String symbol) {
        return new ShownUnit(symbol, 1, 0);
    }

    /** A value of the limit in this unit. */
    public double of(double value) {
        return (value - offset) / factor;
    }

    /** An uncertainty of such a value in this unit. */
    public double ofU(double u) {
        return u / factor;
    }
}

package nightlag.pipeline.teamsheet;

/**
 * A cell of a sheet as it stands in its part.
 *
 * @param column its column, from 0
 * @param start where it begins in the part
 * @param end where what follows it begins
 * @param style its style; 0 is the default one
 * @param kind what it holds
 * @param value its text as it is shown, or its number as it is written; of a formula, what it last gave
 * @param formula its formula
 * @param resultStart where its value begins in the part; of a formula, this is what it last gave
 * @param resultEnd where what follows that begins; the same place where it has none
 */
record BookCell(
        int column,
        int start,
        int end,
        int style,
        Kind kind,
        String value,
        Formula formula,
        int resultStart,
        int resultEnd) {
    /** What a cell holds. */
    enum Kind {
        EMPTY,
        TEXT,
        NUMBER,
        /** A truth value, an error, a date in text. */
        OTHER
    }

    boolean hasFormula() {
        return formula.isThere();
    }

    boolean hasContent() {
        return kind != Kind.EMPTY || hasFormula();
    }
}

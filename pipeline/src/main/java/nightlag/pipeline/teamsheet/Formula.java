package nightlag.pipeline.teamsheet;

import java.util.Optional;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/**
 * A formula of somebody's.
 *
 * @param text the formula, as it reads in the cell it was written for
 * @param origin that cell: one that was filled down shares its formula
 * @param array the cells it fills together, of a formula that fills several
 */
record Formula(String text, CellReference origin, Optional<CellRange> array) {
    /** No formula. */
    static final Formula NONE = new Formula("", new CellReference(0, 0), Optional.empty());

    /** A cell's name, with or without a sign that says its row stays when the formula is filled down. */
    private static final Pattern CELL = Pattern.compile("(\\$?[A-Z]{1,3})(\\$?)([0-9]{1,7})");

    boolean isThere() {
        return !text.isEmpty();
    }

    /** Whether filling down this one gives the other. */
    boolean isSameAs(Formula other) {
        return origin.equals(other.origin) || relative().equals(other.relative());
    }

    /** The text with each row that moves as a distance from the formula's own. */
    private String relative() {
        Matcher cells = CELL.matcher(text);
        return cells.replaceAll(cell -> Matcher.quoteReplacement(
                cell.group(2).isEmpty()
                        ? cell.group(1) + "[" + (Integer.parseInt(cell.group(3)) - 1 - origin.row()) + "]"
                        : cell.group()));
    }
}

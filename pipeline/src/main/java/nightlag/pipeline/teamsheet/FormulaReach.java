package nightlag.pipeline.teamsheet;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/**
 * The cells that a formula looks at, as far as its text tells. Where it does not (a name, a column of a table, a function
 * that makes up an address), the formula may look at anything.
 *
 * @param blocks the blocks it looks at
 * @param anything whether it may look at anything
 */
record FormulaReach(List<Block> blocks, boolean anything) {
    private static final FormulaReach ANYTHING = new FormulaReach(List.of(), true);

    private static final String CELL = "\\$?[A-Z]{1,3}\\$?[0-9]{1,7}";
    private static final String COLUMNS = "\\$?[A-Z]{1,3}:\\$?[A-Z]{1,3}";
    private static final String ROWS = "\\$?[0-9]{1,7}:\\$?[0-9]{1,7}";

    /** A text, cells, a function, a number, a word, a sign: in this order, at the place that is being looked at. */
    private static final Pattern PIECE = Pattern.compile("\"[^\"]*\""
            + "|(?:(?<sheet>'(?:[^']|'')+'|[\\p{L}_][\\p{L}\\p{N}_.]*)!)?(?<cells>" + CELL + "(?::" + CELL + ")?|"
            + COLUMNS + "|"
            + ROWS + ")(?![\\p{L}\\p{N}_.(:!])"
            + "|(?<function>[\\p{L}_][\\p{L}\\p{N}_.]*)\\("
            + "|[0-9]*\\.?[0-9]+(?:E[+-]?[0-9]+)?(?![\\p{L}_(:!])"
            + "|(?:TRUE|FALSE)(?![\\p{L}\\p{N}_.(:!])"
            + "|[-+*/^&=<>(),;{}%\\s]");

    private static final Pattern END = Pattern.compile("(\\$?)([A-Z]*)(\\$?)([0-9]*)");

    /** Copies the list. */
    FormulaReach {
        blocks = List.copyOf(blocks);
    }

    /**
     * A block of cells of a sheet.
     *
     * @param sheet the sheet's name in small letters; empty for the formula's own
     * @param from one corner
     * @param to the other
     */
    record Block(String sheet, Corner from, Corner to) {}

    /**
     * A corner of a block; a number is negative where a block of whole rows or columns has none.
     *
     * @param row its row
     * @param rowStays whether it stays when the formula is filled down
     * @param column its column
     * @param columnStays whether it stays when the formula is filled to the right
     */
    record Corner(int row, boolean rowStays, int column, boolean columnStays) {
        int rowAt(int down, int otherwise) {
            return row < 0 ? otherwise : rowStays ? row : row + down;
        }

        int columnAt(int right, int otherwise) {
            return column < 0 ? otherwise : columnStays ? column : column + right;
        }
    }

    static FormulaReach of(String formula) {
        List<Block> blocks = new ArrayList<>();
        Matcher piece = PIECE.matcher(formula);
        piece.useTransparentBounds(true);
        for (int at = 0; at < formula.length(); at = piece.end()) {
            piece.region(at, formula.length());
            if (!piece.lookingAt() || makesAddresses(piece.group("function"))) {
                return ANYTHING;
            }
            if (piece.group("cells") != null) {
                blocks.add(block(Optional.ofNullable(piece.group("sheet")), piece.group("cells")));
            }
        }
        return new FormulaReach(blocks, false);
    }

    private static boolean makesAddresses(String function) {
        return "INDIRECT".equals(function) || "OFFSET".equals(function);
    }

    private static Block block(Optional<String> sheet, String cells) {
        int colon = cells.indexOf(':');
        String name = sheet.map(text -> text.startsWith("'")
                        ? text.substring(1, text.length() - 1).replace("''", "'")
                        : text)
                .orElse("");
        return new Block(
                name.toLowerCase(Locale.ROOT),
                corner(colon < 0 ? cells : cells.substring(0, colon)),
                corner(cells.substring(colon + 1)));
    }

    private static Corner corner(String text) {
        Matcher parts = END.matcher(text);
        if (!parts.matches()) {
            throw new IllegalStateException("no corner of a block: " + text);
        }
        int column = CellReference.columnOf(parts.group(2));
        int row = parts.group(4).isEmpty() ? 0 : Integer.parseInt(parts.group(4));
        // of a block of whole rows, as in $2:$3, the first sign belongs to the row
        boolean rowStays =
                !parts.group(3).isEmpty() || (column < 0 && !parts.group(1).isEmpty());
        return new Corner(row - 1, rowStays, column, !parts.group(1).isEmpty());
    }
}

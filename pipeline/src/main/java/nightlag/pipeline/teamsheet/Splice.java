package nightlag.pipeline.teamsheet;

import java.util.Map;
import java.util.TreeMap;

/** A text with pieces of it replaced; all else comes out as it stands. */
final class Splice {
    private final String text;
    private final TreeMap<Integer, Piece> pieces = new TreeMap<>();

    Splice(String text) {
        this.text = text;
    }

    private record Piece(int end, String replacement) {}

    /** Puts a text in the place of another, behind what is inserted in front of it; pieces must not overlap. */
    void replace(int start, int end, String replacement) {
        pieces.merge(start, new Piece(end, replacement), Splice::join);
    }

    private static Piece join(Piece before, Piece piece) {
        return new Piece(Math.max(before.end(), piece.end()), before.replacement() + piece.replacement());
    }

    /** Puts a text in front of a place, behind what was inserted there before. */
    void insert(int place, String piece) {
        replace(place, place, piece);
    }

    String text() {
        StringBuilder whole = new StringBuilder(text.length() + 1024);
        int at = 0;
        for (Map.Entry<Integer, Piece> piece : pieces.entrySet()) {
            whole.append(text, at, piece.getKey()).append(piece.getValue().replacement());
            at = piece.getValue().end();
        }
        return whole.append(text, at, text.length()).toString();
    }
}

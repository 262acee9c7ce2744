package nightlag.pipeline.teamsheet;

import java.util.List;
import java.util.Optional;

/**
 * A row of a sheet as it stands in its part.
 *
 * @param number its number, from 0
 * @param start where it begins in the part
 * @param tagEnd where what follows its start tag begins
 * @param close where its end tag begins; the end of the start tag where that closes itself
 * @param end where what follows it begins
 * @param cells its cells from left to right
 */
record BookRow(int number, int start, int tagEnd, int close, int end, List<BookCell> cells) {
    boolean selfClosed() {
        return tagEnd == end;
    }

    Optional<BookCell> cell(int column) {
        int low = 0;
        int high = cells.size() - 1;
        while (low <= high) {
            int middle = (low + high) >>> 1;
            int order = Integer.compare(cells.get(middle).column(), column);
            if (order == 0) {
                return Optional.of(cells.get(middle));
            }
            low = order < 0 ? middle + 1 : low;
            high = order < 0 ? high : middle - 1;
        }
        return Optional.empty();
    }

    /** Columns up to the last that holds anything. */
    int width() {
        int last = cells.size() - 1;
        while (last >= 0 && !cells.get(last).hasContent()) {
            last--;
        }
        return last < 0 ? 0 : cells.get(last).column() + 1;
    }
}

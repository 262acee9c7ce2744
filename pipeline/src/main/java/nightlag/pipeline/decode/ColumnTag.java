package nightlag.pipeline.decode;

import java.util.Map;
import java.util.Optional;
import nightlag.pipeline.config.ColumnRef;
import nightlag.pipeline.config.TagName;
import nightlag.pipeline.config.Unit;

/**
 * A fact that stands in a column of the data.
 *
 * @param tag the fact
 * @param column the column
 * @param index position of its cell from 0
 * @param unit unit of a bare number
 * @param decimal decimal sign
 * @param complaints the file's
 */
record ColumnTag(TagName tag, ColumnRef column, int index, Optional<Unit> unit, char decimal, Complaints complaints) {
    /** Its value in a row; empty if the cell is. */
    Optional<TagValue> read(Cells cells, int line) throws DecodeException {
        return cells.empty(index)
                ? Optional.empty()
                : TagReader.value(tag, cells.text(index), unit, decimal, spot(line), column.toString());
    }

    /**
     * Takes its value in a row into the facts of a record, where it must not change. An empty cell says nothing.
     *
     * @param values the record's facts so far
     */
    void takeInto(Map<TagName, TagValue> values, Cells cells, int line) throws DecodeException {
        TagValue before = values.get(tag);
        if (cells.empty(index) || (before != null && cells.holds(index, before.text()))) {
            return;
        }
        TagValue now = read(cells, line).orElseThrow();
        if (before == null) {
            values.put(tag, now);
        } else if (now.si().isEmpty() || !now.si().equals(before.si())) {
            throw spot(line)
                    .complaint(
                            Complaints.shown(now.text()) + " after " + Complaints.shown(before.text()),
                            "one value of the tag " + tag.word() + " throughout a record");
        }
    }

    /** This column on a line. */
    Spot spot(int line) {
        return new Spot(complaints, line, column.toString());
    }
}

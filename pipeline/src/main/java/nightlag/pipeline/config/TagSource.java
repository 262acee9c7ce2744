package nightlag.pipeline.config;

import java.util.Optional;

/** Where a fact about a record comes from. A unit is there where the fact is a quantity and the source is a bare number. */
public sealed interface TagSource {
    /** The unit of a bare number. */
    Optional<Unit> unit();

    /**
     * A line above the header, {@code label<: or = or delimiter>value}; a further cell that is a unit is the value's unit.
     *
     * @param label text before the mark, trimmed
     * @param unit unit of a bare number
     */
    record Preamble(String label, Optional<Unit> unit) implements TagSource {}

    /**
     * A named group of {@code path_pattern}.
     *
     * @param group the group
     * @param unit unit of a bare number
     */
    record PathGroup(String group, Optional<Unit> unit) implements TagSource {}

    /**
     * The same for every file.
     *
     * @param value the value; for a quantity a bare number in {@code unit}, with a decimal point
     * @param unit unit of the number
     */
    record Fixed(String value, Optional<Unit> unit) implements TagSource {}

    /**
     * A column of the data, which must not change within a record.
     *
     * @param column the column
     * @param unit unit of a bare number
     */
    record DataColumn(ColumnRef column, Optional<Unit> unit) implements TagSource {}

    /**
     * A column of the run sheet.
     *
     * @param column its header
     * @param unit unit of a bare number
     */
    record RunSheet(String column, Optional<Unit> unit) implements TagSource {}
}

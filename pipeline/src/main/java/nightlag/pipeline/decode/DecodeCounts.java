package nightlag.pipeline.decode;

/**
 * Where the rows of a file went; {@code rows == used + leftOut}, asserted.
 *
 * @param rows data rows in the file
 * @param used rows that entered a record
 * @param leftOut rows with an empty cell in a needed column, and rows of a long record that enter no window
 * @param outsideWindows the latter among them
 * @param records records handed over
 */
public record DecodeCounts(long rows, long used, long leftOut, long outsideWindows, int records) {
    /** Without rows outside windows. */
    public DecodeCounts(long rows, long used, long leftOut, int records) {
        this(rows, used, leftOut, 0, records);
    }
}

package nightlag.pipeline.decode;

import nightlag.stages.MeasuredRecord;

/** Hands records over and counts where their rows went. */
final class Tally {
    private final RecordSink sink;
    private final Complaints complaints;
    private long used;
    private long leftOut;
    private long outsideWindows;
    private int records;

    Tally(RecordSink sink, Complaints complaints) {
        this.sink = sink;
        this.complaints = complaints;
    }

    /** Hands over a record made of some rows. */
    void handOver(MeasuredRecord record, int rowsUsed) throws DecodeException {
        if (records == Bounds.RECORDS) {
            throw complaints.at(0, "", "more than " + Bounds.RECORDS + " records in one file", "fewer in a file");
        }
        sink.accept(record);
        used += rowsUsed;
        records++;
    }

    /** Counts a row with an empty cell, which enters no record. */
    void leaveOut() {
        leftOut++;
    }

    /** Counts a complete row of a long record that enters no window. */
    void leaveOutsideWindows() {
        leftOut++;
        outsideWindows++;
    }

    /**
     * The counts of a file that has been read to its end.
     *
     * @throws IllegalStateException if a row went nowhere, which no input may bring about
     */
    DecodeCounts counts(long rows) {
        if (rows != used + leftOut) {
            throw new IllegalStateException(
                    complaints.file() + ": of " + rows + " rows " + used + " were used and " + leftOut + " left out");
        }
        return new DecodeCounts(rows, used, leftOut, outsideWindows, records);
    }
}

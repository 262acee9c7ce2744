package nightlag.pipeline.decode;

import java.io.IOException;
import java.util.EnumMap;
import java.util.Map;
import java.util.Optional;
import nightlag.pipeline.config.TagName;
import nightlag.pipeline.intake.RawFile;

/** Reads a raw file as its instrument file says. */
public final class RawFileDecoder {
    /** The specimen of a record that names none. */
    public static final String FIRST_SPECIMEN = RecordFacts.FIRST;

    private RawFileDecoder() {}

    /**
     * Decodes one file and hands over its records one at a time; never holds more than one. Values are in SI by the unit,
     * zero, sign and sensitivity of each channel; delays are left to the corrections.
     *
     * <p>Every row is used, left out (an empty cell in a needed column) or the reason to set the file aside: too few or too
     * many cells, text where a number belongs, a number that is not finite, a time that does not rise.
     *
     * @return where the rows went; {@code rows == used + leftOut}
     * @throws DecodeException if the file cannot be read as said; records handed over before that are to be dropped
     * @throws IOException if its bytes cannot be had
     */
    public static DecodeCounts decode(RawFile file, Optional<RunSheetRow> runSheetRow, RecordSink sink)
            throws DecodeException, IOException {
        Complaints complaints = new Complaints(file.tableName());
        try (RawTable table = RawTable.open(file, complaints)) {
            Tally tally = new Tally(sink, complaints);
            RowTaker taker = taker(file, FileFacts.of(file, runSheetRow, table, complaints), tally);
            while (table.nextRow()) {
                taker.row(table.cells(), table.line());
            }
            taker.end();
            DecodeCounts counts = tally.counts(table.rows());
            if (counts.rows() == 0) {
                throw complaints.at(table.line(), "", "no rows below the header", "rows of data");
            }
            if (counts.used() == 0) {
                throw complaints.at(
                        table.line(),
                        "",
                        "an empty cell in a needed column of every one of " + counts.rows() + " rows",
                        "a value in every needed column");
            }
            return counts;
        }
    }

    /**
     * How a file decodes, by its head and first rows; the rest of it is not looked at.
     *
     * @throws DecodeException if that much of it cannot be read as said
     * @throws IOException if its bytes cannot be had
     */
    public static FileDescription describe(RawFile file, Optional<RunSheetRow> runSheetRow)
            throws DecodeException, IOException {
        Complaints complaints = new Complaints(file.tableName());
        try (RawTable table = RawTable.open(file, complaints)) {
            FileFacts facts = FileFacts.of(file, runSheetRow, table, complaints);
            taker(file, facts, new Tally(record -> {}, complaints));
            return Describing.describe(file, table, facts);
        }
    }

    /**
     * The facts that stand outside the rows, as written: preamble, path, run sheet, fixed values.
     *
     * @throws DecodeException if the head cannot be read as said
     * @throws IOException if its bytes cannot be had
     */
    public static Map<TagName, String> tagsOfHead(RawFile file, Optional<RunSheetRow> runSheetRow)
            throws DecodeException, IOException {
        Complaints complaints = new Complaints(file.tableName());
        try (RawTable table = RawTable.open(file, complaints)) {
            Map<TagName, String> tags = new EnumMap<>(TagName.class);
            FileFacts.of(file, runSheetRow, table, complaints)
                    .values()
                    .forEach((name, value) -> tags.put(name, value.text()));
            return tags;
        }
    }

    private static RowTaker taker(RawFile file, FileFacts facts, Tally tally) throws DecodeException {
        return switch (file.intake().instrument().records().layout()) {
            case MODULI -> new ModuliRows(facts, tally);
            case COLUMN -> new WaveformRows(facts, true, tally);
            case SINGLE, MULTISINE, CHIRP, CREEP -> new WaveformRows(facts, false, tally);
            case ROLLING -> new RollingRows(facts, file.intake().instrument().records(), tally);
        };
    }
}

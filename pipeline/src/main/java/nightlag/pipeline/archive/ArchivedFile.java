package nightlag.pipeline.archive;

/**
 * What the archive holds about a raw file besides its reductions.
 *
 * @param identity which file
 * @param tableName its name in tables
 * @param instrument id of the instrument file it was read by
 * @param bytes size when its content was looked at
 * @param modifiedMillis modified time then, ms since 1970
 * @param sha256 digest of its content, hex
 * @param fingerprint digest of everything else that decides about it (run-sheet row, instrument, plans, program version)
 * @param status reduced or set aside
 * @param reason why it was set aside; empty text otherwise
 * @param points points it gave
 * @param grade its grade; empty text where it holds more than one or none is known
 * @param lot its lot, likewise
 * @param specimen its specimen, likewise
 * @param rows data rows in it
 * @param rowsLeftOut rows left out: an empty cell, or outside the windows of a long record
 */
public record ArchivedFile(
        FileIdentity identity,
        String tableName,
        String instrument,
        long bytes,
        long modifiedMillis,
        String sha256,
        String fingerprint,
        FileStatus status,
        String reason,
        int points,
        String grade,
        String lot,
        String specimen,
        long rows,
        long rowsLeftOut) {}

package nightlag.pipeline.tables;

import java.util.Arrays;
import java.util.List;

/** The declaration of {@code files}. */
final class FilesTable {
    static final Table<NightFileRow> TABLE = Table.of(
            "files",
            "One raw file of the intake, and what became of it this night",
            List.of(
                    Column.text(
                                    "file",
                                    "the raw file: the intake folder's name, then the path below it",
                                    NightFileRow::file)
                            .required()
                            .asKey(),
                    Column.text("instrument", "instrument file it was read by", NightFileRow::instrument)
                            .required()
                            .asKey(),
                    Column.text(
                            "grade",
                            "its material grade; empty where it holds more than one, or none is known",
                            NightFileRow::grade),
                    Column.text(
                            "lot", "its lot; empty where it holds more than one, or none is known", NightFileRow::lot),
                    Column.text(
                            "specimen",
                            "its specimen; empty where it holds more than one, or none is known",
                            NightFileRow::specimen),
                    Column.word(
                            "status",
                            "what became of it",
                            Arrays.stream(NightFileRow.Status.values())
                                    .map(NightFileRow.Status::word)
                                    .toList(),
                            row -> row.status().word()),
                    Column.text("reason", "why it was set aside or waits", NightFileRow::reason),
                    Column.count("points", "points it gave", NightFileRow::points),
                    Column.count("bytes", "its size in bytes", NightFileRow::bytes),
                    Column.text("sha256", "SHA-256 of its content, in hex", NightFileRow::sha256)
                            .matching("^[0-9a-f]{64}$")));

    private FilesTable() {}
}

package nightlag.pipeline.config;

import java.util.List;
import nightlag.pipeline.config.KeyType.Shape;
import nightlag.pipeline.config.KeyType.Sign;
import nightlag.pipeline.config.KeyType.Text;
import nightlag.pipeline.config.KeyType.Whole;

/** The keys of the night file. */
final class NightKeys {
    private static final int MOST_WORKERS = 1024;
    private static final int MOST_NIGHTS = 1_000_000;

    static final Key RESULTS =
            Key.required("results", new Shape("path of a folder"), "Everything a run writes goes below this folder.");
    static final Key GRADES = Key.required("grades", new Shape("path of a folder"), "Folder of the grade files.");
    static final Key INSTRUMENTS =
            Key.required("instruments", new Shape("path of a folder"), "Folder of the instrument files.");
    static final Key WORKERS = Key.withDefault(
            "workers",
            new Whole(0, MOST_WORKERS),
            "0",
            "Files reduced side by side; `0` takes one worker for each processor.");
    static final Key SETTLE = Key.withDefault(
            "settle",
            KeyType.quantity(QuantityKind.TIME, Sign.NOT_NEGATIVE),
            "\"0 s\"",
            "A file changed less than this ago waits for the next run. `\"60 s\"` suits a shared PC. "
                    + "A modified time in the future counts as settled.");
    static final Key KEEP_NIGHTS = Key.optional(
            "keep_nights",
            new Whole(1, MOST_NIGHTS),
            "How many folders of nights are kept, the newest ones; without it all. A run that ends takes older ones away, but "
                    + "never one in which there is anything it did not put there.");
    static final Section TOP =
            new Section("", "Where things are.", List.of(RESULTS, GRADES, INSTRUMENTS, WORKERS, SETTLE, KEEP_NIGHTS));

    static final Key FOLDER = Key.required(
            "folder", new Shape("path of a folder"), "The folder the instrument writes to; it is only read.");
    static final Key INSTRUMENT = Key.required(
            "instrument",
            new Shape("name of an instrument file, without .toml"),
            "Name of the instrument file without `.toml`. One folder may stand several times, each time with another "
                    + "instrument file.");
    static final Section INTAKE = new Section(
            "[[intake]]", "One folder that raw files come in by; at least one.", List.of(FOLDER, INSTRUMENT));

    static final Key FILE = Key.required("file", new Shape("path of a .csv or .xlsx"), "The team's own spreadsheet.");
    static final Key SHEET = Key.withDefault("sheet", new Text(), "\"lots\"", "The sheet of an `.xlsx`.");
    static final Section TEAM_SHEET = new Section(
            "[team_sheet]", "Optional: a spreadsheet of the team in which each lot has a row.", List.of(FILE, SHEET));

    static final FileKind KIND = new FileKind("Night file", TOP, List.of(INTAKE, TEAM_SHEET));

    private NightKeys() {}
}

package nightlag.pipeline.config;

import java.util.Arrays;
import java.util.List;
import nightlag.pipeline.config.KeyType.Measured;
import nightlag.pipeline.config.KeyType.Shape;
import nightlag.pipeline.config.KeyType.Sign;
import nightlag.pipeline.config.KeyType.Switch;
import nightlag.pipeline.config.KeyType.Text;
import nightlag.pipeline.config.KeyType.Whole;
import nightlag.stages.geometry.MeasuringWall;

/** The keys of an instrument file. */
final class InstrumentKeys {
    static final Key NAME = Key.optional(
            "name", new Text(), "What people call the instrument; without it, the file's name. It changes no result.");
    static final Section TOP = new Section("", "The instrument.", List.of(NAME));

    static final Key MATCH = Key.withDefault(
            "match",
            new Shape("glob"),
            "\"**/*.csv\"",
            "Which files below the intake folder are raw files: a glob, always with `/`; `**/` also matches no folder. "
                    + "Links are not followed and a run sheet is never a raw file.");
    static final Key CHARSET = Key.withDefault(
            "charset",
            new Shape("name of a charset"),
            "\"UTF-8\"",
            "Any charset Java knows, such as `\"UTF-16LE\"` or `\"windows-1252\"`. A byte-order mark always wins.");
    static final Key DELIMITER = Key.withDefault(
            "delimiter",
            new Shape("one character, \"tab\", or \" \" for any run of spaces"),
            "\",\"",
            "What parts the cells; it differs from `decimal`.");
    static final Key DECIMAL = Key.withDefault(
            "decimal",
            new KeyType.Word(List.of(".", ",")),
            "\".\"",
            "The decimal sign of the numbers in raw files, run sheets and tags.");
    static final Key HEADER = Key.withDefault(
            "header",
            new Shape("the first characters of a line, a line number from 1, or \"none\""),
            "1",
            "The header row: the first line that starts with this text, or a line number; with `\"none\"` columns are "
                    + "numbers from 1 and the data begin at the first line of numbers.");
    static final Key UNIT_ROW = Key.withDefault(
            "unit_row",
            new Switch(),
            "false",
            "`true`: the row below the header holds units, which then go before those of `[channels]`. Brackets round "
                    + "a unit are dropped; an empty cell leaves `[channels]` in force.");
    static final Key RUN_SHEET = Key.optional(
            "run_sheet",
            new Shape("file name"),
            "A CSV in the raw files' dialect with one row a raw file, whose column `file` holds the path from the "
                    + "sheet's folder. It is sought in the raw file's folder and then upwards to the intake folder.");
    static final Key PATH_PATTERN = Key.optional(
            "path_pattern",
            new Shape("regular expression"),
            "What the path below the intake folder looks like, with `/`; its named groups (letters and digits) can be "
                    + "tags. Single quotes spare doubled backslashes.");
    static final Section FILES = new Section(
            "[files]",
            "How a raw file reads.",
            List.of(MATCH, CHARSET, DELIMITER, DECIMAL, HEADER, UNIT_ROW, RUN_SHEET, PATH_PATTERN));

    static final Key LAYOUT = Key.withDefault(
            "layout",
            KeyType.wordsOf(Layout.class),
            "\"single\"",
            "`single`: a file is one record. `column`: a file holds many records, told apart by the tag `point`; the "
                    + "rows of one stand together. `rolling`: one long record at one frequency, cut into windows; needs "
                    + "the tag `frequency`. `moduli`: no waveforms, each row is a point already reduced. `multisine`: a "
                    + "file is one record of several frequencies at once, a point each. `chirp`: a file is one "
                    + "exponential sweep of frequency. `creep`: a file is one "
                    + "record of steps of stress and their recovery, at no frequency; the steps are found from the "
                    + "stress. It should begin before the first load. Of `[corrections]` only `compliance` acts on "
                    + "it.");
    static final Key WINDOW = Key.withDefault(
            "window",
            new Whole(1, 100_000),
            "6",
            "`rolling`: cycles per window. How the specimen changes within a window can be told from 3 cycles up; in "
                    + "shorter ones it is taken as steady (1) or as changing evenly (2).");
    static final Key ADVANCE = Key.withDefault(
            "advance",
            new Whole(1, 100_000),
            "3",
            "`rolling`: cycles from one window to the next. Rows between windows, where this is over `window`, and "
                    + "behind the last full window are left out and counted.");
    static final Key FREQUENCIES = Key.optional(
            "frequencies",
            new Shape("list of frequencies, such as [\"0.5 Hz\", \"1 Hz\"]"),
            "`multisine`: the frequencies; without them they are found. They are exact with `frequency_from = \"tag\"`, else "
                    + "right but for one factor, the recorder's clock against the drive's.");
    static final Key POINTS_PER_DECADE = Key.withDefault(
            "points_per_decade",
            new Whole(1, 100),
            "10",
            "`chirp`: points for each decade of frequency, evenly spaced in its logarithm.");
    static final Section RECORDS = new Section(
            "[records]",
            "How records stand in a file.",
            List.of(LAYOUT, WINDOW, ADVANCE, FREQUENCIES, POINTS_PER_DECADE));

    static final Section CHANNELS = new Section(
            "[channels]",
            "The columns that carry signals, each as a table `{ column = …, unit = … }` with the keys below. Waveforms "
                    + "need `time` (or the tag `sample_rate`), exactly one of `strain`, `angle` and `displacement`, and "
                    + "exactly one of `stress`, `torque` and `force`. Layout `moduli` needs `frequency` and "
                    + "`temperature` (each as a channel or a tag) and either `storage_modulus` and `loss_modulus` or "
                    + "`complex_modulus` and `phase_angle`; `strain`, `storage_modulus_u` and `loss_modulus_u` may "
                    + "stand beside them.",
            Arrays.stream(ChannelName.values())
                    .map(channel -> Key.optional(
                            channel.word(),
                            new Shape("channel: " + channel.kind().bareNoun()),
                            channelMeaning(channel)))
                    .toList());

    static final Key COLUMN = Key.required(
            "column",
            new Shape("header text, or column number from 1"),
            "The column, by its trimmed header or by number.");
    static final Key UNIT = Key.required("unit", new Shape("unit"), "The unit of its cells.");
    static final Key SENSITIVITY = Key.optional(
            "sensitivity",
            new Shape("quantity per volt, such as \"20 mN·m/V\""),
            "What a volt stands for, where the column holds a recorder's raw voltage.");
    static final Key ZERO = Key.optional(
            "zero",
            new Shape("quantity in units of the cells"),
            "What the column reads at rest; it is taken off first.");
    static final Key INVERT = Key.withDefault("invert", new Switch(), "false", "`true` reverses the sign.");
    static final Key DELAY = Key.withDefault(
            "delay",
            KeyType.quantity(QuantityKind.TIME, Sign.ANY),
            "\"0 s\"",
            "This column comes so much late; for deformation and load only.");
    static final Section CHANNEL = new Section(
            "a channel", "The keys of one channel.", List.of(COLUMN, UNIT, SENSITIVITY, ZERO, INVERT, DELAY));

    static final Section TAGS = new Section(
            "[tags]",
            "Where each fact about a record comes from: a table with one source out of those below. For one fact the "
                    + "order is channel, tag, `[geometry]`; an empty source counts as not set. `grade` and `lot` are "
                    + "required.",
            Arrays.stream(TagName.values())
                    .map(tag -> tag == TagName.GRADE || tag == TagName.LOT
                            ? Key.required(tag.word(), tagType(tag), tagMeaning(tag))
                            : Key.optional(tag.word(), tagType(tag), tagMeaning(tag)))
                    .toList());

    static final Key PREAMBLE = Key.optional(
            "preamble",
            new Text(),
            "A line `label: value`, `label = value` or label and value parted by the delimiter, above the header; a "
                    + "further cell that is a unit is the value's unit.");
    static final Key PATH = Key.optional("path", new Text(), "A named group of `path_pattern`.");
    static final Key VALUE = Key.optional(
            "value", new Shape("text, number or quantity"), "The same for every file, such as `\"1\"` or `\"25 mm\"`.");
    static final Key DATA_COLUMN = Key.optional(
            "column",
            new Shape("header text, or column number from 1"),
            "A column of the data, which must not change within a record.");
    static final Key SHEET_COLUMN = Key.optional("run_sheet", new Text(), "A column of the run sheet, by its header.");
    static final Key TAG_UNIT = Key.optional(
            "unit", new Shape("unit"), "The unit of a bare number; a value that brings its own unit keeps it.");
    static final Section TAG = new Section(
            "a tag",
            "The keys of one tag: exactly one of the first five, and a unit where the fact is a quantity.",
            List.of(PREAMBLE, PATH, VALUE, DATA_COLUMN, SHEET_COLUMN, TAG_UNIT));

    static final Key SIGNAL_DELAY = Key.withDefault(
            "signal_delay",
            KeyType.quantity(QuantityKind.TIME, Sign.ANY),
            "\"0 s\"",
            "Stress, torque or force comes this much late.");
    static final Key INERTIA = correction(
            "inertia",
            QuantityKind.INERTIA,
            "\"0 kg·m²\"",
            "Moment of inertia between transducer and specimen, where the drive's own torque is measured.");
    static final Key FRICTION =
            correction("friction", QuantityKind.FRICTION, "\"0 N·m·s\"", "Rotary friction of the bearing.");
    static final Key MOVING_MASS =
            correction("moving_mass", QuantityKind.MASS, "\"0 kg\"", "What `inertia` is, for force and displacement.");
    static final Key DAMPING = correction(
            "damping", QuantityKind.DAMPING, "\"0 N·s/m\"", "What `friction` is, for force and displacement.");
    static final Key COMPLIANCE = Key.optional(
            "compliance",
            new Shape("quantity: rad/(N·m) for torque, m/N for force"),
            "What the frame gives under load, such as `\"0.003 rad/(N·m)\"` or `\"0.4 µm/N\"`.");
    static final Key TORQUE_AT = Key.withDefault(
            "torque_at",
            KeyType.wordsOf(MeasuringWall.class),
            "\"fixed\"",
            "The wall that carries the transducer; it decides how the specimen's own inertia shows.");
    static final Section CORRECTIONS = new Section(
            "[corrections]",
            "Optional: what the instrument adds to the signal.",
            List.of(SIGNAL_DELAY, INERTIA, FRICTION, MOVING_MASS, DAMPING, COMPLIANCE, TORQUE_AT));

    private static final List<ChannelName> SIGNALS = List.of(
            ChannelName.STRAIN,
            ChannelName.ANGLE,
            ChannelName.DISPLACEMENT,
            ChannelName.STRESS,
            ChannelName.TORQUE,
            ChannelName.FORCE);

    static final Section UNCERTAINTY = new Section(
            "[uncertainty]", "Optional: standard uncertainties common to many records, by channel.", uncertaintyKeys());

    static final Section RANGE = new Section(
            "[range]",
            "Optional: by channel name, the smallest and the largest amplitude the instrument is trusted with. Measured "
                    + "amplitudes outside are flagged `out-of-range`.",
            SIGNALS.stream()
                    .map(channel -> Key.optional(
                            channel.word(),
                            new Shape(
                                    "[lowest, highest], each " + channel.kind().noun()),
                            "Trusted amplitudes of " + channel.word() + "."))
                    .toList());

    static final FileKind KIND = new FileKind(
            "Instrument file",
            TOP,
            List.of(FILES, RECORDS, CHANNELS, TAGS, CORRECTIONS, UNCERTAINTY, RANGE, GeometryKeys.GEOMETRY));

    private InstrumentKeys() {}

    private static Key correction(String name, QuantityKind kind, String none, String meaning) {
        return Key.withDefault(name, KeyType.quantity(kind, Sign.NOT_NEGATIVE), none, meaning);
    }

    private static List<Key> uncertaintyKeys() {
        List<Key> keys = new java.util.ArrayList<>(SIGNALS.stream()
                .map(channel -> Key.optional(
                        channel.word(),
                        new Measured(QuantityKind.RATIO, Sign.NOT_NEGATIVE, false),
                        "Of " + channel.word() + ", as a part of the value."))
                .toList());
        keys.add(Key.optional(
                ChannelName.TEMPERATURE.word(),
                KeyType.quantity(QuantityKind.TEMPERATURE_DIFFERENCE, Sign.NOT_NEGATIVE),
                "Of the temperature."));
        return keys;
    }

    private static Shape tagType(TagName tag) {
        return new Shape("source of " + tag.kind().map(QuantityKind::noun).orElse("a text"));
    }

    private static String channelMeaning(ChannelName channel) {
        return switch (channel) {
            case TIME -> "Strictly rising within a record.";
            case STRAIN -> "Deformation; in layout `moduli` the strain amplitude.";
            case ANGLE, DISPLACEMENT -> "Deformation; needs a `[geometry]`.";
            case STRESS -> "Load.";
            case TORQUE, FORCE -> "Load; needs a `[geometry]`.";
            case TEMPERATURE -> "Temperature of the specimen.";
            case FREQUENCY -> "Frequency, in Hz or rad/s.";
            case STORAGE_MODULUS, LOSS_MODULUS, COMPLEX_MODULUS, PHASE_ANGLE -> "Layout `moduli`.";
            case STORAGE_MODULUS_U, LOSS_MODULUS_U -> "Layout `moduli`: its standard uncertainty.";
        };
    }

    private static String tagMeaning(TagName tag) {
        return switch (tag) {
            case GRADE -> "The material's grade, as the key `grade` of a grade file has it.";
            case LOT -> "The lot.";
            case SPECIMEN -> "The specimen; `1` where nothing is said.";
            case SWEEP -> "The sweep; `1` where nothing is said.";
            case POINT -> "What the point is called; layout `column` tells records apart by it.";
            case MADE -> "The lot's date.";
            case TEMPERATURE -> "The temperature; it groups isotherms where it is there.";
            case FREQUENCY -> "The frequency, in Hz or rad/s.";
            case SAMPLE_RATE -> "Samples a second, as a frequency; in place of the channel `time`.";
            case ELAPSED -> "Time since the start of the run.";
            case DIAMETER, GAP, CONE_ANGLE, LENGTH, WIDTH, THICKNESS, INNER_DIAMETER, OUTER_DIAMETER, AREA, DENSITY ->
                "Dimension of this specimen; it goes before `[geometry]`.";
        };
    }
}

package nightlag.pipeline.config;

import java.util.Arrays;
import java.util.List;
import nightlag.pipeline.config.KeyType.Measured;
import nightlag.pipeline.config.KeyType.Real;
import nightlag.pipeline.config.KeyType.Shape;
import nightlag.pipeline.config.KeyType.Sign;
import nightlag.pipeline.config.KeyType.Switch;
import nightlag.pipeline.config.KeyType.Text;
import nightlag.pipeline.config.KeyType.Whole;
import nightlag.stages.geometry.Dimension;
import nightlag.stages.superposition.SuperpositionPlan;
import nightlag.stages.sweep.FigureMarkerPlan;
import nightlag.stages.sweep.SweepPlan;
import nightlag.stages.waveform.Drift;
import nightlag.stages.waveform.FrequencySource;

/** The keys of a grade file. */
final class GradeKeys {
    static final int MOST_MODES = 200;

    static final Key GRADE = Key.optional(
            "grade",
            new Text(),
            "What the tag `grade` of a record must equal. Required unless the file only serves `extends`.");
    static final Key EXTENDS = Key.optional(
            "extends",
            new Text(),
            "Another file of this folder, without `.toml`, whose values hold where this file says nothing: merged key "
                    + "by key, lists and `[[…]]` replaced whole. A new geometry kind drops the dimensions and options "
                    + "of the old one; density and Poisson's ratio stay where they mean something.");
    static final Section TOP = new Section("", "The grade.", List.of(GRADE, EXTENDS));

    static final Key START_UP_CYCLES = Key.withDefault(
            "start_up_cycles", new Real(Sign.NOT_NEGATIVE), "0", "Cycles left out at the front of a record.");
    static final Key HARMONICS = Key.withDefault("harmonics", new Whole(1, 99), "7", "Highest order fitted.");
    static final Key DRIFT = Key.withDefault(
            "drift", KeyType.wordsOf(Drift.class), "\"linear\"", "The polynomial under the oscillation.");
    static final Key FREQUENCY_FROM = Key.withDefault(
            "frequency_from",
            KeyType.wordsOf(FrequencySource.class),
            "\"signal\"",
            "`signal`: refined from the record. `tag`: the tag is exact.");
    static final Section EXTRACTION = new Section(
            "[extraction]",
            "How amplitudes are taken out of a record.",
            List.of(START_UP_CYCLES, HARMONICS, DRIFT, FREQUENCY_FROM));

    static final Key MIN_CYCLES = threshold("min_cycles", "[3, 1]", "Fewer cycles raise `few-cycles`.");
    static final Key CLIPPED = threshold("clipped", "[0, 0.1]", "Share of samples; more raise `clipped`.");
    static final Key GAPS = threshold("gaps", "[0.02, 0.3]", "Share of the record; more raises `gaps`.");
    static final Key CLOCK = Key.withDefault(
            "clock",
            new Shape("[doubtful] or doubtful"),
            "[0.05]",
            "Jitter over the mean interval; more raises `uneven-clock`. Never unusable, as the true stamps are used.");
    static final Key SNR = threshold("snr_dB", "[40, 15]", "Signal to noise in dB; less raises `weak-signal`.");
    static final Key BASELINE = threshold(
            "baseline", "[0.1, 1]", "Movement of the mean as a part of the amplitude; more raises `drifting`.");
    static final Key CYCLE_TREND =
            threshold("cycle_trend", "[0.02, 0.2]", "Change of |G*| over the record; more raises `unsettled`.");
    static final Key THIRD_HARMONIC = threshold(
            "third_harmonic",
            "[0.01, 0.2]",
            "Relative third harmonic; more raises `nonlinear`. Never makes a point of an amplitude sweep unusable.");
    static final Key EVEN_HARMONICS =
            threshold("even_harmonics", "[0.01, 0.2]", "Relative even harmonics; more raise `even-harmonics`.");
    static final Key INERTIA = threshold(
            "inertia", "[1, 10]", "Inertia torque over the specimen's own torque; more raises `inertia-heavy`.");
    static final Key COMPLIANCE =
            threshold("compliance", "[0.5, 0.9]", "The frame's share of the movement; more raises `compliance-heavy`.");
    static final Key TEMPERATURE_WANDER = Key.withDefault(
            "temperature_wander",
            new Shape("[doubtful, unusable] or doubtful, each a difference of temperatures in K"),
            "[\"0.5 K\", \"3 K\"]",
            "Movement of the temperature within a record; more raises `temperature-wander`.");
    static final Key FREQUENCY_MISMATCH = threshold(
            "frequency_mismatch",
            "[0.001, 0.05]",
            "Relative difference of the record's frequency from the tag; more raises `frequency-mismatch`.");
    static final Section SCREENING = new Section(
            "[screening]",
            "The limits behind the flags: beyond the first number a point is doubtful, beyond the second unusable. A "
                    + "single number has no second.",
            List.of(
                    MIN_CYCLES,
                    CLIPPED,
                    GAPS,
                    CLOCK,
                    SNR,
                    BASELINE,
                    CYCLE_TREND,
                    THIRD_HARMONIC,
                    EVEN_HARMONICS,
                    INERTIA,
                    COMPLIANCE,
                    TEMPERATURE_WANDER,
                    FREQUENCY_MISMATCH));

    static final Key SWEEP_KIND = Key.withDefault(
            "kind",
            KeyType.wordsOf(SweepPlan.Kind.class),
            "\"auto\"",
            "What varies. Where two things vary: by isotherm first, then by frequency.");
    static final Key REPEATS = Key.withDefault(
            "repeats",
            KeyType.wordsOf(SweepPlan.Repeats.class),
            "\"apart\"",
            "Whether repeats of a point stay apart or are averaged by weight.");
    static final Key ONSET_AXIS = Key.withDefault(
            "onset_axis",
            KeyType.wordsOf(SweepPlan.OnsetAxis.class),
            "\"linear\"",
            "Axis of the storage modulus for the onset of the glass transition.");
    static final Section SWEEPS =
            new Section("[sweeps]", "How points become sweeps.", List.of(SWEEP_KIND, REPEATS, ONSET_AXIS));

    static final Key REFERENCE_TEMPERATURE = Key.required(
            "reference_temperature",
            KeyType.quantity(QuantityKind.TEMPERATURE, Sign.ANY),
            "It need not be a measured one.");
    static final Key VERTICAL_SHIFT = Key.withDefault(
            "vertical_shift",
            KeyType.wordsOf(SuperpositionPlan.VerticalShift.class),
            "\"none\"",
            "What is done about vertical shifts.");
    static final Key EXPANSION = Key.optional(
            "expansion",
            KeyType.quantity(QuantityKind.EXPANSION, Sign.POSITIVE),
            "Volumetric thermal expansion; required with `vertical_shift = \"density\"`.");
    static final Key LAW = Key.withDefault(
            "law", KeyType.wordsOf(SuperpositionPlan.ShiftLaw.class), "\"auto\"", "The law of the horizontal shifts.");
    static final Key TOLERANCE = Key.withDefault(
            "tolerance",
            new Real(Sign.NOT_NEGATIVE),
            "0.003",
            "Decades of modulus: a smaller misfit superposes, however exact the data.");
    static final Section SUPERPOSITION = new Section(
            "[superposition]",
            "Optional: without it there is no master curve.",
            List.of(REFERENCE_TEMPERATURE, VERTICAL_SHIFT, EXPANSION, LAW, TOLERANCE));

    static final Key EQUILIBRIUM = Key.withDefault(
            "equilibrium",
            new KeyType.Word(List.of("none", "fitted")),
            "\"none\"",
            "`none`: a liquid. `fitted`: a solid, whose equilibrium modulus is fitted.");
    static final Key MODES = Key.withDefault(
            "modes",
            new Shape("\"auto\", or whole number, 1 to " + MOST_MODES),
            "\"auto\"",
            "As few as the data carry, or a fixed number of relaxation modes.");
    static final Key CONTINUOUS =
            Key.withDefault("continuous", new Switch(), "true", "Whether continuous spectra are wanted too.");
    static final Section SPECTRUM = new Section(
            "[spectrum]", "Optional: without it there are no spectra.", List.of(EQUILIBRIUM, MODES, CONTINUOUS));

    static final Key RESPONSE_NAME = Key.required("name", new Text(), "Its name; each stands once.");
    static final Key RESPONSE_TEMPERATURE = Key.optional(
            "temperature",
            new Shape("temperature, or steps [[time, temperature], …]"),
            "Without it the reference temperature.");
    static final Key STRESS = Key.optional(
            "stress",
            new Shape("steps [[time, stress], …]"),
            "Steps from 0 s on; exactly one of `stress` and `strain`.");
    static final Key STRAIN = Key.optional(
            "strain",
            new Shape("steps [[time, strain], …]"),
            "Steps from 0 s on; exactly one of `stress` and `strain`.");
    static final Key UNTIL =
            Key.required("until", KeyType.quantity(QuantityKind.TIME, Sign.POSITIVE), "End of the prediction.");
    static final Section RESPONSE = new Section(
            "[[response]]",
            "A prediction; any number of them.",
            List.of(RESPONSE_NAME, RESPONSE_TEMPERATURE, STRESS, STRAIN, UNTIL));

    static final Key DERIVED_NAME = Key.required(
            "name",
            new Text(),
            "What it is called in `derived.csv`, in a `[[marker]]` and in a `[[limit]]`: small letters, digits and `_`.");
    static final Key EXPRESSION = Key.required(
            "expression",
            new Text(),
            "How it follows from the columns of `points`, named without their unit's suffix: see below.");
    static final Key DERIVED_UNIT = Key.required(
            "unit",
            new KeyType.Word(
                    Arrays.stream(OwnUnit.values()).map(OwnUnit::symbol).toList()),
            "The unit its values are in. Nothing is converted: the columns' own units go in.");
    static final Section DERIVED = new Section(
            "[[derived]]",
            "A figure of every point that the grade defines for itself; any number of them.",
            List.of(DERIVED_NAME, EXPRESSION, DERIVED_UNIT));

    static final Key MARKER_NAME = Key.required(
            "name",
            new Text(),
            "Its `property` in `markers.csv`, and its name in a `[[limit]]`: small letters, digits and `_`.");
    static final Key MARKER_QUANTITY = Key.required(
            "quantity",
            new Text(),
            "What is followed: a column of `points` without its unit's suffix, or a `[[derived]]`.");
    static final Key REACHES = Key.required(
            "reaches", new Shape("quantity of `quantity`; a number where it has no unit"), "The value it reaches.");
    static final Key ALONG = Key.required(
            "along",
            KeyType.wordsOf(FigureMarkerPlan.Along.class),
            "`frequency`: over frequency within each isotherm. `temperature`: over temperature at each frequency.");
    static final Key SCALE = Key.withDefault(
            "scale",
            KeyType.wordsOf(FigureMarkerPlan.Scale.class),
            "\"log\"",
            "What is interpolated by a smooth curve, over log frequency or over temperature. `log`: the logarithm of the "
                    + "quantity. `linear`: the quantity itself.");
    static final Key MARKER_TEMPERATURE = Key.optional(
            "temperature",
            KeyType.quantity(QuantityKind.TEMPERATURE, Sign.ANY),
            "Along frequency: only the isotherm within 0.5 K of it.");
    static final Key MARKER_FREQUENCY = Key.optional(
            "frequency",
            KeyType.quantity(QuantityKind.FREQUENCY, Sign.POSITIVE),
            "Along temperature: only the points within 1 % of it.");
    static final Key REPORT = Key.optional(
            "report",
            new Text(),
            "The quantity whose value there is the marker's, by its logarithm where that is above zero. Without it the "
                    + "marker's value is the place, in Hz or °C.");
    static final Section MARKER = new Section(
            "[[marker]]",
            "Where a quantity reaches a value, by interpolation between measured points and never beyond them; any number "
                    + "of them.",
            List.of(MARKER_NAME, MARKER_QUANTITY, REACHES, ALONG, SCALE, MARKER_TEMPERATURE, MARKER_FREQUENCY, REPORT));

    static final Key LIMIT_NAME = Key.optional("name", new Text(), "The column's name in the team sheet.");
    static final Key PROPERTY = Key.required(
            "property",
            new KeyType.Word(Arrays.stream(LimitProperty.values())
                    .map(LimitProperty::word)
                    .toList()),
            "A quantity of `points.csv` without its unit suffix, or a property of `markers.csv`; or the name of a "
                    + "`[[derived]]` or a `[[marker]]`.");
    static final Key LIMIT_TEMPERATURE = Key.optional(
            "temperature",
            KeyType.quantity(QuantityKind.TEMPERATURE, Sign.ANY),
            "Where the limit holds; required for a quantity of `points.csv` and for a `[[derived]]`.");
    static final Key LIMIT_FREQUENCY = Key.optional(
            "frequency",
            KeyType.quantity(QuantityKind.FREQUENCY, Sign.POSITIVE),
            "Where the limit holds; required for a quantity of `points.csv` and for a `[[derived]]`.");
    static final Key MIN = Key.optional(
            "min",
            new Shape("quantity of the property; a number where it has no unit"),
            "Lower limit; `min`, `max` or both.");
    static final Key MAX = Key.optional(
            "max",
            new Shape("quantity of the property; a number where it has no unit"),
            "Upper limit; `min`, `max` or both.");
    static final Key COVERAGE = Key.withDefault(
            "coverage", new Real(Sign.NOT_NEGATIVE), "2", "The guard band in standard uncertainties; `0`: none.");
    static final Section LIMIT = new Section(
            "[[limit]]",
            "A limit of acceptance; any number of them.",
            List.of(LIMIT_NAME, PROPERTY, LIMIT_TEMPERATURE, LIMIT_FREQUENCY, MIN, MAX, COVERAGE));

    static final Section UNCERTAINTY = new Section(
            "[uncertainty]",
            "Optional: standard uncertainties of dimensions, common to many records.",
            Arrays.stream(Dimension.values())
                    .map(dimension -> Key.optional(
                            dimension.word(),
                            new Measured(GeometryKeys.kindOf(dimension), Sign.NOT_NEGATIVE, false),
                            "Of " + dimension.word() + ", in its own unit."))
                    .toList());

    static final FileKind KIND = new FileKind(
            "Grade file",
            TOP,
            List.of(
                    GeometryKeys.GEOMETRY,
                    EXTRACTION,
                    SCREENING,
                    SWEEPS,
                    SUPERPOSITION,
                    SPECTRUM,
                    RESPONSE,
                    DERIVED,
                    MARKER,
                    LIMIT,
                    UNCERTAINTY));

    private GradeKeys() {}

    private static Key threshold(String name, String fallback, String meaning) {
        return Key.withDefault(name, new Shape("[doubtful, unusable] or doubtful"), fallback, meaning);
    }
}

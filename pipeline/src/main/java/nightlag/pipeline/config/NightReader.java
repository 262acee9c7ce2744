package nightlag.pipeline.config;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.file.Files;
import java.nio.file.InvalidPathException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.HashSet;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalInt;
import java.util.Set;
import java.util.stream.Stream;
import nightlag.stages.geometry.Corrections;
import nightlag.stages.geometry.MeasuringWall;

/** Reads the night file itself; the instrument files its intakes name are read by the way. */
final class NightReader {
    private static final int LONGEST_SHEET_NAME = 31;

    private final Path folder;
    private final FileNames names;
    private final FileSections file;
    private final Problems problems;
    private final List<Problem> instrumentProblems = new ArrayList<>();
    private final Map<String, Optional<Instrument>> instruments = new LinkedHashMap<>();

    /**
     * @param folder the night file's folder, absolute and normalised
     * @param names how files are called
     * @param toml what stands in the night file
     * @param problems where everything wrong with it goes
     */
    NightReader(Path folder, FileNames names, TomlFile toml, Problems problems) {
        this.folder = folder;
        this.names = names;
        this.problems = problems;
        problems.addAll(toml.problems());
        this.file = new FileSections(NightKeys.KIND, toml.root(), problems);
    }

    /**
     * What the night file says.
     *
     * @param results folder of results
     * @param grades folder of grade files, as far as it is there
     * @param workers at least 1
     * @param settleS s
     * @param intakes intakes whose instrument is right
     * @param teamSheet the team's spreadsheet
     * @param keepNights how many folders of nights are kept
     */
    record Night(
            Optional<Path> results,
            Optional<Path> grades,
            OptionalInt workers,
            OptionalDouble settleS,
            List<Intake> intakes,
            Optional<TeamSheet> teamSheet,
            OptionalInt keepNights) {}

    Night read() {
        SectionReader top = file.top();
        Optional<Path> results = path(top, NightKeys.RESULTS);
        Optional<Path> grades = folderThatIsThere(top, NightKeys.GRADES);
        Optional<Path> instrumentFolder = folderThatIsThere(top, NightKeys.INSTRUMENTS);
        OptionalInt workers = top.whole(NightKeys.WORKERS);
        OptionalDouble settle = top.si(NightKeys.SETTLE);
        results.filter(path -> Files.exists(path) && !Files.isDirectory(path))
                .ifPresent(
                        path -> top.wrong(NightKeys.RESULTS, "this is a file", "a folder, which need not exist yet"));
        List<Intake> intakes = intakes(instrumentFolder, results);
        Optional<TeamSheet> teamSheet = file.optional(NightKeys.TEAM_SHEET).flatMap(this::teamSheet);
        OptionalInt keepNights = top.whole(NightKeys.KEEP_NIGHTS);
        return new Night(results, grades, workers, settle, intakes, teamSheet, keepNights);
    }

    List<Problem> instrumentProblems() {
        return instrumentProblems;
    }

    /** What instrument files ask for and their layout has no use for. */
    List<String> notActedOn() {
        List<String> lines = new ArrayList<>();
        for (Optional<Instrument> instrument : instruments.values()) {
            instrument.flatMap(NightReader::idleOnCreep).ifPresent(lines::add);
        }
        return lines;
    }

    /** Corrections that do nothing to steps of stress, as of all of them only the frame's compliance acts there. */
    private static Optional<String> idleOnCreep(Instrument instrument) {
        if (instrument.records().layout() != Layout.CREEP) {
            return Optional.empty();
        }
        Corrections given = instrument.corrections();
        List<String> idle = new ArrayList<>();
        if (given.loadDelayS() != 0 || given.deformationDelayS() != 0) {
            idle.add("delays");
        }
        addIf(given.inertiaKgM2() != 0, InstrumentKeys.INERTIA, idle);
        addIf(given.frictionNMS() != 0, InstrumentKeys.FRICTION, idle);
        addIf(given.movingMassKg() != 0, InstrumentKeys.MOVING_MASS, idle);
        addIf(given.dampingNSPerM() != 0, InstrumentKeys.DAMPING, idle);
        addIf(given.wall() == MeasuringWall.MOVING, InstrumentKeys.TORQUE_AT, idle);
        return idle.isEmpty()
                ? Optional.empty()
                : Optional.of("[corrections] of instrument " + instrument.id() + ": " + String.join(", ", idle)
                        + " read and checked, not acted on with layout creep; only compliance is");
    }

    private static void addIf(boolean there, Key key, List<String> idle) {
        if (there) {
            idle.add(key.name());
        }
    }

    private Optional<Path> path(SectionReader section, Key key) {
        Optional<String> text = section.text(key);
        try {
            return text.map(written -> folder.resolve(written).normalize());
        } catch (InvalidPathException e) {
            section.wrong(key, "not a path: " + e.getReason(), "a path, with '/' between folders");
            return Optional.empty();
        }
    }

    private Optional<Path> folderThatIsThere(SectionReader section, Key key) {
        Optional<Path> path = path(section, key);
        if (path.isPresent() && !Files.isDirectory(path.get())) {
            section.wrong(
                    key,
                    Files.exists(path.get())
                            ? names.name(path.get()) + " is no folder"
                            : "there is no folder " + names.name(path.get()),
                    "a folder that exists; relative paths start at the night file");
            return Optional.empty();
        }
        return path;
    }

    private List<Intake> intakes(Optional<Path> instrumentFolder, Optional<Path> results) {
        List<SectionReader> sections = file.repeated(NightKeys.INTAKE);
        if (!file.has(NightKeys.INTAKE)) {
            problems.missing(file.at(), "[[intake]]", "missing", "at least one section [[intake]]");
        }
        List<Intake> intakes = new ArrayList<>();
        Set<List<Object>> seen = new HashSet<>();
        for (SectionReader section : sections) {
            Optional<Path> path = path(section, NightKeys.FOLDER);
            Optional<String> id = section.text(NightKeys.INSTRUMENT).map(String::strip);
            if (path.isPresent() && id.isPresent() && !seen.add(List.of(path.get(), id.get()))) {
                section.wrong(
                        NightKeys.FOLDER,
                        "this folder is taken in with instrument " + id.get() + " already",
                        "each folder once for an instrument");
            }
            if (path.isPresent() && results.isPresent() && results.get().startsWith(path.get())) {
                section.wrong(
                        NightKeys.FOLDER,
                        "the results lie in this folder and would be taken in again",
                        "an intake folder that does not hold the results");
            }
            Optional<Instrument> instrument = instrumentFolder.isPresent() && id.isPresent()
                    ? instrument(section, instrumentFolder.get(), id.get())
                    : Optional.empty();
            if (path.isPresent() && FileNames.last(path.get()).isEmpty()) {
                section.wrong(NightKeys.FOLDER, "this is the root of a drive", "a folder with a name");
            } else if (path.isPresent() && instrument.isPresent()) {
                intakes.add(new Intake(path.get(), FileNames.last(path.get()), instrument.get()));
            }
        }
        return intakes;
    }

    private Optional<Instrument> instrument(SectionReader section, Path instrumentFolder, String id) {
        if (instruments.containsKey(id)) {
            return instruments.get(id);
        }
        List<String> known = namesIn(instrumentFolder);
        Optional<Instrument> instrument = Optional.empty();
        if (known.contains(id)) {
            Path path = instrumentFolder.resolve(id + ".toml");
            instrument = InstrumentReader.read(id, TomlFile.read(path, names.name(path)), instrumentProblems);
            instruments.put(id, instrument);
        } else {
            section.wrong(
                    NightKeys.INSTRUMENT,
                    "there is no file " + names.name(instrumentFolder) + "/" + id + ".toml"
                            + Suggestion.clause(id, known),
                    known.isEmpty() ? "the name of an instrument file" : "one of " + String.join(", ", known));
        }
        return instrument;
    }

    private static List<String> namesIn(Path instrumentFolder) {
        try (Stream<Path> files = Files.list(instrumentFolder)) {
            return files.map(FileNames::last)
                    .filter(name -> name.endsWith(".toml") && !name.startsWith("."))
                    .map(name -> name.substring(0, name.length() - ".toml".length()))
                    .sorted()
                    .toList();
        } catch (IOException | UncheckedIOException e) {
            return List.of();
        }
    }

    private Optional<TeamSheet> teamSheet(SectionReader section) {
        Optional<Path> path = path(section, NightKeys.FILE);
        Optional<String> sheet = section.text(NightKeys.SHEET);
        if (path.isPresent()) {
            String name = path.get().toString().toLowerCase(Locale.ROOT);
            if (!name.endsWith(".csv") && !name.endsWith(".xlsx")) {
                section.wrong(NightKeys.FILE, "this is no .csv and no .xlsx", "a .csv or an .xlsx");
            }
        }
        if (sheet.isPresent()
                && (sheet.get().length() > LONGEST_SHEET_NAME || sheet.get().matches(".*[\\[\\]:*?/\\\\].*"))) {
            section.wrong(
                    NightKeys.SHEET,
                    "no workbook can hold a sheet of this name",
                    "at most 31 characters, none of [ ] : * ? / \\");
        }
        return path.isPresent() && sheet.isPresent()
                ? Optional.of(new TeamSheet(path.get(), sheet.get()))
                : Optional.empty();
    }
}

package nightlag.pipeline.night;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.InvalidPathException;
import java.nio.file.Path;
import java.time.Clock;
import java.time.LocalDate;
import java.util.Comparator;
import java.util.HashSet;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.stream.Collectors;
import nightlag.pipeline.archive.Archive;
import nightlag.pipeline.archive.ArchiveException;
import nightlag.pipeline.archive.KeptRow;
import nightlag.pipeline.archive.LotName;
import nightlag.pipeline.archive.LotState;
import nightlag.pipeline.config.Configuration;
import nightlag.pipeline.config.Intake;
import nightlag.pipeline.decode.RunSheets;
import nightlag.pipeline.report.NightHeading;
import nightlag.pipeline.report.NightReport;
import nightlag.pipeline.report.ResultsIndex;
import nightlag.pipeline.tables.LotTables;
import nightlag.pipeline.tables.NightTables;
import nightlag.pipeline.teamsheet.SheetRow;
import org.apache.logging.log4j.LogManager;
import org.apache.logging.log4j.Logger;

/**
 * One night's work: survey the intakes, look at what is new, commit it, rebuild the tables of the lots it touches,
 * put their rows into the team sheet.
 * Files are looked at side by side and committed in the order of their names, so that the number of workers shows nowhere.
 */
public final class Night {
    /** The archive's file name below the results folder. */
    static final String ARCHIVE = "archive.sqlite";

    private static final Logger LOG = LogManager.getLogger(Night.class);

    private final Configuration configuration;
    private final RunOptions options;
    private final Progress progress;
    private final Clock clock;
    private final String version;

    /** A night over a configuration; the clock names its folder and judges which files have settled. */
    public Night(Configuration configuration, RunOptions options, Progress progress, Clock clock) {
        this.configuration = configuration;
        this.options = options;
        this.progress = progress;
        this.clock = clock;
        this.version = ProgramVersion.get();
    }

    /**
     * Runs the night.
     *
     * @throws NightFault if it cannot begin, or has to stop; what was committed is kept
     */
    public NightOutcome run() throws NightFault {
        checkGradesAsked();
        checkSomeIntakeReadable();
        Path results = configuration.results();
        try {
            Files.createDirectories(results);
        } catch (IOException e) {
            throw stopped("the results folder " + results + " cannot be made", e);
        }
        try {
            RunLock lock = RunLock.take(results);
            try {
                return workLocked(results);
            } finally {
                lock.close();
            }
        } catch (ArchiveException e) {
            throw new NightFault(NightFault.Kind.STOPPED, e.getMessage(), e);
        } catch (IOException e) {
            throw stopped("the results folder " + results + " cannot be written", e);
        }
    }

    private NightOutcome workLocked(Path results) throws ArchiveException, IOException, NightFault {
        try (Archive archive = Archive.open(results.resolve(ARCHIVE))) {
            archive.bringUpToDate();
            Path folder = NightFolder.make(results, clock);
            try (NightLog log = NightLog.open(folder)) {
                log.info("Nightlag " + version + ", " + workers() + " workers, results in " + results);
                return work(archive, folder);
            }
        }
    }

    private NightOutcome work(Archive archive, Path folder) throws ArchiveException, IOException, NightFault {
        configuration.notActedOn().forEach(LOG::info);
        RunSheets runSheets = new RunSheets();
        Survey survey = Survey.of(configuration, archive.files(), runSheets, options.redo(), version, clock);
        Tally tally = new Tally(folder);
        survey.unreadable().forEach(tally::unreadable);
        NightOutcome outcome;
        try (NightReport report = NightReport.begin(folder)) {
            NightWork night = new NightWork(configuration, options, version, workers(), archive, tally, report);
            new FileStage(night, progress).work(survey, runSheets);
            new LotStage(night).work();
            sayUnknownLots(archive, tally);
            new SheetStage(night).work(LocalDate.now(clock));
            outcome = tally.outcome();
            NightTables.writeFiles(folder, outcome.files());
            report.finish(new NightHeading(
                    String.valueOf(folder.getFileName()), version, outcome.counts(), outcome.concerns(configuration)));
        }
        boolean nightsGone = configuration.keepNights().isPresent()
                && OldNights.remove(
                        NightFolder.nights(configuration.results()),
                        folder,
                        configuration.keepNights().getAsInt());
        if (nightsGone
                || !outcome.nothingNew()
                || !Files.exists(configuration.results().resolve(ResultsIndex.FILE_NAME))) {
            writeIndex(archive);
        }
        LOG.info(
                "{} files; {} lots rebuilt",
                outcome.files().size(),
                outcome.lotsConcluded().size());
        return outcome;
    }

    /** A lot that is asked for and is nowhere, most often a slip of the pen, is not passed over. */
    private void sayUnknownLots(Archive archive, Tally tally) throws ArchiveException {
        Set<String> known = new HashSet<>();
        for (LotState lot : archive.lots()) {
            known.add(lot.name().lot());
        }
        options.lots().stream()
                .filter(lot -> !known.contains(lot) && !tally.names(lot))
                .sorted()
                .forEach(tally::unknownLot);
    }

    /** The tables stand without it: one that is held open elsewhere is written the next night. */
    private void writeIndex(Archive archive) throws ArchiveException {
        Path results = configuration.results();
        Map<LotName, String> verdicts = archive.sheetRows().stream()
                .collect(Collectors.toMap(KeptRow::lot, kept -> verdicts(SheetRow.fromJson(kept.body()))));
        List<ResultsIndex.Entry> lots = archive.lots().stream()
                .filter(lot -> lot.points() > 0)
                .flatMap(lot -> entry(results, lot, verdicts.getOrDefault(lot.name(), "")).stream())
                .toList();
        try {
            ResultsIndex.write(results, NightFolder.nights(results), lots);
        } catch (IOException e) {
            LOG.warn("{} cannot be written: {}", ResultsIndex.FILE_NAME, IoSentences.of(e));
        }
    }

    private static String verdicts(SheetRow row) {
        Map<String, Long> counts = row.values().stream()
                .flatMap(value -> value.verdict().stream())
                .collect(Collectors.groupingBy(verdict -> verdict, LinkedHashMap::new, Collectors.counting()));
        return counts.entrySet().stream()
                .map(count -> count.getValue() + " " + count.getKey())
                .collect(Collectors.joining(", "));
    }

    private static Optional<ResultsIndex.Entry> entry(Path results, LotState lot, String verdicts) {
        try {
            Path folder =
                    LotTables.folder(results, lot.name().grade(), lot.name().lot());
            return Files.isDirectory(folder)
                    ? Optional.of(new ResultsIndex.Entry(
                            lot.name().grade(),
                            lot.name().lot(),
                            lot.points(),
                            verdicts,
                            folder,
                            LotTables.fileNames()))
                    : Optional.empty();
        } catch (InvalidPathException cannotBeNamedHere) {
            return Optional.empty();
        }
    }

    private int workers() {
        return options.workers().orElse(configuration.workers());
    }

    private void checkGradesAsked() throws NightFault {
        List<String> unknown = options.grades().stream()
                .filter(grade -> !configuration.grades().containsKey(grade)
                        && !configuration.wrongGrades().containsKey(grade))
                .sorted()
                .toList();
        if (!unknown.isEmpty()) {
            throw new NightFault(
                    NightFault.Kind.CANNOT_BEGIN,
                    "no grade file says grade = '" + String.join("', '", unknown) + "'; there are files for '"
                            + configuration.grades().keySet().stream()
                                    .sorted(Comparator.naturalOrder())
                                    .collect(Collectors.joining("', '"))
                            + "'");
        }
    }

    /** Whether there is anything to look at at all. */
    static boolean someIntakeReadable(Configuration configuration) {
        return configuration.intakes().stream()
                .anyMatch(intake -> Files.isDirectory(intake.folder()) && Files.isReadable(intake.folder()));
    }

    private void checkSomeIntakeReadable() throws NightFault {
        if (!someIntakeReadable(configuration)) {
            List<Intake> intakes = configuration.intakes();
            throw new NightFault(
                    NightFault.Kind.CANNOT_BEGIN,
                    "no intake can be read: "
                            + intakes.stream()
                                    .map(intake -> intake.folder().toString())
                                    .collect(Collectors.joining(", ")));
        }
    }

    private static NightFault stopped(String what, IOException e) {
        return new NightFault(NightFault.Kind.STOPPED, what + ": " + IoSentences.of(e), e);
    }
}

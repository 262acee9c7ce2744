package nightlag.pipeline.night;

import java.util.ArrayList;
import java.util.HashSet;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.TreeMap;
import java.util.function.Function;
import java.util.stream.Stream;
import nightlag.pipeline.archive.Archive;
import nightlag.pipeline.archive.ArchiveException;
import nightlag.pipeline.archive.ArchivedFile;
import nightlag.pipeline.archive.FileIdentity;
import nightlag.pipeline.archive.FileOutcome;
import nightlag.pipeline.archive.FileStatus;
import nightlag.pipeline.archive.LotName;
import nightlag.pipeline.archive.LotState;
import nightlag.pipeline.config.Configuration;
import nightlag.pipeline.decode.RunSheets;
import nightlag.pipeline.intake.RawFile;
import nightlag.pipeline.night.Survey.Candidate;
import nightlag.pipeline.night.Survey.Task;
import nightlag.pipeline.tables.NightFileRow;
import nightlag.pipeline.tables.NightFileRow.Status;
import nightlag.stages.Reduction;
import nightlag.stages.moduli.PointKey;

/** The first half of a night: every file of the intakes ends with a status, what is new is in the archive. */
final class FileStage {
    /** Files a commit holds at most: each costs a wait for the disk, and a kill loses no more than these. */
    private static final int FILES_PER_COMMIT = 64;

    private final Configuration configuration;
    private final RunOptions options;
    private final Progress progress;
    private final String version;
    private final int workers;
    private final Archive archive;
    private final Tally tally;
    private final List<FileOutcome> pending = new ArrayList<>();
    private final Set<FileIdentity> toLookAt = new HashSet<>();

    /** Lots by grade and lower-case name, to find those that differ only in case. */
    private final Map<LotName, LotName> lotsByLowerCase = new TreeMap<>();

    FileStage(
            Configuration configuration,
            RunOptions options,
            Progress progress,
            String version,
            int workers,
            Archive archive,
            Tally tally) {
        this.configuration = configuration;
        this.options = options;
        this.progress = progress;
        this.version = version;
        this.workers = workers;
        this.archive = archive;
        this.tally = tally;
    }

    /** Brings every file of the survey to its end. */
    void work(Survey survey, RunSheets runSheets) throws ArchiveException {
        for (LotState lot : archive.lots()) {
            if (lot.points() > 0) {
                lotsByLowerCase.putIfAbsent(lowerCase(lot.name()), lot.name());
            }
        }
        Set<FileIdentity> wanted = wantedFiles();
        List<Candidate> looks = survey.candidates().stream()
                .filter(candidate -> candidate.task() == Task.LOOK)
                .toList();
        looks.forEach(candidate -> toLookAt.add(candidate.identity()));
        FileLooker looker = new FileLooker(configuration, runSheets, options.redo(), version);
        progress.begin(looks.size());
        try (SideBySide<Candidate, Look> results = new SideBySide<>(looks.iterator(), looker::look, workers)) {
            for (Candidate candidate : survey.candidates()) {
                boolean inside = !options.narrowed()
                        || wanted.contains(candidate.identity())
                        || candidate.known().filter(this::namesWantedLot).isPresent();
                if (candidate.task() == Task.LOOK) {
                    Look look = results.next();
                    if (inside || namesWantedLot(look)) {
                        end(candidate, look, survey.vanished());
                    }
                    toLookAt.remove(candidate.identity());
                    progress.fileDone();
                } else if (inside && candidate.task() == Task.WAIT) {
                    tally.file(waiting(
                            candidate,
                            "changed less than " + configuration.settle().toSeconds()
                                    + " s ago; the next run takes it"));
                } else if (inside) {
                    leave(candidate.known().orElseThrow(), candidate.file());
                }
            }
            commit();
        } finally {
            progress.end();
        }
    }

    private void end(Candidate candidate, Look look, Map<String, List<ArchivedFile>> vanished) throws ArchiveException {
        if (look instanceof Look.Waiting wait) {
            tally.file(waiting(candidate, wait.reason()));
        } else if (look instanceof Look.Unchanged) {
            ArchivedFile known = candidate.known().orElseThrow();
            ArchivedFile restamped = archived(candidate, look.sha256(), known);
            archive.amend(List.of(restamped));
            leave(restamped, candidate.file());
        } else if (look instanceof Look.SetAside aside) {
            setAside(candidate, aside, vanished);
        } else if (look instanceof Look.Reduced reduced) {
            Optional<FileIdentity> replaces = takePlaceOf(candidate, reduced.sha256(), vanished);
            Optional<String> clash = clash(candidate, replaces, lots(reduced.reductions()));
            if (clash.isPresent()) {
                Look.SetAside aside = new Look.SetAside(
                        reduced.sha256(),
                        candidate.file().tableName() + ": " + clash.get(),
                        lots(reduced.reductions()),
                        distinct(reduced.reductions(), PointKey::specimen),
                        reduced.state(),
                        false);
                setAside(candidate, aside, vanished);
            } else {
                reduced(candidate, reduced, replaces);
            }
        }
    }

    private void reduced(Candidate candidate, Look.Reduced look, Optional<FileIdentity> replaces)
            throws ArchiveException {
        ArchivedFile file = new ArchivedFile(
                candidate.identity(),
                candidate.file().tableName(),
                candidate.file().intake().instrument().id(),
                candidate.file().bytes(),
                candidate.file().modifiedMillis(),
                look.sha256(),
                look.state(),
                FileStatus.REDUCED,
                "",
                look.reductions().stream()
                        .mapToInt(reduction -> reduction.points().size())
                        .sum(),
                only(distinct(look.reductions(), PointKey::grade)),
                only(distinct(look.reductions(), PointKey::lot)),
                only(distinct(look.reductions(), PointKey::specimen)),
                look.counts().rows(),
                look.counts().leftOut());
        pending.add(new FileOutcome(file, look.reductions(), replaces));
        lots(look.reductions()).forEach(lot -> lotsByLowerCase.put(lowerCase(lot), lot));
        tally.file(row(file, candidate.file(), Status.REDUCED));
        tally.reduced(file.tableName(), look.counts(), look.reductions());
        if (pending.size() >= FILES_PER_COMMIT) {
            commit();
        }
    }

    private void setAside(Candidate candidate, Look.SetAside look, Map<String, List<ArchivedFile>> vanished)
            throws ArchiveException {
        ArchivedFile file = new ArchivedFile(
                candidate.identity(),
                candidate.file().tableName(),
                candidate.file().intake().instrument().id(),
                candidate.file().bytes(),
                candidate.file().modifiedMillis(),
                look.sha256(),
                look.state(),
                FileStatus.SET_ASIDE,
                look.reason(),
                0,
                only(map(look.lots(), LotName::grade)),
                only(map(look.lots(), LotName::lot)),
                only(look.specimens()),
                0,
                0);
        boolean before = candidate
                .known()
                .filter(known -> known.status() == FileStatus.SET_ASIDE
                        && known.sha256().equals(look.sha256())
                        && known.fingerprint().equals(look.state())
                        && !look.state().equals(ReductionState.TRY_AGAIN))
                .isPresent();
        if (look.keepsReductions() && candidate.known().isPresent()) {
            archive.amend(List.of(file));
        } else {
            pending.add(new FileOutcome(file, List.of(), takePlaceOf(candidate, look.sha256(), vanished)));
        }
        NightFileRow row = row(file, candidate.file(), Status.SET_ASIDE);
        if (before) {
            tally.stillSetAside(row);
        } else {
            tally.newlySetAside(row);
        }
    }

    private void leave(ArchivedFile known, RawFile file) {
        if (known.status() == FileStatus.SET_ASIDE) {
            tally.stillSetAside(row(known, file, Status.SET_ASIDE));
        } else {
            tally.file(row(known, file, Status.UNCHANGED));
        }
    }

    private void commit() throws ArchiveException {
        if (!pending.isEmpty()) {
            archive.commit(pending);
            pending.clear();
        }
    }

    /** A new path whose content the archive knows from a file that is gone takes that file's place. */
    private static Optional<FileIdentity> takePlaceOf(
            Candidate candidate, String sha256, Map<String, List<ArchivedFile>> vanished) {
        if (candidate.known().isPresent()) {
            return Optional.empty();
        }
        List<ArchivedFile> gone = vanished.getOrDefault(sha256, List.of());
        return gone.isEmpty() ? Optional.empty() : Optional.of(gone.remove(0).identity());
    }

    /** Why a file's lots cannot stand beside those known: one differs from another only in case. */
    private Optional<String> clash(Candidate candidate, Optional<FileIdentity> replaces, Set<LotName> lots)
            throws ArchiveException {
        Map<LotName, LotName> own = new TreeMap<>();
        for (LotName lot : lots) {
            LotName twin = own.putIfAbsent(lowerCase(lot), lot);
            if (twin != null) {
                return Optional.of(differsOnlyInCase(lot, twin));
            }
            LotName known = lotsByLowerCase.getOrDefault(lowerCase(lot), lot);
            if (!known.equals(lot) && stays(known, candidate, replaces)) {
                return Optional.of(differsOnlyInCase(lot, known));
            }
        }
        return Optional.empty();
    }

    private static String differsOnlyInCase(LotName lot, LotName known) {
        return "lot '%s' differs only in case from the known lot '%s' of grade '%s'"
                .formatted(lot.lot(), known.lot(), lot.grade());
    }

    /** Whether a known lot has points from a file that is not itself up for another look. */
    private boolean stays(LotName known, Candidate candidate, Optional<FileIdentity> replaces) throws ArchiveException {
        commit();
        return archive.filesOf(known).stream()
                .map(ArchivedFile::identity)
                .anyMatch(identity -> !identity.equals(candidate.identity())
                        && !toLookAt.contains(identity)
                        && !replaces.filter(identity::equals).isPresent());
    }

    private Set<FileIdentity> wantedFiles() throws ArchiveException {
        Set<FileIdentity> wanted = new HashSet<>();
        if (options.narrowed()) {
            for (LotState lot : archive.lots()) {
                if (options.wants(lot.name())) {
                    archive.filesOf(lot.name()).forEach(file -> wanted.add(file.identity()));
                }
            }
        }
        return wanted;
    }

    private boolean namesWantedLot(ArchivedFile known) {
        return options.wants(new LotName(known.grade(), known.lot()));
    }

    private boolean namesWantedLot(Look look) {
        if (look instanceof Look.Reduced reduced) {
            return lots(reduced.reductions()).stream().anyMatch(options::wants);
        }
        return look instanceof Look.SetAside aside && aside.lots().stream().anyMatch(options::wants);
    }

    private static NightFileRow waiting(Candidate candidate, String reason) {
        Optional<ArchivedFile> known = candidate.known();
        return new NightFileRow(
                candidate.file().tableName(),
                candidate.file().intake().instrument().id(),
                known.map(ArchivedFile::grade).orElse(""),
                known.map(ArchivedFile::lot).orElse(""),
                known.map(ArchivedFile::specimen).orElse(""),
                Status.WAITING,
                reason,
                0,
                candidate.file().bytes(),
                "");
    }

    private static NightFileRow row(ArchivedFile known, RawFile file, Status status) {
        return new NightFileRow(
                known.tableName(),
                file.intake().instrument().id(),
                known.grade(),
                known.lot(),
                known.specimen(),
                status,
                known.reason(),
                known.points(),
                file.bytes(),
                known.sha256());
    }

    private static ArchivedFile archived(Candidate candidate, String sha256, ArchivedFile known) {
        return new ArchivedFile(
                known.identity(),
                known.tableName(),
                candidate.file().intake().instrument().id(),
                candidate.file().bytes(),
                candidate.file().modifiedMillis(),
                sha256,
                known.fingerprint(),
                known.status(),
                known.reason(),
                known.points(),
                known.grade(),
                known.lot(),
                known.specimen(),
                known.rows(),
                known.rowsLeftOut());
    }

    private static LotName lowerCase(LotName lot) {
        return new LotName(lot.grade(), lot.lot().toLowerCase(Locale.ROOT));
    }

    private static Stream<PointKey> keys(List<Reduction> reductions) {
        return reductions.stream()
                .flatMap(reduction -> reduction.points().stream())
                .map(point -> point.key());
    }

    private static Set<LotName> lots(List<Reduction> reductions) {
        Set<LotName> lots = new LinkedHashSet<>();
        keys(reductions).forEach(key -> lots.add(new LotName(key.grade(), key.lot())));
        return lots;
    }

    private static Set<String> distinct(List<Reduction> reductions, Function<PointKey, String> part) {
        Set<String> values = new LinkedHashSet<>();
        keys(reductions).map(part).forEach(values::add);
        return values;
    }

    private static Set<String> map(Set<LotName> lots, Function<LotName, String> part) {
        Set<String> values = new LinkedHashSet<>();
        lots.stream().map(part).forEach(values::add);
        return values;
    }

    private static String only(Set<String> values) {
        return values.size() == 1 ? values.iterator().next() : "";
    }
}

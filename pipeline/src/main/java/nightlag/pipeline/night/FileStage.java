package nightlag.pipeline.night;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashSet;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.TreeMap;
import nightlag.pipeline.archive.ArchiveException;
import nightlag.pipeline.archive.ArchivedFile;
import nightlag.pipeline.archive.FileIdentity;
import nightlag.pipeline.archive.FileOutcome;
import nightlag.pipeline.archive.FileStatus;
import nightlag.pipeline.archive.LotName;
import nightlag.pipeline.archive.LotState;
import nightlag.pipeline.decode.RunSheets;
import nightlag.pipeline.intake.RawFile;
import nightlag.pipeline.night.Survey.Candidate;
import nightlag.pipeline.night.Survey.Task;
import nightlag.pipeline.tables.NightFileRow;
import nightlag.pipeline.tables.NightFileRow.Status;

/** The first half of a night: every file of the intakes ends with a status, what is new is in the archive. */
final class FileStage {
    /** Files a commit holds at most: each costs a wait for the disk, and a kill loses no more than these. */
    private static final int FILES_PER_COMMIT = 64;

    private final NightWork night;
    private final Progress progress;
    private final List<FileOutcome> pending = new ArrayList<>();
    private final List<ArchivedFile> amended = new ArrayList<>();
    private final Set<FileIdentity> toLookAt = new HashSet<>();

    /** Lots by grade and lower-case name, to find those that differ only in case. */
    private final Map<LotName, LotName> lotsByLowerCase = new TreeMap<>();

    FileStage(NightWork night, Progress progress) {
        this.night = night;
        this.progress = progress;
    }

    /** Brings every file of the survey to its end. */
    void work(Survey survey, RunSheets runSheets) throws ArchiveException {
        for (LotState lot : night.archive().lots()) {
            if (lot.points() > 0) {
                lotsByLowerCase.putIfAbsent(lowerCase(lot.name()), lot.name());
            }
        }
        Set<FileIdentity> wanted = wantedFiles();
        survey.candidates().stream()
                .filter(candidate -> candidate.task() != Task.LOOK && inside(candidate, wanted))
                .forEach(this::leaveAlone);
        lookAt(survey, runSheets, wanted);
    }

    private boolean inside(Candidate candidate, Set<FileIdentity> wanted) {
        return !night.options().narrowed()
                || wanted.contains(candidate.identity())
                || candidate.known().filter(this::namesWantedLot).isPresent();
    }

    private void leaveAlone(Candidate candidate) {
        if (candidate.task() == Task.WAIT) {
            String reason =
                    "changed less than " + night.configuration().settle().toSeconds() + " s ago; the next run takes it";
            night.tally().file(FileStates.waiting(candidate, reason));
        } else {
            leave(candidate.known().orElseThrow(), candidate.file());
        }
    }

    /**
     * Files with points come before new ones, and among them those whose lot now differs from a known one only in case come
     * last: the known lot goes first, whatever the names of the files.
     */
    private void lookAt(Survey survey, RunSheets runSheets, Set<FileIdentity> wanted) throws ArchiveException {
        List<Candidate> looks = survey.candidates().stream()
                .filter(candidate -> candidate.task() == Task.LOOK)
                .sorted(Comparator.comparing(candidate -> !hasPoints(candidate)))
                .toList();
        looks.forEach(candidate -> toLookAt.add(candidate.identity()));
        FileLooker looker =
                new FileLooker(night.configuration(), runSheets, night.options().redo(), night.version());
        List<Looked> twins = new ArrayList<>();
        progress.begin(looks.size());
        try (SideBySide<Candidate, Look> results = new SideBySide<>(looks.iterator(), looker::look, night.workers())) {
            for (Candidate candidate : looks) {
                Looked looked = new Looked(candidate, results.next());
                if (!hasPoints(candidate)) {
                    endAll(twins, survey.vanished());
                }
                if (!inside(candidate, wanted) && !namesWantedLot(looked.look())) {
                    toLookAt.remove(candidate.identity());
                } else if (namesATwin(looked)) {
                    twins.add(looked);
                } else {
                    end(looked, survey.vanished());
                }
                progress.fileDone();
            }
            endAll(twins, survey.vanished());
            commit();
        } finally {
            progress.end();
        }
    }

    /** A file and what looking at it gave. */
    private record Looked(Candidate candidate, Look look) {}

    private static boolean hasPoints(Candidate candidate) {
        return candidate.known().filter(known -> known.points() > 0).isPresent();
    }

    /** Whether a file that has points now names a lot that differs from a known one only in case. */
    private boolean namesATwin(Looked looked) {
        return hasPoints(looked.candidate())
                && looked.look() instanceof Look.Reduced reduced
                && FileStates.lots(reduced.reductions()).stream()
                        .anyMatch(lot -> !lotsByLowerCase
                                .getOrDefault(lowerCase(lot), lot)
                                .equals(lot));
    }

    private void endAll(List<Looked> looked, Map<String, List<ArchivedFile>> vanished) throws ArchiveException {
        for (Looked one : looked) {
            end(one, vanished);
        }
        looked.clear();
    }

    private void end(Looked looked, Map<String, List<ArchivedFile>> vanished) throws ArchiveException {
        end(looked.candidate(), looked.look(), vanished);
        toLookAt.remove(looked.candidate().identity());
    }

    private void end(Candidate candidate, Look look, Map<String, List<ArchivedFile>> vanished) throws ArchiveException {
        if (look instanceof Look.Waiting wait) {
            night.tally().file(FileStates.waiting(candidate, wait.reason()));
        } else if (look instanceof Look.Unchanged) {
            ArchivedFile known = candidate.known().orElseThrow();
            ArchivedFile restamped = FileStates.restamped(candidate, known);
            amend(restamped);
            leave(restamped, candidate.file());
        } else if (look instanceof Look.SetAside aside) {
            setAside(candidate, aside);
        } else if (look instanceof Look.Reduced reduced) {
            // a new path whose content the archive knows from a file that is gone takes that file's place
            List<ArchivedFile> gone =
                    candidate.known().isPresent() ? List.of() : vanished.getOrDefault(reduced.sha256(), List.of());
            Optional<FileIdentity> replaces = gone.stream().findFirst().map(ArchivedFile::identity);
            Optional<String> clash = clash(candidate, replaces, FileStates.lots(reduced.reductions()));
            if (clash.isPresent()) {
                Look.SetAside aside = new Look.SetAside(
                        reduced.sha256(),
                        candidate.file().tableName() + ": " + clash.get(),
                        FileStates.lots(reduced.reductions()),
                        FileStates.specimens(reduced.reductions()),
                        // it depends on other files than this one, so it is looked at again every night
                        ReductionState.TRY_AGAIN,
                        false);
                setAside(candidate, aside);
            } else {
                if (replaces.isPresent()) {
                    gone.remove(0);
                }
                reduced(candidate, reduced, replaces);
            }
        }
    }

    private void reduced(Candidate candidate, Look.Reduced look, Optional<FileIdentity> replaces)
            throws ArchiveException {
        ArchivedFile file = FileStates.reduced(candidate, look);
        pending.add(new FileOutcome(file, look.reductions(), replaces));
        FileStates.lots(look.reductions()).forEach(lot -> lotsByLowerCase.put(lowerCase(lot), lot));
        night.tally().file(FileStates.row(file, candidate.file(), Status.REDUCED));
        night.tally().reduced(file.tableName(), look.counts());
        if (pending.size() >= FILES_PER_COMMIT) {
            commit();
        }
    }

    private void setAside(Candidate candidate, Look.SetAside look) throws ArchiveException {
        ArchivedFile file = FileStates.setAside(candidate, look);
        boolean before = candidate
                .known()
                .filter(known -> known.status() == FileStatus.SET_ASIDE
                        && known.sha256().equals(look.sha256())
                        && known.fingerprint().equals(look.state())
                        && known.reason().equals(look.reason()))
                .isPresent();
        boolean archiveHasIt = candidate.known().filter(file::equals).isPresent();
        if (look.keepsReductions() && candidate.known().isPresent()) {
            amend(file);
        } else if (!archiveHasIt) {
            // a vanished file keeps its points until its content can be reduced elsewhere
            pending.add(new FileOutcome(file, List.of(), Optional.empty()));
        }
        NightFileRow row = FileStates.row(file, candidate.file(), Status.SET_ASIDE);
        if (before) {
            night.tally().stillSetAside(row);
        } else {
            night.tally().newlySetAside(row);
        }
    }

    private void leave(ArchivedFile known, RawFile file) {
        if (known.status() == FileStatus.SET_ASIDE) {
            night.tally().stillSetAside(FileStates.row(known, file, Status.SET_ASIDE));
        } else {
            night.tally().file(FileStates.row(known, file, Status.UNCHANGED));
        }
    }

    private void amend(ArchivedFile file) throws ArchiveException {
        amended.add(file);
        if (amended.size() >= FILES_PER_COMMIT) {
            commit();
        }
    }

    private void commit() throws ArchiveException {
        if (!amended.isEmpty()) {
            night.archive().amend(amended);
            amended.clear();
        }
        if (!pending.isEmpty()) {
            night.archive().commit(pending);
            pending.clear();
        }
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
        return night.archive().filesOf(known).stream()
                .map(ArchivedFile::identity)
                .anyMatch(identity -> !identity.equals(candidate.identity())
                        && !toLookAt.contains(identity)
                        && !replaces.filter(identity::equals).isPresent());
    }

    private Set<FileIdentity> wantedFiles() throws ArchiveException {
        Set<FileIdentity> wanted = new HashSet<>();
        if (night.options().narrowed()) {
            for (LotState lot : night.archive().lots()) {
                if (night.options().wants(lot.name())) {
                    night.archive().filesOf(lot.name()).forEach(file -> wanted.add(file.identity()));
                }
            }
        }
        return wanted;
    }

    private boolean namesWantedLot(ArchivedFile known) {
        return night.options().wants(new LotName(known.grade(), known.lot()));
    }

    private boolean namesWantedLot(Look look) {
        if (look instanceof Look.Reduced reduced) {
            return FileStates.lots(reduced.reductions()).stream().anyMatch(night.options()::wants);
        }
        return look instanceof Look.SetAside aside && aside.lots().stream().anyMatch(night.options()::wants);
    }

    private static LotName lowerCase(LotName lot) {
        return new LotName(lot.grade(), lot.lot().toLowerCase(Locale.ROOT));
    }
}

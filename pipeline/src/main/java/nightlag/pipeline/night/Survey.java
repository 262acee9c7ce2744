package nightlag.pipeline.night;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.InvalidPathException;
import java.nio.file.Path;
import java.time.Clock;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashMap;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import nightlag.pipeline.archive.ArchivedFile;
import nightlag.pipeline.archive.FileIdentity;
import nightlag.pipeline.config.Configuration;
import nightlag.pipeline.config.Intake;
import nightlag.pipeline.config.Problem;
import nightlag.pipeline.decode.DecodeException;
import nightlag.pipeline.decode.RunSheetRow;
import nightlag.pipeline.decode.RunSheets;
import nightlag.pipeline.intake.IntakeFiles;
import nightlag.pipeline.intake.IntakeScan;
import nightlag.pipeline.intake.RawFile;
import nightlag.pipeline.intake.Settling;

/**
 * What the intakes hold and what is to be done about each file, decided without opening a raw file.
 *
 * @param candidates every raw file, by name
 * @param unreadable what could not be read: whole intakes, or folders and files below them, with the reason
 * @param vanished files of the archive that are no longer there, by the digest of their content; files of an intake that
 *     cannot be read tonight are not among them
 */
record Survey(List<Candidate> candidates, List<String> unreadable, Map<String, List<ArchivedFile>> vanished) {
    /** What is to be done about a file. */
    enum Task {
        /** Changed too recently. */
        WAIT,
        /** Size, time and everything that decides about it are as the archive has them. */
        LEAVE,
        /** New, or something about it changed. */
        LOOK
    }

    /**
     * A raw file and what is to be done about it.
     *
     * @param file the file
     * @param runSheetDigest digest of its run-sheet row; empty text without one
     * @param known what the archive holds about it
     * @param task what is to be done
     */
    record Candidate(RawFile file, String runSheetDigest, Optional<ArchivedFile> known, Task task) {
        FileIdentity identity() {
            return identityOf(file);
        }
    }

    static FileIdentity identityOf(RawFile file) {
        return new FileIdentity(file.intake().folder().toString(), file.relativePath());
    }

    /** Surveys all intakes against what the archive holds. */
    static Survey of(
            Configuration configuration,
            List<ArchivedFile> archived,
            RunSheets runSheets,
            boolean redo,
            String version,
            Clock clock) {
        Map<FileIdentity, ArchivedFile> known = new HashMap<>();
        archived.forEach(file -> known.put(file.identity(), file));
        List<Candidate> candidates = new ArrayList<>();
        List<String> unreadable = new ArrayList<>();
        Set<String> notWhollyRead = new HashSet<>();
        Set<FileIdentity> seen = new HashSet<>();
        for (Intake intake : configuration.intakes()) {
            IntakeFiles found;
            try {
                found = IntakeScan.scan(intake);
            } catch (IOException e) {
                unreadable.add(intake.folder() + ": " + IoSentences.of(e));
                notWhollyRead.add(intake.folder().toString());
                continue;
            }
            for (Problem problem : found.unreadable()) {
                unreadable.add(problem.sentence());
                notWhollyRead.add(intake.folder().toString());
            }
            for (RawFile file : found.files()) {
                // a file that two intakes of one folder both match belongs to the first of them
                if (seen.add(identityOf(file))) {
                    candidates.add(candidate(configuration, known, file, runSheets, redo, version, clock));
                }
            }
        }
        candidates.sort(
                Comparator.comparing((Candidate candidate) -> candidate.file().tableName())
                        .thenComparing(candidate -> candidate.identity().folder()));
        return new Survey(candidates, unreadable, vanished(archived, seen, notWhollyRead));
    }

    private static Candidate candidate(
            Configuration configuration,
            Map<FileIdentity, ArchivedFile> known,
            RawFile file,
            RunSheets runSheets,
            boolean redo,
            String version,
            Clock clock) {
        Optional<ArchivedFile> before = Optional.ofNullable(known.get(identityOf(file)));
        String runSheetDigest = runSheetDigest(file, runSheets);
        boolean sameStamp = before.isPresent()
                && before.get().bytes() == file.bytes()
                && before.get().modifiedMillis() == file.modifiedMillis();
        Task task;
        if (!sameStamp && !Settling.settled(file, clock.millis(), configuration.settle())) {
            task = Task.WAIT;
        } else if (sameStamp
                && !redo
                && ReductionState.isCurrent(
                        before.get().fingerprint(),
                        version,
                        file.intake().instrument(),
                        runSheetDigest,
                        configuration)) {
            task = Task.LEAVE;
        } else {
            task = Task.LOOK;
        }
        return new Candidate(file, runSheetDigest, before, task);
    }

    /** A run sheet that cannot be read counts as a row of its own: mending it brings the file up again. */
    static String runSheetDigest(RawFile file, RunSheets runSheets) {
        try {
            return runSheets.rowOf(file).map(RunSheetRow::digest).orElse("");
        } catch (DecodeException e) {
            return e.problem().sentence();
        }
    }

    private static Map<String, List<ArchivedFile>> vanished(
            List<ArchivedFile> archived, Set<FileIdentity> seen, Set<String> unreadableFolders) {
        Map<String, List<ArchivedFile>> vanished = new HashMap<>();
        for (ArchivedFile file : archived) {
            FileIdentity identity = file.identity();
            if (!file.sha256().isEmpty()
                    && !seen.contains(identity)
                    && !unreadableFolders.contains(identity.folder())
                    && isGone(identity)) {
                vanished.computeIfAbsent(file.sha256(), sha -> new ArrayList<>())
                        .add(file);
            }
        }
        return vanished;
    }

    private static boolean isGone(FileIdentity identity) {
        try {
            return !Files.exists(Path.of(identity.folder()).resolve(identity.relativePath()));
        } catch (InvalidPathException notOfThisPlatform) {
            // an archive that came from another PC
            return true;
        }
    }
}

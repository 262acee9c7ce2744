package nightlag.pipeline.night;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.InvalidPathException;
import java.nio.file.Path;
import java.time.Clock;
import java.util.ArrayList;
import java.util.Collections;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import nightlag.pipeline.archive.Archive;
import nightlag.pipeline.archive.ArchiveException;
import nightlag.pipeline.archive.ArchivedFile;
import nightlag.pipeline.archive.FileStatus;
import nightlag.pipeline.config.Configuration;
import nightlag.pipeline.config.Intake;
import nightlag.pipeline.config.TagName;
import nightlag.pipeline.decode.DecodeException;
import nightlag.pipeline.decode.FileDescription;
import nightlag.pipeline.decode.RawFileDecoder;
import nightlag.pipeline.decode.RunSheets;
import nightlag.pipeline.intake.RawFile;

/**
 * What the next run would do, found without writing anything.
 *
 * @param toLookAt files it would take up
 * @param again files set aside before that it would look at again, as what stands in their way may be gone
 * @param waiting files that have not settled
 * @param left how many files it would leave as they are
 * @param unreadable what could not be read, with the reason
 * @param someIntakeReadable whether a run could begin
 * @param firstFiles how the first file of each intake decodes; empty for an intake without files
 */
public record Preview(
        List<RawFile> toLookAt,
        List<RawFile> again,
        List<RawFile> waiting,
        int left,
        List<String> unreadable,
        boolean someIntakeReadable,
        Map<Intake, Optional<FirstFile>> firstFiles) {
    /** Copies the collections; the map keeps the order of the intakes. */
    public Preview {
        toLookAt = List.copyOf(toLookAt);
        again = List.copyOf(again);
        waiting = List.copyOf(waiting);
        unreadable = List.copyOf(unreadable);
        firstFiles = Collections.unmodifiableMap(new LinkedHashMap<>(firstFiles));
    }

    /**
     * How a file decodes.
     *
     * @param file the file
     * @param description how it decodes; empty if it does not
     * @param problem why it, or every file like it, would be set aside; empty text otherwise
     */
    public record FirstFile(RawFile file, Optional<FileDescription> description, String problem) {}

    /**
     * Looks at the intakes and the archive.
     *
     * @throws NightFault if there is an archive that cannot be read
     */
    public static Preview of(Configuration configuration, Clock clock) throws NightFault {
        RunSheets runSheets = new RunSheets();
        Survey survey =
                Survey.of(configuration, archived(configuration), runSheets, false, ProgramVersion.get(), clock);
        List<RawFile> toLookAt = new ArrayList<>();
        List<RawFile> again = new ArrayList<>();
        List<RawFile> waiting = new ArrayList<>();
        Map<Intake, Optional<FirstFile>> firstFiles = new LinkedHashMap<>();
        configuration.intakes().forEach(intake -> firstFiles.put(intake, Optional.empty()));
        for (Survey.Candidate candidate : survey.candidates()) {
            RawFile file = candidate.file();
            if (candidate.task() == Survey.Task.LOOK) {
                (isTriedAgain(candidate) ? again : toLookAt).add(file);
            } else if (candidate.task() == Survey.Task.WAIT) {
                waiting.add(file);
            }
            firstFiles.compute(
                    file.intake(),
                    (intake, before) ->
                            before.isPresent() ? before : Optional.of(describe(file, runSheets, configuration)));
        }
        return new Preview(
                toLookAt,
                again,
                waiting,
                survey.candidates().size() - toLookAt.size() - again.size() - waiting.size(),
                survey.unreadable(),
                Night.someIntakeReadable(configuration),
                firstFiles);
    }

    /** Unchanged, and looked at every night: it is not taken up unless something else has changed. */
    private static boolean isTriedAgain(Survey.Candidate candidate) {
        return candidate
                .known()
                .filter(known -> known.status() == FileStatus.SET_ASIDE
                        && known.fingerprint().equals(ReductionState.TRY_AGAIN)
                        && known.bytes() == candidate.file().bytes()
                        && known.modifiedMillis() == candidate.file().modifiedMillis())
                .isPresent();
    }

    private static List<ArchivedFile> archived(Configuration configuration) throws NightFault {
        Path file = configuration.results().resolve(Night.ARCHIVE);
        if (!Files.exists(file)) {
            return List.of();
        }
        try (Archive archive = Archive.open(file)) {
            return archive.files();
        } catch (ArchiveException e) {
            throw new NightFault(NightFault.Kind.STOPPED, e.getMessage(), e);
        }
    }

    private static FirstFile describe(RawFile file, RunSheets runSheets, Configuration configuration) {
        try {
            FileDescription description = RawFileDecoder.describe(file, runSheets.rowOf(file));
            String stopped = description.tags().stream()
                    .filter(tag -> tag.name() == TagName.GRADE)
                    .map(tag ->
                            GradePlans.stoppedBecause(tag.text(), file.intake().instrument(), configuration))
                    .flatMap(Optional::stream)
                    .findFirst()
                    .map(reason -> file.tableName() + ": " + reason)
                    .orElse("");
            return new FirstFile(file, Optional.of(description), stopped);
        } catch (DecodeException e) {
            return new FirstFile(file, Optional.empty(), e.problem().sentence());
        } catch (IOException e) {
            return new FirstFile(file, Optional.empty(), file.tableName() + ": " + IoSentences.of(e));
        } catch (InvalidPathException e) {
            return new FirstFile(file, Optional.empty(), file.tableName() + ": " + IoSentences.of(e));
        }
    }
}

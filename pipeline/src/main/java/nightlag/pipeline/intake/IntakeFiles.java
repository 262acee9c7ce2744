package nightlag.pipeline.intake;

import java.util.List;
import nightlag.pipeline.config.Problem;

/**
 * What a walk through an intake folder found.
 *
 * @param files the raw files, sorted by path
 * @param unreadable folders and files below it that could not be looked at; what they hold is not among the files
 */
public record IntakeFiles(List<RawFile> files, List<Problem> unreadable) {
    /** Copies the lists. */
    public IntakeFiles {
        files = List.copyOf(files);
        unreadable = List.copyOf(unreadable);
    }
}

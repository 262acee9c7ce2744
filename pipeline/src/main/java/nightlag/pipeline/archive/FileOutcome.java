package nightlag.pipeline.archive;

import java.util.List;
import java.util.Optional;
import nightlag.stages.Reduction;

/**
 * What becomes of one file in the archive, committed whole: its old reductions go, the new ones come, the lots of both
 * are due.
 *
 * @param file the new state
 * @param reductions its reductions; empty when it is set aside
 * @param replaces a vanished file whose place it takes (same content, new path)
 */
public record FileOutcome(ArchivedFile file, List<Reduction> reductions, Optional<FileIdentity> replaces) {
    /** Copies the list. */
    public FileOutcome {
        reductions = List.copyOf(reductions);
    }
}

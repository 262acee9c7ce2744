package nightlag.pipeline.archive;

import java.util.List;
import java.util.Optional;
import nightlag.stages.Reduction;
import nightlag.stages.moduli.PointKey;

/**
 * What becomes of one file in the archive, committed whole: its old reductions go, the new ones come, the lots of both
 * are due.
 *
 * @param file the new state
 * @param reductions its reductions, in the order of the file; empty when it is set aside
 * @param replaces a vanished file whose place it takes (same content, new path)
 */
public record FileOutcome(ArchivedFile file, List<Reduction> reductions, Optional<FileIdentity> replaces) {
    /**
     * Copies the list.
     *
     * @throws IllegalArgumentException if a reduction has no point, or points of more than one lot
     */
    public FileOutcome {
        reductions = List.copyOf(reductions);
        reductions.forEach(FileOutcome::requireOneLot);
    }

    private static void requireOneLot(Reduction reduction) {
        long lots = reduction.keys().map(FileOutcome::lotOf).distinct().count();
        if (lots != 1) {
            throw new IllegalArgumentException("a reduction has points of " + lots + " lots; a record is of one");
        }
    }

    /** The lot a point is of. */
    static LotName lotOf(PointKey key) {
        return new LotName(key.grade(), key.lot());
    }
}

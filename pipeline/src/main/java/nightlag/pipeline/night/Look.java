package nightlag.pipeline.night;

import java.util.List;
import java.util.Set;
import nightlag.pipeline.archive.LotName;
import nightlag.pipeline.decode.DecodeCounts;
import nightlag.stages.Reduction;

/** What looking at one file gave. */
sealed interface Look {
    /** Digest of the file's content, hex; empty text where it could not be had. */
    String sha256();

    /**
     * Its records were reduced.
     *
     * @param sha256 digest of the content
     * @param counts where its rows went
     * @param reductions one a record
     * @param state what decided about it, for the archive
     */
    record Reduced(String sha256, DecodeCounts counts, List<Reduction> reductions, String state) implements Look {
        /** Copies the list. */
        public Reduced {
            reductions = List.copyOf(reductions);
        }
    }

    /**
     * Only its time stamp changed.
     *
     * @param sha256 digest of the content
     */
    record Unchanged(String sha256) implements Look {}

    /**
     * It cannot be used.
     *
     * @param sha256 digest of the content
     * @param reason what a technician can act on
     * @param lots lots its records named before it failed
     * @param specimens specimens they named
     * @param state what decided about it, for the archive
     * @param keepsReductions whether the points it gave before stay in the archive (its grade file is at fault, not the file)
     */
    record SetAside(
            String sha256,
            String reason,
            Set<LotName> lots,
            Set<String> specimens,
            String state,
            boolean keepsReductions)
            implements Look {
        /** Copies the sets. */
        public SetAside {
            lots = Set.copyOf(lots);
            specimens = Set.copyOf(specimens);
        }
    }

    /**
     * It is still being written.
     *
     * @param sha256 empty text
     * @param reason why it waits
     */
    record Waiting(String sha256, String reason) implements Look {}
}

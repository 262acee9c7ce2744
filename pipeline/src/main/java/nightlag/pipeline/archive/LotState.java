package nightlag.pipeline.archive;

/**
 * A lot that has, or had, points in the archive.
 *
 * @param name which lot
 * @param due whether its tables are behind the archive
 * @param conclusionFingerprint digest of what its tables were made with; empty text before the first time
 * @param points points it has now
 * @param trendFingerprint digest of its trends when its tables were made; empty text without any
 */
public record LotState(LotName name, boolean due, String conclusionFingerprint, int points, String trendFingerprint) {}

package nightlag.pipeline.archive;

/**
 * The row of a lot in the team sheet.
 *
 * @param lot the lot
 * @param body the row
 * @param written where it stands as it is here; empty where it has not been written yet
 */
public record KeptRow(LotName lot, String body, String written) {}

package nightlag.stages.geometry;

/**
 * What one correction comes to in one record.
 *
 * @param name what is corrected, in words
 * @param value how large it is configured, in {@code unit}
 * @param unit SI unit of the value
 * @param share its size as a part of what it acts on
 * @param actsOn what that is, in words
 */
public record CorrectionSize(String name, double value, String unit, double share, String actsOn) {}

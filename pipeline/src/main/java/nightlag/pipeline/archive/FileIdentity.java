package nightlag.pipeline.archive;

/**
 * A raw file as the archive knows it: two intake folders may carry the same name.
 *
 * @param folder the intake folder, absolute, as text
 * @param relativePath the path below it, always with '/'
 */
public record FileIdentity(String folder, String relativePath) {}

package nightlag.pipeline.archive;

/** What the archive knows of a raw file. */
public enum FileStatus {
    REDUCED,
    SET_ASIDE
}

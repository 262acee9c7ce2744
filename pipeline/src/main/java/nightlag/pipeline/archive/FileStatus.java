package nightlag.pipeline.archive;

/** What the archive knows of a raw file. */
public enum FileStatus {
    REDUCED("reduced"),
    SET_ASIDE("set-aside");

    private final String word;

    FileStatus(String word) {
        this.word = word;
    }

    /** The word in the archive, the same as in tables. */
    public String word() {
        return word;
    }

    /** The status with this word. */
    static FileStatus of(String word) {
        for (FileStatus status : values()) {
            if (status.word.equals(word)) {
                return status;
            }
        }
        throw new IllegalArgumentException("\"" + word + "\" is no status of a file");
    }
}

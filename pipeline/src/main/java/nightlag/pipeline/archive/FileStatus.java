package nightlag.pipeline.archive;

import java.util.Arrays;
import java.util.Optional;

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

    /** The status with this word, if it is one. */
    static Optional<FileStatus> of(String word) {
        return Arrays.stream(values())
                .filter(status -> status.word.equals(word))
                .findFirst();
    }
}

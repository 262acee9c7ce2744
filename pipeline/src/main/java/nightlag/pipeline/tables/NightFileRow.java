package nightlag.pipeline.tables;

/**
 * A row of {@code files.csv}.
 *
 * @param file its name in tables
 * @param instrument id of its instrument file
 * @param grade its grade, or empty text
 * @param lot its lot, or empty text
 * @param specimen its specimen, or empty text
 * @param status what became of it
 * @param reason why, where it was set aside or waits
 * @param points points it gave
 * @param bytes size
 * @param sha256 digest of its content, hex; empty text where it was not looked at
 */
public record NightFileRow(
        String file,
        String instrument,
        String grade,
        String lot,
        String specimen,
        Status status,
        String reason,
        int points,
        long bytes,
        String sha256) {
    /** What became of a file. */
    public enum Status {
        REDUCED("reduced"),
        UNCHANGED("unchanged"),
        WAITING("waiting"),
        SET_ASIDE("set-aside");

        private final String word;

        Status(String word) {
            this.word = word;
        }

        /** The word in tables. */
        public String word() {
            return word;
        }
    }
}

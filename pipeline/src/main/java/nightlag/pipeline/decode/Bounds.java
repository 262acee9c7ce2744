package nightlag.pipeline.decode;

/**
 * What is refused with a sentence because no recording looks like that, so that no file, however odd, can take all memory.
 */
final class Bounds {
    /** Characters in one line. */
    static final int LINE_CHARS = 1 << 20;
    /** Cells in one line. */
    static final int COLUMNS = 10_000;
    /** Rows of one waveform: with four channels 32 MB, and as much again while they are handed over. */
    static final int RECORD_ROWS = 1_000_000;
    /** Records of one file. */
    static final int RECORDS = 200_000;
    /** Characters in a tag. */
    static final int TAG_CHARS = 1_000;
    /** Bytes of a run sheet, which is held whole. */
    static final long RUN_SHEET_BYTES = 16L << 20;
    /** Steps a path pattern may take on one path: thousands of times what a sane one needs. */
    static final int PATTERN_STEPS = 1_000_000;

    private Bounds() {}
}

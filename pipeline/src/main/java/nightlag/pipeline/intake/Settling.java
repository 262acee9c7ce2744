package nightlag.pipeline.intake;

import java.time.Duration;

/** Whether an instrument has finished writing a file. */
public final class Settling {
    private Settling() {}

    /**
     * Whether the file was last changed at least {@code settle} ago. A modified time in the future counts as settled: the
     * clock that wrote it was wrong, and waiting for it could take for ever.
     *
     * @param nowMillis the present, ms since 1970
     */
    public static boolean settled(RawFile file, long nowMillis, Duration settle) {
        long age = nowMillis - file.modifiedMillis();
        return age < 0 || age >= settle.toMillis();
    }
}

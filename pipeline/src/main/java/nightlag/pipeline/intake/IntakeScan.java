package nightlag.pipeline.intake;

import java.io.IOException;
import java.util.List;
import nightlag.pipeline.config.Intake;

/** Finds the raw files of an intake folder. */
public final class IntakeScan {
    private IntakeScan() {}

    /**
     * Every regular file below the folder that the instrument's glob matches, sorted by path; links are not followed, a
     * run sheet is never a raw file.
     *
     * @throws IOException if the folder cannot be read
     */
    public static List<RawFile> files(Intake intake) throws IOException {
        throw new UnsupportedOperationException();
    }
}

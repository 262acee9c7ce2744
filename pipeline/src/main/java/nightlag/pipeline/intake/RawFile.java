package nightlag.pipeline.intake;

import java.nio.file.Path;
import nightlag.pipeline.config.Intake;

/**
 * One raw file of an intake as the night found it.
 *
 * @param intake its intake
 * @param relativePath path below the intake folder, always with '/'
 * @param bytes size
 * @param modifiedMillis modified time, ms since 1970
 */
public record RawFile(Intake intake, String relativePath, long bytes, long modifiedMillis) {
    /** The file itself. */
    public Path path() {
        return intake.folder().resolve(relativePath);
    }

    /** Its name in tables: the intake folder's name, '/', the path below it. */
    public String tableName() {
        return intake.name() + "/" + relativePath;
    }
}

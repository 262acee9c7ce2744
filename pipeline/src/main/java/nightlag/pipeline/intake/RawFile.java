package nightlag.pipeline.intake;

import java.io.IOException;
import java.io.InputStream;
import java.nio.file.Files;
import java.nio.file.Path;
import nightlag.pipeline.config.Intake;
import org.apache.commons.codec.digest.DigestUtils;

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

    /** SHA-256 of its bytes, hex; read in pieces, whatever its size. */
    public String sha256() throws IOException {
        try (InputStream bytes = Files.newInputStream(path())) {
            return DigestUtils.sha256Hex(bytes);
        }
    }

    /** Its name in tables: the intake folder's name, '/', the path below it. */
    public String tableName() {
        return intake.name() + "/" + relativePath;
    }
}

package nightlag.pipeline.night;

import java.io.IOException;
import java.io.InputStream;
import java.io.UncheckedIOException;
import java.util.Properties;

/** The program's version, as the build wrote it down. */
public final class ProgramVersion {
    private ProgramVersion() {}

    /** Such as {@code 0.2.0}. */
    public static String get() {
        try (InputStream in = ProgramVersion.class.getResourceAsStream("/nightlag/version.properties")) {
            Properties properties = new Properties();
            properties.load(in);
            return properties.getProperty("version");
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }
}

package nightlag.pipeline.config;

import java.nio.file.Path;

/** Reads a night file and everything it leads to. */
public final class ConfigurationReader {
    private ConfigurationReader() {}

    /**
     * Reads and checks the night file, every instrument file in use and every grade file.
     *
     * @param nightFile the night file
     * @throws ConfigurationException if the night file or an instrument file in use is wrong; all problems of all files,
     *     grade files included, are in it
     */
    public static Configuration read(Path nightFile) throws ConfigurationException {
        throw new UnsupportedOperationException();
    }
}

package nightlag.pipeline.cli;

import java.io.PrintWriter;
import java.nio.file.Path;
import nightlag.pipeline.config.Configuration;
import nightlag.pipeline.config.ConfigurationException;
import nightlag.pipeline.config.ConfigurationReader;
import nightlag.pipeline.night.NightFault;

/** What every command begins with, reading the configuration, and how each ends when something is wrong. */
final class NightFile {
    /** The night file where none is named. */
    static final String DEFAULT = "config/night.toml";

    private NightFile() {}

    /** A command's own work. */
    @FunctionalInterface
    interface Work {
        /** Does it and returns the exit code. */
        int with(Configuration configuration) throws NightFault;
    }

    /** Reads the configuration and does the work; what goes wrong is said on {@code err}, and the exit code tells. */
    static int read(Path nightFile, PrintWriter err, Work work) {
        try {
            return work.with(ConfigurationReader.read(nightFile));
        } catch (ConfigurationException e) {
            e.problems().forEach(problem -> err.println(problem.sentence()));
            return Nightlag.CANNOT_BEGIN;
        } catch (NightFault e) {
            err.println("nightlag: " + e.getMessage());
            return e.kind() == NightFault.Kind.CANNOT_BEGIN ? Nightlag.CANNOT_BEGIN : Nightlag.STOPPED;
        }
    }
}

package nightlag.pipeline.cli;

import java.io.PrintWriter;
import nightlag.pipeline.config.Configuration;

/** Says in a line each which sections are read and checked but not acted on yet. */
final class NotActedOn {
    private NotActedOn() {}

    static void print(Configuration configuration, PrintWriter out) {
        configuration.notActedOn().forEach(out::println);
    }
}

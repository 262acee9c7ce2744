package nightlag.pipeline.cli;

import java.io.PrintWriter;
import java.util.List;
import nightlag.pipeline.config.Configuration;
import nightlag.pipeline.night.NightOutcome;
import nightlag.pipeline.report.Concern;

/** What a technician reads when the night is over: what was done, and what to look at. */
final class Summary {
    private static final int MOST_LINES = 20;

    private final Configuration configuration;
    private final NightOutcome outcome;

    Summary(Configuration configuration, NightOutcome outcome) {
        this.configuration = configuration;
        this.outcome = outcome;
    }

    void print(PrintWriter out) {
        outcome.counts().forEach(out::println);
        for (Concern concern : outcome.concerns(configuration)) {
            list(out, concern.heading() + " (" + concern.things() + ")", concern.lines());
        }
        out.println("in      " + outcome.folder());
    }

    private static void list(PrintWriter out, String heading, List<String> lines) {
        if (lines.isEmpty()) {
            return;
        }
        out.println(heading);
        lines.stream().limit(MOST_LINES).forEach(line -> out.println("  " + line));
        if (lines.size() > MOST_LINES) {
            out.println("  and " + (lines.size() - MOST_LINES) + " more, all in night.log");
        }
    }
}

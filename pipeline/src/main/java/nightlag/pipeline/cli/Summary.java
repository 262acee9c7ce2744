package nightlag.pipeline.cli;

import java.io.PrintWriter;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Map;
import java.util.stream.Collectors;
import nightlag.pipeline.archive.LotName;
import nightlag.pipeline.config.Configuration;
import nightlag.pipeline.night.NightOutcome;
import nightlag.pipeline.tables.NightFileRow.Status;
import nightlag.stages.moduli.Quality;

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
        out.println("files   " + outcome.files().size() + " in the intake: "
                + Arrays.stream(Status.values())
                        .map(status -> outcome.count(status) + " " + status.word())
                        .collect(Collectors.joining(", ")));
        if (outcome.rows() > 0) {
            out.println("rows    " + outcome.rows() + " read, " + outcome.rowsLeftOut() + " left out");
            out.println("points  "
                    + Arrays.stream(Quality.values())
                            .map(quality -> outcome.quality().getOrDefault(quality, 0) + " " + quality.word())
                            .collect(Collectors.joining(", ")));
        }
        if (!outcome.flags().isEmpty()) {
            out.println("flags   "
                    + outcome.flags().entrySet().stream()
                            .map(flag -> flag.getKey().word() + " " + flag.getValue())
                            .collect(Collectors.joining(", ")));
        }
        out.println("lots    " + outcome.lotsConcluded().size() + " rebuilt");
        list(out, "look at: set aside", outcome.newlySetAside());
        list(out, "look at: points that are not sound", outcome.notSound());
        list(out, "look at: intakes that cannot be read", outcome.unreadableIntakes());
        list(
                out,
                "look at: lots not concluded",
                outcome.lotsNotConcluded().entrySet().stream()
                        .map(lot -> named(lot.getKey()) + ": " + lot.getValue())
                        .toList());
        list(out, "still set aside from an earlier night", outcome.stillSetAside());
        list(out, "could not be had", notes());
        list(
                out,
                "wrong grade files",
                configuration.gradeProblems().stream()
                        .map(problem -> problem.sentence())
                        .toList());
        out.println("in      " + outcome.folder());
    }

    private List<String> notes() {
        List<String> notes = new ArrayList<>();
        for (Map.Entry<LotName, List<String>> lot : outcome.lotsConcluded().entrySet()) {
            lot.getValue().forEach(note -> notes.add(named(lot.getKey()) + ": " + note));
        }
        return notes;
    }

    private static String named(LotName lot) {
        return lot.grade() + " lot " + lot.lot();
    }

    private static void list(PrintWriter out, String heading, List<String> lines) {
        if (lines.isEmpty()) {
            return;
        }
        out.println(heading + " (" + lines.size() + ")");
        lines.stream().limit(MOST_LINES).forEach(line -> out.println("  " + line));
        if (lines.size() > MOST_LINES) {
            out.println("  and " + (lines.size() - MOST_LINES) + " more, all in files.csv and night.log");
        }
    }
}

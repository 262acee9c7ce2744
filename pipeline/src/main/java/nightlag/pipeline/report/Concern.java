package nightlag.pipeline.report;

import java.util.List;

/**
 * Something a person should look at.
 *
 * @param heading what kind of thing
 * @param lines what is said of them
 * @param things how many they are; a line may speak of several
 */
public record Concern(String heading, List<String> lines, int things) {
    private static final String CALL = "look at: ";

    /** Copies the list. */
    public Concern {
        lines = List.copyOf(lines);
    }

    /** A line a thing. */
    public Concern(String heading, List<String> lines) {
        this(heading, lines, lines.size());
    }

    /** The heading where the call to look at it stands above it already. */
    public String underACall() {
        return heading.startsWith(CALL) ? heading.substring(CALL.length()) : heading;
    }
}

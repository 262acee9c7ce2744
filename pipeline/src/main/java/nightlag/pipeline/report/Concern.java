package nightlag.pipeline.report;

import java.util.List;

/**
 * Something a person should look at.
 *
 * @param heading what kind of thing
 * @param lines one a thing, with its reason
 */
public record Concern(String heading, List<String> lines) {
    private static final String CALL = "look at: ";

    /** Copies the list. */
    public Concern {
        lines = List.copyOf(lines);
    }

    /** The heading where the call to look at it stands above it already. */
    public String underACall() {
        return heading.startsWith(CALL) ? heading.substring(CALL.length()) : heading;
    }
}

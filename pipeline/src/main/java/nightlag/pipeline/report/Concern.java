package nightlag.pipeline.report;

import java.util.List;

/**
 * Something a person should look at.
 *
 * @param heading what kind of thing
 * @param lines one a thing, with its reason
 */
public record Concern(String heading, List<String> lines) {
    /** Copies the list. */
    public Concern {
        lines = List.copyOf(lines);
    }
}

package nightlag.pipeline.report;

import java.util.List;

/**
 * What stands at the top of a night's page.
 *
 * @param night the name of the night's folder
 * @param version the program's version
 * @param counts what was done, a line each
 * @param concerns what to look at, worst first; those without lines are not shown
 */
public record NightHeading(String night, String version, List<String> counts, List<Concern> concerns) {
    /** Copies the lists. */
    public NightHeading {
        counts = List.copyOf(counts);
        concerns = List.copyOf(
                concerns.stream().filter(concern -> !concern.lines().isEmpty()).toList());
    }
}

package nightlag.pipeline.tables;

import java.util.List;

/**
 * What a lot's tables were made from; it goes into the data package.
 *
 * @param grade the grade
 * @param lot the lot
 * @param inputs raw files with points in the lot, sorted by name
 * @param plans digests of the plans
 * @param programVersion version of the program
 */
public record Provenance(String grade, String lot, List<Input> inputs, List<Plan> plans, String programVersion) {
    /** Copies the lists. */
    public Provenance {
        inputs = List.copyOf(inputs);
        plans = List.copyOf(plans);
    }

    /**
     * A raw file.
     *
     * @param file its name in tables
     * @param sha256 digest of its content, hex
     */
    public record Input(String file, String sha256) {}

    /**
     * A plan.
     *
     * @param name what it decides, such as {@code reduction} or {@code conclusion}
     * @param fingerprint its digest, hex
     */
    public record Plan(String name, String fingerprint) {}
}

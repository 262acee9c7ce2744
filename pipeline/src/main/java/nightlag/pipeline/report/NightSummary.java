package nightlag.pipeline.report;

import com.fasterxml.jackson.databind.json.JsonMapper;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;

/**
 * What the index says of a night; {@code night.json} in the night's folder.
 *
 * @param night the name of the night's folder
 * @param version the program's version
 * @param counts what was done, a line each
 * @param concerns how much there was to look at, worst first
 * @param lots the lots rebuilt, each with its place in the night's page
 */
record NightSummary(String night, String version, List<String> counts, List<Count> concerns, List<LotLink> lots) {
    private static final String FILE_NAME = "night.json";
    private static final JsonMapper MAPPER = JsonMapper.builder().build();

    /**
     * So many things of one kind.
     *
     * @param heading what kind of thing
     * @param number how many
     */
    record Count(String heading, int number) {}

    /** Copies the lists. */
    NightSummary {
        counts = List.copyOf(counts);
        concerns = List.copyOf(concerns);
        lots = List.copyOf(lots);
    }

    static NightSummary of(NightHeading heading, List<LotLink> lots) {
        return new NightSummary(
                heading.night(),
                heading.version(),
                heading.counts(),
                heading.concerns().stream()
                        .map(concern -> new Count(concern.underACall(), concern.things()))
                        .toList(),
                lots);
    }

    void write(Path folder) throws IOException {
        Files.write(folder.resolve(FILE_NAME), MAPPER.writeValueAsBytes(this));
    }

    /** That of a night's folder; empty where the night was stopped, or the file is not as it was written. */
    static Optional<NightSummary> read(Path folder) {
        try {
            return Optional.of(MAPPER.readValue(Files.readAllBytes(folder.resolve(FILE_NAME)), NightSummary.class));
        } catch (IOException notThere) {
            return Optional.empty();
        }
    }
}

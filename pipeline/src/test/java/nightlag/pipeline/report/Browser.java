package nightlag.pipeline.report;

import static org.assertj.core.api.Assertions.assertThat;

import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.json.JsonMapper;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import java.util.stream.Stream;
import nightlag.pipeline.NodeCheck;

/** A real browser, Chromium, driven by the Node package {@code playwright-core}. */
final class Browser {
    private static final Optional<Path> CHROMIUM = Stream.of("/usr/bin/chromium", "/usr/bin/chromium-browser")
            .map(Path::of)
            .filter(Files::isExecutable)
            .findFirst();

    private Browser() {}

    /** Skips the test, or fails it, where there is none. */
    static void isNeeded() {
        NodeCheck.needs(CHROMIUM.isPresent(), "install Chromium to have this checked");
        NodeCheck.needs("playwright-core");
    }

    /** What a check of a page found. */
    static JsonNode found(String check, Path page, String... more) throws IOException, InterruptedException {
        String[] arguments = Stream.concat(
                        Stream.of(page.toString(), CHROMIUM.orElseThrow().toString()), Stream.of(more))
                .toArray(String[]::new);
        List<String> said = NodeCheck.lines(check, arguments);
        assertThat(said).hasSize(1);
        return JsonMapper.builder().build().readTree(said.get(0));
    }
}

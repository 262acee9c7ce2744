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
import nightlag.pipeline.tables.RandomLot;
import nightlag.stages.LotResult;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** The page in a real browser, Chromium, driven by the Node package {@code playwright-core}. */
class NightReportBrowserTest {
    private static Optional<Path> browser = Optional.empty();

    @TempDir
    Path folder;

    @BeforeAll
    static void needsABrowser() {
        browser = Stream.of("/usr/bin/chromium", "/usr/bin/chromium-browser")
                .map(Path::of)
                .filter(Files::isExecutable)
                .findFirst();
        NodeCheck.needs(browser.isPresent(), "install Chromium to have this checked");
        NodeCheck.needs("playwright-core");
    }

    @Test
    void everyChartIsDrawnAndEveryValueCanBeReadWithoutAPointer() throws IOException, InterruptedException {
        LotResult result = new RandomLot(2).result("Heron 3", "L-17");
        try (NightReport report = NightReport.begin(folder)) {
            report.lot("Heron 3", "L-17", result);
            report.lot("Heron 3", "L-18", LotResult.EMPTY);
            report.finish(new NightHeading("2026-03-01T020000", "1.2.3", List.of(), List.of()));
        }

        JsonNode page = opened(folder.resolve(NightReport.FILE_NAME));

        assertThat(page.get("faults")).isEmpty();
        List<Chart> charts = LotCharts.of(result);
        assertThat(page.get("figures")).hasSameSizeAs(charts);
        for (int i = 0; i < charts.size(); i++) {
            JsonNode figure = page.get("figures").get(i);
            assertThat(figure.get("title").asText()).isEqualTo(charts.get(i).title());
            assertThat(figure.get("shapes").asInt()).as(figure.toString()).isPositive();
            assertThat(figure.get("values").asInt()).as(figure.toString()).isPositive();
        }
        assertThat(page.get("readOff").asText())
                .contains(" Pa at ")
                .endsWith(charts.get(0).x().unit());
        assertThat(page.get("overflow").asBoolean()).isFalse();
    }

    private static JsonNode opened(Path page) throws IOException, InterruptedException {
        List<String> said = NodeCheck.lines(
                "check-page.js", page.toString(), browser.orElseThrow().toString());
        assertThat(said).hasSize(1);
        return JsonMapper.builder().build().readTree(said.get(0));
    }
}

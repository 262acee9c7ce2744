package nightlag.pipeline.report;

import static org.assertj.core.api.Assertions.assertThat;

import com.fasterxml.jackson.databind.JsonNode;
import java.io.IOException;
import java.nio.file.Path;
import java.util.List;
import nightlag.pipeline.tables.RandomLot;
import nightlag.stages.LotResult;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** The page in a real browser. */
class NightReportBrowserTest {
    @TempDir
    Path folder;

    @BeforeAll
    static void needsABrowser() {
        Browser.isNeeded();
    }

    @Test
    void everyChartIsDrawnAndEveryValueCanBeReadWithoutAPointer() throws IOException, InterruptedException {
        LotResult result = new RandomLot(2).result("Heron 3", "L-17");
        try (NightReport report = NightReport.begin(folder)) {
            report.lot("Heron 3", "L-17", result);
            report.lot("Heron 3", "L-18", LotResult.EMPTY);
            report.finish(new NightHeading("2026-03-01T020000", "1.2.3", List.of(), List.of()));
        }

        JsonNode page = Browser.found("check-page.js", folder.resolve(NightReport.FILE_NAME));

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
}

package nightlag.pipeline.report;

import static org.assertj.core.api.Assertions.assertThat;

import com.fasterxml.jackson.databind.JsonNode;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import nightlag.stages.LotResult;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** The way from the results folder to its nights and lots. */
class ResultsIndexTest {
    @TempDir
    Path results;

    private Path nights;

    @BeforeEach
    void setUp() throws IOException {
        nights = Files.createDirectory(results.resolve("nights"));
    }

    @Test
    void aLotLeadsToItsPartOfTheLatestPageThatHasIt() throws IOException {
        night("2026-03-01T020000", "L-17", "L-18");
        night("2026-03-01T020000-2", "L-18");
        night("2026-03-01T020000-10");

        String page = index(lot("Heron 3", "L-17"), lot("Heron 3", "L-18"));

        assertThat(page)
                .contains("href=\"nights/2026-03-01T020000/report.html#lot-1\"")
                .contains("href=\"nights/2026-03-01T020000-2/report.html#lot-1\"")
                .doesNotContain("report.html#lot-2");
        assertThat(page.indexOf("data-name=\"night 2026-03-01T020000-10\""))
                .isPositive()
                .isLessThan(page.indexOf("data-name=\"night 2026-03-01T020000-2\""));
    }

    @Test
    void whatIsGoneIsNotLedTo() throws IOException {
        night("2026-03-01T020000", "L-17");
        Files.delete(nights.resolve("2026-03-01T020000").resolve("report.html"));
        Files.createDirectory(nights.resolve("2026-03-02T020000"));
        Files.writeString(nights.resolve("2026-03-02T020000").resolve("night.json"), "{\"night\":");

        String page = index(lot("Heron 3", "L-17"));

        assertThat(page)
                .contains("the page of its night is gone")
                .contains("it was stopped, or is not over")
                .doesNotContain("report.html");
    }

    @Test
    void namesCanHoldAnything() throws IOException {
        String hostile = "\"><img src=x onerror=alert(1)>&";

        String page = index(new ResultsIndex.Entry(
                hostile,
                hostile,
                3,
                hostile,
                results.resolve("Grüne #1").resolve("a b?c"),
                List.of("master_curve.csv")));

        assertThat(page)
                .doesNotContain("<img")
                .contains("href=\"Gr%C3%BCne%20%231/a%20b%3Fc/master_curve.csv\">master curve</a>");
    }

    @Test
    void whatIsSoughtIsFoundByTheWordsOfItsName() throws IOException, InterruptedException {
        Browser.isNeeded();
        night("2026-03-01T020000", "L-17");
        index(lot("Heron 3", "L-17"), lot("Heron 3", "L-18"), lot("Plover", "L-17"));

        JsonNode found = Browser.found("check-index.js", results.resolve(ResultsIndex.FILE_NAME), "l-17 HERON");

        assertThat(found.get("faults")).isEmpty();
        assertThat(Browser.found("check-index.js", results.resolve(ResultsIndex.FILE_NAME), "undecided")
                        .get("found"))
                .hasSize(2);
        assertThat(found.get("found")).hasSize(1);
        assertThat(found.get("found").get(0).asText()).isEqualTo("L-17");
        assertThat(found.get("said").asText()).isEqualTo("lots: 1, nights: 0");
        assertThat(found.get("overflow").asBoolean()).isFalse();
    }

    private void night(String name, String... lots) throws IOException {
        Path folder = Files.createDirectory(nights.resolve(name));
        try (NightReport report = NightReport.begin(folder)) {
            for (String lot : lots) {
                report.lot("Heron 3", lot, LotResult.EMPTY);
            }
            report.finish(new NightHeading(
                    name,
                    "1.2.3",
                    List.of("lots    " + lots.length + " rebuilt"),
                    List.of(new Concern("set aside", List.of("bench/a.csv, line 7")))));
        }
        Files.writeString(folder.resolve("night.log"), "");
    }

    private ResultsIndex.Entry lot(String grade, String lot) {
        return new ResultsIndex.Entry(
                grade,
                lot,
                50,
                lot.endsWith("17") ? "2 conforming, 1 undecided" : "",
                results.resolve(grade).resolve(lot),
                List.of("points.csv"));
    }

    private String index(ResultsIndex.Entry... lots) throws IOException {
        ResultsIndex.write(results, nights, List.of(lots));
        return Files.readString(results.resolve(ResultsIndex.FILE_NAME));
    }
}

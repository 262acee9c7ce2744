package nightlag.pipeline.decode;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.nio.file.Path;
import java.util.Map;
import nightlag.pipeline.config.TagName;
import nightlag.stages.RecordTags;
import nightlag.stages.geometry.Dimension;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** Where the facts about a record come from. */
class TagTest {
    @TempDir
    Path folder;

    @ParameterizedTest(name = "{0}")
    @CsvSource(
            delimiter = '|',
            quoteCharacter = '~',
            value = {
                "Gap: 0,95|0.95e-3",
                "Gap = 0,95|0.95e-3",
                "Gap=0,95|0.95e-3",
                "Gap;0,95|0.95e-3",
                "  Gap ;  0,95 ;|0.95e-3",
                "Gap:;0,95|0.95e-3",
                "Gap;950;µm|0.95e-3",
                "Gap;950;[um]|0.95e-3",
                "Gap: 950 µm|0.95e-3",
                "Gap: 950µm|0.95e-3",
                "Gap: 0,95 ; set by hand|0.95e-3",
                "Gap: 0,95;3|0.95e-3",
                "~\"Gap\";\"0,95\"~|0.95e-3",
                "~\"Gap:\";\"950\";\"µm\"~|0.95e-3",
                "~\"Gap: 0,95\"~|0.95e-3",
                "Gap: 9,5e-1|0.95e-3"
            })
    void aLabelledLineAboveTheHeader(String line, double gap) throws Exception {
        Bench bench = Bench.melt(folder).preamble(TagName.GAP, "Gap", "mm");
        RecordTags tags = tags(bench, "a.csv", "Gaps: 7", "a Gap: 8", line, "Gap: 9,0", "t;phi;M", "0;1;2");
        assertThat(tags.dimensions().get(Dimension.GAP)).isCloseTo(gap, within(1e-17));
    }

    @Test
    void textEndsAtTheNextDelimiter() throws Exception {
        Bench bench = Bench.melt(folder)
                .preamble(TagName.GRADE, "Compound", "")
                .preamble(TagName.MADE, "Made", "")
                .preamble(TagName.SPECIMEN, "Remark", "");
        RecordTags tags = tags(
                bench,
                "a.csv",
                "Compound:\u00a0Heron 3 = new;;;",
                "Made: 2026-02-27 14:05",
                "Remark: \"mended",
                "t;phi;M",
                "0;1;2");
        assertThat(tags.key().grade()).isEqualTo("Heron 3 = new");
        assertThat(tags.made()).hasValue("2026-02-27 14:05");
        assertThat(tags.key().specimen()).isEqualTo("\"mended");
    }

    @Test
    void anEmptySourceCountsAsNotSet() throws Exception {
        Bench bench = Bench.melt(folder)
                .preamble(TagName.SPECIMEN, "Specimen", "")
                .preamble(TagName.GAP, "Gap", "mm")
                .preamble(TagName.POINT, "Point", "")
                .preamble(TagName.SWEEP, "Sweep", "");
        RecordTags tags = tags(bench, "sub.x/run.07.csv", "Specimen:", "Gap;;mm", "Point = ", "t;phi;M", "0;1;2");
        assertThat(tags.key().specimen()).isEqualTo("1");
        assertThat(tags.key().sweep()).isEqualTo("1");
        assertThat(tags.key().point()).isEqualTo("run.07");
        assertThat(tags.dimensions()).isEmpty();
    }

    @Test
    void groupsOfThePath() throws Exception {
        Bench bench = Bench.melt(folder)
                .path("(?<lot>[^/]+)/(?<specimen>[^/]+)/(?:T(?<t>[0-9,]+)-)?[^/]+\\.csv")
                .pathGroup(TagName.LOT, "lot", "")
                .pathGroup(TagName.SPECIMEN, "specimen", "")
                .pathGroup(TagName.TEMPERATURE, "t", "°C");
        RecordTags tags = tags(bench, "H3-0412/2/T190,5-1.csv", "t;phi;M", "0;1;2");
        assertThat(tags.key().lot()).isEqualTo("H3-0412");
        assertThat(tags.key().specimen()).isEqualTo("2");
        assertThat(tags.temperatureK().orElseThrow()).isCloseTo(463.65, within(1e-12));
        assertThat(tags(bench, "H3-0412/2/1.csv", "t;phi;M", "0;1;2").temperatureK())
                .isEmpty();
    }

    @Test
    void everyDimensionAndTimeInSi() throws Exception {
        Bench bench = Bench.melt(folder)
                .preamble(TagName.DIAMETER, "D", "mm")
                .preamble(TagName.CONE_ANGLE, "cone", "°")
                .preamble(TagName.AREA, "A", "mm²")
                .preamble(TagName.DENSITY, "rho", "g/cm³")
                .preamble(TagName.ELAPSED, "after", "min")
                .fixed(TagName.WIDTH, "10.5 mm");
        RecordTags tags =
                tags(bench, "a.csv", "D: 25", "cone: 180", "A: 150", "rho: 0,92", "after: 2,5", "t;phi;M", "0;1;2");
        assertThat(tags.dimensions())
                .containsExactlyInAnyOrderEntriesOf(Map.of(
                        Dimension.DIAMETER, 0.025,
                        Dimension.CONE_ANGLE, Math.PI,
                        Dimension.AREA, 150e-6,
                        Dimension.DENSITY, 920.0,
                        Dimension.WIDTH, 0.0105));
        assertThat(tags.elapsedS()).hasValue(150);
    }

    private static RecordTags tags(Bench bench, String path, String... lines) throws Exception {
        return Bench.decode(bench.write(path, lines)).records().get(0).tags();
    }
}

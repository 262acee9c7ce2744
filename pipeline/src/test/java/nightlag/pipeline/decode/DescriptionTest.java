package nightlag.pipeline.decode;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;

import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import nightlag.pipeline.config.ChannelName;
import nightlag.pipeline.config.TagName;
import nightlag.pipeline.decode.FileDescription.DescribedChannel;
import nightlag.pipeline.decode.FileDescription.DescribedTag;
import nightlag.pipeline.intake.RawFile;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class DescriptionTest {
    @TempDir
    Path folder;

    @Test
    void tellsChannelsAndTagsAndWhereEachCameFrom() throws Exception {
        Bench bench = Bench.melt(folder)
                .unitRow()
                .runSheet("runs.csv")
                .runSheetColumn(TagName.SWEEP, "sweep", "")
                .preamble(TagName.GRADE, "Compound", "")
                .path("(?<lot>[^/]+)/.*")
                .pathGroup(TagName.LOT, "lot", "")
                .column(TagName.TEMPERATURE, "T", "K")
                .fixed(TagName.GAP, "1 mm");
        bench.write("runs.csv", "file;sweep", "A/p.csv;up");
        RawFile file = bench.write(
                "A/p.csv",
                "Compound: Heron 3",
                "t;phi;M;T",
                "s;;µN·m;°C",
                "",
                "0;1;2;20",
                "1;;4;20",
                "2;5;6;20",
                "3;7;n/a;20");
        FileDescription description = RawFileDecoder.describe(file, new RunSheets().rowOf(file));
        assertThat(description.file()).isEqualTo("bench/A/p.csv");
        assertThat(description.charset()).isEqualTo("UTF-8");
        assertThat(description.byteOrderMark()).isFalse();
        assertThat(description.headerLine()).isEqualTo(2);
        assertThat(description.columns()).containsExactly("t", "phi", "M", "T");
        assertThat(description.firstDataLine()).isEqualTo(5);
        assertThat(description.channels())
                .containsExactly(
                        new DescribedChannel(
                                ChannelName.TIME,
                                1,
                                Optional.of("t"),
                                "s",
                                "unit row, line 3",
                                "s",
                                values(0.0, 1.0, 2.0)),
                        new DescribedChannel(
                                ChannelName.ANGLE,
                                2,
                                Optional.of("phi"),
                                "mrad",
                                "[channels]",
                                "rad",
                                List.of(Optional.of(0.001), Optional.empty(), Optional.of(0.005))),
                        new DescribedChannel(
                                ChannelName.TORQUE,
                                3,
                                Optional.of("M"),
                                "µN·m",
                                "unit row, line 3",
                                "N·m",
                                values(2e-6, 4e-6, 6e-6)));
        assertThat(description.tags())
                .containsExactly(
                        new DescribedTag(TagName.GRADE, "Heron 3", Optional.empty(), "line 1, 'Compound'"),
                        new DescribedTag(TagName.LOT, "A", Optional.empty(), "path, group 'lot'"),
                        new DescribedTag(TagName.SPECIMEN, "1", Optional.empty(), "default"),
                        new DescribedTag(
                                TagName.SWEEP,
                                "up",
                                Optional.empty(),
                                "run sheet bench/runs.csv, line 2, column 'sweep'"),
                        new DescribedTag(TagName.POINT, "p", Optional.empty(), "default, the file's name"),
                        new DescribedTag(TagName.TEMPERATURE, "20", Optional.of("293.15 K"), "column 'T'"),
                        new DescribedTag(TagName.GAP, "1 mm", Optional.of("0.001 m"), "instrument file"));
    }

    @Test
    void aFileThatCannotBeReadSaysWhy() {
        RawFile file = Bench.melt(folder).write("a.csv", "t;phi;M", "0;1;n/a");
        assertThatThrownBy(() -> RawFileDecoder.describe(file, Optional.empty()))
                .isInstanceOf(DecodeException.class)
                .hasMessageContaining("line 2, column 'M'");
    }

    private static List<Optional<Double>> values(double... values) {
        return java.util.Arrays.stream(values).mapToObj(Optional::of).toList();
    }
}

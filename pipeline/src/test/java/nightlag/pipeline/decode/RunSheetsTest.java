package nightlag.pipeline.decode;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;
import static org.assertj.core.api.Assertions.within;

import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Map;
import nightlag.pipeline.config.TagName;
import nightlag.pipeline.intake.RawFile;
import nightlag.stages.geometry.Dimension;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class RunSheetsTest {
    @TempDir
    Path folder;

    private Bench bench;

    @BeforeEach
    void aBenchWithRunSheets() {
        bench = Bench.melt(folder)
                .runSheet("runs.csv")
                .runSheetColumn(TagName.GAP, "gap_mm", "mm")
                .runSheetColumn(TagName.SPECIMEN, "piece", "");
    }

    @Test
    void aRowSpeaksOfItsFileInTheDialectOfRawFiles() throws Exception {
        bench.write("runs.csv", "", "file;gap_mm;piece", "day1/a.csv;0,95;bar 7", "day1/b.csv;0,90 mm;");
        RawFile a = bench.write("day1/a.csv", "t;phi;M", "0;1;2");
        RawFile b = bench.write("day1/b.csv", "t;phi;M", "0;1;2");
        assertThat(Bench.decode(a).waveform(0).tags().dimensions().get(Dimension.GAP))
                .isCloseTo(9.5e-4, within(1e-18));
        assertThat(Bench.decode(a).waveform(0).tags().key().specimen()).isEqualTo("bar 7");
        assertThat(Bench.decode(b).waveform(0).tags().dimensions().get(Dimension.GAP))
                .isCloseTo(9e-4, within(1e-18));
        assertThat(Bench.decode(b).waveform(0).tags().key().specimen()).isEqualTo("1");
        assertThat(new RunSheets().rowOf(a))
                .contains(new RunSheetRow(
                        "bench/runs.csv", 3, Map.of("file", "day1/a.csv", "gap_mm", "0,95", "piece", "bar 7")));
    }

    @Test
    void theNearestSheetThatNamesTheFileSpeaks() throws Exception {
        bench.write("runs.csv", "file;gap_mm;piece", "x/y/a.csv;1;top", ".\\x\\y\\b.csv;1;top");
        bench.write("x/runs.csv", "file;gap_mm;piece", "y/a.csv;2;middle");
        bench.write("x/y/runs.csv", "file;gap_mm;piece", "other.csv;3;bottom");
        RunSheets sheets = new RunSheets();
        RawFile a = bench.write("x/y/a.csv", "t;phi;M", "0;1;2");
        RawFile b = bench.write("x/y/b.csv", "t;phi;M", "0;1;2");
        RawFile c = bench.write("x/y/c.csv", "t;phi;M", "0;1;2");
        assertThat(sheets.rowOf(a).orElseThrow().cells()).containsEntry("piece", "middle");
        assertThat(sheets.rowOf(b).orElseThrow().sheet()).isEqualTo("bench/runs.csv");
        assertThat(sheets.rowOf(c)).isEmpty();
        // no gap from the run sheet: the geometry's own stays in force
        assertThat(Bench.decode(c).waveform(0).tags().dimensions()).isEmpty();
    }

    @Test
    void eachSheetIsReadOnce() throws Exception {
        bench.write("runs.csv", "file;gap_mm;piece", "a.csv;1;first");
        RawFile a = bench.write("a.csv", "t;phi;M", "0;1;2");
        RunSheets sheets = new RunSheets();
        assertThat(sheets.rowOf(a).orElseThrow().cells()).containsEntry("piece", "first");
        Files.delete(folder.resolve("runs.csv"));
        assertThat(sheets.rowOf(a).orElseThrow().cells()).containsEntry("piece", "first");
    }

    @Test
    void twoRowsForOneFileAreAProblemOfThatFile() throws Exception {
        bench.write("runs.csv", "file;gap_mm;piece", "a.csv;1;x", "b.csv;1;x", "./a.csv;2;y");
        RawFile a = bench.write("a.csv", "t;phi;M", "0;1;2");
        RawFile b = bench.write("b.csv", "t;phi;M", "0;1;2");
        RunSheets sheets = new RunSheets();
        assertThatThrownBy(() -> sheets.rowOf(a))
                .hasMessage("bench/runs.csv, line 4, column 'file': a second row for 'a.csv' after that on line 2;"
                        + " expected one row a file");
        assertThat(sheets.rowOf(b)).isPresent();
    }

    @Test
    void aShortRowIsAProblemOfTheFileItNames() throws Exception {
        bench.write("runs.csv", "file;gap_mm;piece", "a.csv;1", "b.csv;1;x");
        RunSheets sheets = new RunSheets();
        assertThatThrownBy(() -> sheets.rowOf(bench.write("a.csv", "")))
                .hasMessage("bench/runs.csv, line 2: a row of 2 cells; expected 3, as the header has");
        assertThat(sheets.rowOf(bench.write("b.csv", ""))).isPresent();
    }

    @Test
    void aSheetThatCannotBeReadIsAProblemOfEveryFile() {
        RawFile a = bench.write("a.csv", "t;phi;M", "0;1;2");
        bench.write("runs.csv", "name;gap_mm", "a.csv;1");
        assertThatThrownBy(() -> new RunSheets().rowOf(a))
                .hasMessageStartingWith("bench/runs.csv, line 1, column 'file': no such column in 'name, gap_mm'");
        bench.write("runs.csv", "file;gap_mm;gap_mm", "a.csv;1;2");
        assertThatThrownBy(() -> new RunSheets().rowOf(a)).hasMessageContaining("column 'gap_mm': that header twice");
        bench.write("runs.csv", "file;gap_mm", "b.csv;\"1");
        assertThatThrownBy(() -> new RunSheets().rowOf(a)).hasMessageContaining("line 2: quotation marks");
        bench.writeBytes("runs.csv", "file;gap_mm\né;1".getBytes(StandardCharsets.ISO_8859_1));
        assertThatThrownBy(() -> new RunSheets().rowOf(a)).hasMessageContaining("line 2: bytes that are no text");
        bench.write("runs.csv", "");
        assertThatThrownBy(() -> new RunSheets().rowOf(a)).hasMessageContaining("an empty run sheet");
    }

    @Test
    void complaintsAboutACellNameTheSheet() {
        bench.write("runs.csv", "file;gap_mm;piece", "a.csv;wide;x");
        RawFile a = bench.write("a.csv", "t;phi;M", "0;1;2");
        assertThatThrownBy(() -> Bench.decode(a))
                .hasMessageStartingWith("bench/runs.csv, line 2, column 'gap_mm': 'wide'");
        bench.write("runs.csv", "file;piece", "a.csv;x");
        assertThatThrownBy(() -> Bench.decode(a))
                .hasMessage("bench/runs.csv, line 2, column 'gap_mm': no such column; expected one of the run sheet's:"
                        + " 'file', 'piece'");
    }

    @Test
    void theDigestFollowsTheFactsButNotTheirPlace() {
        RunSheetRow row = new RunSheetRow("bench/runs.csv", 2, Map.of("file", "a.csv", "gap", "1"));
        assertThat(row.digest()).hasSize(64);
        assertThat(new RunSheetRow("bench/x/runs.csv", 9, Map.of("file", "b.csv", "gap", "1")).digest())
                .isEqualTo(row.digest());
        assertThat(new RunSheetRow("bench/runs.csv", 2, Map.of("file", "a.csv", "gap", "2")).digest())
                .isNotEqualTo(row.digest());
        assertThat(new RunSheetRow("bench/runs.csv", 2, Map.of("file", "a.csv", "gap", "1", "x", "")).digest())
                .isNotEqualTo(row.digest());
    }
}

package nightlag.pipeline.decode;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;

import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class CellSplitterTest {
    private static final Complaints COMPLAINTS = new Complaints("bench/a.csv");

    @TempDir
    Path folder;

    @Test
    void cellsLieBetweenDelimitersWithoutTheBlanksAroundThem() throws Exception {
        assertThat(split(';', " a ;;b\u00a0;\tc d ")).containsExactly("a", "", "b", "c d");
        assertThat(split('\t', "a\t b \t")).containsExactly("a", "b", "");
        assertThat(split(',', "")).containsExactly("");
    }

    @Test
    void aRunOfSpacesIsOneDelimiterAndThoseAroundTheLineAreNone() throws Exception {
        assertThat(split(' ', "   1.0    2 3   ")).containsExactly("1.0", "2", "3");
        assertThat(split(' ', "  \"a b\"   \"\"  c ")).containsExactly("a b", "", "c");
    }

    @Test
    void quotesHoldDelimitersAndDoubledQuotes() throws Exception {
        assertThat(split(';', "\"a;b\"; \"say \"\"so\"\"\" ;")).containsExactly("a;b", "say \"so\"", "");
        assertThat(split(';', "2\" pipe;3")).containsExactly("2\" pipe", "3");
    }

    /** A line without quotes must mean the same whether it is cut here or by the library. */
    @Test
    void bothWaysAgree() throws Exception {
        for (String line : List.of("1;2;3", ";;", "a", "a; b ;c;", "x\u00e4;\u03bc")) {
            assertThat(split(';', line + ";\"\""))
                    .as(line)
                    .startsWith(split(';', line).toArray(String[]::new));
        }
    }

    @Test
    void quotesThatDoNotPairUpAreAComplaintWithTheirLine() {
        assertThatThrownBy(() -> split(';', "1;\"2;3"))
                .hasMessage("bench/a.csv, line 1: quotation marks that do not pair up in '1;\"2;3'; expected a quoted"
                        + " cell that ends on its own line, before a delimiter");
        assertThatThrownBy(() -> split(';', "\"1\"2;3")).isInstanceOf(DecodeException.class);
    }

    @Test
    void aRemarkMayHoldAnyQuotes() throws Exception {
        assertThat(new CellSplitter(';', COMPLAINTS).splitLoosely("\"1;2")).containsExactly("\"1", "2");
    }

    private List<String> split(char delimiter, String line) throws Exception {
        Path file = Files.writeString(folder.resolve("a.csv"), line + "\n", StandardCharsets.UTF_8);
        try (TextLines lines = new TextLines(file, StandardCharsets.UTF_8, COMPLAINTS)) {
            assertThat(lines.next()).isTrue();
            Cells cells = new Cells();
            new CellSplitter(delimiter, COMPLAINTS).split(lines, cells);
            return cells.texts();
        }
    }
}

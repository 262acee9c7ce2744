package nightlag.pipeline.decode;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;

import java.nio.charset.Charset;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class TextLinesTest {
    @TempDir
    Path folder;

    @Test
    void aLastLineNeedsNoEnd() throws Exception {
        assertThat(lines("a\n\nb".getBytes(StandardCharsets.UTF_8), StandardCharsets.UTF_8))
                .containsExactly("a", "", "b");
        assertThat(lines("a\n".getBytes(StandardCharsets.UTF_8), StandardCharsets.UTF_8))
                .containsExactly("a");
        assertThat(lines(new byte[0], StandardCharsets.UTF_8)).isEmpty();
    }

    /** Characters and line ends fall on every place of the buffers, which hold 65,536. */
    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5, 6})
    void longFilesComeBackWhole(long seed) throws Exception {
        Random random = new Random(seed);
        Charset charset = List.of(StandardCharsets.UTF_8, StandardCharsets.UTF_16LE, Charset.forName("UTF-32BE"))
                .get(random.nextInt(3));
        String end = List.of("\n", "\r\n", "\r").get(random.nextInt(3));
        List<String> written = new ArrayList<>();
        for (int i = 0; i < 3000; i++) {
            written.add("aé°€😀".repeat(random.nextInt(40)) + i);
        }
        byte[] bytes = (String.join(end, written) + end).getBytes(charset);
        assertThat(lines(bytes, charset)).isEqualTo(written);
    }

    @Test
    void bytesThatAreNoTextAreNamedWithTheirLine() {
        byte[] bytes = "one\ntwo\nthr\u00e9e\n".getBytes(StandardCharsets.ISO_8859_1);
        assertThatThrownBy(() -> lines(bytes, StandardCharsets.UTF_8))
                .isInstanceOf(DecodeException.class)
                .hasMessageStartingWith("bench/a.csv, line 3: bytes that are no text in UTF-8");
    }

    @Test
    void textCutOffInTheMiddleOfACharacterIsNoText() {
        byte[] bytes = "one\nt".getBytes(StandardCharsets.UTF_16LE);
        assertThatThrownBy(() -> lines(java.util.Arrays.copyOf(bytes, bytes.length - 1), StandardCharsets.UTF_16LE))
                .hasMessageStartingWith("bench/a.csv, line 2: bytes that are no text in UTF-16LE");
    }

    @Test
    void utf16ReadAsUtf8IsNoticedByItsZeros() {
        byte[] bytes = "one\ntwo\n".getBytes(StandardCharsets.UTF_16LE);
        assertThatThrownBy(() -> lines(bytes, StandardCharsets.UTF_8))
                .hasMessageStartingWith("bench/a.csv, line 1: a zero character; expected text in UTF-8");
    }

    @Test
    void anEndlessLineIsRefused() {
        byte[] bytes = ("one\n" + "x".repeat(Bounds.LINE_CHARS + 1)).getBytes(StandardCharsets.UTF_8);
        assertThatThrownBy(() -> lines(bytes, StandardCharsets.UTF_8))
                .hasMessage("bench/a.csv, line 2: a line of more than 1048576 characters; expected lines of a table");
    }

    private List<String> lines(byte[] bytes, Charset charset) throws Exception {
        Path file = Files.write(folder.resolve("a.csv"), bytes);
        List<String> read = new ArrayList<>();
        try (TextLines lines = new TextLines(file, charset, new Complaints("bench/a.csv"))) {
            while (lines.next()) {
                read.add(lines.line());
                assertThat(lines.number()).isEqualTo(read.size());
            }
        }
        return read;
    }
}

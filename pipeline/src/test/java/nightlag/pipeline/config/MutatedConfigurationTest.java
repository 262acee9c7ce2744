package nightlag.pipeline.config;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.Random;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** Whatever stands in a file, it is either read or refused with at least one problem that names a line of it. */
class MutatedConfigurationTest {
    private static final Path ACCEPTED = Path.of("src/test/resources/config-accepted");
    private static final int ROUNDS = 30;
    private static final String[] PIECES = {
        "\"",
        "'",
        "[",
        "]",
        "[[",
        "{",
        "}",
        "=",
        ",",
        ".",
        "\n",
        "#",
        "-1",
        "0",
        "1e400",
        "nan",
        "true",
        "\"\"",
        "[]",
        "{}",
        "\\",
        "\u0000",
        "°",
        "\uD83D\uDE00",
        "\"1 mm\"",
        "\"-3 K\"",
        "grade",
        "[geometry]\n",
        "kind = \"none\"\n"
    };

    private static String mutated(String text, Random random) {
        StringBuilder out = new StringBuilder(text);
        for (int i = 1 + random.nextInt(3); i > 0; i--) {
            int at = random.nextInt(out.length());
            switch (random.nextInt(4)) {
                case 0 -> out.insert(at, PIECES[random.nextInt(PIECES.length)]);
                case 1 -> out.delete(at, Math.min(out.length(), at + 1 + random.nextInt(12)));
                case 2 -> out.setCharAt(at, (char) (32 + random.nextInt(95)));
                default -> {
                    int from = random.nextInt(out.length());
                    String piece = out.substring(from, Math.min(out.length(), from + random.nextInt(40)));
                    out.insert(at, piece);
                }
            }
        }
        return out.toString();
    }

    private static void check(boolean read, List<Problem> problems, String text) {
        assertThat(read || !problems.isEmpty()).as(text).isTrue();
        long lines = text.lines().count() + 1;
        assertThat(problems).allSatisfy(problem -> {
            assertThat(problem.line()).isBetween(0, Math.toIntExact(lines));
            assertThat(problem.found()).isNotBlank();
        });
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5, 6, 7, 8, 9, 10})
    void instruments(long seed) throws IOException {
        Random random = new Random(seed);
        String text = Files.readString(ACCEPTED.resolve("instruments/bench.toml"));
        for (int i = 0; i < ROUNDS; i++) {
            String wrong = mutated(text, random);
            List<Problem> problems = new ArrayList<>();
            Optional<Instrument> read = InstrumentReader.read("bench", TomlFile.parse(wrong, "bench.toml"), problems);
            check(read.isPresent(), problems, wrong);
        }
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {11, 12, 13, 14, 15, 16, 17, 18, 19, 20})
    void grades(long seed) throws IOException {
        Random random = new Random(seed);
        String text = Files.readString(ACCEPTED.resolve("grades/heron-3.toml"))
                .replace("extends = \"melt\"", "")
                .replace("[geometry]", "[geometry]\nkind = \"parallel-plate\"");
        for (int i = 0; i < ROUNDS; i++) {
            String wrong = mutated(text, random);
            TomlFile toml = TomlFile.parse(wrong, "heron.toml");
            Problems problems = new Problems(!toml.whole());
            problems.addAll(toml.problems());
            Optional<Grade> read = GradeReader.read("Heron 3", "heron.toml", toml.root(), problems);
            check(read.isPresent(), problems.inOrder(), wrong);
        }
    }
}

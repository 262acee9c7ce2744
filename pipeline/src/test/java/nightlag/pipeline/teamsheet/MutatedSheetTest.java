package nightlag.pipeline.teamsheet;

import static nightlag.pipeline.teamsheet.Rows.MARCH_1;
import static nightlag.pipeline.teamsheet.Rows.damping;
import static nightlag.pipeline.teamsheet.Rows.row;
import static nightlag.pipeline.teamsheet.Rows.update;
import static org.assertj.core.api.Assertions.assertThat;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Random;
import nightlag.pipeline.teamsheet.SheetOutcome.Written;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** However a file is damaged: it takes the rows and every other cell stays, or it stays as it is with a reason; nothing breaks. */
class MutatedSheetTest {
    private static final int MUTATIONS = 60;

    @TempDir
    Path folder;

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3})
    void aWorkbookWithDamagedParts(long seed) throws IOException {
        Path file = folder.resolve("team.xlsx");
        Books.write(file, RandomWorkbook.of(seed));
        Map<String, String> whole = Books.parts(file);
        List<String> names = new ArrayList<>(whole.keySet());
        Random random = new Random(seed);
        for (int i = 0; i < MUTATIONS; i++) {
            Map<String, String> parts = new LinkedHashMap<>();
            String damaged = names.get(random.nextInt(names.size()));
            whole.forEach((name, text) -> parts.put(name, utf8(name.equals(damaged) ? mutated(text, random) : text)));
            Books.writeParts(file, parts);
            assertWholeOrUntouched(file);
        }
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3})
    void aWorkbookWithDamagedBytes(long seed) throws IOException {
        Path file = folder.resolve("team.xlsx");
        Books.write(file, RandomWorkbook.of(seed));
        assertOnMutatedBytes(file, seed);
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3})
    void aCsvWithDamagedBytes(long seed) throws IOException {
        Path file = folder.resolve("team.csv");
        Files.writeString(
                file, "grade;lot;\"a; note\";updated\r\nHeron 3;A;\"x\"\"y\";2026-01-01\r\nHeron 3;B;1,5;\r\n");
        assertOnMutatedBytes(file, seed);
    }

    private static void assertOnMutatedBytes(Path file, long seed) throws IOException {
        byte[] whole = Files.readAllBytes(file);
        Random random = new Random(seed);
        for (int i = 0; i < MUTATIONS; i++) {
            byte[] damaged = whole.clone();
            for (int flip = 0; flip <= random.nextInt(4); flip++) {
                damaged[random.nextInt(damaged.length)] = (byte) random.nextInt(256);
            }
            Files.write(
                    file,
                    random.nextInt(5) == 0
                            ? java.util.Arrays.copyOf(damaged, random.nextInt(damaged.length))
                            : damaged);
            assertWholeOrUntouched(file);
        }
    }

    private static void assertWholeOrUntouched(Path file) throws IOException {
        byte[] before = Files.readAllBytes(file);

        SheetOutcome outcome =
                new TeamSheetFile(file, "lots").update(update(MARCH_1, row("L1", damping(7, "conforming"))));

        if (outcome instanceof Written written && written.touched()) {
            // what was written can be read, and says everything
            assertThat(new TeamSheetFile(file, "lots").update(update(MARCH_1, row("L1", damping(7, "conforming")))))
                    .isInstanceOf(Written.class)
                    .satisfies(again -> assertThat(((Written) again).touched()).isFalse());
        } else {
            assertThat(Files.readAllBytes(file)).isEqualTo(before);
        }
    }

    private static String mutated(String text, Random random) {
        int at = random.nextInt(text.length());
        return switch (random.nextInt(4)) {
            case 0 -> text.substring(0, at) + text.substring(Math.min(text.length(), at + 1 + random.nextInt(20)));
            case 1 -> text.substring(0, at) + "<>\"&='/0x ".charAt(random.nextInt(10)) + text.substring(at);
            case 2 -> text.substring(0, at);
            default -> text.substring(0, at) + text.substring(random.nextInt(text.length()));
        };
    }

    private static String utf8(String bytes) {
        return new String(bytes.getBytes(StandardCharsets.ISO_8859_1), StandardCharsets.UTF_8);
    }
}

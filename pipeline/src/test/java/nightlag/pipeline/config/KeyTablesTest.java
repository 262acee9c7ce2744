package nightlag.pipeline.config;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;

/** {@code config/README.md} says what the reader does. */
class KeyTablesTest {
    private static final Path PAGE = Path.of("../config/README.md");

    /** Where this fails, the page as it should be lies in {@code target/config-README.md}, to be looked at and copied. */
    @Test
    void thePageHoldsTheTablesOfTheDeclarations() throws IOException {
        String page = Files.readString(PAGE);
        assertThat(KeyTables.regions())
                .allSatisfy(name -> assertThat(page).contains("<!-- keys of " + name + " -->\n"));
        String renewed = KeyTables.renewed(page);
        if (!renewed.equals(page)) {
            Files.writeString(Path.of("target/config-README.md"), renewed);
        }
        assertThat(page).isEqualTo(renewed);
    }

    /** The examples on the page are read like any other file. */
    @Test
    void theExamplesOfThePageAreRight() throws IOException {
        List<String> examples = new ArrayList<>();
        String page = Files.readString(PAGE);
        for (String block : page.split("```toml\n", -1)) {
            examples.add(block.substring(0, Math.max(0, block.indexOf("```"))));
        }
        assertThat(examples.subList(1, examples.size()))
                .hasSizeGreaterThanOrEqualTo(2)
                .allSatisfy(example -> {
                    Problems problems = new Problems(true);
                    TomlFile toml = TomlFile.parse(example, "README.md");
                    problems.addAll(toml.problems());
                    if (example.contains("[channels]")) {
                        List<Problem> all = new ArrayList<>();
                        InstrumentReader.read("example", toml, all);
                        problems.addAll(all);
                    } else {
                        GradeReader.read("example", "README.md", toml.root(), problems);
                    }
                    assertThat(problems.inOrder()).isEmpty();
                });
    }

    @Test
    void everyKeyHasAMeaningAndEveryDefaultReads() {
        Stream.of(NightKeys.KIND, InstrumentKeys.KIND, GradeKeys.KIND)
                .flatMap(kind -> Stream.concat(Stream.of(kind.top()), kind.sections().stream()))
                .forEach(section -> {
                    assertThat(section.purpose()).endsWith(".");
                    assertThat(section.names()).doesNotHaveDuplicates();
                    assertThat(section.keys()).allSatisfy(key -> {
                        assertThat(key.meaning()).as(key.name()).endsWith(".");
                        assertThat(key.type().words()).as(key.name()).isNotBlank();
                        if (!key.fallback().isEmpty()) {
                            assertThat(TomlFile.literal(key.fallback(), new At("", 0)))
                                    .isNotNull();
                        }
                    });
                });
    }
}

package nightlag.pipeline.config;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.catchThrowableOfType;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.stream.Stream;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/**
 * Every file of the folder {@code config-invalid} has one fault; its second line is the one sentence that must come of
 * it, with line, key, what was found and what is allowed.
 */
class RefusedConfigurationTest {
    private static final Path CASES = Path.of("src/test/resources/config-invalid");
    private static final Path ACCEPTED = Path.of("src/test/resources/config-accepted");
    private static final String EXPECTED = "# expected: ";

    @TempDir
    private Path folder;

    static Stream<Path> nights() throws IOException {
        return files("night");
    }

    static Stream<Path> instruments() throws IOException {
        return files("instruments");
    }

    static Stream<Path> grades() throws IOException {
        return files("grades");
    }

    private static Stream<Path> files(String kind) throws IOException {
        try (Stream<Path> listed = Files.list(CASES.resolve(kind))) {
            List<Path> sorted = listed.sorted().toList();
            assertThat(sorted).as("cases of " + kind).hasSizeGreaterThan(10);
            return sorted.stream();
        }
    }

    private static String expected(Path file) throws IOException {
        String line = Files.readAllLines(file).get(1);
        assertThat(line).startsWith(EXPECTED);
        return line.substring(EXPECTED.length());
    }

    /** A night that would be right but for one file. */
    private Path night(String instrument) throws IOException {
        for (String name : List.of("instruments/frame.toml", "grades/plover.toml")) {
            Files.createDirectories(folder.resolve(name).getParent());
            Files.copy(ACCEPTED.resolve(name), folder.resolve(name));
        }
        return Files.writeString(folder.resolve("night.toml"), """
                results = "out"
                grades = "grades"
                instruments = "instruments"
                [[intake]]
                folder = "intake"
                instrument = "%s"
                """.formatted(instrument));
    }

    @ParameterizedTest
    @MethodSource("nights")
    void aWrongNightFileStopsTheNight(Path wrong) throws IOException {
        Path night = night("frame");
        Files.copy(wrong, night, java.nio.file.StandardCopyOption.REPLACE_EXISTING);
        ConfigurationException thrown =
                catchThrowableOfType(ConfigurationException.class, () -> ConfigurationReader.read(night));
        assertThat(thrown).isNotNull();
        assertThat(thrown.problems()).extracting(Problem::sentence).containsExactly("night.toml" + expected(wrong));
    }

    @ParameterizedTest
    @MethodSource("instruments")
    void aWrongInstrumentFileInUseStopsTheNight(Path wrong) throws IOException {
        String name = wrong.getFileName().toString();
        Path night = night(name.replace(".toml", ""));
        Files.copy(wrong, folder.resolve("instruments/" + name));
        ConfigurationException thrown =
                catchThrowableOfType(ConfigurationException.class, () -> ConfigurationReader.read(night));
        assertThat(thrown).isNotNull();
        assertThat(thrown.problems())
                .extracting(Problem::sentence)
                .containsExactly("instruments/" + name + expected(wrong));
    }

    @ParameterizedTest
    @MethodSource("grades")
    void aWrongGradeFileStopsThatGradeAlone(Path wrong) throws IOException, ConfigurationException {
        String name = wrong.getFileName().toString();
        Path night = night("frame");
        Files.copy(wrong, folder.resolve("grades/" + name));
        Configuration configuration = ConfigurationReader.read(night);
        assertThat(configuration.gradeProblems())
                .extracting(Problem::sentence)
                .containsExactly("grades/" + name + expected(wrong));
        assertThat(configuration.grades()).containsOnlyKeys("Plover 60");
        boolean named = Files.readString(wrong).contains("grade = \"Heron 3\"");
        assertThat(configuration.wrongGrades().keySet())
                .isEqualTo(named ? java.util.Set.of("Heron 3") : java.util.Set.of());
    }
}

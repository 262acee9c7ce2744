package nightlag.pipeline.config;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.catchThrowableOfType;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** Files as a whole: what is read, how files are called, and that nothing wrong is kept back. */
class ConfigurationReaderTest {
    private static final String NIGHT = """
            results = "out"
            grades = "grades"
            instruments = "instruments"
            [[intake]]
            folder = "intake/bench"
            instrument = "bench"
            """;
    private static final String BENCH = """
            [channels]
            time = { column = "t", unit = "s" }
            angle = { column = "phi", unit = "rad" }
            torque = { column = "M", unit = "N·m" }
            [tags]
            grade = { column = "grade" }
            lot = { column = "lot" }
            """;

    @TempDir
    private Path folder;

    private Path file(String name, String text) throws IOException {
        Path path = folder.resolve(name);
        Files.createDirectories(path.getParent());
        return Files.writeString(path, text);
    }

    private Path night() throws IOException {
        file("instruments/bench.toml", BENCH);
        file("grades/heron.toml", "grade = \"Heron 3\"\n");
        return file("night.toml", NIGHT);
    }

    private static List<String> sentences(ConfigurationException thrown) {
        return thrown.problems().stream().map(Problem::sentence).toList();
    }

    private static ConfigurationException refused(Path night) {
        ConfigurationException thrown =
                catchThrowableOfType(ConfigurationException.class, () -> ConfigurationReader.read(night));
        assertThat(thrown).as("the night file must be refused").isNotNull();
        return thrown;
    }

    @Test
    void everythingWrongInEveryFileIsListedInOneGo() throws IOException {
        night();
        Path night = file("night.toml", NIGHT.replace("results", "reslts") + "[team_sheet]\nfile = \"a.doc\"\n");
        file(
                "instruments/bench.toml",
                BENCH.replace("\"rad\"", "\"mm\"").replace("\"N·m\"", "5") + "[range]\ntorque = 1\n");
        file(
                "grades/heron.toml",
                "grade = \"Heron 3\"\n[geometry]\nkind = \"cone\"\ngap = 1\n[extraction]\ndrft = 2\n");
        assertThat(refused(night).problems())
                .extracting(problem -> problem.file() + ":" + problem.line() + " " + problem.place())
                .containsExactly(
                        "night.toml:0 results",
                        "night.toml:1 reslts",
                        "night.toml:8 [team_sheet] file",
                        "instruments/bench.toml:3 [channels] angle.unit",
                        "instruments/bench.toml:4 [channels] torque.unit",
                        "instruments/bench.toml:9 [range] torque",
                        "grades/heron.toml:3 [geometry] kind",
                        "grades/heron.toml:4 [geometry] gap",
                        "grades/heron.toml:6 [extraction] drft");
    }

    @Test
    void theRestOfAFileIsReadPastASlipInItsWriting() throws IOException {
        Path night = night();
        file("instruments/bench.toml", BENCH.replace("\"s\" }", "\"s }") + "[range]\ntorqe = 1\n");
        assertThat(refused(night).problems())
                .extracting(Problem::line)
                .as("the broken channel itself is not called missing")
                .containsExactly(2, 9);
    }

    @Test
    void aByteOrderMarkIsAccepted() throws IOException, ConfigurationException {
        Path night = night();
        file("night.toml", "\uFEFF" + NIGHT);
        file("instruments/bench.toml", "\uFEFF" + BENCH);
        file("grades/heron.toml", "\uFEFFgrade = \"Heron 3\"\r\n[extraction]\r\nharmonics = 5\r\n");
        Configuration configuration = ConfigurationReader.read(night);
        assertThat(configuration.grades().get("Heron 3").extraction().harmonics())
                .isEqualTo(5);
    }

    @Test
    void aFileInAnotherCharsetIsSaidToBe() throws IOException, ConfigurationException {
        Path night = night();
        Files.write(folder.resolve("grades/heron.toml"), "grade = \"Käfer\"".getBytes(StandardCharsets.ISO_8859_1));
        assertThat(ConfigurationReader.read(night).gradeProblems())
                .extracting(Problem::sentence)
                .containsExactly("grades/heron.toml: the file is not UTF-8; expected a file saved as UTF-8");
    }

    @Test
    void aNightFileThatIsNotThere() {
        assertThat(sentences(refused(folder.resolve("nigth.toml"))))
                .containsExactly("nigth.toml: there is no such file; expected a file that exists");
    }

    @Test
    void relativePathsStartAtTheFileAndNamesDoNotDependOnWhereARunStarts() throws IOException, ConfigurationException {
        night();
        Path night = file(
                "config/night.toml",
                NIGHT.replace("\"grades\"", "\"../grades\"").replace("\"instruments\"", "\"../instruments\""));
        file("instruments/bench.toml", BENCH + "x = 1\n");
        assertThat(sentences(refused(night)).get(0)).startsWith("../instruments/bench.toml, line 8, [tags] x: ");
        file("instruments/bench.toml", BENCH);
        Configuration configuration = ConfigurationReader.read(night);
        assertThat(configuration.results()).isEqualTo(folder.resolve("config/out"));
        assertThat(configuration.intakes().get(0).folder()).isEqualTo(folder.resolve("config/intake/bench"));
        assertThat(configuration.grades().get("Heron 3").file()).isEqualTo("../grades/heron.toml");
    }

    @Test
    void zeroWorkersAreAllProcessorsAndNothingElseNeedBeThere() throws IOException, ConfigurationException {
        Configuration configuration = ConfigurationReader.read(night());
        assertThat(configuration.workers()).isEqualTo(Runtime.getRuntime().availableProcessors());
        assertThat(configuration.settle()).isZero();
        assertThat(configuration.results()).doesNotExist();
        assertThat(configuration.intakes().get(0).folder())
                .as("left to the night")
                .doesNotExist();
    }

    @Test
    void onlyInstrumentsInUseAreRead() throws IOException, ConfigurationException {
        Path night = night();
        file("instruments/old.toml", "nonsense = 1\n");
        assertThat(ConfigurationReader.read(night).intakes()).hasSize(1);
    }

    @Test
    void anInstrumentOfTwoIntakesIsReadOnceAndItsProblemsAreSaidOnce() throws IOException {
        night();
        Path night = file("night.toml", NIGHT + "[[intake]]\nfolder = \"b\"\ninstrument = \"bench\"\n");
        file("instruments/bench.toml", BENCH + "x = 1\n");
        assertThat(refused(night).problems()).hasSize(1);
    }

    @Test
    void onlyTomlFilesOfTheFolderItselfAreGrades() throws IOException, ConfigurationException {
        Path night = night();
        file("grades/README.md", "nothing");
        file("grades/.#heron.toml", "an editor's lock");
        file("grades/old/heron.toml", "grade = \"Heron 3\"");
        Configuration configuration = ConfigurationReader.read(night);
        assertThat(configuration.gradeProblems()).isEmpty();
        assertThat(configuration.grades()).containsOnlyKeys("Heron 3");
    }

    @Test
    void whateverStandsInAFileAMessageStaysOneLine() throws IOException, ConfigurationException {
        Path night = night();
        String text = "\"\"\"\n" + "x".repeat(10_000) + "\n\"\"\"";
        file("grades/heron.toml", "grade = \"Heron 3\"\n[geometry]\nkind = " + text + "\ngap = " + text + "\n");
        assertThat(ConfigurationReader.read(night).gradeProblems())
                .hasSize(2)
                .allSatisfy(problem ->
                        assertThat(problem.sentence()).doesNotContain("\n").hasSizeLessThan(600));
    }

    /** The project's own configuration must load, every grade of it. */
    @Test
    void theProjectsOwnConfigurationIsRight() throws ConfigurationException {
        Configuration configuration = ConfigurationReader.read(Path.of("../config/night.toml"));
        assertThat(configuration.gradeProblems()).isEmpty();
        assertThat(configuration.grades()).isNotEmpty();
        assertThat(configuration.intakes()).allSatisfy(intake -> {
            assertThat(intake.folder()).isDirectory();
            assertThat(configuration.grades().values())
                    .anySatisfy(grade -> assertThat(Plans.mismatch(intake.instrument(), grade))
                            .isEmpty());
        });
    }
}

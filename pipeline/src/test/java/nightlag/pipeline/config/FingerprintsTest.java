package nightlag.pipeline.config;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.stages.moduli.SignalRange;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** A fingerprint says whether work must be done again: values count, their writing does not. */
class FingerprintsTest {
    private static final Path ACCEPTED = Path.of("src/test/resources/config-accepted");

    private static String bench() throws IOException {
        return Files.readString(ACCEPTED.resolve("instruments/bench.toml"));
    }

    private static String instrument(String text) {
        List<Problem> problems = new ArrayList<>();
        Optional<Instrument> read = InstrumentReader.read("bench", TomlFile.parse(text, "bench.toml"), problems);
        assertThat(problems).isEmpty();
        return read.orElseThrow().fingerprint();
    }

    private static Grade grade(String text) {
        Problems problems = new Problems(false);
        Optional<Grade> read = GradeReader.read(
                "Heron 3", "heron.toml", TomlFile.parse(text, "heron.toml").root(), problems);
        assertThat(problems.inOrder()).isEmpty();
        return read.orElseThrow();
    }

    /** The grade of the accepted example with its parent's sections put in. */
    private static String heron() throws IOException {
        return Files.readString(ACCEPTED.resolve("grades/heron-3.toml"))
                        .replace("extends = \"melt\"", "")
                        .replace("[geometry]\n", "")
                        .replace("gap = \"0.8 mm\"\n", "")
                + Files.readString(ACCEPTED.resolve("grades/melt.toml"));
    }

    /** The same file with its sections, and the keys of each, in reverse order, and without comments. */
    private static String reversed(String text) {
        List<List<String>> sections = new ArrayList<>(List.of(new ArrayList<>()));
        for (String line : text.lines().toList()) {
            if (line.startsWith("[")) {
                sections.add(new ArrayList<>(List.of(line)));
            } else if (!line.isBlank() && !line.startsWith("#")) {
                sections.get(sections.size() - 1).add(line);
            }
        }
        List<List<String>> single = new ArrayList<>(sections.subList(1, sections.size()));
        List<List<String>> repeated = new ArrayList<>(single);
        single.removeIf(section -> section.get(0).startsWith("[["));
        repeated.removeIf(section -> !section.get(0).startsWith("[["));
        Collections.reverse(single);
        single.forEach(section -> Collections.reverse(section.subList(1, section.size())));
        StringBuilder out = new StringBuilder(String.join("\n", sections.get(0))).append('\n');
        single.forEach(section -> out.append(String.join("\n", section)).append('\n'));
        repeated.forEach(section -> out.append(String.join("\n", section)).append('\n'));
        return out.toString();
    }

    @Test
    void commentsAndOrderDoNotCount() throws IOException {
        assertThat(reversed(bench())).isNotEqualTo(bench());
        assertThat(instrument(reversed(bench()))).isEqualTo(instrument(bench()));
        assertThat(grade(reversed(heron())).reductionFingerprint())
                .isEqualTo(grade(heron()).reductionFingerprint());
        assertThat(grade(reversed(heron())).conclusionFingerprint())
                .isEqualTo(grade(heron()).conclusionFingerprint());
    }

    @ParameterizedTest(name = "{0} as {1}")
    @CsvSource(delimiter = '|', quoteCharacter = '^', textBlock = """
                    "85 µs"            | "85 us"
                    "85 µs"            | "0.085 ms"
                    "25 mm"            | "2.5 cm"
                    "25 mm"            | "25mm"
                    "20 mN·m/V"        | "0.02 N.m/V"
                    unit = "°C"        | unit = "degC"
                    "0.78 g/cm³"       | "780 kg/m3"
                    "2 °"              | "2 deg"
                    "1 %"              | "0.01 1"
                    "Melt bench"       | "Another name"
                    """)
    void spellingAndTheNameOfAnInstrumentDoNotCount(String written, String otherwise) throws IOException {
        assertThat(bench()).contains(written);
        assertThat(instrument(bench().replace(written, otherwise))).isEqualTo(instrument(bench()));
    }

    @Test
    void whatIsLeftOutIsItsDefault() throws IOException {
        String moduli = Files.readString(ACCEPTED.resolve("instruments/bench-moduli.toml"));
        assertThat(instrument(moduli + "[files]\ndelimiter = \",\"\nheader = 1\n"))
                .isEqualTo(instrument(moduli));
        assertThat(grade("[screening]\nbaseline = [0.1, 1]\n").reductionFingerprint())
                .isEqualTo(grade("").reductionFingerprint());
    }

    @ParameterizedTest(name = "{0} is not {1}")
    @CsvSource(delimiter = '|', quoteCharacter = '^', textBlock = """
                    "**/*.txt"          | "*.txt"
                    windows-1252        | UTF-8
                    delimiter    = ";"  | delimiter = "tab"
                    decimal      = ","  | decimal = "."
                    "t;"                | "t"
                    unit_row     = true | unit_row = false
                    runs.csv            | run.csv
                    /[^/]+\\.txt        | /.+\\.txt
                    "column"            | "single"
                    "ms"                | "s"
                    invert = true       | invert = false
                    column = 4          | column = 5
                    "20 mN·m/V"         | "21 mN·m/V"
                    "0.013 V"           | "0.014 V"
                    "12 µs"             | "13 µs"
                    "Compound"          | "Grade"
                    { path = "lot" }    | { path = "specimen" }
                    value = 2           | value = 3
                    { column = "point" }| { column = "run" }
                    run_sheet = "gap_mm"| preamble = "gap_mm"
                    "25 mm"             | "26 mm"
                    "85 µs"             | "86 µs"
                    "1.2e-5 kg·m²"      | "1.3e-5 kg·m²"
                    "2e-6 N·m·s"        | "3e-6 N·m·s"
                    "0.003 rad/(N·m)"   | "0.004 rad/(N·m)"
                    "moving"            | "fixed"
                    torque      = "1 %" | torque = "2 %"
                    "0.3 K"             | "0.4 K"
                    "200 mN·m"          | "300 mN·m"
                    "40 mm"             | "50 mm"
                    """)
    void everyValueOfAnInstrumentCounts(String written, String otherwise) throws IOException {
        String text = bench();
        assertThat(text).contains(written);
        assertThat(instrument(text.replace(written, otherwise))).isNotEqualTo(instrument(text));
    }

    @ParameterizedTest(name = "{0} is not {1}")
    @CsvSource(delimiter = '|', quoteCharacter = '^', textBlock = """
                    "25 mm"                       | "20 mm"
                    "0.78 g/cm³"                  | "0.79 g/cm³"
                    start_up_cycles = 1.5         | start_up_cycles = 1
                    harmonics       = 9           | harmonics = 7
                    "quadratic"                   | "linear"
                    frequency_from  = "tag"       | frequency_from = "signal"
                    [4, 2]                        | [4, 1]
                    [4, 2]                        | [5, 2]
                    0.02                          | 0.03
                    "2 K"                         | "3 K"
                    0.005                         | [0.005, 1]
                    """)
    void everyValueOfTheReductionCountsThereAndOnlyThere(String written, String otherwise) throws IOException {
        String text = heron().replace("tolerance             = 0.005", "").replace("0.02 mm", "20 µm");
        Grade before = grade(text);
        assertThat(text).contains(written);
        Grade after = grade(text.replace(written, otherwise));
        assertThat(after.reductionFingerprint()).isNotEqualTo(before.reductionFingerprint());
        assertThat(after.conclusionFingerprint()).isEqualTo(before.conclusionFingerprint());
    }

    @ParameterizedTest(name = "{0} is not {1}")
    @CsvSource(delimiter = '|', quoteCharacter = '^', textBlock = """
                    kind       = "frequency"      | kind = "auto"
                    "averaged"                    | "apart"
                    "log"                         | "linear"
                    reference_temperature = "190  | reference_temperature = "191
                    "density"                     | "fitted"
                    6.5e-4                        | 6.6e-4
                    "arrhenius"                   | "wlf"
                    tolerance             = 0.005 | tolerance = 0.004
                    "none"                        | "fitted"
                    modes       = 12              | modes = "auto"
                    continuous  = false           | continuous = true
                    "a day on the shelf"          | "a day"
                    "0.2 MPa"                     | "0.3 MPa"
                    "2 d"                         | "3 d"
                    ["12 h", "40 °C"]             | ["13 h", "40 °C"]
                    "damping"                     | "loss"
                    max         = 1.4             | max = 1.5
                    "10 rad/s"                    | "11 rad/s"
                    coverage    = 0               | coverage = 1
                    "glass_transition_loss_peak"  | "glass_transition_storage_onset"
                    "crossing_stiffness"          | "stiffness_there"
                    scale       = "linear"        | scale = "log"
                    reaches     = "45 °"          | reaches = "44 °"
                    frequency = "10 rad/s"        | frequency = "9 rad/s"
                    report      = "complex_modulus" | report = "storage_modulus"
                    "10 µm"                       | "11 µm"
                    """)
    void everyValueOfTheConclusionCountsThereAndOnlyThere(String written, String otherwise) throws IOException {
        String text = heron();
        assertThat(text).contains(written);
        Grade before = grade(text);
        Grade after = grade(text.replace(written, otherwise));
        assertThat(after.conclusionFingerprint()).isNotEqualTo(before.conclusionFingerprint());
        assertThat(after.reductionFingerprint()).isEqualTo(before.reductionFingerprint());
    }

    @Test
    void valuesThatLookAlikeAreToldApart() {
        assertThat(Fingerprints.of("ab", "c")).isNotEqualTo(Fingerprints.of("a", "bc"));
        assertThat(Fingerprints.of(List.of("a"), List.of())).isNotEqualTo(Fingerprints.of(List.of(), List.of("a")));
        assertThat(Fingerprints.of(Optional.empty(), 1.0)).isNotEqualTo(Fingerprints.of(1.0, Optional.empty()));
        assertThat(Fingerprints.of(OptionalDouble.of(0))).isNotEqualTo(Fingerprints.of(OptionalDouble.empty()));
        assertThat(Fingerprints.of(new TagSource.PathGroup("x", Optional.empty())))
                .isNotEqualTo(Fingerprints.of(new TagSource.Preamble("x", Optional.empty())));
        assertThat(Fingerprints.of(Map.of("a", "b"))).isNotEqualTo(Fingerprints.of(Map.of("b", "a")));
        assertThat(Fingerprints.of(0.0)).isEqualTo(Fingerprints.of(-0.0));
        assertThat(Fingerprints.of(new SignalRange(1, 2))).isEqualTo(Fingerprints.of(new SignalRange(1, 2)));
        assertThat(Fingerprints.of("a")).hasSize(64).matches("[0-9a-f]+");
    }

    @Test
    void whatHasNoFingerprintIsRefused() {
        assertThatThrownBy(() -> Fingerprints.of(new Object())).isInstanceOf(IllegalArgumentException.class);
    }

    /** The compiled function is another object at every reading; what counts is the expression. */
    @Test
    void ofAFigureItsExpressionCounts() throws IOException {
        String other = heron().replace("complex_modulus / sin(phase_angle)", "complex_modulus * sin(phase_angle)");
        String another = heron().replace("reaches   = \"1 kPa\"", "reaches   = \"2 kPa\"");

        assertThat(other).isNotEqualTo(heron());
        assertThat(grade(heron()).conclusionFingerprint())
                .isEqualTo(grade(heron()).conclusionFingerprint());
        assertThat(grade(other).conclusionFingerprint())
                .isNotEqualTo(grade(heron()).conclusionFingerprint());
        assertThat(another).isNotEqualTo(heron());
        assertThat(grade(another).conclusionFingerprint())
                .isNotEqualTo(grade(heron()).conclusionFingerprint());
        assertThat(grade(other).reductionFingerprint()).isEqualTo(grade(heron()).reductionFingerprint());
    }
}

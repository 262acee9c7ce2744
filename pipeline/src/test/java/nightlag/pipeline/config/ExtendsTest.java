package nightlag.pipeline.config;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Map;
import nightlag.stages.geometry.Dimension;
import nightlag.stages.geometry.GeometryKind;
import nightlag.stages.geometry.GeometrySpec;
import nightlag.stages.moduli.Threshold;
import nightlag.stages.waveform.Drift;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** One grade file over another. */
class ExtendsTest {
    @TempDir
    private Path folder;

    @BeforeEach
    void parent() throws IOException {
        write("melt", """
                [geometry]
                kind = "parallel-plate"
                diameter = "25 mm"
                gap = "1 mm"
                density = "780 kg/m³"
                [extraction]
                harmonics = 5
                drift = "quadratic"
                [screening]
                baseline = [0.2, 2]
                [[limit]]
                name = "a"
                property = "gel_exponent"
                max = 1
                [[limit]]
                name = "b"
                property = "gel_exponent"
                max = 2
                """);
    }

    private void write(String id, String text) throws IOException {
        Files.writeString(folder.resolve(id + ".toml"), text);
    }

    private GradeFolder read() {
        return GradeFolder.read(folder, new FileNames(folder));
    }

    private Grade grade(String text) throws IOException {
        write("heron", "grade = \"Heron 3\"\nextends = \"melt\"\n" + text);
        GradeFolder read = read();
        assertThat(read.problems()).isEmpty();
        return read.right().get("Heron 3");
    }

    @Test
    void mergedKeyByKey() throws IOException {
        Grade grade = grade("[extraction]\nharmonics = 9\n[geometry]\ngap = \"0.5 mm\"\n");
        assertThat(grade.extraction().harmonics()).isEqualTo(9);
        assertThat(grade.extraction().drift()).isEqualTo(Drift.QUADRATIC);
        assertThat(grade.geometry().orElseThrow().dimensions())
                .isEqualTo(Map.of(Dimension.DIAMETER, 0.025, Dimension.GAP, 0.0005, Dimension.DENSITY, 780.0));
    }

    @Test
    void listsAndRepeatedSectionsAreReplacedWhole() throws IOException {
        Grade grade =
                grade("[screening]\nbaseline = 0.3\n[[limit]]\nname = \"c\"\nproperty = \"gel_exponent\"\nmax = 3\n");
        assertThat(grade.screening().baseline()).isEqualTo(new Threshold(0.3, java.util.OptionalDouble.empty()));
        assertThat(grade.conclusion().limits())
                .extracting(limit -> limit.name().orElse(""))
                .containsExactly("c");
    }

    @Test
    void whatIsNotSaidAgainIsInherited() throws IOException {
        Grade grade = grade("");
        assertThat(grade.conclusion().limits()).hasSize(2);
        assertThat(grade.screening().baseline()).isEqualTo(Threshold.of(0.2, 2));
    }

    @Test
    void aNewKindDropsInheritedDimensionsButNotWhatTheMaterialIs() throws IOException {
        GeometrySpec geometry = grade("[geometry]\nkind = \"cone-plate\"\ncone_angle = \"2 °\"\n")
                .geometry()
                .orElseThrow();
        assertThat(geometry.kind()).isEqualTo(GeometryKind.CONE_PLATE);
        assertThat(geometry.dimensions()).containsOnlyKeys(Dimension.CONE_ANGLE, Dimension.DENSITY);
    }

    @Test
    void aNewKindWithoutUseForTheDensityDropsItToo() throws IOException {
        GeometrySpec geometry = grade("[geometry]\nkind = \"rod-torsion\"\nlength = \"40 mm\"\n")
                .geometry()
                .orElseThrow();
        assertThat(geometry.dimensions()).containsOnlyKeys(Dimension.LENGTH);
    }

    @Test
    void theSameKindSaidAgainKeepsThem() throws IOException {
        GeometrySpec geometry =
                grade("[geometry]\nkind = \"parallel-plate\"\n").geometry().orElseThrow();
        assertThat(geometry.dimensions()).containsOnlyKeys(Dimension.DIAMETER, Dimension.GAP, Dimension.DENSITY);
    }

    @Test
    void aChainOfThree() throws IOException {
        write("soft-melt", "extends = \"melt.toml\"\n[extraction]\nharmonics = 3\n");
        write("heron", "grade = \"Heron 3\"\nextends = \"soft-melt\"\n[extraction]\ndrift = \"none\"\n");
        Grade grade = read().right().get("Heron 3");
        assertThat(grade.extraction().harmonics()).isEqualTo(3);
        assertThat(grade.extraction().drift()).isEqualTo(Drift.NONE);
        assertThat(grade.geometry().orElseThrow().kind()).isEqualTo(GeometryKind.PARALLEL_PLATE);
    }

    @Test
    void aGradeMayExtendAnotherGradeAndKeepsItsOwnName() throws IOException {
        write("heron", "grade = \"Heron 3\"\nextends = \"melt\"\n");
        write("heron-4", "grade = \"Heron 4\"\nextends = \"heron\"\n");
        GradeFolder read = read();
        assertThat(read.problems()).isEmpty();
        assertThat(read.right()).containsOnlyKeys("Heron 3", "Heron 4");
        assertThat(read.right().get("Heron 4").reductionFingerprint())
                .isEqualTo(read.right().get("Heron 3").reductionFingerprint());
    }

    @Test
    void aCircleIsNamedInEveryFileOfItAndOthersAreNoneTheWorse() throws IOException {
        write("a", "grade = \"A\"\nextends = \"b\"\n");
        write("b", "grade = \"B\"\nextends = \"a\"\n");
        write("c", "grade = \"C\"\n");
        GradeFolder read = read();
        assertThat(read.right()).containsOnlyKeys("C");
        assertThat(read.wrong()).containsOnlyKeys("A", "B");
        assertThat(read.problems())
                .extracting(problem -> problem.file() + ":" + problem.line() + " " + problem.found())
                .contains(
                        "a.toml:2 the files extend each other in a circle: a → b",
                        "b.toml:2 the files extend each other in a circle: b → a");
    }

    @Test
    void aWrongParentMakesEveryChildWrongAndIsSaidOnce() throws IOException {
        write("melt", "[extraction]\nharmonics = 0\n[geometry]\nkind = \"parallel-plate\"\n");
        write("heron", "grade = \"Heron 3\"\nextends = \"melt\"\n[extraction]\nharmonics = 5\n");
        write("heron-4", "grade = \"Heron 4\"\nextends = \"melt\"\n[geometry]\ngap = 1\n");
        write("plover", "grade = \"Plover 60\"\n");
        GradeFolder read = read();
        assertThat(read.right()).containsOnlyKeys("Plover 60");
        assertThat(read.problems())
                .extracting(problem -> problem.file() + ":" + problem.line())
                .containsExactly("heron-4.toml:4", "melt.toml:2");
        assertThat(read.wrong().get("Heron 3")).extracting(Problem::file).containsExactly("melt.toml");
        assertThat(read.wrong().get("Heron 4"))
                .extracting(Problem::file)
                .containsExactlyInAnyOrder("heron-4.toml", "melt.toml");
    }

    @Test
    void aParentMayLackWhatItsChildrenSay() throws IOException {
        write("melt", "[superposition]\nvertical_shift = \"density\"\n[geometry]\ngap = \"1 mm\"\n");
        Grade grade = grade("""
                [superposition]
                reference_temperature = "190 °C"
                expansion = "6e-4 1/K"
                [geometry]
                kind = "parallel-plate"
                diameter = "25 mm"
                """);
        assertThat(grade.conclusion().superposition().orElseThrow().expansionPerK())
                .hasValue(6e-4);
        assertThat(grade.geometry().orElseThrow().dimensions()).hasSize(2);
    }

    @Test
    void twoFilesForOneGradeLeaveOpenWhichIsMeant() throws IOException {
        write("heron", "grade = \"Heron 3\"\n");
        write("heron-copy", "grade = \"HERON 3\"\n");
        write("plover", "grade = \"Plover 60\"\n");
        write("unnamed", "extends = \"melt\"\ngrade = 5\n");
        GradeFolder read = read();
        assertThat(read.right()).containsOnlyKeys("Plover 60");
        assertThat(read.wrong()).containsOnlyKeys("Heron 3", "HERON 3");
        assertThat(read.problems())
                .extracting(Problem::sentence)
                .containsExactly(
                        "heron-copy.toml, line 1, grade: \"HERON 3\" is also the grade of heron.toml; expected one file a"
                                + " grade; names must differ in more than capitals",
                        "heron.toml, line 1, grade: \"Heron 3\" is also the grade of heron-copy.toml; expected one file a"
                                + " grade; names must differ in more than capitals",
                        "unnamed.toml, line 2, grade: found 5 instead of a text; expected text, in quotes");
    }

    @Test
    void threeFilesAreLaidOverEachOtherFromTheOldestDown() throws IOException {
        write("wide", "extends = \"melt\"\n[geometry]\ngap = \"2 mm\"\n");
        write("cone", """
                grade = "Cone"
                extends = "wide"
                [geometry]
                kind = "cone-plate"
                diameter = "40 mm"
                cone_angle = "1 deg"
                """);
        write("flat", "grade = \"Flat\"\nextends = \"wide\"\n");

        GradeFolder read = read();

        assertThat(read.problems()).isEmpty();
        assertThat(read.right().get("Cone").geometry().orElseThrow().dimensions())
                .doesNotContainKey(Dimension.GAP)
                .containsEntry(Dimension.DIAMETER, 0.04);
        assertThat(read.right().get("Flat").geometry().orElseThrow().dimensions())
                .containsEntry(Dimension.GAP, 0.002)
                .containsEntry(Dimension.DIAMETER, 0.025);
    }
}

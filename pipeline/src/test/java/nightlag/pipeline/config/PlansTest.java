package nightlag.pipeline.config;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import nightlag.stages.ReductionPlan;
import nightlag.stages.geometry.DeformationSignal;
import nightlag.stages.geometry.LoadSignal;
import nightlag.stages.moduli.SignalRange;
import org.junit.jupiter.api.Test;

/** Where an instrument and a grade meet. */
class PlansTest {
    private static final String TAGS = "[tags]\ngrade = { column = \"g\" }\nlot = { column = \"l\" }\n";
    private static final String ROTARY = """
            [channels]
            time = { column = "t", unit = "s" }
            angle = { column = "phi", unit = "rad" }
            torque = { column = "M", unit = "N·m" }
            """ + TAGS;
    private static final String LINEAR = """
            [channels]
            time = { column = "t", unit = "s" }
            displacement = { column = "x", unit = "mm" }
            force = { column = "F", unit = "N" }
            """ + TAGS;
    private static final String STRESS_AND_STRAIN = """
            [channels]
            time = { column = "t", unit = "s" }
            strain = { column = "e", unit = "%" }
            stress = { column = "s", unit = "Pa" }
            """ + TAGS;

    private static Instrument instrument(String text) {
        List<Problem> problems = new ArrayList<>();
        Optional<Instrument> read = InstrumentReader.read("bench", TomlFile.parse(text, "bench.toml"), problems);
        assertThat(problems).isEmpty();
        return read.orElseThrow();
    }

    private static Grade grade(String text) {
        Problems problems = new Problems(false);
        Optional<Grade> read = GradeReader.read(
                "Heron 3",
                "grades/heron.toml",
                TomlFile.parse(text, "grades/heron.toml").root(),
                problems);
        assertThat(problems.inOrder()).isEmpty();
        return read.orElseThrow();
    }

    private static String mismatch(String instrument, String grade) {
        return Plans.mismatch(instrument(instrument), grade(grade))
                .map(Problem::sentence)
                .orElse("");
    }

    @Test
    void torqueNeedsAGeometry() {
        assertThat(mismatch(ROTARY, ""))
                .isEqualTo(
                        "grades/heron.toml, [geometry]: the records of instrument bench are torque or angle, and there is"
                                + " no geometry to make stress and strain of them; expected a section [geometry] here or in the"
                                + " instrument file");
        assertThat(mismatch(ROTARY, "[geometry]\nkind = \"none\"\n")).contains("no geometry");
        assertThat(mismatch(STRESS_AND_STRAIN, "")).isEmpty();
        assertThat(mismatch(ROTARY, "[geometry]\nkind = \"parallel-plate\"\ndiameter = \"25 mm\"\ngap = \"1 mm\"\n"))
                .isEmpty();
    }

    @Test
    void theGeometryMustTurnWhereTheInstrumentTurns() {
        String strip = "[geometry]\nkind = \"tension\"\nlength = \"2 cm\"\nwidth = \"4 mm\"\nthickness = \"1 mm\"\n";
        assertThat(mismatch(ROTARY, strip)).contains("tension does not go with the torque or angle");
        assertThat(mismatch(LINEAR, strip)).isEmpty();
        assertThat(mismatch(LINEAR, "[geometry]\nkind = \"cone-plate\"\n")).contains("cone-plate does not go with");
    }

    @Test
    void dimensionsMayComeFromTags() {
        String strip = "[geometry]\nkind = \"tension\"\nwidth = \"4 mm\"\n";
        assertThat(mismatch(LINEAR, strip))
                .contains("tension lacks length and thickness, or ")
                .contains("diameter");
        String tagged = "length = { column = \"L\", unit = \"mm\" }\nthickness = { column = \"t\", unit = \"mm\" }\n";
        assertThat(mismatch(LINEAR + tagged, strip)).isEmpty();
    }

    @Test
    void theInstrumentsGeometryTakesThePlaceOfTheGrades() {
        String own = "[geometry]\nkind = \"cone-plate\"\ndiameter = \"4 cm\"\ncone_angle = \"2 °\"\n";
        assertThat(mismatch(ROTARY + own, "[geometry]\nkind = \"tension\"\n")).isEmpty();
    }

    @Test
    void anExactFrequencyMustBeTagged() {
        String exact = "[extraction]\nfrequency_from = \"tag\"\n";
        assertThat(mismatch(STRESS_AND_STRAIN, exact)).contains("instrument bench tags none");
        assertThat(mismatch(STRESS_AND_STRAIN + "frequency = { column = \"f\", unit = \"Hz\" }\n", exact))
                .isEmpty();
    }

    @Test
    void rangesGoToTheSignalTheySpeakOf() {
        ReductionPlan plan = Plans.reduction(
                instrument(ROTARY + "[range]\nangle = [\"1 mrad\", \"1 rad\"]\ntorque = [\"1 µN·m\", \"0.2 N·m\"]\n"),
                grade(""));
        assertThat(plan.deformationRange()).isEqualTo(Map.of(DeformationSignal.ANGLE, new SignalRange(1e-3, 1)));
        assertThat(plan.loadRange()).isEqualTo(Map.of(LoadSignal.TORQUE, new SignalRange(1e-6, 0.2)));
        assertThat(plan.geometry()).isEmpty();
    }

    @Test
    void complianceGoesWithTheChannelsOrElseWithItsUnit() {
        String angular = "[corrections]\ncompliance = \"0.003 rad/(N·m)\"\n";
        String linear = "[corrections]\ncompliance = \"0.4 µm/N\"\n";
        assertThat(instrument(ROTARY + angular).corrections().angularComplianceRadPerNM())
                .isEqualTo(0.003);
        assertThat(instrument(LINEAR + linear).corrections().linearComplianceMPerN())
                .isEqualTo(4e-7);
        assertThat(instrument(STRESS_AND_STRAIN + angular).corrections().angularComplianceRadPerNM())
                .isEqualTo(0.003);
        assertThat(instrument(STRESS_AND_STRAIN + linear).corrections().linearComplianceMPerN())
                .isEqualTo(4e-7);
    }
}

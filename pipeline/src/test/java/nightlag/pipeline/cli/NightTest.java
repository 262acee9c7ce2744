package nightlag.pipeline.cli;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.nio.file.Path;
import java.util.List;
import java.util.Map;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** Whole nights in an invented lab, from raw files to tables, as a user sees them. */
class NightTest {
    @TempDir
    private Path folder;

    private Lab lab;

    @BeforeEach
    void setUp() {
        lab = new Lab(folder);
    }

    @Test
    void theFirstNightTurnsASweepIntoModuliAndBothSpectra() {
        lab.sweep("plover", "A1");

        Lab.Ended night = lab.run();

        assertThat(night.exitCode()).as(night.err()).isZero();
        List<Map<String, String>> points = lab.table("plover", "A1", "points");
        assertThat(points).hasSize(6);
        for (Map<String, String> point : points) {
            double[] expected = Lab.moduli(Double.parseDouble(point.get("angular_frequency_rad_s")));
            assertThat(Double.parseDouble(point.get("storage_modulus_Pa")))
                    .isCloseTo(expected[0], within(1e-9 * expected[0]));
            assertThat(Double.parseDouble(point.get("loss_modulus_Pa")))
                    .isCloseTo(expected[1], within(1e-9 * expected[1]));
            assertThat(point).containsEntry("quality", "sound").containsEntry("temperature_C", "25");
        }
        assertThat(lab.table("plover", "A1", "spectrum"))
                .extracting(row -> row.get("kind"))
                .containsExactly("relaxation", "relaxation", "retardation");
        assertThat(lab.table("plover", "A1", "markers"))
                .extracting(row -> row.get("property"))
                .contains("zero_shear_viscosity", "instantaneous_compliance");
        assertThat(lab.files()).extracting(row -> row.get("status")).containsOnly("reduced");
    }

    @Test
    void aSecondNightWithNothingNewTouchesNothing() {
        lab.sweep("plover", "A1");
        lab.run();
        Map<String, String> before = lab.state();

        Lab.Ended second = lab.run();

        assertThat(second.exitCode()).isZero();
        assertThat(lab.state()).isEqualTo(before);
        assertThat(lab.files()).hasSize(6).extracting(row -> row.get("status")).containsOnly("unchanged");
    }

    @Test
    void oneWorkerAndFourWriteTheSameBytes(@TempDir Path other) {
        lab.sweep("plover", "A1");
        lab.sweep("plover", "A2");
        Lab twin = new Lab(other);
        twin.sweep("plover", "A1");
        twin.sweep("plover", "A2");

        lab.run("--workers", "1");
        twin.run("--workers", "4");

        assertThat(lab.tables()).isNotEmpty().isEqualTo(twin.tables());
    }

    @Test
    void oneLotCanBeAskedFor() {
        lab.sweep("plover", "A1");
        lab.sweep("plover", "A2");

        assertThat(lab.run("--lot", "A2").exitCode()).isZero();

        assertThat(lab.files()).hasSize(6).extracting(row -> row.get("lot")).containsOnly("A2");
        assertThat(lab.path("results/plover/A1")).doesNotExist();
        assertThat(lab.table("plover", "A2", "points")).hasSize(6);
        lab.run();
        assertThat(lab.table("plover", "A1", "points")).hasSize(6);
    }

    @Test
    void aBadFileOfTheLotAskedForIsNamedAndOneOfAnotherLotIsNot() {
        lab.sweep("plover", "A1");
        lab.write("bench/A1/bad.csv", Lab.recordText("plover", "A1", 1, 1).replaceFirst("\n0\\.015625,", "\nlunch,"));
        lab.write("bench/A2/bad.csv", Lab.recordText("plover", "A2", 1, 1).replaceFirst("\n0\\.015625,", "\nlunch,"));

        assertThat(lab.run("--lot", "A1").exitCode()).isEqualTo(1);

        assertThat(lab.files()).hasSize(7).extracting(row -> row.get("lot")).containsOnly("A1");
    }
}

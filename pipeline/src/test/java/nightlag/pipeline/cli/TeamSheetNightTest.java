package nightlag.pipeline.cli;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.data.Percentage.withPercentage;

import java.nio.file.Path;
import java.util.Map;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** Nights with a team sheet: its rows go in, or wait in the archive. */
class TeamSheetNightTest {
    private static final String SHEET = "results/team.csv";
    private static final String LOCK = "results/.~lock.team.csv#";

    @TempDir
    Path folder;

    private Lab lab;

    @BeforeEach
    void aLabWithATeamSheet() {
        lab = new Lab(folder);
        lab.write(
                "config/night.toml",
                lab.read("config/night.toml") + "\n[team_sheet]\nfile = \"../results/team.csv\"\n");
        lab.sweep("plover", "A1");
    }

    @Test
    void eachLotHasARow() {
        lab.sweep("plover", "A2");

        Lab.Ended night = lab.run();

        assertThat(night.exitCode()).isZero();
        assertThat(night.out()).contains("sheet   2 rows added, 0 changed");
        assertThat(lab.read(SHEET)).startsWith("grade,lot,updated").contains("\r\nplover,A1,2", "\r\nplover,A2,2");
    }

    @Test
    void aLimitHasAColumnForItsValueAndOneForItsVerdict() {
        lab.run();
        lab.grade("plover", """
                [[limit]]
                property = "tan_delta"
                temperature = "25 °C"
                frequency = "1 Hz"
                max = 100

                [[limit]]
                name = "stiffness"
                property = "storage_modulus"
                temperature = "25 °C"
                frequency = "1 Hz"
                min = "900 kPa"
                """);

        assertThat(lab.run().exitCode()).isZero();

        assertThat(lab.read(SHEET))
                .startsWith("grade,lot,updated,tan_delta 25 °C 1 Hz [1],tan_delta 25 °C 1 Hz verdict,stiffness [kPa],"
                        + "stiffness verdict\r\n");
        String[] cells =
                lab.read(SHEET).lines().skip(1).findFirst().orElseThrow().split(",", -1);
        double[] moduli = Lab.moduli(2 * Math.PI);
        assertThat(Double.parseDouble(cells[3])).isCloseTo(moduli[1] / moduli[0], withPercentage(1));
        assertThat(cells[4]).isEqualTo("conforming");
        assertThat(Double.parseDouble(cells[5])).isCloseTo(moduli[0] / 1000, withPercentage(1));
        assertThat(cells[6]).isEqualTo("nonconforming");
        assertThat(cells[3])
                .isEqualTo(lab.table("plover", "A1", "acceptance").get(0).get("value"));
    }

    @Test
    void aNightWithNothingNewDoesNotTouchIt() {
        lab.run();
        Map<String, String> before = lab.state();

        Lab.Ended night = lab.run();

        assertThat(night.out()).doesNotContain("sheet ");
        assertThat(lab.state()).isEqualTo(before);
    }

    @Test
    void rowsWaitWhileItIsOpenAndGoInWithTheNextRun() {
        lab.run();
        lab.write(LOCK, "somebody");
        lab.sweep("plover", "A2");

        Lab.Ended open = lab.run();

        assertThat(open.exitCode()).isZero();
        assertThat(open.out())
                .contains("sheet   1 rows wait in the archive", "look at: team sheet (1)", "open in an office program");
        assertThat(lab.logLines("open in an office program")).hasSize(1);
        assertThat(lab.read(SHEET)).doesNotContain("A2");

        lab.delete(LOCK);
        assertThat(lab.run().out()).contains("sheet   1 rows added, 0 changed");
        assertThat(lab.read(SHEET)).contains("\r\nplover,A2,2");
    }

    @Test
    void aSheetThatAPersonHasToPutRightIsNotAllWell() {
        lab.write(SHEET, "Sorte,Charge\r\n");

        Lab.Ended night = lab.run();

        assertThat(night.exitCode()).isEqualTo(1);
        assertThat(night.out()).contains("no row of headings with the cells \"grade\" and \"lot\"");
        assertThat(lab.read(SHEET)).isEqualTo("Sorte,Charge\r\n");
    }

    @Test
    void aSheetThatIsGoneIsMadeAgainWithEveryLot() {
        lab.run();
        lab.sweep("plover", "A2");
        lab.run();
        lab.delete(SHEET);

        lab.run();

        assertThat(lab.read(SHEET)).contains("\r\nplover,A1,2", "\r\nplover,A2,2");
    }

    @Test
    void anotherSheetGetsEveryLotAndARowTakenOutStaysOut() {
        lab.sweep("plover", "A2");
        lab.run();
        lab.write(SHEET, lab.read(SHEET).replaceAll("plover,A1.*\r\n", ""));
        lab.sweep("plover", "A3");
        lab.run();
        assertThat(lab.read(SHEET)).doesNotContain("A1").contains("A2", "A3");

        lab.write("config/night.toml", lab.read("config/night.toml").replace("team.csv", "other.xlsx"));

        assertThat(lab.run().out()).contains("sheet   3 rows added");
        assertThat(lab.path("results/other.xlsx")).exists();
    }
}

package nightlag.pipeline.cli;

import static org.assertj.core.api.Assertions.assertThat;

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
        assertThat(open.out()).contains("sheet   1 rows wait in the archive", "look at: team sheet (1)", "open in an office program");
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

package nightlag.pipeline.cli;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.tuple;

import java.nio.file.Path;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** Lots whose names differ only in case: on some disks their folders would be one. */
class TwinLotsNightTest {
    @TempDir
    private Path folder;

    private Lab lab;

    @BeforeEach
    void setUp() {
        lab = new Lab(folder);
    }

    @Test
    void aLotThatDiffersOnlyInCaseIsSetAside() {
        lab.sweep("plover", "A1");
        lab.run();
        lab.record("bench/late.csv", "plover", "a1", 1, 1);

        Lab.Ended night = lab.run();

        assertThat(night.exitCode()).isEqualTo(1);
        assertThat(night.out()).contains("'a1'").contains("'A1'");
        assertThat(lab.table("plover", "A1", "points")).hasSize(6);
    }

    @Test
    void aKnownLotGoesBeforeItsTwinInCaseWhateverTheFilesAreCalled() {
        lab.record("bench/z.csv", "plover", "L1", 1, 1);
        lab.run();
        lab.record("bench/a.csv", "plover", "l1", 1, 1);
        assertThat(lab.run().exitCode()).isEqualTo(1);

        lab.run("--redo");

        assertThat(lab.files())
                .extracting(row -> row.get("file"), row -> row.get("status"))
                .containsExactly(tuple("bench/a.csv", "set-aside"), tuple("bench/z.csv", "reduced"));
        assertThat(lab.table("plover", "L1", "points")).hasSize(1);
        assertThat(lab.path("results/plover/l1")).doesNotExist();
    }

    @Test
    void aLotWhoseFilesAllChangeTheirCaseTakesTheNewName() {
        lab.record("bench/a.csv", "plover", "L1", 1, 1);
        lab.record("bench/b.csv", "plover", "L1", 3, 1);
        lab.run();
        lab.record("bench/a.csv", "plover", "l1", 1, 1);
        lab.record("bench/b.csv", "plover", "l1", 3, 1);

        assertThat(lab.run().exitCode()).isZero();

        assertThat(lab.table("plover", "l1", "points")).hasSize(2);
    }
}

package nightlag.pipeline.cli;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.IOException;
import java.nio.channels.FileChannel;
import java.nio.channels.FileLock;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;
import java.sql.Connection;
import java.sql.DriverManager;
import java.sql.SQLException;
import java.sql.Statement;
import java.util.Map;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** Nights that meet another run, were killed, or find something in their way. */
class InterruptedNightTest {
    @TempDir
    private Path folder;

    private Lab lab;

    @BeforeEach
    void setUp() {
        lab = new Lab(folder);
    }

    @Test
    void aSecondRunAtTheSameTimeStops() throws IOException {
        lab.sweep("plover", "A1");
        lab.run();
        try (FileChannel channel = FileChannel.open(lab.path("results/.run.lock"), StandardOpenOption.WRITE);
                FileLock lock = channel.lock()) {
            assertThat(lock.isValid()).isTrue();

            Lab.Ended night = lab.run();

            assertThat(night.exitCode()).isEqualTo(3);
            assertThat(night.err()).contains("another run");
        }
        assertThat(lab.run().exitCode()).isZero();
    }

    @Test
    void aLotLeftDueByAKillBeforeTheSwapGetsItsTables() throws SQLException {
        lab.sweep("plover", "A1");
        lab.run();
        Map<String, String> whole = lab.tables();
        lab.write("results/plover/A1/points.csv", "the tables of an earlier night");
        try (Connection archive = DriverManager.getConnection("jdbc:sqlite:" + lab.path("results/archive.sqlite"));
                Statement statement = archive.createStatement()) {
            assertThat(statement.executeUpdate("UPDATE lot SET due = 1")).isEqualTo(1);
        }

        assertThat(lab.run().exitCode()).isZero();

        assertThat(lab.tables()).isEqualTo(whole);
    }

    @Test
    void whatStandsInTheWayOfOneLotStopsNoOther() {
        lab.sweep("plover", "A1");
        lab.sweep("plover", "A2");
        lab.write("results/plover/A1", "a file where a folder belongs");

        Lab.Ended night = lab.run();

        assertThat(night.exitCode()).isEqualTo(1);
        assertThat(night.out()).contains("plover lot A1").contains("A1");
        assertThat(lab.table("plover", "A2", "points")).hasSize(6);
        lab.delete("results/plover/A1");
        assertThat(lab.run().exitCode()).isZero();
        assertThat(lab.table("plover", "A1", "points")).hasSize(6);
    }
}

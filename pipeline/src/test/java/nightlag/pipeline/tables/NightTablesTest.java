package nightlag.pipeline.tables;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class NightTablesTest {
    @TempDir
    Path folder;

    @Test
    void everyFileHasARowSortedByItsName() throws IOException {
        NightFileRow good = new NightFileRow(
                "bench/L-17/10.csv",
                "melt-bench",
                "Heron 3",
                "L-17",
                "1",
                NightFileRow.Status.REDUCED,
                "",
                12,
                4096,
                "ab");
        NightFileRow bad = new NightFileRow(
                "bench/L-17/9.csv",
                "melt-bench",
                "",
                "",
                "",
                NightFileRow.Status.SET_ASIDE,
                "line 7, column M: \"n/a\" where a number belongs",
                0,
                99,
                "cd");
        NightFileRow waiting = new NightFileRow(
                "bench/L-17/11.csv",
                "melt-bench",
                "",
                "",
                "",
                NightFileRow.Status.WAITING,
                "changed 2 s ago",
                0,
                5,
                "");

        NightTables.writeFiles(folder, List.of(good, waiting, bad));

        assertThat(Files.readString(folder.resolve("files.csv"))).isEqualTo("""
                        file,instrument,grade,lot,specimen,status,reason,points,bytes,sha256
                        bench/L-17/9.csv,melt-bench,,,,set-aside,"line 7, column M: ""n/a"" where a number belongs",0,99,cd
                        bench/L-17/10.csv,melt-bench,Heron 3,L-17,1,reduced,,12,4096,ab
                        bench/L-17/11.csv,melt-bench,,,,waiting,changed 2 s ago,0,5,
                        """.replace("\n", "\r\n"));
        try (var files = Files.list(folder)) {
            assertThat(files).hasSize(1);
        }
    }
}

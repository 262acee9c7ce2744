package nightlag.pipeline.night;

import static org.assertj.core.api.Assertions.assertThat;

import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Map;
import java.util.Optional;
import nightlag.pipeline.config.ConfigurationReader;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** How one file's way ends where a stage has a bug. */
class FileTraceTest {
    @TempDir
    private Path root;

    private Path lab() throws Exception {
        Map<String, String> files = Map.of(
                "config/night.toml",
                """
                results = "../results"
                grades = "grades"
                instruments = "instruments"

                [[intake]]
                folder = "../bench"
                instrument = "bench"
                """,
                "config/grades/plover.toml",
                "grade = \"plover\"\n",
                "config/instruments/bench.toml",
                """
                name = "Bench"

                [files]
                match = "**/*.csv"
                header = "t,"

                [channels]
                time = { column = "t", unit = "s" }
                strain = { column = "strain", unit = "1" }
                stress = { column = "stress", unit = "Pa" }

                [tags]
                grade = { value = "plover" }
                lot = { value = "L1" }
                """,
                "bench/p1.csv",
                "t,strain,stress\n0,0,0\n1,1,1\n");
        for (Map.Entry<String, String> file : files.entrySet()) {
            Path path = root.resolve(file.getKey());
            Files.createDirectories(path.getParent());
            Files.writeString(path, file.getValue());
        }
        return root.resolve("config/night.toml");
    }

    @Test
    void aBugInAStageEndsAsInARun() throws Exception {
        FileTrace trace =
                FileTrace.of(ConfigurationReader.read(lab()), "bench/p1.csv", Optional.empty(), (record, plan) -> {
                    throw new ArithmeticException("beyond all bounds");
                });
        assertThat(trace.problem())
                .isEqualTo("bench/p1.csv: internal fault: java.lang.ArithmeticException: beyond all bounds");
        assertThat(trace.description()).isPresent();
        assertThat(trace.point()).isEmpty();
    }
}

package nightlag.pipeline.samples;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Map;
import java.util.SortedMap;
import java.util.TreeMap;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;

/**
 * The samples are what their models make, byte for byte. With {@code -Dsamples.write=true} they are written instead, and
 * then compared.
 */
class SamplesTest {
    private static final long LIMIT_BYTES = 3_000_000;

    @Test
    void everySampleIsWhatItsModelMakes() throws IOException {
        SortedMap<String, byte[]> made = SampleFiles.all();
        if (Boolean.getBoolean("samples.write")) {
            write(made);
        }

        SortedMap<String, byte[]> found = read();

        assertThat(found.keySet()).containsExactlyElementsOf(made.keySet());
        made.forEach((path, bytes) -> assertThat(found.get(path)).as(path).isEqualTo(bytes));
    }

    @Test
    void theSamplesStaySmall() {
        long size = SampleFiles.all().values().stream()
                .mapToLong(bytes -> bytes.length)
                .sum();

        assertThat(size).isLessThan(LIMIT_BYTES);
    }

    private static void write(Map<String, byte[]> files) throws IOException {
        for (Map.Entry<String, byte[]> file : files.entrySet()) {
            Path path = SampleFiles.INTAKE.resolve(file.getKey());
            Files.createDirectories(path.getParent());
            Files.write(path, file.getValue());
        }
    }

    private static SortedMap<String, byte[]> read() throws IOException {
        SortedMap<String, byte[]> found = new TreeMap<>();
        try (Stream<Path> paths = Files.walk(SampleFiles.INTAKE)) {
            for (Path path : (Iterable<Path>) paths.filter(Files::isRegularFile)::iterator) {
                found.put(SampleFiles.INTAKE.relativize(path).toString().replace('\\', '/'), Files.readAllBytes(path));
            }
        }
        return found;
    }
}

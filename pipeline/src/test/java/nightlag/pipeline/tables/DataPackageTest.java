package nightlag.pipeline.tables;

import static org.assertj.core.api.Assertions.assertThat;

import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.json.JsonMapper;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.stream.StreamSupport;
import nightlag.stages.LotResult;
import org.apache.commons.codec.digest.DigestUtils;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class DataPackageTest {
    private static final Provenance FROM = new Provenance(
            "Heron 3",
            "L-17",
            List.of(new Provenance.Input("bench/a.csv", "00ff"), new Provenance.Input("bench/b.csv", "11ee")),
            List.of(new Provenance.Plan("reduction", "cd34"), new Provenance.Plan("conclusion", "ab12")),
            "1.2.3");

    @TempDir
    Path results;

    @Test
    void everyTableIsDescribedColumnByColumn() throws IOException {
        JsonNode descriptor = write(LotResult.EMPTY);

        assertThat(texts(descriptor.get("resources"), "name"))
                .containsExactly(
                        "points",
                        "harmonics",
                        "markers",
                        "shift_factors",
                        "master_curve",
                        "spectrum",
                        "prony",
                        "response",
                        "derived",
                        "creep",
                        "acceptance");
        for (JsonNode resource : descriptor.get("resources")) {
            JsonNode fields = resource.at("/schema/fields");
            assertThat(Files.readString(lot().resolve(resource.get("path").asText())))
                    .as("the columns described are the columns written")
                    .isEqualTo(String.join(",", texts(fields, "name")) + "\r\n");
            assertThat(texts(fields, "description")).doesNotContain("");
        }
    }

    @Test
    void aFieldSaysItsTypeUnitAndWhatItsCellsKeepTo() throws IOException {
        JsonNode points = write(LotResult.EMPTY).at("/resources/0/schema/fields");

        JsonNode storage = field(points, "storage_modulus_u_Pa");
        assertThat(storage.get("type").asText()).isEqualTo("number");
        assertThat(storage.get("unit").asText()).isEqualTo("Pa");
        assertThat(storage.at("/constraints/minimum").asDouble(-1)).isZero();
        assertThat(storage.at("/constraints/required").asBoolean())
                .as("may be empty")
                .isFalse();
        assertThat(field(points, "lot").at("/constraints/required").asBoolean()).isTrue();
        assertThat(field(points, "samples_used").get("type").asText()).isEqualTo("integer");
        assertThat(StreamSupport.stream(
                                field(points, "quality").at("/constraints/enum").spliterator(), false)
                        .map(JsonNode::asText))
                .containsExactly("sound", "doubtful", "unusable");
        assertThat("few-cycles;frequency-mismatch")
                .matches(field(points, "flags").at("/constraints/pattern").asText());
    }

    @Test
    void provenanceSaysWhatTheTablesWereMadeFrom() throws IOException {
        JsonNode provenance = write(LotResult.EMPTY).get("provenance");

        assertThat(provenance.get("programVersion").asText()).isEqualTo("1.2.3");
        assertThat(texts(provenance.get("inputs"), "file")).containsExactly("bench/a.csv", "bench/b.csv");
        assertThat(texts(provenance.get("inputs"), "sha256")).containsExactly("00ff", "11ee");
        assertThat(texts(provenance.get("plans"), "fingerprint")).containsExactly("cd34", "ab12");
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2})
    void sizeAndDigestAreThoseOfTheTable(long seed) throws IOException {
        JsonNode descriptor = write(new RandomLot(seed).result(FROM.grade(), FROM.lot()));

        for (JsonNode resource : descriptor.get("resources")) {
            byte[] table = Files.readAllBytes(lot().resolve(resource.get("path").asText()));
            assertThat(resource.get("bytes").asLong()).isEqualTo(table.length);
            assertThat(resource.get("hash").asText()).isEqualTo("sha256:" + DigestUtils.sha256Hex(table));
        }
    }

    private Path lot() {
        return LotTables.folder(results, FROM.grade(), FROM.lot());
    }

    private JsonNode write(LotResult result) throws IOException {
        LotTables.write(results, result, FROM);
        return JsonMapper.builder()
                .build()
                .readTree(lot().resolve(DataPackage.FILE_NAME).toFile());
    }

    private static List<String> texts(JsonNode array, String key) {
        return StreamSupport.stream(array.spliterator(), false)
                .map(node -> node.path(key).asText())
                .toList();
    }

    private static JsonNode field(JsonNode fields, String name) {
        return StreamSupport.stream(fields.spliterator(), false)
                .filter(field -> field.get("name").asText().equals(name))
                .findFirst()
                .orElseThrow();
    }
}

package nightlag.pipeline.intake;

import static org.assertj.core.api.Assertions.assertThat;

import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class DigestsTest {
    @TempDir
    Path folder;

    /** Examples of FIPS 180-4 (NIST, 2015): the message "abc", and a million times the letter a. */
    @Test
    void publishedDigests() throws Exception {
        assertThat(Digests.ofText("abc")).isEqualTo("ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad");
        Path million = Files.writeString(folder.resolve("a"), "a".repeat(1_000_000), StandardCharsets.US_ASCII);
        assertThat(Digests.ofFile(million))
                .isEqualTo("cdc76e5c9914fb9281a1c7e284d73e67f1809a48a497200e046d39ccc7112cd0");
    }
}

package nightlag.pipeline.intake;

import java.io.IOException;
import java.io.InputStream;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.security.MessageDigest;
import java.security.NoSuchAlgorithmException;
import java.util.HexFormat;

/** SHA-256 of files and texts, as 64 lower-case hex digits. */
public final class Digests {
    private static final int CHUNK_BYTES = 1 << 16;

    private Digests() {}

    /** SHA-256 of a file's bytes, hex; read in pieces, whatever the file's size. */
    public static String ofFile(Path file) throws IOException {
        MessageDigest digest = sha256();
        byte[] chunk = new byte[CHUNK_BYTES];
        try (InputStream bytes = Files.newInputStream(file)) {
            for (int read = bytes.read(chunk); read >= 0; read = bytes.read(chunk)) {
                digest.update(chunk, 0, read);
            }
        }
        return HexFormat.of().formatHex(digest.digest());
    }

    /** SHA-256 of a text's UTF-8 bytes, hex. */
    public static String ofText(String text) {
        return HexFormat.of().formatHex(sha256().digest(text.getBytes(StandardCharsets.UTF_8)));
    }

    private static MessageDigest sha256() {
        try {
            return MessageDigest.getInstance("SHA-256");
        } catch (NoSuchAlgorithmException e) {
            throw new IllegalStateException("every Java platform has SHA-256", e);
        }
    }
}

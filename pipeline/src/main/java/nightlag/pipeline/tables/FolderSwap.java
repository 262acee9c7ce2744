package nightlag.pipeline.tables;

import java.io.BufferedOutputStream;
import java.io.IOException;
import java.io.OutputStream;
import java.nio.channels.Channels;
import java.nio.channels.FileChannel;
import java.nio.file.DirectoryStream;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardCopyOption;
import java.nio.file.StandardOpenOption;
import java.security.DigestOutputStream;
import java.security.MessageDigest;
import java.util.HexFormat;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import org.apache.commons.codec.digest.DigestUtils;

/**
 * Puts several files into one folder: each is written beside its place and waited for until it is on the disk, then all
 * are moved into place, each in one step. Until {@link #swap} nothing that was there before is touched.
 */
final class FolderSwap implements AutoCloseable {
    /** The end of the name of a file on its way; one that a killed run left is cleared away by the next. */
    static final String ON_ITS_WAY = ".nightlag-new";

    private final Path folder;
    private final Map<Path, Path> written = new LinkedHashMap<>();

    private FolderSwap(Path folder) {
        this.folder = folder;
    }

    /** Makes the folder where it is not there yet, and clears away what a killed run left on its way. */
    static FolderSwap into(Path folder) throws IOException {
        Files.createDirectories(folder);
        try (DirectoryStream<Path> left = Files.newDirectoryStream(folder, "*" + ON_ITS_WAY)) {
            for (Path file : left) {
                Files.delete(file);
            }
        }
        return new FolderSwap(folder);
    }

    /** Writes one file beside its place. */
    Written write(String name, Content content) throws IOException {
        Path target = folder.resolve(name);
        Path beside = folder.resolve(name + ON_ITS_WAY);
        written.put(beside, target);
        MessageDigest digest = DigestUtils.getSha256Digest();
        try (FileChannel channel = FileChannel.open(beside, StandardOpenOption.CREATE_NEW, StandardOpenOption.WRITE)) {
            OutputStream out =
                    new DigestOutputStream(new BufferedOutputStream(Channels.newOutputStream(channel)), digest);
            content.writeTo(out);
            out.flush();
            channel.force(true);
            return new Written(channel.position(), HexFormat.of().formatHex(digest.digest()));
        }
    }

    /** Moves every file into its place, in the order they were written. */
    void swap() throws IOException {
        for (Map.Entry<Path, Path> file : List.copyOf(written.entrySet())) {
            replace(file.getKey(), file.getValue());
            written.remove(file.getKey());
        }
        forceFolder();
    }

    private static void replace(Path beside, Path target) throws TableInUseException {
        try {
            Files.move(beside, target, StandardCopyOption.ATOMIC_MOVE, StandardCopyOption.REPLACE_EXISTING);
        } catch (IOException cause) {
            throw new TableInUseException(target, cause);
        }
    }

    /** So that the new names, too, are on the disk; a system that does not open folders sees to that by itself. */
    private void forceFolder() throws IOException {
        try (FileChannel channel = FileChannel.open(folder, StandardOpenOption.READ)) {
            channel.force(true);
        } catch (IOException notOpened) {
            if (!System.getProperty("os.name").startsWith("Windows")) {
                throw notOpened;
            }
        }
    }

    /** Clears away what was written but not swapped in. */
    @Override
    public void close() throws IOException {
        for (Path beside : written.keySet()) {
            Files.deleteIfExists(beside);
        }
    }

    /** What goes into a file. */
    interface Content {
        void writeTo(OutputStream out) throws IOException;
    }

    /**
     * What was written.
     *
     * @param bytes its size
     * @param sha256 its digest, hex
     */
    record Written(long bytes, String sha256) {}
}

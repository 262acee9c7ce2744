package nightlag.pipeline.teamsheet;

import java.io.BufferedOutputStream;
import java.io.IOException;
import java.io.OutputStream;
import java.nio.channels.Channels;
import java.nio.channels.FileChannel;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardCopyOption;
import java.nio.file.StandardOpenOption;
import java.nio.file.attribute.PosixFileAttributeView;
import java.nio.file.attribute.PosixFileAttributes;

/** A file written beside the one it is to replace, and moved into its place in one step once it is on the disk. */
final class Replacement implements AutoCloseable {
    /** The end of the name of a file on its way; one that a killed run left is written over by the next. */
    private static final String ON_ITS_WAY = ".nightlag-new";

    private final Path target;
    private final Path beside;

    private Replacement(Path target) {
        this.target = target;
        this.beside = target.resolveSibling(target.getFileName() + ON_ITS_WAY);
    }

    static Replacement of(Path target) {
        return new Replacement(target);
    }

    /** What goes into a file. */
    interface Content {
        void writeTo(OutputStream out) throws IOException, SheetFault;
    }

    void write(Content content) throws IOException, SheetFault {
        Files.deleteIfExists(beside);
        try (FileChannel channel = FileChannel.open(beside, StandardOpenOption.CREATE_NEW, StandardOpenOption.WRITE)) {
            OutputStream out = new BufferedOutputStream(Channels.newOutputStream(channel));
            content.writeTo(out);
            out.flush();
            channel.force(true);
        }
    }

    /** Moves the file into its place; it is then as readable to others as the one it replaces was. */
    void swap() throws IOException {
        PosixFileAttributeView view = Files.getFileAttributeView(beside, PosixFileAttributeView.class);
        if (view != null && Files.exists(target)) {
            PosixFileAttributes before = Files.readAttributes(target, PosixFileAttributes.class);
            view.setPermissions(before.permissions());
            if (!view.readAttributes().group().equals(before.group())) {
                giveTo(view, before);
            }
        }
        Files.move(beside, target, StandardCopyOption.ATOMIC_MOVE, StandardCopyOption.REPLACE_EXISTING);
        forceFolder();
    }

    /** So that the new name, too, is on the disk; a system that does not open folders sees to that by itself. */
    private void forceFolder() throws IOException {
        Path folder = target.toAbsolutePath().getParent();
        if (folder == null) {
            return;
        }
        try (FileChannel channel = FileChannel.open(folder, StandardOpenOption.READ)) {
            channel.force(true);
        } catch (IOException notOpened) {
            if (!System.getProperty("os.name").startsWith("Windows")) {
                throw notOpened;
            }
        }
    }

    private static void giveTo(PosixFileAttributeView view, PosixFileAttributes before) {
        try {
            view.setGroup(before.group());
        } catch (IOException notAllowed) {
            // only a member of the group may; the file is whole all the same
        }
    }

    @Override
    public void close() throws IOException {
        Files.deleteIfExists(beside);
    }
}

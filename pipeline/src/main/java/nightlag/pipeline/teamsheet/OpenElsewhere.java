package nightlag.pipeline.teamsheet;

import java.io.IOException;
import java.nio.channels.FileChannel;
import java.nio.channels.FileLock;
import java.nio.channels.OverlappingFileLockException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;
import java.util.List;
import java.util.Optional;

/** Whether somebody has the file open: the office programs leave a file beside it, and the system may hold a lock. */
final class OpenElsewhere {
    private OpenElsewhere() {}

    /** Why the file had better be left alone now; empty where nothing is known of. */
    static Optional<String> reason(Path file) {
        String name = String.valueOf(file.getFileName());
        for (String mark :
                List.of("~$" + name, "~$" + name.substring(Math.min(2, name.length())), ".~lock." + name + "#")) {
            Path beside = file.resolveSibling(mark);
            if (Files.exists(beside)) {
                return Optional.of("it is open in an office program, which says so by " + beside
                        + " (where nobody has it open any more, that file is left over and can be deleted)");
            }
        }
        if (!Files.isWritable(file)) {
            return Optional.of("it is marked as read-only, or this user may not write it");
        }
        try (FileChannel channel = FileChannel.open(file, StandardOpenOption.READ, StandardOpenOption.WRITE)) {
            return isLocked(channel) ? Optional.of("another program holds a lock on it") : Optional.empty();
        } catch (IOException e) {
            return Optional.of(
                    "it cannot be opened for writing; is it open in another program? (" + e.getMessage() + ")");
        }
    }

    private static boolean isLocked(FileChannel channel) {
        try (FileLock lock = channel.tryLock()) {
            return lock == null;
        } catch (OverlappingFileLockException held) {
            return true;
        } catch (IOException noLocksHere) {
            // some network shares have none; that nobody holds one is all that can be known then
            return false;
        }
    }
}

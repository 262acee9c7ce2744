package nightlag.pipeline.night;

import java.io.IOException;
import java.nio.channels.FileChannel;
import java.nio.channels.FileLock;
import java.nio.channels.OverlappingFileLockException;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;

/**
 * Keeps two runs from writing to one results folder at once. The lock is the operating system's, on a file that stays:
 * it goes with the process that holds it, however that ends.
 */
final class RunLock implements AutoCloseable {
    private static final String FILE = ".run.lock";

    private final FileChannel channel;

    private RunLock(FileChannel channel) {
        this.channel = channel;
    }

    /**
     * Takes the lock.
     *
     * @throws NightFault if another run holds it, or the folder cannot be written
     */
    static RunLock take(Path results) throws NightFault {
        Path file = results.resolve(FILE);
        FileChannel channel = null;
        try {
            channel = FileChannel.open(file, StandardOpenOption.CREATE, StandardOpenOption.WRITE);
            FileLock lock = channel.tryLock();
            if (lock != null) {
                return new RunLock(channel);
            }
            channel.close();
        } catch (OverlappingFileLockException heldHere) {
            closeQuietly(channel);
        } catch (IOException e) {
            closeQuietly(channel);
            throw new NightFault(
                    NightFault.Kind.STOPPED,
                    "the results folder " + results + " cannot be written: " + IoSentences.of(e),
                    e);
        }
        throw new NightFault(
                NightFault.Kind.STOPPED, "another run is at work on " + results + "; start again when it has ended");
    }

    private static void closeQuietly(FileChannel channel) {
        try {
            if (channel != null) {
                channel.close();
            }
        } catch (IOException ignored) {
            // the lock was not taken; there is nothing left to lose
        }
    }

    @Override
    public void close() throws IOException {
        channel.close();
    }
}

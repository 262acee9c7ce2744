package nightlag.pipeline.config;

import java.nio.file.Path;
import java.util.Objects;

/** Calls files as they stand to the night file's folder, so that a message is the same wherever a run is started from. */
final class FileNames {
    private final Path base;

    /** @param base the night file's folder, absolute and normalised */
    FileNames(Path base) {
        this.base = base;
    }

    /** The relative path with '/'; the absolute one where the two have nothing but the root in common. */
    String name(Path file) {
        Path absolute = file.toAbsolutePath().normalize();
        boolean related = Objects.equals(base.getRoot(), absolute.getRoot())
                && base.getNameCount() > 0
                && absolute.getNameCount() > 0
                && base.getName(0).equals(absolute.getName(0));
        return (related ? base.relativize(absolute) : absolute).toString().replace('\\', '/');
    }

    /** The last part of a path; empty text for a root. */
    static String last(Path path) {
        Path name = path.getFileName();
        return name == null ? "" : name.toString();
    }
}

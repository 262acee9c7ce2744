package nightlag.pipeline.intake;

import java.io.IOException;
import java.nio.file.AccessDeniedException;
import java.nio.file.FileVisitResult;
import java.nio.file.FileVisitor;
import java.nio.file.Files;
import java.nio.file.NoSuchFileException;
import java.nio.file.NotDirectoryException;
import java.nio.file.Path;
import java.nio.file.attribute.BasicFileAttributes;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import nightlag.pipeline.config.Intake;
import nightlag.pipeline.config.Problem;

/** Finds the raw files of an intake folder. */
public final class IntakeScan {
    private IntakeScan() {}

    /**
     * Every regular file below the folder that the instrument's glob matches, sorted by path, and what could not be looked
     * at. Links below the folder are not followed (the folder itself may be one), a run sheet is never a raw file, and a
     * file that vanishes during the walk is not there.
     *
     * @throws IOException if the folder itself cannot be read, or the glob is none
     */
    public static IntakeFiles scan(Intake intake) throws IOException {
        Path folder = intake.folder().toRealPath();
        if (!Files.isDirectory(folder)) {
            throw new NotDirectoryException(intake.folder().toString());
        }
        Walk walk = new Walk(intake, folder, globOf(intake, folder));
        Files.walkFileTree(folder, walk);
        walk.files.sort(Comparator.comparing(RawFile::relativePath));
        return new IntakeFiles(walk.files, walk.unreadable);
    }

    private static FileGlob globOf(Intake intake, Path folder) throws IOException {
        String glob = intake.instrument().files().match();
        try {
            return new FileGlob(folder.getFileSystem(), glob);
        } catch (IllegalArgumentException e) {
            throw new IOException("match = '" + glob + "' is no glob", e);
        }
    }

    private static final class Walk implements FileVisitor<Path> {
        private final Intake intake;
        private final Path folder;
        private final FileGlob glob;
        private final Optional<Path> runSheet;
        private final List<RawFile> files = new ArrayList<>();
        private final List<Problem> unreadable = new ArrayList<>();

        Walk(Intake intake, Path folder, FileGlob glob) {
            this.intake = intake;
            this.folder = folder;
            this.glob = glob;
            this.runSheet = intake.instrument()
                    .files()
                    .runSheet()
                    .map(name -> folder.getFileSystem().getPath(name));
        }

        @Override
        public FileVisitResult preVisitDirectory(Path directory, BasicFileAttributes attributes) {
            return FileVisitResult.CONTINUE;
        }

        @Override
        public FileVisitResult visitFile(Path file, BasicFileAttributes attributes) {
            Path relative = folder.relativize(file);
            // as paths: the platform knows whether case counts in a file's name
            boolean isRunSheet = runSheet.filter(file::endsWith).isPresent();
            if (attributes.isRegularFile() && !isRunSheet && glob.matches(relative)) {
                files.add(new RawFile(
                        intake,
                        withSlashes(relative),
                        attributes.size(),
                        attributes.lastModifiedTime().toMillis()));
            }
            return FileVisitResult.CONTINUE;
        }

        @Override
        public FileVisitResult visitFileFailed(Path file, IOException reason) throws IOException {
            return passOver(file, reason);
        }

        @Override
        public FileVisitResult postVisitDirectory(Path directory, IOException reason) throws IOException {
            return reason == null ? FileVisitResult.CONTINUE : passOver(directory, reason);
        }

        private FileVisitResult passOver(Path place, IOException reason) throws IOException {
            if (place.equals(folder)) {
                throw reason;
            }
            if (!(reason instanceof NoSuchFileException)) {
                unreadable.add(new Problem(
                        intake.name() + "/" + withSlashes(folder.relativize(place)),
                        0,
                        "",
                        clause(reason),
                        "read access"));
            }
            return FileVisitResult.CONTINUE;
        }

        private static String clause(IOException reason) {
            if (reason instanceof AccessDeniedException) {
                return "cannot be looked into, access is denied";
            }
            return "cannot be looked into (" + reason.getClass().getSimpleName() + ": " + reason.getMessage() + ")";
        }

        private static String withSlashes(Path relative) {
            List<String> parts = new ArrayList<>();
            relative.forEach(part -> parts.add(part.toString()));
            return String.join("/", parts);
        }
    }
}

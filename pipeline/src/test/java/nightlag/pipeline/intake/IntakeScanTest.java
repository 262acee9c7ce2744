package nightlag.pipeline.intake;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;
import static org.junit.jupiter.api.Assumptions.assumeFalse;
import static org.junit.jupiter.api.Assumptions.assumeTrue;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.NoSuchFileException;
import java.nio.file.NotDirectoryException;
import java.nio.file.Path;
import java.nio.file.attribute.FileTime;
import java.nio.file.attribute.PosixFilePermissions;
import java.util.Collections;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import nightlag.pipeline.config.FileFormat;
import nightlag.pipeline.config.Instrument;
import nightlag.pipeline.config.Intake;
import nightlag.pipeline.config.Layout;
import nightlag.pipeline.config.RecordFormat;
import nightlag.stages.geometry.Corrections;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class IntakeScanTest {
    @TempDir
    Path folder;

    @Test
    void findsWhatTheGlobMatchesSortedByPath() throws Exception {
        write("b.csv", "a/z.csv", "a/deep/er/x.csv", "a.csv", "a/notes.txt", "a/X.CSV.bak");
        assertThat(paths(intake("**/*.csv"))).containsExactly("a.csv", "a/deep/er/x.csv", "a/z.csv", "b.csv");
    }

    @Test
    void aDoubleStarAndSlashAlsoMatchesNoFolder() throws Exception {
        write("x.csv", "a/x.csv", "a/raw/x.csv", "a/b/raw/x.csv", "a/b/raw/c/x.csv");
        assertThat(paths(intake("*.csv"))).containsExactly("x.csv");
        assertThat(paths(intake("a/**/*.csv")))
                .containsExactly("a/b/raw/c/x.csv", "a/b/raw/x.csv", "a/raw/x.csv", "a/x.csv");
        assertThat(paths(intake("**/raw/**/*.{csv,txt}")))
                .containsExactly("a/b/raw/c/x.csv", "a/b/raw/x.csv", "a/raw/x.csv");
        assertThat(paths(intake("*/*.csv"))).containsExactly("a/x.csv");
    }

    @Test
    void aRunSheetIsNeverARawFile() throws Exception {
        write("runs.csv", "a/runs.csv", "a/my-runs.csv", "a/b.csv");
        assertThat(paths(intake("**/*.csv", Optional.of("runs.csv")))).containsExactly("a/b.csv", "a/my-runs.csv");
    }

    @Test
    void tellsSizeTimeAndTableName() throws Exception {
        write("a/b.csv");
        Files.setLastModifiedTime(folder.resolve("a/b.csv"), FileTime.fromMillis(1_700_000_000_000L));
        RawFile file = IntakeScan.scan(intake("**/*.csv")).files().get(0);
        assertThat(file.bytes()).isEqualTo(4);
        assertThat(file.modifiedMillis()).isEqualTo(1_700_000_000_000L);
        assertThat(file.tableName()).isEqualTo("bench/a/b.csv");
        assertThat(file.path()).isEqualTo(folder.resolve("a").resolve("b.csv"));
    }

    @Test
    void linksBelowTheFolderAreNotFollowed() throws Exception {
        assumeFalse(System.getProperty("os.name").startsWith("Windows"), "links need rights on Windows");
        write("in/a.csv", "elsewhere/b.csv");
        Files.createSymbolicLink(folder.resolve("in/loop"), folder.resolve("in"));
        Files.createSymbolicLink(folder.resolve("in/b.csv"), folder.resolve("elsewhere/b.csv"));
        Files.createSymbolicLink(folder.resolve("link"), folder.resolve("in"));
        assertThat(paths(new Intake(folder.resolve("in"), "bench", instrument("**/*.csv", Optional.empty()))))
                .containsExactly("a.csv");
        // the intake folder itself may be one
        assertThat(paths(new Intake(folder.resolve("link"), "bench", instrument("**/*.csv", Optional.empty()))))
                .containsExactly("a.csv");
    }

    @Test
    void aSubfolderThatCannotBeLookedIntoIsNamedAndTheOthersAreFound() throws Exception {
        write("a/x.csv", "shut/y.csv", "z/x.csv");
        Path shut = folder.resolve("shut");
        assumeTrue(Files.getFileStore(folder).supportsFileAttributeView("posix"), "needs POSIX permissions");
        Files.setPosixFilePermissions(shut, PosixFilePermissions.fromString("---------"));
        try {
            assumeFalse(Files.isReadable(shut), "this user may read everything");
            IntakeFiles found = IntakeScan.scan(intake("**/*.csv"));
            assertThat(found.files()).extracting(RawFile::relativePath).containsExactly("a/x.csv", "z/x.csv");
            assertThat(found.unreadable())
                    .singleElement()
                    .satisfies(problem -> assertThat(problem.sentence())
                            .isEqualTo("bench/shut: cannot be looked into, access is denied; expected read access"));
        } finally {
            Files.setPosixFilePermissions(shut, PosixFilePermissions.fromString("rwx------"));
        }
    }

    /** Folders nested beyond the length a path may have: they get there by moving one tree into another. */
    @Test
    void aSubfolderTooDeepToReachIsNamedAndTheOthersAreFound() throws Exception {
        assumeTrue(System.getProperty("os.name").equals("Linux"), "the longest path is known for Linux only");
        String deep = String.join("/", Collections.nCopies(12, "d".repeat(200)));
        write("a.csv", "one/" + deep + "/b.csv", "two/" + deep + "/c.csv");
        Path inner = folder.resolve("one/" + deep + "/two");
        Files.move(folder.resolve("two"), inner);
        try {
            IntakeFiles found = IntakeScan.scan(intake("**/*.csv"));
            assertThat(found.files())
                    .extracting(RawFile::relativePath)
                    .containsExactly("a.csv", "one/" + deep + "/b.csv");
            assertThat(found.unreadable())
                    .singleElement()
                    .satisfies(problem -> assertThat(problem.sentence())
                            .startsWith("bench/one/ddd")
                            .contains("cannot be looked into"));
        } finally {
            Files.move(inner, folder.resolve("two"));
        }
    }

    @Test
    void aFolderThatIsNoneIsAnError() throws Exception {
        write("a.csv");
        Instrument instrument = instrument("**/*.csv", Optional.empty());
        assertThatThrownBy(() -> IntakeScan.scan(new Intake(folder.resolve("gone"), "gone", instrument)))
                .isInstanceOf(NoSuchFileException.class);
        assertThatThrownBy(() -> IntakeScan.scan(new Intake(folder.resolve("a.csv"), "a.csv", instrument)))
                .isInstanceOf(NotDirectoryException.class);
        assertThatThrownBy(() -> IntakeScan.scan(intake("**/[")))
                .isInstanceOf(IOException.class)
                .hasMessageContaining("no glob");
    }

    private void write(String... paths) throws IOException {
        for (String path : paths) {
            Path file = folder.resolve(path);
            Files.createDirectories(file.getParent());
            Files.writeString(file, "data", StandardCharsets.UTF_8);
        }
    }

    private static List<String> paths(Intake intake) throws IOException {
        return IntakeScan.scan(intake).files().stream()
                .map(RawFile::relativePath)
                .toList();
    }

    private Intake intake(String glob) {
        return intake(glob, Optional.empty());
    }

    private Intake intake(String glob, Optional<String> runSheet) {
        return new Intake(folder, "bench", instrument(glob, runSheet));
    }

    private static Instrument instrument(String glob, Optional<String> runSheet) {
        return new Instrument(
                "bench",
                "An invented bench",
                new FileFormat(
                        glob,
                        StandardCharsets.UTF_8,
                        ';',
                        ',',
                        new FileFormat.Header.Line(1),
                        false,
                        runSheet,
                        Optional.empty()),
                new RecordFormat(Layout.SINGLE, 6, 3, List.of(), 10),
                Map.of(),
                Map.of(),
                Corrections.none(),
                Map.of(),
                Map.of(),
                Optional.empty(),
                "fingerprint");
    }
}

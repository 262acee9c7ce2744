package nightlag.pipeline.teamsheet;

import static nightlag.pipeline.teamsheet.Rows.MARCH_1;
import static nightlag.pipeline.teamsheet.Rows.MARCH_2;
import static nightlag.pipeline.teamsheet.Rows.damping;
import static nightlag.pipeline.teamsheet.Rows.row;
import static nightlag.pipeline.teamsheet.Rows.update;
import static org.assertj.core.api.Assertions.assertThat;
import static org.junit.jupiter.api.Assumptions.assumeTrue;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.channels.FileChannel;
import java.nio.channels.FileLock;
import java.nio.file.FileSystems;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;
import java.nio.file.attribute.PosixFilePermissions;
import java.util.List;
import java.util.concurrent.atomic.AtomicInteger;
import java.util.stream.Stream;
import nightlag.pipeline.teamsheet.SheetOutcome.Waiting;
import nightlag.pipeline.teamsheet.SheetOutcome.Written;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** The file as a whole: it is replaced in one step, or it stays as it is and the rows wait. */
class TeamSheetFileTest {
    private static final String BEFORE = "grade,lot,note\r\nHeron 3,A,mine\r\n";

    @TempDir
    Path folder;

    private Path file;

    @BeforeEach
    void aFileOfTheTeam() throws IOException {
        file = Files.writeString(folder.resolve("team.csv"), BEFORE);
    }

    private SheetOutcome put() {
        return new TeamSheetFile(file, "lots").update(update(MARCH_1, row("A", damping(1, "conforming"))));
    }

    private void assertUntouched() throws IOException {
        assertThat(file).hasContent(BEFORE);
        try (Stream<Path> files = Files.list(folder)) {
            assertThat(files.map(path -> path.getFileName().toString()).filter(name -> name.endsWith("-new")))
                    .isEmpty();
        }
    }

    @ParameterizedTest
    @ValueSource(strings = {"~$team.csv", "~$am.csv", ".~lock.team.csv#"})
    void openInAnOfficeProgram(String mark) throws IOException {
        Path beside = Files.writeString(folder.resolve(mark), "somebody");

        SheetOutcome outcome = put();

        assertThat(((Waiting) outcome).reason())
                .startsWith("it is open in an office program, which says so by " + beside);
        assertUntouched();
        Files.delete(beside);
        assertThat(put()).isInstanceOf(Written.class);
    }

    @Test
    void lockedByAnotherProgram() throws IOException {
        try (FileChannel channel = FileChannel.open(file, StandardOpenOption.WRITE);
                FileLock lock = channel.lock()) {
            assertThat(lock.isValid()).isTrue();
            assertThat(((Waiting) put()).reason()).contains("holds a lock on it");
        }
        assertUntouched();
    }

    @Test
    void openedWhileTheNewOneIsWritten() throws IOException {
        SheetOutcome outcome = new TeamSheetFile(file, "lots", () -> write(folder.resolve(".~lock.team.csv#"), ""))
                .update(update(MARCH_1, row("A", damping(1, "conforming"))));

        assertThat(outcome).isInstanceOf(Waiting.class);
        assertUntouched();
    }

    @Test
    void whatSomebodySavesMeanwhileIsNotLost() {
        AtomicInteger saves = new AtomicInteger();
        Runnable saveOnce = () -> {
            if (saves.getAndIncrement() == 0) {
                write(file, BEFORE.replace("mine", "saved"));
            }
        };

        SheetOutcome outcome =
                new TeamSheetFile(file, "lots", saveOnce).update(update(MARCH_1, row("A", damping(1, "conforming"))));

        assertThat(outcome).isInstanceOf(Written.class);
        assertThat(file).content().contains("Heron 3,A,saved,2026-03-01,1,conforming");
    }

    @Test
    void aFileThatSomebodyKeepsSavingWaits() {
        AtomicInteger saves = new AtomicInteger();
        SheetOutcome outcome = new TeamSheetFile(
                        file, "lots", () -> write(file, BEFORE.replace("mine", "save " + saves.incrementAndGet())))
                .update(update(MARCH_1, row("A", damping(1, "conforming"))));

        assertThat(outcome).isEqualTo(new Waiting("somebody else keeps saving it"));
        assertThat(file).hasContent(BEFORE.replace("mine", "save 3"));
    }

    @Test
    void whatAKilledRunLeftIsWrittenOver() throws IOException {
        Files.writeString(folder.resolve("team.csv.nightlag-new"), "half a fi");

        assertThat(put()).isInstanceOf(Written.class);

        try (Stream<Path> files = Files.list(folder)) {
            assertThat(files).containsExactly(file);
        }
    }

    @Test
    void aLinkStaysALink() throws IOException {
        assumeTrue(
                FileSystems.getDefault().supportedFileAttributeViews().contains("posix"), "links need a POSIX system");
        Path link = Files.createSymbolicLink(folder.resolve("link.csv"), file);

        new TeamSheetFile(link, "lots").update(update(MARCH_1, row("A", damping(1, "conforming"))));

        assertThat(link).isSymbolicLink();
        assertThat(file).content().contains("conforming");
    }

    @Test
    void whoMayReadTheFileStays() throws IOException {
        assumeTrue(FileSystems.getDefault().supportedFileAttributeViews().contains("posix"), "a POSIX system");
        Files.setPosixFilePermissions(file, PosixFilePermissions.fromString("rw-rw-r--"));

        put();

        assertThat(PosixFilePermissions.toString(Files.getPosixFilePermissions(file)))
                .isEqualTo("rw-rw-r--");
    }

    @Test
    void aFolderThatIsNotThereIsMade() {
        Path deep = folder.resolve("a/b/team.xlsx");

        SheetOutcome outcome = new TeamSheetFile(deep, "lots")
                .update(new SheetUpdate(List.of(), List.of(row("A", damping(1, "conforming"))), MARCH_2));

        assertThat(((Written) outcome).added()).isEqualTo(1);
        assertThat(deep).exists();
    }

    @Test
    void aFolderInThePlaceOfTheFile() throws IOException {
        Files.delete(file);
        Files.createDirectory(file);

        assertThat(put()).isInstanceOf(Waiting.class);
    }

    private static void write(Path path, String text) {
        try {
            Files.writeString(path, text);
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }
}

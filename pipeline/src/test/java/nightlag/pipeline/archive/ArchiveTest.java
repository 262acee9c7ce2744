package nightlag.pipeline.archive;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.attribute.FileTime;
import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Random;
import java.util.TreeMap;
import java.util.stream.Stream;
import nightlag.pipeline.RandomPoints;
import nightlag.stages.Reduction;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class ArchiveTest {
    private static final LotName SEVENTEEN = new LotName("Heron 3", "L-17");
    private static final LotName EIGHTEEN = new LotName("Heron 3", "L-18");

    @TempDir
    Path folder;

    private final RandomPoints random = new RandomPoints(17);

    @Test
    void aCommittedFileIsThereAfterOpeningAgain() throws ArchiveException {
        FileOutcome outcome = reduced("a.csv", SEVENTEEN, 3);
        try (Archive archive = open()) {
            archive.commit(List.of(outcome));
        }

        try (Archive archive = open()) {
            assertThat(archive.files()).containsExactly(outcome.file());
            assertThat(archive.filesOf(SEVENTEEN)).containsExactly(outcome.file());
            assertThat(archive.reductions(SEVENTEEN)).isEqualTo(outcome.reductions());
            assertThat(archive.lots()).containsExactly(new LotState(SEVENTEEN, true, "", 3, ""));
        }
    }

    @Test
    void aSetAsideFileIsKnownButGivesNoPoints() throws ArchiveException {
        try (Archive archive = open()) {
            archive.commit(List.of(setAside("bad.csv", "line 7: \"n/a\" where a number belongs")));

            assertThat(archive.files())
                    .extracting(ArchivedFile::reason)
                    .containsExactly("line 7: \"n/a\" where a number belongs");
            assertThat(archive.lots()).isEmpty();
        }
    }

    @Test
    void aRowOfTheTeamSheetIsDueUntilItIsWrittenAndAgainWhenItChanges() throws ArchiveException {
        try (Archive archive = open()) {
            archive.keepSheetRow(EIGHTEEN, "18");
            archive.keepSheetRow(SEVENTEEN, "17");
            assertThat(archive.sheetRows())
                    .containsExactly(new KeptRow(SEVENTEEN, "17", ""), new KeptRow(EIGHTEEN, "18", ""));

            archive.sheetRowsWritten(List.of(SEVENTEEN, EIGHTEEN), "team.csv");
            archive.keepSheetRow(SEVENTEEN, "17");
            archive.keepSheetRow(EIGHTEEN, "18 again");
        }

        try (Archive archive = open()) {
            assertThat(archive.sheetRows())
                    .containsExactly(new KeptRow(SEVENTEEN, "17", "team.csv"), new KeptRow(EIGHTEEN, "18 again", ""));
        }
    }

    @Test
    void openingAndReadingTouchesNothing() throws ArchiveException, IOException {
        try (Archive archive = open()) {
            archive.commit(List.of(reduced("a.csv", SEVENTEEN, 3), setAside("bad.csv", "empty")));
            archive.concluded(SEVENTEEN, "c1", List.of(), "");
        }
        FileTime longAgo = FileTime.fromMillis(1_000_000_000_000L);
        Files.setLastModifiedTime(archiveFile(), longAgo);
        byte[] before = Files.readAllBytes(archiveFile());
        Files.setLastModifiedTime(folder, longAgo);

        try (Archive archive = open()) {
            archive.files();
            archive.lots();
            archive.reductions(SEVENTEEN);
            archive.filesOf(SEVENTEEN);
            assertThat(namesInFolder()).containsExactly("archive.sqlite");
        }

        assertThat(namesInFolder()).containsExactly("archive.sqlite");
        assertThat(Files.getLastModifiedTime(archiveFile())).isEqualTo(longAgo);
        assertThat(Files.getLastModifiedTime(folder))
                .as("no file came or went in between")
                .isEqualTo(longAgo);
        assertThat(Files.readAllBytes(archiveFile())).isEqualTo(before);
    }

    @Test
    void aChangedFileReplacesItsPointsAndBothLotsAreDue() throws ArchiveException {
        try (Archive archive = open()) {
            archive.commit(List.of(reduced("a.csv", SEVENTEEN, 3), reduced("b.csv", SEVENTEEN, 2)));
            archive.concluded(SEVENTEEN, "c1", List.of(), "");

            FileOutcome changed = reduced("a.csv", EIGHTEEN, 4);
            archive.commit(List.of(changed));

            assertThat(archive.reductions(EIGHTEEN)).isEqualTo(changed.reductions());
            assertThat(archive.reductions(SEVENTEEN)).hasSize(2);
            assertThat(archive.lots())
                    .containsExactly(
                            new LotState(SEVENTEEN, true, "c1", 2, ""), new LotState(EIGHTEEN, true, "", 4, ""));
        }
    }

    @Test
    void aFileThatFailsAfterAChangeTakesItsOldPointsOut() throws ArchiveException {
        try (Archive archive = open()) {
            archive.commit(List.of(reduced("a.csv", SEVENTEEN, 3)));
            archive.concluded(SEVENTEEN, "c1", List.of(), "");

            archive.commit(List.of(setAside("a.csv", "truncated")));

            assertThat(archive.reductions(SEVENTEEN)).isEmpty();
            assertThat(archive.filesOf(SEVENTEEN)).isEmpty();
            assertThat(archive.lots()).containsExactly(new LotState(SEVENTEEN, true, "c1", 0, ""));
        }
    }

    @Test
    void theSameContentAtANewPathTakesThePlaceOfAVanishedFile() throws ArchiveException {
        try (Archive archive = open()) {
            archive.commit(List.of(reduced("old/a.csv", SEVENTEEN, 3)));
            archive.concluded(SEVENTEEN, "c1", List.of(), "");

            FileOutcome moved = reduced("new/a.csv", EIGHTEEN, 3);
            archive.commit(
                    List.of(new FileOutcome(moved.file(), moved.reductions(), Optional.of(identity("old/a.csv")))));

            assertThat(archive.files()).containsExactly(moved.file());
            assertThat(archive.reductions(SEVENTEEN)).isEmpty();
            assertThat(archive.lots()).extracting(LotState::due).containsExactly(true, true);
        }
    }

    @Test
    void aConcludedLotIsNoLongerDueAndALotWithoutPointsIsForgotten() throws ArchiveException {
        try (Archive archive = open()) {
            archive.commit(List.of(reduced("a.csv", SEVENTEEN, 3)));
            archive.concluded(SEVENTEEN, "c1", List.of(), "");
            assertThat(archive.lots()).containsExactly(new LotState(SEVENTEEN, false, "c1", 3, ""));

            archive.commit(List.of(setAside("a.csv", "truncated")));
            archive.concluded(SEVENTEEN, "c2", List.of(), "");
            assertThat(archive.lots()).isEmpty();
        }
    }

    @Test
    void amendingAFileReplacesItsStateAndKeepsItsReductions() throws ArchiveException {
        FileOutcome outcome = reduced("a.csv", SEVENTEEN, 3);
        ArchivedFile stopped = new ArchivedFile(
                outcome.file().identity(),
                outcome.file().tableName(),
                "other",
                999,
                12345,
                "other",
                "other",
                FileStatus.SET_ASIDE,
                "its grade file is wrong",
                0,
                "",
                "",
                "",
                0,
                0);
        try (Archive archive = open()) {
            archive.commit(List.of(outcome));
            archive.concluded(SEVENTEEN, "c1", List.of(), "");

            archive.amend(List.of(stopped));

            assertThat(archive.files()).containsExactly(stopped);
            assertThat(archive.reductions(SEVENTEEN)).isEqualTo(outcome.reductions());
            assertThat(archive.lots()).containsExactly(new LotState(SEVENTEEN, false, "c1", 3, ""));
        }
    }

    @Test
    void theOrderOfCommitsDoesNotShow() throws ArchiveException {
        List<FileOutcome> outcomes = new ArrayList<>();
        for (int i = 0; i < 20; i++) {
            outcomes.add(reduced("f" + i + ".csv", i % 3 == 0 ? EIGHTEEN : SEVENTEEN, 2));
        }
        List<FileOutcome> shuffled = new ArrayList<>(outcomes);
        Collections.shuffle(shuffled, new Random(4));

        try (Archive one = Archive.open(folder.resolve("one.sqlite"));
                Archive other = Archive.open(folder.resolve("other.sqlite"))) {
            one.commit(outcomes);
            for (FileOutcome outcome : shuffled) {
                other.commit(List.of(outcome));
            }

            assertThat(other.files()).isEqualTo(one.files());
            assertThat(other.lots()).isEqualTo(one.lots());
            assertThat(other.reductions(SEVENTEEN)).isEqualTo(one.reductions(SEVENTEEN));
        }
    }

    @Test
    void aFailureInTheMiddleOfACommitLeavesNothingOfIt() throws ArchiveException {
        ArchivedFile good = reduced("b.csv", SEVENTEEN, 1).file();
        ArchivedFile withoutDigest = new ArchivedFile(
                identity("z.csv"), "z.csv", "bench", 1, 1, null, "", FileStatus.REDUCED, "", 0, "", "", "", 0, 0);
        try (Archive archive = open()) {
            archive.commit(List.of(reduced("a.csv", SEVENTEEN, 3)));
            archive.concluded(SEVENTEEN, "c1", List.of(), "");

            assertThatThrownBy(() -> archive.commit(List.of(
                            new FileOutcome(good, List.of(), Optional.of(identity("a.csv"))),
                            new FileOutcome(withoutDigest, List.of(), Optional.empty()))))
                    .isInstanceOf(ArchiveException.class)
                    .hasMessageContaining("cannot keep what was reduced");

            assertThat(archive.files()).extracting(ArchivedFile::tableName).containsExactly("bench/a.csv");
            assertThat(archive.lots()).containsExactly(new LotState(SEVENTEEN, false, "c1", 3, ""));
            archive.commit(List.of(reduced("c.csv", SEVENTEEN, 1)));
            assertThat(archive.files()).hasSize(2);
        }
    }

    @Test
    void namesThatLookLikeStatementsAreOnlyNames() throws ArchiveException {
        LotName hostile = new LotName("x'); DROP TABLE file; --", "\" OR 1=1 %_?1");
        try (Archive archive = open()) {
            archive.commit(
                    List.of(reduced("a'; DELETE FROM file; --.csv", hostile, 2), reduced("b.csv", SEVENTEEN, 1)));

            assertThat(archive.reductions(hostile)).hasSize(2);
            assertThat(archive.files()).hasSize(2);
        }
    }

    @Test
    void aReductionWithPointsOfTwoLotsIsABug() {
        Reduction one = random.reductions("Heron 3", "L-17", "bench/a.csv", 1).get(0);
        Reduction two = random.reductions("Heron 3", "L-18", "bench/a.csv", 1).get(0);
        Reduction mixed =
                new Reduction(List.of(one.points().get(0), two.points().get(0)));
        ArchivedFile file = reduced("a.csv", SEVENTEEN, 0).file();

        assertThatThrownBy(() -> new FileOutcome(file, List.of(mixed), Optional.empty()))
                .isInstanceOf(IllegalArgumentException.class);
        assertThatThrownBy(() -> new FileOutcome(file, List.of(new Reduction(List.of())), Optional.empty()))
                .isInstanceOf(IllegalArgumentException.class);
    }

    @Test
    void aRandomHistoryAgreesWithAPlainMap() throws ArchiveException {
        Random choice = new Random(99);
        Map<FileIdentity, FileOutcome> expected =
                new TreeMap<>(java.util.Comparator.comparing(FileIdentity::relativePath));
        try (Archive archive = open()) {
            for (int step = 0; step < 200; step++) {
                String path = "f" + choice.nextInt(12) + ".csv";
                FileOutcome outcome = choice.nextInt(5) == 0
                        ? setAside(path, "step " + step)
                        : reduced(path, choice.nextBoolean() ? SEVENTEEN : EIGHTEEN, 1 + choice.nextInt(3));
                if (choice.nextInt(6) == 0) {
                    FileIdentity vanished = identity("f" + choice.nextInt(12) + ".csv");
                    outcome = new FileOutcome(outcome.file(), outcome.reductions(), Optional.of(vanished));
                    expected.remove(vanished);
                }
                archive.commit(List.of(outcome));
                expected.put(outcome.file().identity(), outcome);
            }

            assertThat(archive.files())
                    .containsExactlyInAnyOrderElementsOf(
                            expected.values().stream().map(FileOutcome::file).toList());
            for (LotName lot : List.of(SEVENTEEN, EIGHTEEN)) {
                assertThat(archive.reductions(lot))
                        .isEqualTo(expected.values().stream()
                                .sorted(java.util.Comparator.comparing(
                                        outcome -> outcome.file().tableName()))
                                .flatMap(outcome -> outcome.reductions().stream())
                                .filter(reduction -> FileOutcome.lotOf(
                                                reduction.points().get(0).key())
                                        .equals(lot))
                                .toList());
            }
        }
    }

    private Archive open() throws ArchiveException {
        return Archive.open(archiveFile());
    }

    private Path archiveFile() {
        return folder.resolve("archive.sqlite");
    }

    private List<String> namesInFolder() throws IOException {
        try (Stream<Path> files = Files.list(folder)) {
            return files.map(file -> file.getFileName().toString()).sorted().toList();
        }
    }

    private static FileIdentity identity(String path) {
        return new FileIdentity("intake/bench", path);
    }

    private FileOutcome reduced(String path, LotName lot, int points) {
        String name = "bench/" + path;
        ArchivedFile file = new ArchivedFile(
                identity(path),
                name,
                "melt-bench",
                4096,
                1_700_000_000_000L,
                "ab12",
                "cd34",
                FileStatus.REDUCED,
                "",
                points,
                lot.grade(),
                lot.lot(),
                "specimen 1",
                512L * points,
                2);
        return new FileOutcome(file, random.reductions(lot.grade(), lot.lot(), name, points), Optional.empty());
    }

    private static FileOutcome setAside(String path, String reason) {
        ArchivedFile file = new ArchivedFile(
                identity(path),
                "bench/" + path,
                "melt-bench",
                4096,
                1_700_000_000_000L,
                "ab12",
                "cd34",
                FileStatus.SET_ASIDE,
                reason,
                0,
                "",
                "",
                "",
                0,
                0);
        return new FileOutcome(file, List.of(), Optional.empty());
    }
}

package nightlag.pipeline.night;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.InvalidPathException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashMap;
import java.util.HashSet;
import java.util.Iterator;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import nightlag.pipeline.archive.ArchiveException;
import nightlag.pipeline.archive.LotName;
import nightlag.pipeline.archive.LotState;
import nightlag.pipeline.config.Fingerprints;
import nightlag.pipeline.config.Grade;
import nightlag.pipeline.tables.LotTables;
import nightlag.pipeline.tables.Provenance;
import nightlag.pipeline.tables.TableInUseException;
import nightlag.stages.Compare;
import nightlag.stages.Conclude;
import nightlag.stages.LotResult;
import nightlag.stages.Reduction;
import org.apache.logging.log4j.LogManager;
import org.apache.logging.log4j.Logger;

/** The second half of a night: the tables of every lot that is due are rebuilt from the archive and swapped in. */
final class LotStage {
    private static final Logger LOG = LogManager.getLogger(LotStage.class);

    /** With less room than this the disk counts as full. */
    private static final long ROOM_BYTES = 1 << 24;

    private final NightWork night;
    private final GradeTrends trends;
    private final Set<LotName> seen = new HashSet<>();

    LotStage(NightWork night) {
        this.night = night;
        this.trends = new GradeTrends(night.archive(), night.configuration());
    }

    /** A lot with everything it is concluded from. */
    private record Due(LotName lot, Grade grade, List<Reduction> reductions) {}

    /** What a lot became, or why it became nothing. */
    private record Concluded(Due due, Optional<LotResult> result, String reason) {}

    /**
     * Rebuilds what is due; the lots of a grade that has no right grade file stay due. Then the lots that stand among others
     * than before, as when one came before them late, or changed.
     */
    void work() throws ArchiveException, IOException, NightFault {
        List<LotState> due = wanted();
        due.removeIf(
                lot -> !isDue(lot, night.configuration().grades().get(lot.name().grade())));
        rebuild(inOrder(due));
        rebuild(inOrder(amongOthers()));
    }

    /** Lots the command line asks for, of grades that are right. */
    private List<LotState> wanted() throws ArchiveException {
        List<LotState> lots = new ArrayList<>(night.archive().lots());
        lots.removeIf(
                lot -> !night.configuration().grades().containsKey(lot.name().grade())
                        || !night.options().wants(lot.name()));
        return lots;
    }

    /** Lots whose trends are no longer those in their tables; one that has been rebuilt tonight has its own. */
    private List<LotState> amongOthers() throws ArchiveException {
        List<LotState> lots = new ArrayList<>();
        Map<String, Map<LotName, String>> digests = new HashMap<>();
        for (LotState lot : wanted()) {
            String grade = lot.name().grade();
            if (!digests.containsKey(grade)) {
                digests.put(grade, trends.digests(grade));
            }
            String digest = digests.get(grade).getOrDefault(lot.name(), "");
            if (!lot.trendFingerprint().equals(digest) && !seen.contains(lot.name())) {
                lots.add(lot);
            }
        }
        return lots;
    }

    /**
     * A lot that lost its points goes first: where case does not count, one that took its place has the same folder. The others
     * in the order in which they are compared, as each needs the values of those before it.
     */
    private List<LotState> inOrder(List<LotState> lots) throws ArchiveException {
        Map<LotName, Integer> places = new HashMap<>();
        for (LotState lot : lots) {
            places.put(lot.name(), trends.place(lot.name()));
        }
        return lots.stream()
                .sorted(Comparator.comparing((LotState lot) -> lot.points() > 0)
                        .thenComparing(lot -> lot.name().grade())
                        .thenComparing(lot -> places.get(lot.name())))
                .toList();
    }

    private void rebuild(List<LotState> lots) throws ArchiveException, IOException, NightFault {
        try (SideBySide<Due, Concluded> results = new SideBySide<>(read(lots), LotStage::conclude, night.workers())) {
            while (results.hasNext()) {
                publish(results.next());
            }
        } catch (UncheckedArchiveException e) {
            throw e.cause;
        }
    }

    private boolean isDue(LotState lot, Grade grade) {
        return lot.due() || !lot.conclusionFingerprint().equals(conclusionState(grade)) || !hasTables(lot.name());
    }

    private boolean hasTables(LotName lot) {
        try {
            Path folder = LotTables.folder(night.configuration().results(), lot.grade(), lot.lot());
            return Files.exists(folder.resolve("points.csv"));
        } catch (InvalidPathException cannotBeNamedHere) {
            return false;
        }
    }

    private String conclusionState(Grade grade) {
        return Fingerprints.of(night.version(), grade.conclusionFingerprint());
    }

    /** Reads each lot from the archive only when its turn has nearly come. */
    private Iterator<Due> read(List<LotState> lots) {
        return lots.stream()
                .map(LotState::name)
                .map(lot -> {
                    try {
                        return new Due(
                                lot,
                                night.configuration().grades().get(lot.grade()),
                                night.archive().reductions(lot));
                    } catch (ArchiveException e) {
                        throw new UncheckedArchiveException(e);
                    }
                })
                .iterator();
    }

    private static Concluded conclude(Due due) {
        try {
            LotResult result = Conclude.conclude(due.reductions(), due.grade().conclusion());
            return new Concluded(due, Optional.of(result), "");
        } catch (RuntimeException e) {
            // a bug stops this lot and nothing else; the log has what is needed to mend it
            LOG.error("{} lot {}: internal fault", due.lot().grade(), due.lot().lot(), e);
            return new Concluded(due, Optional.empty(), "internal fault: " + e);
        }
    }

    private void publish(Concluded concluded) throws ArchiveException, IOException, NightFault {
        LotName lot = concluded.due().lot();
        seen.add(lot);
        if (concluded.result().isEmpty()) {
            night.tally().notConcluded(lot, concluded.reason());
            return;
        }
        Grade grade = concluded.due().grade();
        LotResult result = trends.compared(lot, concluded.result().get());
        try {
            LotTables.write(night.configuration().results(), result, provenance(lot, grade));
        } catch (TableInUseException e) {
            // the lot stays due
            night.tally().notConcluded(lot, e.getMessage());
            return;
        } catch (InvalidPathException e) {
            night.tally().notConcluded(lot, IoSentences.of(e));
            return;
        } catch (IOException e) {
            if (canBeWritten(night.configuration().results())) {
                // something stands in the way of this lot alone; it stays due
                night.tally().notConcluded(lot, "its tables cannot be written: " + IoSentences.of(e));
                return;
            }
            throw new NightFault(
                    NightFault.Kind.STOPPED,
                    "the tables of %s lot %s cannot be written: %s"
                            .formatted(lot.grade(), lot.lot(), IoSentences.of(e)),
                    e);
        }
        // before the lot is noted as done: one that a kill leaves due is concluded again, to the same row
        night.archive().keepSheetRow(lot, SheetStage.row(lot, result).toJson());
        night.archive()
                .concluded(lot, conclusionState(grade), Compare.values(result), GradeTrends.digest(result.trend()));
        night.tally().concluded(lot, result);
        night.report().lot(lot.grade(), lot.lot(), result);
    }

    /** Whether there is still room and leave to write; else it is no matter of one lot. */
    private static boolean canBeWritten(Path results) throws IOException {
        return Files.isWritable(results) && Files.getFileStore(results).getUsableSpace() > ROOM_BYTES;
    }

    private Provenance provenance(LotName lot, Grade grade) throws ArchiveException {
        return new Provenance(
                lot.grade(),
                lot.lot(),
                night.archive().filesOf(lot).stream()
                        .map(file -> new Provenance.Input(file.tableName(), file.sha256()))
                        .toList(),
                List.of(
                        new Provenance.Plan("reduction", grade.reductionFingerprint()),
                        new Provenance.Plan("conclusion", grade.conclusionFingerprint())),
                night.version());
    }

    /** Carries an archive fault out of a stream. */
    private static final class UncheckedArchiveException extends RuntimeException {
        private static final long serialVersionUID = 1L;

        private final transient ArchiveException cause;

        UncheckedArchiveException(ArchiveException cause) {
            super(cause);
            this.cause = cause;
        }
    }
}

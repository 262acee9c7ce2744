package nightlag.pipeline.night;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Iterator;
import java.util.List;
import java.util.Optional;
import nightlag.pipeline.archive.Archive;
import nightlag.pipeline.archive.ArchiveException;
import nightlag.pipeline.archive.LotName;
import nightlag.pipeline.archive.LotState;
import nightlag.pipeline.config.Configuration;
import nightlag.pipeline.config.Fingerprints;
import nightlag.pipeline.config.Grade;
import nightlag.pipeline.tables.LotTables;
import nightlag.pipeline.tables.Provenance;
import nightlag.pipeline.tables.TableInUseException;
import nightlag.stages.Conclude;
import nightlag.stages.LotResult;
import nightlag.stages.Reduction;
import nightlag.stages.fault.Reason;
import org.apache.logging.log4j.LogManager;
import org.apache.logging.log4j.Logger;

/** The second half of a night: the tables of every lot that is due are rebuilt from the archive and swapped in. */
final class LotStage {
    private static final Logger LOG = LogManager.getLogger(LotStage.class);

    private final Configuration configuration;
    private final RunOptions options;
    private final String version;
    private final int workers;
    private final Archive archive;
    private final Tally tally;

    LotStage(
            Configuration configuration,
            RunOptions options,
            String version,
            int workers,
            Archive archive,
            Tally tally) {
        this.configuration = configuration;
        this.options = options;
        this.version = version;
        this.workers = workers;
        this.archive = archive;
        this.tally = tally;
    }

    /** A lot with everything it is concluded from. */
    private record Due(LotName lot, Grade grade, List<Reduction> reductions) {}

    /** What a lot became, or why it became nothing. */
    private record Concluded(Due due, Optional<LotResult> result, String reason) {}

    /** Rebuilds what is due; the lots of a grade that has no right grade file stay due. */
    void work() throws ArchiveException, IOException, NightFault {
        List<LotState> due = new ArrayList<>();
        for (LotState lot : archive.lots()) {
            Grade grade = configuration.grades().get(lot.name().grade());
            if (grade != null && options.wants(lot.name()) && isDue(lot, grade)) {
                due.add(lot);
            }
        }
        try (SideBySide<Due, Concluded> results = new SideBySide<>(read(due), LotStage::conclude, workers)) {
            while (results.hasNext()) {
                publish(results.next());
            }
        } catch (UncheckedArchiveException e) {
            throw e.cause;
        }
    }

    private boolean isDue(LotState lot, Grade grade) {
        Path points = LotTables.folder(
                        configuration.results(), lot.name().grade(), lot.name().lot())
                .resolve("points.csv");
        return lot.due() || !lot.conclusionFingerprint().equals(conclusionState(grade)) || !Files.exists(points);
    }

    private String conclusionState(Grade grade) {
        return Fingerprints.of(version, grade.conclusionFingerprint());
    }

    /** Reads each lot from the archive only when its turn has nearly come. */
    private Iterator<Due> read(List<LotState> lots) {
        return lots.stream()
                .map(LotState::name)
                .map(lot -> {
                    try {
                        return new Due(lot, configuration.grades().get(lot.grade()), archive.reductions(lot));
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
        if (concluded.result().isEmpty()) {
            tally.notConcluded(lot, concluded.reason());
            return;
        }
        Grade grade = concluded.due().grade();
        LotResult result = concluded.result().get();
        try {
            LotTables.write(configuration.results(), result, provenance(lot, grade));
        } catch (TableInUseException e) {
            // the lot stays due
            tally.notConcluded(lot, e.getMessage());
            return;
        } catch (IOException e) {
            throw new NightFault(
                    NightFault.Kind.STOPPED,
                    "the tables of %s lot %s cannot be written: %s"
                            .formatted(lot.grade(), lot.lot(), IoSentences.of(e)),
                    e);
        }
        archive.concluded(lot, conclusionState(grade));
        tally.concluded(lot, result.notes().stream().map(Reason::sentence).toList());
    }

    private Provenance provenance(LotName lot, Grade grade) throws ArchiveException {
        return new Provenance(
                lot.grade(),
                lot.lot(),
                archive.filesOf(lot).stream()
                        .map(file -> new Provenance.Input(file.tableName(), file.sha256()))
                        .toList(),
                List.of(
                        new Provenance.Plan("reduction", grade.reductionFingerprint()),
                        new Provenance.Plan("conclusion", grade.conclusionFingerprint())),
                version);
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

package nightlag.pipeline.night;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.InvalidPathException;
import java.nio.file.attribute.BasicFileAttributes;
import java.util.ArrayList;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.TreeSet;
import java.util.stream.Collectors;
import nightlag.pipeline.archive.ArchivedFile;
import nightlag.pipeline.archive.LotName;
import nightlag.pipeline.config.Configuration;
import nightlag.pipeline.config.Instrument;
import nightlag.pipeline.config.TagName;
import nightlag.pipeline.config.TagSource;
import nightlag.pipeline.decode.DecodeCounts;
import nightlag.pipeline.decode.DecodeException;
import nightlag.pipeline.decode.RawFileDecoder;
import nightlag.pipeline.decode.RunSheetRow;
import nightlag.pipeline.decode.RunSheets;
import nightlag.pipeline.intake.RawFile;
import nightlag.stages.MeasuredRecord;
import nightlag.stages.Reduce;
import nightlag.stages.Reduction;
import nightlag.stages.moduli.PointKey;
import org.apache.logging.log4j.LogManager;
import org.apache.logging.log4j.Logger;

/** Decodes and reduces one file; safe for use by several threads. */
final class FileLooker {
    private static final Logger LOG = LogManager.getLogger(FileLooker.class);

    private final Configuration configuration;
    private final RunSheets runSheets;
    private final boolean redo;
    private final String version;

    FileLooker(Configuration configuration, RunSheets runSheets, boolean redo, String version) {
        this.configuration = configuration;
        this.runSheets = runSheets;
        this.redo = redo;
        this.version = version;
    }

    /** Looks at one file; whatever it holds, this answers. */
    Look look(Survey.Candidate candidate) {
        RawFile file = candidate.file();
        String sha256 = "";
        Records records = new Records(file.intake().instrument());
        try {
            sha256 = file.sha256();
            if (isUnchanged(candidate, sha256)) {
                return new Look.Unchanged(sha256);
            }
            Optional<RunSheetRow> row = runSheets.rowOf(file);
            DecodeCounts counts = RawFileDecoder.decode(file, row, records::add);
            if (counts.records() != records.reductions.size()) {
                throw new IllegalStateException("%d records decoded, %d reduced in %s"
                        .formatted(counts.records(), records.reductions.size(), file.tableName()));
            }
            if (changedSince(file)) {
                return new Look.Waiting("", "it changed while it was read");
            }
            return new Look.Reduced(sha256, counts, records.reductions, state(candidate, records.grades()));
        } catch (GradePlans.GradeStopped stopped) {
            String reason = file.tableName() + ": " + stopped.getMessage();
            return setAside(candidate, sha256, reason, records, true);
        } catch (DecodeException e) {
            return setAside(candidate, sha256, e.problem().sentence(), records, false);
        } catch (IOException e) {
            String reason = file.tableName() + ": cannot be read: " + IoSentences.of(e);
            return tryAgain(candidate, sha256, reason, records);
        } catch (InvalidPathException e) {
            return tryAgain(candidate, sha256, file.tableName() + ": " + IoSentences.of(e), records);
        } catch (RuntimeException | StackOverflowError e) {
            // a bug stops this file and nothing else; the log has what is needed to mend it
            LOG.error("{}: internal fault", file.tableName(), e);
            String reason = file.tableName() + ": internal fault: " + e;
            return tryAgain(candidate, sha256, reason, records);
        }
    }

    private boolean isUnchanged(Survey.Candidate candidate, String sha256) {
        return !redo
                && candidate.known().isPresent()
                && candidate.known().get().sha256().equals(sha256)
                && ReductionState.isCurrent(
                        candidate.known().get().fingerprint(),
                        version,
                        candidate.file().intake().instrument(),
                        candidate.runSheetDigest(),
                        configuration);
    }

    private Look setAside(
            Survey.Candidate candidate, String sha256, String reason, Records records, boolean keepsReductions) {
        // points of a changed file are not those of its new content, whoever is at fault
        boolean sameContent = candidate
                .known()
                .map(ArchivedFile::sha256)
                .filter(sha256::equals)
                .isPresent();
        String state = state(candidate, records.grades());
        if (records.lots.isEmpty()) {
            readNamesFromHead(candidate.file(), records);
        }
        return new Look.SetAside(
                sha256, reason, records.lots, records.specimens, state, keepsReductions && sameContent);
    }

    /** A file that fails before its first record may still say in its head whose it is; a person looks for it by that. */
    private void readNamesFromHead(RawFile file, Records records) {
        Map<TagName, TagSource> sources = file.intake().instrument().tags();
        if (sources.get(TagName.LOT) instanceof TagSource.DataColumn
                || sources.get(TagName.GRADE) instanceof TagSource.DataColumn) {
            return;
        }
        try {
            Map<TagName, String> tags = RawFileDecoder.tagsOfHead(file, runSheets.rowOf(file));
            if (tags.containsKey(TagName.GRADE) && tags.containsKey(TagName.LOT)) {
                records.lots.add(new LotName(tags.get(TagName.GRADE), tags.get(TagName.LOT)));
                if (!(sources.get(TagName.SPECIMEN) instanceof TagSource.DataColumn)) {
                    records.specimens.add(tags.getOrDefault(TagName.SPECIMEN, RawFileDecoder.FIRST_SPECIMEN));
                }
            }
        } catch (DecodeException | IOException alreadySaid) {
            // the head itself is what is wrong with the file, and the reason says so
        }
    }

    /** Set aside for tonight only; what it gave before stays unless its content is known to have changed. */
    private static Look tryAgain(Survey.Candidate candidate, String sha256, String reason, Records records) {
        boolean changed = !sha256.isEmpty()
                && candidate
                        .known()
                        .map(ArchivedFile::sha256)
                        .filter(sha256::equals)
                        .isEmpty();
        return new Look.SetAside(sha256, reason, records.lots, records.specimens, ReductionState.TRY_AGAIN, !changed);
    }

    private String state(Survey.Candidate candidate, Set<String> grades) {
        return ReductionState.of(
                version, candidate.file().intake().instrument(), candidate.runSheetDigest(), grades, configuration);
    }

    private static boolean changedSince(RawFile file) throws IOException {
        BasicFileAttributes now = Files.readAttributes(file.path(), BasicFileAttributes.class);
        return now.size() != file.bytes() || now.lastModifiedTime().toMillis() != file.modifiedMillis();
    }

    /** Reduces the records of one file as they come. */
    private final class Records {
        private final GradePlans plans;
        private final List<Reduction> reductions = new ArrayList<>();
        private final Set<LotName> lots = new LinkedHashSet<>();
        private final Set<String> specimens = new LinkedHashSet<>();

        Records(Instrument instrument) {
            this.plans = new GradePlans(configuration, instrument);
        }

        void add(MeasuredRecord record) {
            PointKey key = record.tags().key();
            lots.add(new LotName(key.grade(), key.lot()));
            specimens.add(key.specimen());
            reductions.add(Reduce.reduce(record, plans.of(key.grade())));
        }

        Set<String> grades() {
            return lots.stream().map(LotName::grade).collect(Collectors.toCollection(TreeSet::new));
        }
    }
}

package nightlag.pipeline.night;

import java.util.LinkedHashSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import nightlag.pipeline.archive.ArchivedFile;
import nightlag.pipeline.archive.FileStatus;
import nightlag.pipeline.archive.LotName;
import nightlag.pipeline.intake.RawFile;
import nightlag.pipeline.night.Survey.Candidate;
import nightlag.pipeline.tables.NightFileRow;
import nightlag.stages.Reduction;
import nightlag.stages.moduli.PointKey;

/** What a look at a file becomes in the archive and in {@code files.csv}. */
final class FileStates {
    private FileStates() {}

    /** A file whose records were reduced. */
    static ArchivedFile reduced(Candidate candidate, Look.Reduced look) {
        int points = look.reductions().stream().mapToInt(Reduction::count).sum();
        return new ArchivedFile(
                candidate.identity(),
                candidate.file().tableName(),
                candidate.file().intake().instrument().id(),
                candidate.file().bytes(),
                candidate.file().modifiedMillis(),
                look.sha256(),
                look.state(),
                FileStatus.REDUCED,
                "",
                points,
                only(keys(look.reductions()).map(PointKey::grade)),
                only(keys(look.reductions()).map(PointKey::lot)),
                only(specimens(look.reductions()).stream()),
                look.counts().rows(),
                look.counts().leftOut());
    }

    /** A file that is set aside. */
    static ArchivedFile setAside(Candidate candidate, Look.SetAside look) {
        return new ArchivedFile(
                candidate.identity(),
                candidate.file().tableName(),
                candidate.file().intake().instrument().id(),
                candidate.file().bytes(),
                candidate.file().modifiedMillis(),
                look.sha256(),
                look.state(),
                FileStatus.SET_ASIDE,
                look.reason(),
                0,
                only(look.lots().stream().map(LotName::grade)),
                only(look.lots().stream().map(LotName::lot)),
                only(look.specimens().stream()),
                0,
                0);
    }

    /** A file of which only size or time stamp are new. */
    static ArchivedFile restamped(Candidate candidate, ArchivedFile known) {
        return new ArchivedFile(
                known.identity(),
                known.tableName(),
                candidate.file().intake().instrument().id(),
                candidate.file().bytes(),
                candidate.file().modifiedMillis(),
                known.sha256(),
                known.fingerprint(),
                known.status(),
                known.reason(),
                known.points(),
                known.grade(),
                known.lot(),
                known.specimen(),
                known.rows(),
                known.rowsLeftOut());
    }

    /** The row of a file that the archive knows. */
    static NightFileRow row(ArchivedFile known, RawFile file, NightFileRow.Status status) {
        return new NightFileRow(
                known.tableName(),
                file.intake().instrument().id(),
                known.grade(),
                known.lot(),
                known.specimen(),
                status,
                known.reason(),
                known.points(),
                file.bytes(),
                known.sha256());
    }

    /** The row of a file that waits. */
    static NightFileRow waiting(Candidate candidate, String reason) {
        Optional<ArchivedFile> known = candidate.known();
        return new NightFileRow(
                candidate.file().tableName(),
                candidate.file().intake().instrument().id(),
                known.map(ArchivedFile::grade).orElse(""),
                known.map(ArchivedFile::lot).orElse(""),
                known.map(ArchivedFile::specimen).orElse(""),
                NightFileRow.Status.WAITING,
                reason,
                0,
                candidate.file().bytes(),
                "");
    }

    /** The lots a file's points are of, in the order of the file. */
    static Set<LotName> lots(List<Reduction> reductions) {
        return keys(reductions)
                .map(key -> new LotName(key.grade(), key.lot()))
                .collect(Collectors.toCollection(LinkedHashSet::new));
    }

    /** The specimens a file's points are of. */
    static Set<String> specimens(List<Reduction> reductions) {
        return keys(reductions).map(PointKey::specimen).collect(Collectors.toSet());
    }

    private static Stream<PointKey> keys(List<Reduction> reductions) {
        return reductions.stream().flatMap(Reduction::keys);
    }

    /** The one value all agree on, or empty text. */
    private static String only(Stream<String> values) {
        List<String> distinct = values.distinct().limit(2).toList();
        return distinct.size() == 1 ? distinct.get(0) : "";
    }
}

package nightlag.pipeline.night;

import java.nio.file.Path;
import java.util.ArrayList;
import java.util.EnumMap;
import java.util.HashSet;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.TreeMap;
import java.util.stream.Collectors;
import nightlag.pipeline.archive.LotName;
import nightlag.pipeline.decode.DecodeCounts;
import nightlag.pipeline.tables.NightFileRow;
import nightlag.stages.LotResult;
import nightlag.stages.Reduction;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.moduli.Flag;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.PointKey;
import nightlag.stages.moduli.Quality;
import org.apache.logging.log4j.LogManager;
import org.apache.logging.log4j.Logger;

/** Counts what becomes of every file, row, point and lot, and says to the log what a person should know. */
final class Tally {
    private static final Logger LOG = LogManager.getLogger(Tally.class);

    /** Of so many points that are not sound a person reads the reasons at the end; the log has them all. */
    private static final int MOST_NOT_SOUND = 100;

    /** So many points that share a reason are named, the others are counted. */
    private static final int MOST_NAMED = 3;

    private final Path folder;
    private final List<NightFileRow> files = new ArrayList<>();
    private final List<String> newlySetAside = new ArrayList<>();
    private final List<String> stillSetAside = new ArrayList<>();
    private final List<String> unreadableIntakes = new ArrayList<>();
    private final Map<LotName, List<String>> lotsConcluded = new TreeMap<>();
    private final Map<LotName, String> lotsNotConcluded = new TreeMap<>();
    private final Map<Quality, Integer> quality = new EnumMap<>(Quality.class);
    private final Map<Flag, Integer> flags = new EnumMap<>(Flag.class);
    private final Set<String> reducedTonight = new HashSet<>();
    private final Map<Quality, List<String>> notSound = new EnumMap<>(Quality.class);
    private final VerdictCount verdicts = new VerdictCount();
    private long rows;
    private long rowsLeftOut;
    private SheetReport teamSheet = SheetReport.NOTHING;

    Tally(Path folder) {
        this.folder = folder;
    }

    void file(NightFileRow row) {
        files.add(row);
    }

    void newlySetAside(NightFileRow row) {
        files.add(row);
        newlySetAside.add(row.reason());
        LOG.warn("set aside: {}", row.reason());
    }

    void stillSetAside(NightFileRow row) {
        files.add(row);
        stillSetAside.add(row.reason());
        LOG.info("still set aside: {}", row.reason());
    }

    void unreadable(String sentence) {
        unreadableIntakes.add(sentence);
        LOG.warn("intake cannot be read: {}", sentence);
    }

    /** Says what each point of a file was found to be; they are counted as their lots publish them. */
    void reduced(String file, DecodeCounts counts, List<Reduction> reductions) {
        reducedTonight.add(file);
        rows += counts.rows();
        rowsLeftOut += counts.leftOut();
        if (counts.leftOut() > 0) {
            LOG.info(
                    "{}: {} of {} rows left out, {} for an empty cell, {} outside the windows of a long record",
                    file,
                    counts.leftOut(),
                    counts.rows(),
                    counts.leftOut() - counts.outsideWindows(),
                    counts.outsideWindows());
        }
        Map<String, List<String>> pointsBySentence = new LinkedHashMap<>();
        for (Reduction reduction : reductions) {
            for (ModulusPoint point : reduction.points()) {
                for (Reason reason : point.reasons()) {
                    pointsBySentence
                            .computeIfAbsent(reason.sentence(), any -> new ArrayList<>())
                            .add(point.key().point());
                }
            }
        }
        for (Reduction reduction : reductions) {
            reduction
                    .creep()
                    .ifPresent(curve -> curve.reasons()
                            .forEach(reason -> pointsBySentence
                                    .computeIfAbsent(reason.sentence(), any -> new ArrayList<>())
                                    .add(curve.key().point())));
        }
        pointsBySentence.forEach((sentence, points) -> LOG.info("{}, {}: {}", file, named(points), sentence));
    }

    /** One sentence about many points of a long record is one line of the log. */
    private static String named(List<String> points) {
        if (points.size() == 1) {
            return "point " + points.get(0);
        }
        String first = String.join(", ", points.subList(0, Math.min(MOST_NAMED, points.size())));
        return "points " + first + (points.size() > MOST_NAMED ? " and " + (points.size() - MOST_NAMED) + " more" : "");
    }

    /** Counts the points of a lot that come from files reduced this night, as they are published. */
    void concluded(LotName lot, LotResult result) {
        List<String> notes = result.notes().stream().map(Reason::sentence).toList();
        lotsConcluded.put(lot, notes);
        LOG.info("{} lot {}: tables rebuilt", lot.grade(), lot.lot());
        notes.forEach(note -> LOG.info("{} lot {}: {}", lot.grade(), lot.lot(), note));
        result.absent().forEach(why -> LOG.info("{} lot {}: {}", lot.grade(), lot.lot(), why.sentence()));
        verdicts.add(lot.grade() + " lot " + lot.lot(), result).forEach(LOG::info);
        for (ModulusPoint point : result.points()) {
            if (reducedTonight.contains(point.key().sourceFile())) {
                quality.merge(point.quality(), 1, Integer::sum);
                point.flags().forEach(flag -> flags.merge(flag, 1, Integer::sum));
                if (point.quality() != Quality.SOUND) {
                    notSound(point.key(), point.quality(), point.reasons());
                }
            }
        }
        for (CreepCurve curve : result.creep()) {
            if (reducedTonight.contains(curve.key().sourceFile())) {
                quality.merge(curve.quality(), 1, Integer::sum);
                curve.flags().forEach(flag -> flags.merge(flag, 1, Integer::sum));
                if (curve.quality() != Quality.SOUND) {
                    notSound(curve.key(), curve.quality(), curve.reasons());
                }
            }
        }
    }

    private void notSound(PointKey key, Quality found, List<Reason> why) {
        String name = key.sourceFile() + ", point " + key.point();
        String reasons = why.stream().map(Reason::sentence).collect(Collectors.joining("; "));
        LOG.info("{}: published as {}: {}", name, found.word(), reasons);
        List<String> lines = notSound.computeIfAbsent(found, any -> new ArrayList<>());
        if (lines.size() < MOST_NOT_SOUND) {
            lines.add(name + ", " + found.word() + ": " + reasons);
        }
    }

    void notConcluded(LotName lot, String reason) {
        lotsNotConcluded.put(lot, reason);
        LOG.warn("{} lot {}: not concluded: {}", lot.grade(), lot.lot(), reason);
    }

    /** What became of the team sheet. */
    void teamSheet(SheetReport report) {
        teamSheet = report;
        report.line().ifPresent(line -> LOG.info("team sheet: {}", line));
        report.concerns().forEach(concern -> LOG.warn("team sheet: {}", concern));
    }

    NightOutcome outcome() {
        List<String> worstFirst = new ArrayList<>(notSound.getOrDefault(Quality.UNUSABLE, List.of()));
        worstFirst.addAll(notSound.getOrDefault(Quality.DOUBTFUL, List.of()));
        return new NightOutcome(
                folder,
                files,
                newlySetAside,
                stillSetAside,
                unreadableIntakes,
                lotsConcluded,
                lotsNotConcluded,
                quality,
                worstFirst,
                flags,
                rows,
                rowsLeftOut,
                verdicts.line(),
                verdicts.notConforming(),
                verdicts.unusual(),
                teamSheet);
    }
}

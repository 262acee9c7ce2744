package nightlag.pipeline.night;

import java.nio.file.Path;
import java.util.ArrayList;
import java.util.EnumMap;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.TreeMap;
import nightlag.pipeline.archive.LotName;
import nightlag.pipeline.decode.DecodeCounts;
import nightlag.pipeline.report.AlikeTogether;
import nightlag.pipeline.tables.NightFileRow;
import nightlag.stages.LotResult;
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

    /** So many lines on points of a lot that are not sound a person reads at the end; the log has them all. */
    private static final int MOST_NOT_SOUND = 100;

    private final Path folder;
    private final List<NightFileRow> files = new ArrayList<>();
    private final List<String> newlySetAside = new ArrayList<>();
    private final List<String> stillSetAside = new ArrayList<>();
    private final List<String> unreadableIntakes = new ArrayList<>();
    private final Map<LotName, List<String>> lotsConcluded = new TreeMap<>();
    private final Map<LotName, List<String>> remarks = new TreeMap<>();
    private final List<String> doubts = new ArrayList<>();
    private final List<String> unknownLots = new ArrayList<>();
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

    /** Counts the rows of a file; its points are counted, and spoken of, as their lots publish them. */
    void reduced(String file, DecodeCounts counts) {
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
    }

    /** Counts the points of a lot that come from files reduced this night, as they are published, and says what was found. */
    void concluded(LotName lot, LotResult result) {
        String name = lot.grade() + " lot " + lot.lot();
        lotsConcluded.put(lot, AlikeTogether.lines(result.unattained()));
        remarks.put(lot, AlikeTogether.lines(result.remarks()));
        List<String> inDoubt = AlikeTogether.lines(result.doubts());
        LOG.info("{}: tables rebuilt", name);
        inDoubt.forEach(line -> {
            doubts.add(name + ": " + line);
            LOG.info("{}: look at: {}", name, line);
        });
        lotsConcluded.get(lot).forEach(line -> LOG.info("{}: {}", name, line));
        remarks.get(lot).forEach(line -> LOG.info("{}: {}", name, line));
        AlikeTogether.lines(result.absent()).forEach(line -> LOG.info("{}: {}", name, line));
        verdicts.add(name, result).forEach(LOG::info);
        PointLines lines = new PointLines();
        for (ModulusPoint point : result.points()) {
            found(point.key(), point.quality(), point.flags(), point.reasons(), lines);
        }
        for (CreepCurve curve : result.creep()) {
            found(curve.key(), curve.quality(), curve.flags(), curve.reasons(), lines);
        }
        for (Quality each : Quality.values()) {
            lines.of(each).forEach(LOG::info);
            if (each != Quality.SOUND) {
                lines.of(each).stream()
                        .limit(MOST_NOT_SOUND)
                        .forEach(notSound.computeIfAbsent(each, any -> new ArrayList<>())::add);
            }
        }
    }

    private void found(PointKey key, Quality found, List<Flag> raised, List<Reason> why, PointLines lines) {
        if (reducedTonight.contains(key.sourceFile())) {
            quality.merge(found, 1, Integer::sum);
            raised.forEach(flag -> flags.merge(flag, 1, Integer::sum));
            lines.add(key, found, why);
        }
    }

    /** A lot the command line asks for that is nowhere. */
    void unknownLot(String lot) {
        String line = "no lot '" + lot + "' in the archive or in the files looked at (capitals and spaces count)";
        unknownLots.add(line);
        LOG.warn("{}", line);
    }

    /** Whether a file of this night names a lot. */
    boolean names(String lot) {
        return files.stream().anyMatch(file -> file.lot().equals(lot));
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
                remarks,
                doubts,
                unknownLots,
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

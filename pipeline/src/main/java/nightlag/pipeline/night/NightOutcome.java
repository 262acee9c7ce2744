package nightlag.pipeline.night;

import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Collections;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;
import java.util.stream.Collectors;
import nightlag.pipeline.archive.LotName;
import nightlag.pipeline.config.Configuration;
import nightlag.pipeline.config.Problem;
import nightlag.pipeline.report.Concern;
import nightlag.pipeline.tables.NightFileRow;
import nightlag.stages.moduli.Flag;
import nightlag.stages.moduli.Quality;

/**
 * What a night came to.
 *
 * @param folder the night's folder
 * @param files every file of the intake, and what became of it
 * @param newlySetAside files this run set aside, with the reason
 * @param stillSetAside files set aside before that have not changed, with the reason
 * @param unreadableIntakes intakes that could not be read, with the reason
 * @param lotsConcluded lots whose tables were rebuilt, with what could not be had for them
 * @param remarks how figures of those lots were had, where that may not be what was expected
 * @param doubts what puts figures of those lots in doubt, a line each
 * @param unknownLots lots the command line asks for that are nowhere, a line each
 * @param lotsNotConcluded lots whose tables could not be rebuilt, with the reason
 * @param quality points reduced this night, by quality, as their lots publish them
 * @param notSound the first of them that are not sound, unusable ones first, each with its reasons
 * @param flags how often each flag was raised on them
 * @param rows rows read this night
 * @param rowsLeftOut rows among them left out: an empty cell, or outside the windows of a long record
 * @param verdicts how many of each verdict the lots rebuilt got; empty where none has a limit
 * @param notConforming all verdicts but conforming ones, the worst first
 * @param unusual lots outside of what was usual in their grade before
 * @param teamSheet what became of the team sheet
 */
public record NightOutcome(
        Path folder,
        List<NightFileRow> files,
        List<String> newlySetAside,
        List<String> stillSetAside,
        List<String> unreadableIntakes,
        Map<LotName, List<String>> lotsConcluded,
        Map<LotName, List<String>> remarks,
        List<String> doubts,
        List<String> unknownLots,
        Map<LotName, String> lotsNotConcluded,
        Map<Quality, Integer> quality,
        List<String> notSound,
        Map<Flag, Integer> flags,
        long rows,
        long rowsLeftOut,
        Optional<String> verdicts,
        List<String> notConforming,
        List<String> unusual,
        SheetReport teamSheet) {
    /** Copies the collections; the maps keep their order. */
    public NightOutcome {
        files = List.copyOf(files);
        newlySetAside = List.copyOf(newlySetAside);
        stillSetAside = List.copyOf(stillSetAside);
        unreadableIntakes = List.copyOf(unreadableIntakes);
        lotsConcluded = Collections.unmodifiableMap(new TreeMap<>(lotsConcluded));
        remarks = Collections.unmodifiableMap(new TreeMap<>(remarks));
        doubts = List.copyOf(doubts);
        unknownLots = List.copyOf(unknownLots);
        lotsNotConcluded = Collections.unmodifiableMap(new TreeMap<>(lotsNotConcluded));
        quality = Collections.unmodifiableMap(new TreeMap<>(quality));
        notSound = List.copyOf(notSound);
        flags = Collections.unmodifiableMap(new TreeMap<>(flags));
        notConforming = List.copyOf(notConforming);
        unusual = List.copyOf(unusual);
    }

    /**
     * Whether all went well; files that wait, files set aside before, and a team sheet that is open elsewhere do not count
     * against it, and no verdict does: a lot that does not conform is what the night is there to find.
     */
    public boolean allWell() {
        return newlySetAside.isEmpty()
                && unreadableIntakes.isEmpty()
                && lotsNotConcluded.isEmpty()
                && !teamSheet.refused();
    }

    /** Whether there was nothing to do: all outside the night's own folder is as it was. */
    public boolean nothingNew() {
        return allWell() && lotsConcluded.isEmpty() && count(NightFileRow.Status.REDUCED) == 0;
    }

    /** How many files ended with a status. */
    public long count(NightFileRow.Status status) {
        return files.stream().filter(file -> file.status() == status).count();
    }

    /** What was done, a line each. */
    public List<String> counts() {
        List<String> lines = new ArrayList<>();
        lines.add("files   " + files.size() + " in the intake: "
                + Arrays.stream(NightFileRow.Status.values())
                        .map(status -> count(status) + " " + status.word())
                        .collect(Collectors.joining(", ")));
        if (rows > 0) {
            lines.add("rows    " + rows + " read, " + rowsLeftOut + " left out");
            lines.add("points  "
                    + Arrays.stream(Quality.values())
                            .map(each -> quality.getOrDefault(each, 0) + " " + each.word())
                            .collect(Collectors.joining(", ")));
        }
        if (!flags.isEmpty()) {
            lines.add("flags   "
                    + flags.entrySet().stream()
                            .map(flag -> flag.getKey().word() + " " + flag.getValue())
                            .collect(Collectors.joining(", ")));
        }
        lines.add("lots    " + lotsConcluded.size() + " rebuilt");
        verdicts.ifPresent(counted -> lines.add("limits  " + counted));
        teamSheet.line().ifPresent(lines::add);
        return lines;
    }

    /** What a person should look at, worst first; some may have no lines. */
    public List<Concern> concerns(Configuration configuration) {
        return List.of(
                new Concern("look at: set aside", newlySetAside),
                new Concern(
                        "look at: points that are not sound",
                        notSound,
                        quality.getOrDefault(Quality.UNUSABLE, 0) + quality.getOrDefault(Quality.DOUBTFUL, 0)),
                new Concern("look at: intakes that cannot be read", unreadableIntakes),
                new Concern(
                        "look at: lots not concluded",
                        lotsNotConcluded.entrySet().stream()
                                .map(lot -> named(lot.getKey()) + ": " + lot.getValue())
                                .toList()),
                new Concern("look at: lots asked for that are nowhere", unknownLots),
                new Concern("look at: lots whose figures are in doubt", doubts),
                new Concern("look at: lots against their limits", notConforming),
                new Concern("look at: lots unlike the earlier ones of their grade", unusual),
                new Concern("look at: team sheet", teamSheet.concerns()),
                new Concern("still set aside from an earlier night", stillSetAside),
                new Concern("could not be had", lines(lotsConcluded)),
                new Concern("worth knowing", lines(remarks)),
                new Concern(
                        "wrong grade files",
                        configuration.gradeProblems().stream()
                                .map(Problem::sentence)
                                .toList()));
    }

    private static List<String> lines(Map<LotName, List<String>> byLot) {
        List<String> lines = new ArrayList<>();
        byLot.forEach((lot, said) -> said.forEach(line -> lines.add(named(lot) + ": " + line)));
        return lines;
    }

    private static String named(LotName lot) {
        return lot.grade() + " lot " + lot.lot();
    }
}

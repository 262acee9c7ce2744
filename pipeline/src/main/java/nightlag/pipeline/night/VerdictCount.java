package nightlag.pipeline.night;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.stream.Collectors;
import nightlag.pipeline.report.VerdictWords;
import nightlag.stages.LotResult;
import nightlag.stages.acceptance.Judgement;
import nightlag.stages.acceptance.Trend;
import nightlag.stages.acceptance.Verdict;

/** The verdicts on the lots rebuilt this night. */
final class VerdictCount {
    private static final List<Verdict> WORST_FIRST = List.of(Verdict.NONCONFORMING, Verdict.UNDECIDED, Verdict.MISSING);

    private final Map<Verdict, Integer> counts = new EnumMap<>(Verdict.class);
    private final Map<Verdict, List<String>> lines = new EnumMap<>(Verdict.class);
    private final List<String> unusual = new ArrayList<>();

    /** Counts the verdicts on a lot; gives the lines that speak of it. */
    List<String> add(String lot, LotResult result) {
        List<String> said = new ArrayList<>();
        for (Judgement judged : result.acceptance()) {
            counts.merge(judged.verdict(), 1, Integer::sum);
            String line = lot + ": " + VerdictWords.of(judged);
            lines.computeIfAbsent(judged.verdict(), any -> new ArrayList<>()).add(line);
            said.add(line);
        }
        for (Trend trend : result.trend()) {
            if (trend.verdict() == Verdict.NONCONFORMING) {
                String line = lot + ": " + VerdictWords.of(trend);
                unusual.add(line);
                said.add(line);
            }
        }
        return said;
    }

    /** How many of each; empty where nothing was judged. */
    Optional<String> line() {
        return counts.isEmpty()
                ? Optional.empty()
                : Optional.of(Arrays.stream(Verdict.values())
                        .map(verdict -> counts.getOrDefault(verdict, 0) + " " + verdict.word())
                        .collect(Collectors.joining(", ")));
    }

    /** All that do not conform, the worst first. */
    List<String> notConforming() {
        return WORST_FIRST.stream()
                .flatMap(verdict -> lines.getOrDefault(verdict, List.of()).stream())
                .toList();
    }

    /** Lots outside of what was usual before. */
    List<String> unusual() {
        return List.copyOf(unusual);
    }
}

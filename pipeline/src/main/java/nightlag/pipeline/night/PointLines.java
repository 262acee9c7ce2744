package nightlag.pipeline.night;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.stream.Collectors;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.PointKey;
import nightlag.stages.moduli.Quality;

/** What is said of the points of one lot: each point once, and many of which the same is said in one line. */
final class PointLines {
    /** So many of one kind stand one by one. */
    private static final int ONE_BY_ONE = 3;

    private final Map<Kind, List<Told>> kinds = new LinkedHashMap<>();

    /** Points of one quality for reasons of the same codes. */
    private record Kind(Quality quality, List<String> codes) {}

    private record Told(PointKey key, String sentences) {}

    /** A point with what it was found to be; one without a reason is not spoken of. */
    void add(PointKey key, Quality quality, List<Reason> reasons) {
        if (!reasons.isEmpty()) {
            kinds.computeIfAbsent(
                            new Kind(
                                    quality,
                                    reasons.stream()
                                            .map(Reason::code)
                                            .distinct()
                                            .toList()),
                            any -> new ArrayList<>())
                    .add(new Told(key, reasons.stream().map(Reason::sentence).collect(Collectors.joining("; "))));
        }
    }

    /** The lines on points of one quality. */
    List<String> of(Quality quality) {
        List<String> lines = new ArrayList<>();
        kinds.forEach((kind, points) -> {
            if (kind.quality() == quality) {
                String found = quality == Quality.SOUND ? "" : ", " + quality.word();
                if (points.size() <= ONE_BY_ONE) {
                    points.forEach(point -> lines.add(name(point.key()) + found + ": " + point.sentences()));
                } else {
                    lines.add(together(points) + found + ": " + sentences(points));
                }
            }
        });
        return lines;
    }

    private static String name(PointKey key) {
        return key.sourceFile() + ", point " + key.point();
    }

    private static String together(List<Told> points) {
        PointKey first = points.get(0).key();
        if (points.stream().allMatch(point -> point.key().sourceFile().equals(first.sourceFile()))) {
            return points.stream()
                            .limit(ONE_BY_ONE)
                            .map(point -> point.key().point())
                            .collect(Collectors.joining(", ", first.sourceFile() + ", points ", ""))
                    + " and "
                    + (points.size() - ONE_BY_ONE)
                    + " more";
        }
        int more = points.size() - 1;
        long files = points.stream()
                .map(point -> point.key().sourceFile())
                .distinct()
                .count();
        return name(first) + ", and " + more + " more points of its lot, in " + files + " files";
    }

    /** Where the figures differ, those of the first. */
    private static String sentences(List<Told> points) {
        String first = points.get(0).sentences();
        boolean same = points.stream().allMatch(point -> point.sentences().equals(first));
        return same ? first : "of the first, " + first;
    }
}

package nightlag.pipeline.night;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;
import nightlag.pipeline.archive.Archive;
import nightlag.pipeline.archive.ArchiveException;
import nightlag.pipeline.archive.LotName;
import nightlag.pipeline.config.Configuration;
import nightlag.pipeline.config.Fingerprints;
import nightlag.pipeline.config.Grade;
import nightlag.stages.Compare;
import nightlag.stages.LotResult;
import nightlag.stages.acceptance.LotRecord;
import nightlag.stages.acceptance.Trend;

/**
 * The lots of each grade in their order, and each among those before it. A lot's values are taken from the archive until the
 * night has concluded it anew.
 */
final class GradeTrends {
    private final Archive archive;
    private final Configuration configuration;
    private final Map<String, Lots> grades = new TreeMap<>();

    GradeTrends(Archive archive, Configuration configuration) {
        this.archive = archive;
        this.configuration = configuration;
    }

    /** The lots of a grade in order, and the place of each. */
    private record Lots(List<LotRecord> inOrder, Map<String, Integer> places) {}

    private Lots lots(String grade) throws ArchiveException {
        Lots known = grades.get(grade);
        if (known == null) {
            List<LotRecord> inOrder = new ArrayList<>(Compare.inOrder(archive.lotRecords(grade)));
            Map<String, Integer> places = new HashMap<>();
            for (int i = 0; i < inOrder.size(); i++) {
                places.put(inOrder.get(i).lot(), i);
            }
            known = new Lots(inOrder, places);
            grades.put(grade, known);
        }
        return known;
    }

    /** The place of a lot among those of its grade; of one without points 0. */
    int place(LotName lot) throws ArchiveException {
        return lots(lot.grade()).places().getOrDefault(lot.lot(), 0);
    }

    /** The lot, its new values remembered, among those before it. */
    LotResult compared(LotName lot, LotResult result) throws ArchiveException {
        Optional<Grade> grade = grade(lot.grade());
        Lots all = lots(lot.grade());
        Integer place = all.places().get(lot.lot());
        if (grade.isEmpty() || place == null) {
            return result;
        }
        LotRecord remembered = all.inOrder().get(place).with(Compare.values(result));
        all.inOrder().set(place, remembered);
        return result.withTrend(Compare.compare(
                remembered, all.inOrder().subList(0, place), grade.get().conclusion()));
    }

    /** The digest of every lot's trends as they would be now. */
    Map<LotName, String> digests(String gradeName) throws ArchiveException {
        Map<LotName, String> digests = new TreeMap<>();
        Optional<Grade> grade = grade(gradeName);
        if (grade.isPresent()) {
            Compare.compare(lots(gradeName).inOrder(), grade.get().conclusion())
                    .forEach((lot, trends) -> digests.put(new LotName(gradeName, lot), digest(trends)));
        }
        return digests;
    }

    /** Grades without limits have no trends. */
    private Optional<Grade> grade(String name) {
        return Optional.ofNullable(configuration.grades().get(name))
                .filter(grade -> !grade.conclusion().limits().isEmpty());
    }

    /** Of what the tables say; empty text for none. */
    static String digest(List<Trend> trends) {
        return trends.isEmpty()
                ? ""
                : Fingerprints.of(trends.stream()
                        .map(trend -> List.of(
                                trend.limit().quantity(), trend.mean(), trend.lower(), trend.upper(), trend.lots()))
                        .toList());
    }
}

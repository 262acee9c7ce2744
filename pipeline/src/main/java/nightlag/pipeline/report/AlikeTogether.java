package nightlag.pipeline.report;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import nightlag.stages.fault.Reason;

/** Reasons of one kind that differ only in whose they are: many of them are one line with a count. */
public final class AlikeTogether {
    /** So many of one kind stand one by one. */
    private static final int ONE_BY_ONE = 3;

    private AlikeTogether() {}

    /** The sentences, kinds in the order they first come. */
    public static List<String> lines(List<Reason> reasons) {
        Map<String, List<Reason>> kinds = new LinkedHashMap<>();
        for (Reason reason : reasons) {
            kinds.computeIfAbsent(reason.code(), any -> new ArrayList<>()).add(reason);
        }
        List<String> lines = new ArrayList<>();
        for (List<Reason> alike : kinds.values()) {
            if (alike.size() <= ONE_BY_ONE) {
                alike.forEach(reason -> lines.add(reason.sentence()));
            } else {
                lines.add(alike.get(0).sentence() + "; and " + (alike.size() - 1) + " more like it");
            }
        }
        return lines;
    }
}

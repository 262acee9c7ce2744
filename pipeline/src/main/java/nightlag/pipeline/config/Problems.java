package nightlag.pipeline.config;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Set;

/** Collects what is wrong. Where a file could only be read in part, nothing is said to be missing from it. */
final class Problems {
    private final Set<Problem> found = new LinkedHashSet<>();
    private final boolean partial;

    /** @param partial whether things may be missing because the file is not whole, or serves {@code extends} only */
    Problems(boolean partial) {
        this.partial = partial;
    }

    void wrong(At at, String place, String what, String allowed) {
        found.add(new Problem(at.file(), at.line(), place, what, allowed));
    }

    void missing(At at, String place, String what, String allowed) {
        if (!partial) {
            wrong(at, place, what, allowed);
        }
    }

    void addAll(List<Problem> problems) {
        found.addAll(problems);
    }

    boolean isEmpty() {
        return found.isEmpty();
    }

    boolean partial() {
        return partial;
    }

    /** By line within each file, files in the order they first appear. */
    List<Problem> inOrder() {
        List<String> files = found.stream().map(Problem::file).distinct().toList();
        List<Problem> sorted = new ArrayList<>(found);
        sorted.sort(Comparator.<Problem>comparingInt(problem -> files.indexOf(problem.file()))
                .thenComparingInt(Problem::line));
        return List.copyOf(sorted);
    }
}

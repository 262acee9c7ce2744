package nightlag.pipeline.config;

import java.util.Collection;
import java.util.Comparator;
import java.util.Locale;
import java.util.Optional;
import org.apache.commons.text.similarity.LevenshteinDistance;

/** Finds the known word nearest to a mistyped one. */
final class Suggestion {
    private static final LevenshteinDistance DISTANCE = LevenshteinDistance.getDefaultInstance();

    private Suggestion() {}

    /** The nearest word, if any lies within a third of the typed one's letters (two at least). */
    static Optional<String> nearest(String typed, Collection<String> known) {
        int reach = Math.max(2, typed.length() / 3);
        return known.stream()
                .filter(word -> distance(typed, word) <= reach)
                .min(Comparator.<String>comparingInt(word -> distance(typed, word))
                        .thenComparing(Comparator.naturalOrder()));
    }

    /** {@code , did you mean 'x'?}, or nothing. */
    static String clause(String typed, Collection<String> known) {
        return nearest(typed, known)
                .map(word -> ", did you mean '" + word + "'?")
                .orElse("");
    }

    private static int distance(String typed, String word) {
        return DISTANCE.apply(plain(typed), plain(word));
    }

    private static String plain(String word) {
        return word.toLowerCase(Locale.ROOT).replace('-', '_');
    }
}

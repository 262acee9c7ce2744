package nightlag.pipeline.archive;

import java.util.Comparator;

/**
 * A lot of a grade.
 *
 * @param grade the grade
 * @param lot the lot
 */
public record LotName(String grade, String lot) implements Comparable<LotName> {
    private static final Comparator<LotName> ORDER =
            Comparator.comparing(LotName::grade).thenComparing(LotName::lot);

    @Override
    public int compareTo(LotName other) {
        return ORDER.compare(this, other);
    }
}

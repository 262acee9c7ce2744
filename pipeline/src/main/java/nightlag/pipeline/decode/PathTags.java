package nightlag.pipeline.decode;

import java.util.Optional;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/** Facts in the path of a raw file, by the named groups of a pattern. */
final class PathTags {
    private PathTags() {}

    /**
     * What a group matched; empty text if it took no part.
     *
     * @param path the path below the intake folder, with '/'
     */
    static String group(Optional<Pattern> pattern, String path, String group, Spot spot) throws DecodeException {
        if (pattern.isEmpty()) {
            throw spot.complaint("no path_pattern", "one with the group '" + group + "'");
        }
        Matcher matcher = pattern.get().matcher(new CountedText(path));
        try {
            if (!matcher.matches()) {
                throw spot.complaint(
                        "the path " + Complaints.shown(path), "one that path_pattern matches: " + pattern.get());
            }
            // from the path itself, as the count is of no interest any more
            int start = matcher.start(group);
            return start < 0 ? "" : path.substring(start, matcher.end(group));
        } catch (TooManySteps e) {
            throw spot.complaint(
                    "path_pattern takes for ever on " + Complaints.shown(path),
                    "one with fewer repetitions than " + pattern.get());
        } catch (IllegalArgumentException e) {
            throw spot.complaint("no group '" + group + "' in path_pattern", "a group of " + pattern.get());
        }
    }

    /** Says when a match has looked at more characters than any sane pattern needs: a pattern can otherwise take years. */
    private static final class CountedText implements CharSequence {
        private final String text;
        private int looks;

        CountedText(String text) {
            this.text = text;
        }

        @Override
        public int length() {
            return text.length();
        }

        @Override
        public char charAt(int index) {
            if (++looks > Bounds.PATTERN_STEPS) {
                throw new TooManySteps();
            }
            return text.charAt(index);
        }

        @Override
        public CharSequence subSequence(int start, int end) {
            return text.subSequence(start, end);
        }

        @Override
        public String toString() {
            return text;
        }
    }

    private static final class TooManySteps extends RuntimeException {
        private static final long serialVersionUID = 1L;
    }
}

package nightlag.pipeline.intake;

import java.nio.file.FileSystem;
import java.nio.file.Path;
import java.nio.file.PathMatcher;
import java.util.ArrayList;
import java.util.List;

/**
 * The glob of an instrument file, written with '/' on every system. It is the platform's own glob but for one thing: a
 * leading or inner {@code **}{@code /} also stands for no folder at all, as people expect.
 */
final class FileGlob {
    private static final String ANY_FOLDERS = "**/";
    /** Each {@code **}{@code /} doubles the patterns tried; nobody needs so many. */
    private static final int MOST_ANY_FOLDERS = 8;

    private final List<PathMatcher> matchers;

    /**
     * Prepares a glob.
     *
     * @throws IllegalArgumentException if it is no glob (a bracket is not closed, …)
     */
    FileGlob(FileSystem system, String glob) {
        this.matchers = withAndWithoutFolders(glob, 0).stream()
                .map(pattern -> system.getPathMatcher("glob:" + pattern))
                .toList();
    }

    /** Whether a path below the intake folder matches. */
    boolean matches(Path relative) {
        return matchers.stream().anyMatch(matcher -> matcher.matches(relative));
    }

    private static List<String> withAndWithoutFolders(String glob, int depth) {
        int at = glob.indexOf(ANY_FOLDERS);
        while (at > 0 && glob.charAt(at - 1) != '/') {
            at = glob.indexOf(ANY_FOLDERS, at + 1);
        }
        if (at < 0) {
            return List.of(glob);
        }
        if (depth == MOST_ANY_FOLDERS) {
            throw new IllegalArgumentException(
                    "more than " + MOST_ANY_FOLDERS + " times **/ in the glob '" + glob + "'");
        }
        String before = glob.substring(0, at);
        List<String> patterns = new ArrayList<>();
        for (String rest : withAndWithoutFolders(glob.substring(at + ANY_FOLDERS.length()), depth + 1)) {
            patterns.add(before + rest);
            patterns.add(before + ANY_FOLDERS + rest);
        }
        return patterns;
    }
}

package nightlag.pipeline.night;

import java.io.IOException;
import java.nio.file.FileAlreadyExistsException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Clock;
import java.time.LocalDateTime;
import java.time.format.DateTimeFormatter;
import java.util.Locale;
import java.util.regex.Pattern;

/** Names and makes the folder of one night. */
final class NightFolder {
    private static final DateTimeFormatter NAME = DateTimeFormatter.ofPattern("uuuu-MM-dd'T'HHmmss", Locale.ROOT);

    private static final Pattern NAMES = Pattern.compile("\\d{4}-\\d{2}-\\d{2}T\\d{6}(-\\d+)?");

    private NightFolder() {}

    /** Whether a folder has a name that {@link #make} gives. */
    static boolean isNamedAsOurs(Path folder) {
        return NAMES.matcher(String.valueOf(folder.getFileName())).matches();
    }

    /** Where the folders of all nights are. */
    static Path nights(Path results) {
        return results.resolve("nights");
    }

    /** Makes {@code nights/2026-03-01T020000}, in the PC's local time; a taken name gets {@code -2}, {@code -3} … */
    static Path make(Path results, Clock clock) throws IOException {
        Path nights = Files.createDirectories(nights(results));
        String name = NAME.format(LocalDateTime.now(clock));
        Path folder = nights.resolve(name);
        for (int next = 2; !made(folder); next++) {
            // a clock set back, or two runs within a second
            folder = nights.resolve(name + "-" + next);
        }
        return folder;
    }

    private static boolean made(Path folder) throws IOException {
        try {
            Files.createDirectory(folder);
            return true;
        } catch (FileAlreadyExistsException taken) {
            return false;
        }
    }
}

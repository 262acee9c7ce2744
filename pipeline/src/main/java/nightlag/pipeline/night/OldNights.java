package nightlag.pipeline.night;

import java.io.IOException;
import java.nio.file.DirectoryStream;
import java.nio.file.Files;
import java.nio.file.LinkOption;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Set;
import nightlag.pipeline.report.NightReport;
import nightlag.stages.sweep.NaturalOrder;
import org.apache.logging.log4j.LogManager;
import org.apache.logging.log4j.Logger;

/**
 * Takes away the folders of older nights. A folder goes only if its name is one that {@link NightFolder} gives and there is
 * nothing in it but what a run puts there; what somebody else left stays, and the folder with it.
 */
final class OldNights {
    private static final Logger LOG = LogManager.getLogger(OldNights.class);

    /** What a run writes into its folder, finished or not. */
    private static final Set<String> OURS = Set.of(
            "files.csv",
            "night.json",
            "night.log",
            NightReport.FILE_NAME,
            NightReport.FILE_NAME + ".lots",
            NightReport.FILE_NAME + ".new");

    private static final String UNFINISHED = ".nightlag-new";

    private OldNights() {}

    /**
     * Leaves the newest nights and takes away what can be taken of the others. Nothing that cannot be done stops a night.
     *
     * @param nights the folder of all nights
     * @param tonight the folder of this night, which stays
     * @param keep how many stay, this night's among them
     * @return whether any was taken away
     */
    static boolean remove(Path nights, Path tonight, int keep) {
        boolean any = false;
        try {
            List<Path> older = namedAsOurs(nights);
            older.remove(tonight);
            int surplus = older.size() - (keep - 1);
            for (Path night : older.subList(0, Math.max(0, surplus))) {
                any |= isRemoved(night);
            }
        } catch (IOException e) {
            LOG.warn("older nights stay: {}", IoSentences.of(e));
        }
        return any;
    }

    /** The folders that are named as nights are, the oldest first. */
    private static List<Path> namedAsOurs(Path nights) throws IOException {
        List<Path> named = new ArrayList<>();
        try (DirectoryStream<Path> all = Files.newDirectoryStream(nights)) {
            for (Path path : all) {
                if (NightFolder.isNamedAsOurs(path) && Files.isDirectory(path, LinkOption.NOFOLLOW_LINKS)) {
                    named.add(path);
                }
            }
        }
        named.sort(Comparator.comparing(OldNights::name, NaturalOrder::compare));
        return named;
    }

    private static String name(Path path) {
        return String.valueOf(path.getFileName());
    }

    private static boolean isRemoved(Path night) {
        try {
            List<Path> inside = new ArrayList<>();
            try (DirectoryStream<Path> all = Files.newDirectoryStream(night)) {
                all.forEach(inside::add);
            }
            if (!inside.stream().allMatch(OldNights::isOurs)) {
                LOG.info("{} stays, as there is something in it that no run put there", night);
                return false;
            }
            for (Path file : inside) {
                Files.delete(file);
            }
            Files.delete(night);
            LOG.info("{} taken away, as keep_nights asks", night);
            return true;
        } catch (IOException e) {
            LOG.warn("{} cannot be taken away: {}", night, IoSentences.of(e));
            return false;
        }
    }

    private static boolean isOurs(Path file) {
        return Files.isRegularFile(file, LinkOption.NOFOLLOW_LINKS)
                && (OURS.contains(name(file)) || name(file).endsWith(UNFINISHED));
    }
}

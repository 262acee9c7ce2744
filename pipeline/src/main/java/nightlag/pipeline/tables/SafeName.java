package nightlag.pipeline.tables;

import java.text.Normalizer;
import java.util.Locale;
import java.util.Set;
import org.apache.commons.codec.digest.DigestUtils;

/**
 * A folder's name made from the name of a grade or a lot, which may hold anything: never a way out of the folder it is
 * made in, and one that Windows, Linux and macOS all take.
 *
 * <p>Letters and digits of every script, {@code -} and {@code _} stay, and so do dots and spaces with something else
 * before and after them; every other character becomes {@code _}. When anything changed, or the name is reserved or over
 * 80 characters, {@code -} and the first 8 hex digits of the SHA-256 of the original (UTF-8) follow, so that two names
 * stay two folders. The same goes for a name that is not in Unicode's composed form (NFC), because some file systems
 * take two spellings of one letter for the same name.
 */
final class SafeName {
    private static final int LONGEST = 80;
    private static final int HASH_DIGITS = 8;

    /** Device names of Windows (reserved with any extension), then the names the results folder uses itself. */
    private static final Set<String> DEVICES = Set.of(
            "con", "prn", "aux", "nul", "com0", "com1", "com2", "com3", "com4", "com5", "com6", "com7", "com8", "com9",
            "lpt0", "lpt1", "lpt2", "lpt3", "lpt4", "lpt5", "lpt6", "lpt7", "lpt8", "lpt9");

    private static final Set<String> OWN = Set.of("nights", "index.html", "archive.sqlite", "archive.sqlite-journal");

    private SafeName() {}

    /** The folder's name for this name of a grade or lot. */
    static String of(String name) {
        String kept = keep(name);
        boolean asItWas = kept.equals(name)
                && !name.isEmpty()
                && name.length() <= LONGEST
                && !isReserved(name)
                && Normalizer.isNormalized(name, Normalizer.Form.NFC);
        if (asItWas) {
            return name;
        }
        String front = kept.isEmpty() ? "_" : shortened(kept);
        return front + "-" + DigestUtils.sha256Hex(name).substring(0, HASH_DIGITS);
    }

    private static String keep(String name) {
        int first = firstInside(name);
        int last = lastInside(name);
        StringBuilder kept = new StringBuilder(name.length());
        int i = 0;
        while (i < name.length()) {
            int c = name.codePointAt(i);
            boolean inner = (c == '.' || c == ' ') && i > first && i < last;
            kept.appendCodePoint(Character.isLetterOrDigit(c) || c == '-' || c == '_' || inner ? c : '_');
            i += Character.charCount(c);
        }
        return kept.toString();
    }

    private static int firstInside(String name) {
        int first = 0;
        while (first < name.length() && isDotOrSpace(name.charAt(first))) {
            first++;
        }
        return first;
    }

    private static int lastInside(String name) {
        int last = name.length() - 1;
        while (last >= 0 && isDotOrSpace(name.charAt(last))) {
            last--;
        }
        return last;
    }

    private static boolean isDotOrSpace(char c) {
        return c == '.' || c == ' ';
    }

    private static boolean isReserved(String name) {
        String lower = name.toLowerCase(Locale.ROOT);
        int dot = lower.indexOf('.');
        String beforeExtension = (dot < 0 ? lower : lower.substring(0, dot)).strip();
        return DEVICES.contains(beforeExtension) || OWN.contains(lower);
    }

    private static String shortened(String name) {
        if (name.length() <= LONGEST) {
            return name;
        }
        boolean splitsACharacter = Character.isHighSurrogate(name.charAt(LONGEST - 1));
        return name.substring(0, splitsACharacter ? LONGEST - 1 : LONGEST);
    }
}

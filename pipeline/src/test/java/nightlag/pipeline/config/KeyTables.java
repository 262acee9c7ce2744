package nightlag.pipeline.config;

import java.util.ArrayList;
import java.util.List;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/** Writes the key tables of {@code config/README.md} from the declarations that the reader works by. */
final class KeyTables {
    private static final Pattern REGION = Pattern.compile("(?s)<!-- keys of (.*?) -->\n.*?<!-- end -->");
    private static final List<FileKind> KINDS = List.of(NightKeys.KIND, InstrumentKeys.KIND, GradeKeys.KIND);

    private KeyTables() {}

    /** The page with every region between its marks written anew. */
    static String renewed(String page) {
        Matcher matcher = REGION.matcher(page);
        StringBuilder out = new StringBuilder();
        while (matcher.find()) {
            String name = matcher.group(1);
            String region = "<!-- keys of " + name + " -->\n" + tables(name) + "\n<!-- end -->";
            matcher.appendReplacement(out, Matcher.quoteReplacement(region));
        }
        return matcher.appendTail(out).toString();
    }

    /** The names of the regions a complete page has. */
    static List<String> regions() {
        List<String> names = new ArrayList<>(KINDS.stream().map(FileKind::title).toList());
        names.add("[geometry]");
        return names;
    }

    private static String tables(String name) {
        if (name.equals("[geometry]")) {
            return table(GeometryKeys.GEOMETRY, "### `[geometry]`");
        }
        FileKind kind = KINDS.stream()
                .filter(found -> found.title().equals(name))
                .findFirst()
                .orElseThrow();
        StringBuilder out = new StringBuilder(table(kind.top(), "### At the top"));
        for (Section section : kind.sections()) {
            if (!section.equals(GeometryKeys.GEOMETRY)) {
                out.append(table(section, "### `" + section.heading() + "`"));
            }
            if (section.equals(InstrumentKeys.CHANNELS)) {
                out.append(table(InstrumentKeys.CHANNEL, "#### Keys of one channel"));
            }
            if (section.equals(InstrumentKeys.TAGS)) {
                out.append(table(InstrumentKeys.TAG, "#### Keys of one tag"));
            }
        }
        return out.toString();
    }

    private static String table(Section section, String heading) {
        StringBuilder out = new StringBuilder("\n" + heading + "\n\n" + section.purpose() + "\n\n");
        out.append("| key | holds | default | meaning |\n|---|---|---|---|\n");
        for (Key key : section.keys()) {
            String fallback = key.required() ? "required" : key.fallback().isEmpty() ? "" : "`" + key.fallback() + "`";
            out.append("| `")
                    .append(key.name())
                    .append("` | ")
                    .append(cell(key.type().words()))
                    .append(" | ")
                    .append(fallback)
                    .append(" | ")
                    .append(cell(key.meaning()))
                    .append(" |\n");
        }
        return out.toString();
    }

    private static String cell(String text) {
        return text.replace("|", "\\|");
    }
}

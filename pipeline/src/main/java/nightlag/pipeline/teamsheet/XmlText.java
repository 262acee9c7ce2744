package nightlag.pipeline.teamsheet;

import java.util.regex.Matcher;
import java.util.regex.Pattern;

/**
 * Text as it is written into the XML of a workbook, and back. A character that XML does not allow is written
 * {@code _x000B_}, and an underscore that would be taken for the beginning of one {@code _x005F_} (ISO/IEC 29500-1, 22.9.2.19).
 */
final class XmlText {
    private static final Pattern ESCAPED = Pattern.compile("_x([0-9A-Fa-f]{4})_");

    private XmlText() {}

    /** As the value of an attribute in double quotation marks. */
    static String attribute(String text) {
        return text.replace("&", "&amp;")
                .replace("<", "&lt;")
                .replace("\"", "&quot;")
                .replace("\n", "&#10;")
                .replace("\r", "&#13;")
                .replace("\t", "&#9;");
    }

    /** As the text of a cell. */
    static String cell(String text) {
        StringBuilder xml = new StringBuilder(text.length() + 16);
        Matcher escaped = ESCAPED.matcher(text);
        for (int i = 0; i < text.length(); i++) {
            char c = text.charAt(i);
            if (c == '_' && escaped.region(i, text.length()).lookingAt()) {
                xml.append("_x005F_");
            } else if (c == '&') {
                xml.append("&amp;");
            } else if (c == '<') {
                xml.append("&lt;");
            } else if (c == '>') {
                xml.append("&gt;");
            } else if (isAllowed(text, i)) {
                xml.append(c);
            } else {
                xml.append("_x").append("%04X".formatted((int) c)).append('_');
            }
        }
        return xml.toString();
    }

    /** The text of a cell as it is meant. */
    static String meant(String xmlText) {
        if (!xmlText.contains("_x")) {
            return xmlText;
        }
        return ESCAPED.matcher(xmlText)
                .replaceAll(
                        found -> Matcher.quoteReplacement(String.valueOf((char) Integer.parseInt(found.group(1), 16))));
    }

    /** Whether XML 1.0 takes a character as it is, and gives it back the same. */
    private static boolean isAllowed(String text, int at) {
        char c = text.charAt(at);
        if (Character.isHighSurrogate(c)) {
            return at + 1 < text.length() && Character.isLowSurrogate(text.charAt(at + 1));
        }
        if (Character.isLowSurrogate(c)) {
            return at > 0 && Character.isHighSurrogate(text.charAt(at - 1));
        }
        return c == '\t' || c == '\n' || (c >= ' ' && c < '\uFFFE');
    }
}

package nightlag.pipeline.teamsheet;

import java.util.ArrayList;
import java.util.List;

/** The texts that the cells of a workbook point at. Ours are written into their cells, so this part is only read. */
final class SharedStrings {
    private SharedStrings() {}

    static List<String> of(String part, String xml) throws SheetFault {
        List<String> strings = new ArrayList<>();
        try (XmlTags tags = new XmlTags(part, xml)) {
            while (tags.nextStart("si")) {
                strings.add(textUntil(tags, "si"));
            }
        }
        return strings;
    }

    /** The text up to an end tag: all its runs, without what tells how they are pronounced. */
    static String textUntil(XmlTags tags, String end) throws SheetFault {
        StringBuilder text = new StringBuilder();
        boolean inText = false;
        boolean spoken = false;
        while (tags.next() && !tags.ends(end)) {
            if (tags.isText()) {
                text.append(inText && !spoken ? tags.text() : "");
            } else if (tags.starts("t")) {
                inText = true;
            } else if (tags.ends("t")) {
                inText = false;
            } else if (tags.starts("rPh")) {
                spoken = true;
            } else if (tags.ends("rPh")) {
                spoken = false;
            }
        }
        return XmlText.meant(text.toString());
    }
}

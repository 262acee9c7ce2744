package nightlag.pipeline.teamsheet;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import nightlag.pipeline.teamsheet.XmlTags.Tag;

/** The styles of a workbook: which of them show a date, and one of ours at the end where none shows it as we do. */
final class BookStyles {
    private static final String DATE_FORMAT = "yyyy\\-mm\\-dd";

    /** Numbers below are built in. */
    private static final int FIRST_FREE_FORMAT = 164;

    private final String xml;
    private final Map<Integer, String> formats = new HashMap<>();
    private final List<Integer> formatOfStyle = new ArrayList<>();
    private String prefix = "";
    private Optional<Tag> root = Optional.empty();
    private Optional<Tag> formatsTag = Optional.empty();
    private Optional<Tag> stylesTag = Optional.empty();
    private int formatsClose;
    private int stylesClose;

    private BookStyles(String xml) {
        this.xml = xml;
    }

    static BookStyles of(String part, String xml) throws SheetFault {
        BookStyles styles = new BookStyles(xml);
        try (XmlTags tags = new XmlTags(part, xml)) {
            styles.read(tags);
        }
        if (styles.root.isEmpty() || styles.stylesTag.isEmpty()) {
            throw new SheetFault(part + " inside the workbook names no styles of cells");
        }
        return styles;
    }

    private void read(XmlTags tags) throws SheetFault {
        boolean inStyles = false;
        while (tags.next()) {
            if (tags.starts("styleSheet")) {
                root = Optional.of(tags.tag());
                prefix = tags.prefix();
            } else if (tags.starts("numFmts")) {
                formatsTag = Optional.of(tags.tag());
            } else if (tags.starts("numFmt") && formatsTag.isPresent() && formatsClose == 0) {
                formats.put(
                        tags.number("numFmtId", -1),
                        tags.attribute("formatCode").orElse(""));
            } else if (tags.ends("numFmts")) {
                formatsClose = tags.start();
            } else if (tags.starts("cellXfs")) {
                stylesTag = Optional.of(tags.tag());
                inStyles = true;
            } else if (tags.starts("xf") && inStyles) {
                formatOfStyle.add(tags.number("numFmtId", 0));
            } else if (tags.ends("cellXfs")) {
                stylesClose = tags.start();
                inStyles = false;
            }
        }
    }

    /** Whether a style shows a number as a date. */
    boolean isDate(int style) {
        if (style < 0 || style >= formatOfStyle.size()) {
            return false;
        }
        int format = formatOfStyle.get(style);
        String code = formats.get(format);
        if (code == null) {
            // built in: ISO/IEC 29500-1, 18.8.30
            return (format >= 14 && format <= 17)
                    || format == 22
                    || (format >= 27 && format <= 36)
                    || (format >= 50 && format <= 58);
        }
        String bare = code.toLowerCase(Locale.ROOT)
                .replaceAll("\"[^\"]*\"", "")
                .replaceAll("\\\\.", "")
                .replaceAll("\\[[^\\]]*\\]", "");
        return bare.indexOf('y') >= 0 || bare.indexOf('d') >= 0;
    }

    /** The style that shows a date as we do; {@link #xml} has it, at the end where it is new. */
    int dateStyle() {
        for (int style = 0; style < formatOfStyle.size(); style++) {
            if (DATE_FORMAT.equals(formats.get(formatOfStyle.get(style)))) {
                return style;
            }
        }
        return formatOfStyle.size();
    }

    /** The part, with the style of {@link #dateStyle} in it. */
    String withDateStyle() {
        if (dateStyle() < formatOfStyle.size()) {
            return xml;
        }
        int format = formats.entrySet().stream()
                .filter(each -> each.getValue().equals(DATE_FORMAT))
                .map(Map.Entry::getKey)
                .findFirst()
                .orElse(-1);
        boolean formatIsNew = format < 0;
        if (formatIsNew) {
            format = formats.keySet().stream().mapToInt(Integer::intValue).max().orElse(0) + 1;
            format = Math.max(format, FIRST_FREE_FORMAT);
        }
        Splice splice = new Splice(xml);
        if (formatIsNew) {
            addFormat(splice, format);
        }
        Tag styles = stylesTag.orElseThrow();
        splice.replace(styles.start(), styles.end(), styles.with("count", String.valueOf(formatOfStyle.size() + 1)));
        splice.insert(
                stylesClose,
                "<" + prefix + "xf numFmtId=\"" + format
                        + "\" fontId=\"0\" fillId=\"0\" borderId=\"0\" xfId=\"0\" applyNumberFormat=\"1\"/>");
        return splice.text();
    }

    private void addFormat(Splice splice, int number) {
        String format = "<" + prefix + "numFmt numFmtId=\"" + number + "\" formatCode=\""
                + XmlText.attribute(DATE_FORMAT) + "\"/>";
        if (formatsTag.isPresent() && !formatsTag.get().selfClosed()) {
            Tag tag = formatsTag.get();
            splice.replace(tag.start(), tag.end(), tag.with("count", String.valueOf(formats.size() + 1)));
            splice.insert(formatsClose, format);
            return;
        }
        String all = "<" + prefix + "numFmts count=\"1\">" + format + "</" + prefix + "numFmts>";
        if (formatsTag.isPresent()) {
            splice.replace(formatsTag.get().start(), formatsTag.get().end(), all);
        } else {
            // it is the first of all
            splice.insert(root.orElseThrow().end(), all);
        }
    }
}

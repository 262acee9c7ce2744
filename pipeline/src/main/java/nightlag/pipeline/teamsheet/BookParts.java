package nightlag.pipeline.teamsheet;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import nightlag.pipeline.teamsheet.BookLinks.Link;
import nightlag.pipeline.teamsheet.XmlTags.Tag;

/** Where in a workbook what stands: its sheets, the texts and styles they share, and how its dates count. */
final class BookParts {
    private static final String CONTENT_TYPES = "[Content_Types].xml";
    private static final String SHEET_TYPE =
            "application/vnd.openxmlformats-officedocument.spreadsheetml.worksheet+xml";

    private final Book book;
    private final String workbook;
    private final List<Link> links;
    private final List<Sheet> sheets = new ArrayList<>();
    private String namespace = "";
    private boolean datesFrom1904;
    private Optional<Tag> calculation = Optional.empty();
    private String prefix = "";
    private int sheetsClose;
    private int calculationPlace;

    /** A sheet as the workbook lists it. */
    private record Sheet(String name, int number, String link, String raw) {}

    private BookParts(Book book, String workbook) throws SheetFault {
        this.book = book;
        this.workbook = workbook;
        this.links = BookLinks.of(book, workbook);
        readWorkbook();
    }

    static BookParts of(Book book) throws SheetFault {
        String workbook = BookLinks.of(book, "").stream()
                .filter(link -> link.is("officeDocument"))
                .map(Link::target)
                .findFirst()
                .orElseThrow(() -> new SheetFault("this is no workbook: nothing in it says where its sheets are"));
        return new BookParts(book, workbook);
    }

    private void readWorkbook() throws SheetFault {
        try (XmlTags tags = new XmlTags(workbook, book.text(workbook))) {
            while (tags.next()) {
                if (tags.starts("workbook")) {
                    namespace = tags.namespace();
                    prefix = tags.prefix();
                } else if (tags.starts("workbookPr")) {
                    String from1904 = tags.attribute("date1904").orElse("0").strip();
                    datesFrom1904 = from1904.equals("1") || from1904.equals("true");
                } else if (tags.starts("sheet")) {
                    sheets.add(new Sheet(
                            tags.attribute("name").orElse(""),
                            tags.number("sheetId", 0),
                            tags.attribute("id").orElse(""),
                            tags.tag().raw()));
                } else if (tags.starts("calcPr")) {
                    calculation = Optional.of(tags.tag());
                } else if (tags.ends("sheets")) {
                    sheetsClose = tags.start();
                    calculationPlace = tags.end();
                } else if (tags.ends("functionGroups")
                        || tags.ends("externalReferences")
                        || tags.ends("definedNames")) {
                    calculationPlace = tags.end();
                }
            }
        }
    }

    boolean datesFrom1904() {
        return datesFrom1904;
    }

    /** The part of a sheet; empty where no sheet has this name. Capitals do not count, as in the office programs. */
    Optional<String> sheet(String name) throws SheetFault {
        for (Sheet sheet : sheets) {
            if (sheet.name().equalsIgnoreCase(name)) {
                return Optional.of(
                        links.stream()
                                .filter(link -> link.id().equals(sheet.link()) && link.is("worksheet"))
                                .map(Link::target)
                                .findFirst()
                                .orElseThrow(
                                        () -> new SheetFault(
                                                "the sheet \"" + name
                                                        + "\" is a chart or of some other kind that holds no rows; name another in the night file")));
            }
        }
        return Optional.empty();
    }

    /** The names of all sheets that hold rows. */
    List<String> sheetNames() {
        return sheets.stream()
                .filter(sheet ->
                        links.stream().anyMatch(link -> link.id().equals(sheet.link()) && link.is("worksheet")))
                .map(Sheet::name)
                .toList();
    }

    /** The texts that cells share. */
    List<String> sharedStrings() throws SheetFault {
        Optional<String> part = linked("sharedStrings");
        return part.isEmpty() ? List.of() : SharedStrings.of(part.get(), book.text(part.get()));
    }

    /** The part of the styles. */
    Optional<String> styles() {
        return linked("styles");
    }

    private Optional<String> linked(String kind) {
        return links.stream()
                .filter(link -> link.is(kind) && book.has(link.target()))
                .map(Link::target)
                .findFirst();
    }

    /** Says in the workbook that its formulas are to be calculated when it is next opened: their last values are behind. */
    void calculateOnOpening() throws SheetFault {
        Splice splice = new Splice(book.text(workbook));
        if (calculation.isPresent()) {
            Tag tag = calculation.get();
            splice.replace(tag.start(), tag.end(), tag.with("fullCalcOnLoad", "1"));
        } else {
            splice.insert(calculationPlace, "<" + prefix + "calcPr fullCalcOnLoad=\"1\"/>");
        }
        book.replace(workbook, splice.text());
    }

    /** Adds an empty sheet behind the others; this object no longer tells what stands in the workbook then. */
    void addSheet(String name) throws SheetFault {
        String folder = workbook.substring(0, workbook.lastIndexOf('/') + 1) + "worksheets/";
        int number = sheets.stream().mapToInt(Sheet::number).max().orElse(0) + 1;
        int free = number;
        while (book.has(folder + "sheet" + free + ".xml")) {
            free++;
        }
        String part = folder + "sheet" + free + ".xml";
        String link = "nightlag" + free;
        Optional<Link> another =
                links.stream().filter(each -> each.is("worksheet")).findFirst();
        if (another.isEmpty() || sheetsClose == 0) {
            throw new SheetFault("the workbook has no sheet \"" + name + "\" and none to add it after");
        }
        Splice list = new Splice(book.text(workbook));
        list.insert(
                sheetsClose,
                "<" + prefix + "sheet name=\"" + XmlText.attribute(name) + "\" sheetId=\"" + number + "\" "
                        + linkPrefix() + "id=\"" + link + "\"/>");
        book.replace(workbook, list.text());
        addBeforeEnd(
                BookLinks.partOf(workbook),
                "Relationships",
                "Relationship Id=\"" + link + "\" Type=\""
                        + XmlText.attribute(another.get().type()) + "\" Target=\"/" + part + "\"/>");
        addBeforeEnd(
                CONTENT_TYPES, "Types", "Override PartName=\"/" + part + "\" ContentType=\"" + SHEET_TYPE + "\"/>");
        book.replace(
                part,
                "<?xml version=\"1.0\" encoding=\"UTF-8\" standalone=\"yes\"?>\n<worksheet xmlns=\""
                        + XmlText.attribute(namespace) + "\"><sheetData/></worksheet>");
    }

    /** The prefix by which the workbook's own sheets name their links. */
    private String linkPrefix() {
        for (Sheet sheet : sheets) {
            int id = sheet.raw().indexOf(":id");
            if (id > 0) {
                int start = id;
                while (!Character.isWhitespace(sheet.raw().charAt(start - 1))) {
                    start--;
                }
                return sheet.raw().substring(start, id + 1);
            }
        }
        return "r:";
    }

    private void addBeforeEnd(String part, String root, String tag) throws SheetFault {
        String xml = book.text(part);
        Splice splice = new Splice(xml);
        try (XmlTags tags = new XmlTags(part, xml)) {
            String before = "";
            while (tags.next()) {
                if (tags.starts(root)) {
                    before = "<" + tags.prefix();
                } else if (tags.ends(root)) {
                    splice.insert(tags.start(), before + tag);
                }
            }
        }
        book.replace(part, splice.text());
    }
}

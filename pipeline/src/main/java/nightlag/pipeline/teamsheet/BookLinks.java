package nightlag.pipeline.teamsheet;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/** Which parts of a workbook a part points at (ISO/IEC 29500-2, relationships). */
final class BookLinks {
    private BookLinks() {}

    /**
     * One of them.
     *
     * @param id what the pointing part calls it
     * @param type the address that says what it is
     * @param target the part
     */
    record Link(String id, String type, String target) {
        /** Whether it is this; the strict and the usual form of the standard differ only in front. */
        boolean is(String kind) {
            return type.endsWith("/" + kind);
        }
    }

    /** The part that holds the links of a part; that of the whole file for an empty name. */
    static String partOf(String part) {
        int slash = part.lastIndexOf('/') + 1;
        return part.substring(0, slash) + "_rels/" + part.substring(slash) + ".rels";
    }

    /** All links of a part to others of the file. */
    static List<Link> of(Book book, String part) throws SheetFault {
        List<Link> links = new ArrayList<>();
        String name = partOf(part);
        if (!book.has(name)) {
            return links;
        }
        try (XmlTags tags = new XmlTags(name, book.text(name))) {
            while (tags.nextStart("Relationship")) {
                Optional<String> target = tags.attribute("Target");
                boolean inside = !tags.attribute("TargetMode").equals(Optional.of("External"));
                if (inside && target.isPresent()) {
                    links.add(new Link(
                            tags.attribute("Id").orElse(""),
                            tags.attribute("Type").orElse(""),
                            resolved(part, target.get())));
                }
            }
        }
        return links;
    }

    private static String resolved(String from, String target) {
        if (target.startsWith("/")) {
            return target.substring(1);
        }
        List<String> path = new ArrayList<>();
        String folder = from.substring(0, from.lastIndexOf('/') + 1);
        for (String step : (folder + target).split("/", -1)) {
            if (step.equals("..") && !path.isEmpty()) {
                path.remove(path.size() - 1);
            } else if (!step.equals(".") && !step.isEmpty()) {
                path.add(step);
            }
        }
        return String.join("/", path);
    }
}

package nightlag.pipeline.config;

import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/** Reads {@code [tags]}. */
final class TagsReader {
    private static final List<Key> SOURCES = List.of(
            InstrumentKeys.PREAMBLE,
            InstrumentKeys.PATH,
            InstrumentKeys.VALUE,
            InstrumentKeys.DATA_COLUMN,
            InstrumentKeys.SHEET_COLUMN);

    private final SectionReader section;
    private final FilesReader files;

    private TagsReader(SectionReader section, FilesReader files) {
        this.section = section;
        this.files = files;
    }

    static Map<TagName, TagSource> read(SectionReader section, FilesReader files, Layout layout) {
        TagsReader reader = new TagsReader(section, files);
        Map<TagName, TagSource> tags = new EnumMap<>(TagName.class);
        for (TagName name : TagName.values()) {
            Key key = key(name);
            if (section.has(key)) {
                section.inner(key, InstrumentKeys.TAG)
                        .flatMap(inner -> reader.source(name, inner))
                        .ifPresent(source -> tags.put(name, source));
            } else if (key.required()) {
                section.missing(key, "a source, such as { preamble = \"…\" } or { path = \"…\" }");
            }
        }
        reader.checkLayout(layout, tags);
        return tags;
    }

    static Key key(TagName name) {
        return InstrumentKeys.TAGS.key(name.word()).orElseThrow();
    }

    private void checkLayout(Layout layout, Map<TagName, TagSource> tags) {
        Key point = key(TagName.POINT);
        if (layout == Layout.COLUMN && !section.has(point)) {
            section.missing(point, "a column of the data, as layout column tells records apart by it");
        } else if (layout == Layout.COLUMN
                && tags.containsKey(TagName.POINT)
                && !(tags.get(TagName.POINT) instanceof TagSource.DataColumn)) {
            section.wrong(
                    point,
                    "this source is the same for a whole file",
                    "a column of the data, as layout column tells records apart by it");
        }
        if (layout == Layout.ROLLING && !section.has(key(TagName.FREQUENCY))) {
            section.missing(key(TagName.FREQUENCY), "a source, as layout rolling needs the frequency");
        }
    }

    private Optional<TagSource> source(TagName name, SectionReader inner) {
        List<Key> given = SOURCES.stream().filter(inner::has).toList();
        Optional<Unit> unit = unit(name, inner);
        if (given.size() != 1) {
            section.wrong(
                    key(name),
                    given.isEmpty() ? "no source" : given.size() + " sources",
                    "exactly one of "
                            + String.join(", ", SOURCES.stream().map(Key::name).toList()));
            return Optional.empty();
        }
        Key source = given.get(0);
        if (source.equals(InstrumentKeys.VALUE)) {
            return fixed(name, inner, unit);
        }
        if (source.equals(InstrumentKeys.DATA_COLUMN)) {
            return ChannelsReader.column(inner, source, files.headless())
                    .map(column -> new TagSource.DataColumn(column, unit));
        }
        Optional<String> text = inner.text(source).map(String::strip);
        if (text.isEmpty()) {
            return Optional.empty();
        }
        if (source.equals(InstrumentKeys.PREAMBLE)) {
            if (files.nothingAboveHeader()) {
                inner.wrong(source, "there is no line above the header, as header is 1", "a header further down");
            }
            return Optional.of(new TagSource.Preamble(text.get(), unit));
        }
        if (source.equals(InstrumentKeys.PATH)) {
            checkGroup(inner, text.get());
            return Optional.of(new TagSource.PathGroup(text.get(), unit));
        }
        if (!files.hasRunSheet()) {
            inner.wrong(source, "[files] names no run_sheet", "the key run_sheet in [files]");
        }
        return Optional.of(new TagSource.RunSheet(text.get(), unit));
    }

    private static Optional<Unit> unit(TagName name, SectionReader inner) {
        if (!inner.has(InstrumentKeys.TAG_UNIT)) {
            return Optional.empty();
        }
        if (name.kind().isEmpty()) {
            inner.wrong(InstrumentKeys.TAG_UNIT, name.word() + " is a text and has no unit", "no unit");
            return Optional.empty();
        }
        return ChannelsReader.unit(inner, InstrumentKeys.TAG_UNIT, name.kind().get());
    }

    private void checkGroup(SectionReader inner, String group) {
        if (!files.hasPathPattern()) {
            inner.wrong(InstrumentKeys.PATH, "[files] has no path_pattern", "the key path_pattern in [files]");
        } else if (files.groups().isPresent() && !files.groups().get().contains(group)) {
            List<String> groups = files.groups().get();
            inner.wrong(
                    InstrumentKeys.PATH,
                    "path_pattern has no group '" + group + "'" + Suggestion.clause(group, groups),
                    groups.isEmpty()
                            ? "a pattern with a group (?<" + group + ">…)"
                            : "one of " + String.join(", ", groups));
        }
    }

    /** A fixed value: text, or a quantity whose number is kept as written with a decimal point. */
    private Optional<TagSource> fixed(TagName name, SectionReader inner, Optional<Unit> unit) {
        Key key = InstrumentKeys.VALUE;
        Optional<Node> node = inner.node(key);
        if (node.isEmpty() || !(node.get() instanceof Node.Scalar scalar)) {
            node.ifPresent(found ->
                    inner.wrong(key, "found " + found.found(), key.type().words()));
            return Optional.empty();
        }
        if (name.kind().isEmpty()) {
            String text = String.valueOf(scalar.value()).strip();
            if (text.isEmpty()) {
                inner.wrong(key, "the text is empty", key.type().words());
                return Optional.empty();
            }
            return Optional.of(new TagSource.Fixed(text, Optional.empty()));
        }
        Node asText = unit.isPresent() && scalar.value() instanceof Number number
                ? new Node.Scalar(scalar.at(), number + " " + unit.get().symbol())
                : scalar;
        KeyType.Measured type = new KeyType.Measured(
                name.kind().get(), name.dimension().isPresent() ? KeyType.Sign.POSITIVE : KeyType.Sign.ANY, false);
        return inner.quantity(key, asText, type)
                .map(quantity -> new TagSource.Fixed(Double.toString(quantity.number()), Optional.of(quantity.unit())));
    }
}

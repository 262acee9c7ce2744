package nightlag.pipeline.decode;

import java.util.Collection;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.TreeSet;
import java.util.stream.Collectors;
import nightlag.pipeline.config.ChannelName;
import nightlag.pipeline.config.Instrument;
import nightlag.pipeline.config.TagName;
import nightlag.pipeline.intake.RawFile;

/**
 * What holds for all records of a file.
 *
 * @param complaints the file's
 * @param fileStem the file's name without folder and extension
 * @param channels its channels
 * @param values facts from elsewhere than the columns
 * @param columnTags facts from columns
 * @param recordFacts puts together what is known about one record
 */
record FileFacts(
        Complaints complaints,
        String fileStem,
        Map<ChannelName, ChannelColumn> channels,
        Map<TagName, TagValue> values,
        List<ColumnTag> columnTags,
        RecordFacts recordFacts) {

    /** What the head of a file and its run sheet row say. */
    static FileFacts of(RawFile file, Optional<RunSheetRow> runSheetRow, RawTable table, Complaints complaints)
            throws DecodeException {
        Instrument instrument = file.intake().instrument();
        TagReader tags = new TagReader(file, runSheetRow, complaints);
        return new FileFacts(
                complaints,
                stem(file.relativePath()),
                ChannelColumn.of(instrument, table.columns()),
                tags.ofFile(table.preamble()),
                tags.columns(table.columns()),
                new RecordFacts(instrument, runSheetRow.isPresent(), complaints));
    }

    /** The one channel of several that the instrument has. */
    ChannelName oneOf(Collection<ChannelName> names) throws DecodeException {
        List<ChannelName> there =
                new TreeSet<>(names).stream().filter(channels::containsKey).toList();
        if (there.size() != 1) {
            throw complaints.at(
                    0,
                    "[channels]",
                    there.size() + " of them in the instrument file",
                    "one of "
                            + new TreeSet<>(names)
                                    .stream().map(ChannelName::word).collect(Collectors.joining(", ")));
        }
        return there.get(0);
    }

    /** A fact that must come from a column. */
    ColumnTag columnTag(TagName tag) throws DecodeException {
        return columnTags.stream()
                .filter(column -> column.tag() == tag)
                .findFirst()
                .orElseThrow(() -> complaints.at(
                        0,
                        "tag " + tag.word(),
                        "no column for it in the instrument file",
                        "one, in the layout column"));
    }

    private static String stem(String path) {
        String name = path.substring(path.lastIndexOf('/') + 1);
        int dot = name.lastIndexOf('.');
        return dot > 0 ? name.substring(0, dot) : name;
    }
}

package nightlag.pipeline.decode;

import java.io.IOException;
import java.math.BigDecimal;
import java.math.MathContext;
import java.util.ArrayList;
import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.pipeline.config.ChannelName;
import nightlag.pipeline.config.Layout;
import nightlag.pipeline.config.TagName;
import nightlag.pipeline.config.TagSource;
import nightlag.pipeline.intake.RawFile;
import nightlag.stages.RecordTags;

/** Makes the description of a file from its head and its first rows. */
final class Describing {
    private static final int ROWS = 3;

    private Describing() {}

    static FileDescription describe(RawFile file, RawTable table, FileFacts facts) throws IOException, DecodeException {
        Map<TagName, TagValue> values = new EnumMap<>(TagName.class);
        values.putAll(facts.values());
        Map<ChannelName, List<Optional<Double>>> firstValues = new EnumMap<>(ChannelName.class);
        facts.channels().keySet().forEach(name -> firstValues.put(name, new ArrayList<>(ROWS)));
        int firstDataLine = 0;
        for (int row = 0; row < ROWS && table.nextRow(); row++) {
            if (row == 0) {
                firstDataLine = table.line();
                for (ColumnTag tag : facts.columnTags()) {
                    tag.takeInto(values, table.cells(), table.line());
                }
            }
            for (Map.Entry<ChannelName, ChannelColumn> channel :
                    facts.channels().entrySet()) {
                double si = channel.getValue().read(table.cells(), table.line());
                firstValues.get(channel.getKey()).add(Double.isNaN(si) ? Optional.empty() : Optional.of(si));
            }
        }
        Layout layout = file.intake().instrument().records().layout();
        if (firstDataLine > 0) {
            addDefaults(values, facts, layout, firstDataLine);
        }
        return new FileDescription(
                file.tableName(),
                table.charset().name(),
                table.marked(),
                layout,
                table.columns().headerLine(),
                table.columns().headers(),
                firstDataLine,
                facts.channels().entrySet().stream()
                        .map(channel -> channel(
                                channel.getKey(),
                                channel.getValue(),
                                table.columns(),
                                firstValues.get(channel.getKey())))
                        .toList(),
                tags(values, file.intake().instrument().tags()));
    }

    /** What is set, and what the instrument file names a source for but this file does not hold. */
    private static List<FileDescription.DescribedTag> tags(
            Map<TagName, TagValue> values, Map<TagName, TagSource> sources) {
        List<FileDescription.DescribedTag> tags = new ArrayList<>();
        for (TagName name : TagName.values()) {
            if (values.containsKey(name)) {
                tags.add(tag(name, values.get(name)));
            } else if (sources.containsKey(name)) {
                tags.add(new FileDescription.DescribedTag(
                        name, "not set", Optional.empty(), "nowhere: " + sought(sources.get(name))));
            }
        }
        return tags;
    }

    private static String sought(TagSource source) {
        if (source instanceof TagSource.Preamble preamble) {
            return "no line '" + preamble.label() + "' with a value above the header";
        }
        if (source instanceof TagSource.RunSheet sheet) {
            return "no cell '" + sheet.column() + "' in a run sheet's row for this file";
        }
        return "its source is empty";
    }

    private static void addDefaults(Map<TagName, TagValue> values, FileFacts facts, Layout layout, int line)
            throws DecodeException {
        boolean byFile = layout.oneRecordAFile();
        RecordTags tags =
                facts.recordFacts().tags(values, OptionalDouble.empty(), byFile ? facts.fileStem() : "1", line);
        values.putIfAbsent(TagName.SPECIMEN, byDefault(tags.key().specimen(), "default"));
        values.putIfAbsent(TagName.SWEEP, byDefault(tags.key().sweep(), "default"));
        values.putIfAbsent(TagName.POINT, byDefault(tags.key().point(), defaultPoint(layout)));
    }

    private static String defaultPoint(Layout layout) {
        return switch (layout) {
            case SINGLE, MULTISINE, CHIRP, CREEP -> "default, the file's name";
            case ROLLING -> "default, the window";
            default -> "default, the row";
        };
    }

    private static TagValue byDefault(String text, String from) {
        return new TagValue(text, OptionalDouble.empty(), from);
    }

    private static FileDescription.DescribedChannel channel(
            ChannelName name, ChannelColumn column, Columns columns, List<Optional<Double>> firstValues) {
        int index = column.index();
        return new FileDescription.DescribedChannel(
                name,
                index + 1,
                index < columns.headers().size() ? Optional.of(columns.headers().get(index)) : Optional.empty(),
                column.unit().symbol(),
                column.unitFrom(),
                name.kind().si(),
                firstValues);
    }

    private static FileDescription.DescribedTag tag(TagName name, TagValue value) {
        Optional<String> si = name.kind()
                .filter(kind -> value.si().isPresent())
                .map(kind -> toTenDigits(value.si().getAsDouble()) + " " + kind.si());
        return new FileDescription.DescribedTag(name, value.text(), si, value.from());
    }

    /**
     * A number that a file or an instrument file holds, near enough to be found there again: never with an exponent, and
     * without what its conversion to SI leaves in the last digits.
     */
    static String toTenDigits(double value) {
        return new BigDecimal(value)
                .round(new MathContext(10))
                .stripTrailingZeros()
                .toPlainString();
    }
}

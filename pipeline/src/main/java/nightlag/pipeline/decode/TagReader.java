package nightlag.pipeline.decode;

import java.util.ArrayList;
import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.TreeMap;
import java.util.stream.Collectors;
import nightlag.pipeline.config.Instrument;
import nightlag.pipeline.config.QuantityKind;
import nightlag.pipeline.config.TagName;
import nightlag.pipeline.config.TagSource;
import nightlag.pipeline.config.Unit;
import nightlag.pipeline.intake.RawFile;

/** Reads the facts about a file's records from wherever the instrument file says they stand. An empty source is not set. */
final class TagReader {
    private final RawFile file;
    private final Instrument instrument;
    private final Optional<RunSheetRow> runSheetRow;
    private final Complaints complaints;

    TagReader(RawFile file, Optional<RunSheetRow> runSheetRow, Complaints complaints) {
        this.file = file;
        this.instrument = file.intake().instrument();
        this.runSheetRow = runSheetRow;
        this.complaints = complaints;
    }

    /** The facts that hold for all records of the file. */
    Map<TagName, TagValue> ofFile(Preamble preamble) throws DecodeException {
        Map<TagName, TagValue> values = new EnumMap<>(TagName.class);
        for (Map.Entry<TagName, TagSource> entry : new TreeMap<>(instrument.tags()).entrySet()) {
            Optional<TagValue> value = ofFile(entry.getKey(), entry.getValue(), preamble);
            value.ifPresent(found -> values.put(entry.getKey(), found));
        }
        return values;
    }

    /** The facts that stand in columns of the data. */
    List<ColumnTag> columns(Columns columns) throws DecodeException {
        List<ColumnTag> found = new ArrayList<>();
        for (Map.Entry<TagName, TagSource> entry : new TreeMap<>(instrument.tags()).entrySet()) {
            if (entry.getValue() instanceof TagSource.DataColumn source) {
                int index = columns.indexOf(source.column());
                Optional<QuantityKind> kind = entry.getKey().kind();
                Optional<Unit> unit = source.unit();
                if (kind.isPresent()) {
                    unit = columns.unitOf(index, source.column(), kind.get()).or(source::unit);
                }
                found.add(new ColumnTag(
                        entry.getKey(),
                        source.column(),
                        index,
                        unit,
                        instrument.files().decimal(),
                        complaints));
            }
        }
        return found;
    }

    private Optional<TagValue> ofFile(TagName tag, TagSource source, Preamble preamble) throws DecodeException {
        if (source instanceof TagSource.Preamble labelled) {
            return ofPreamble(tag, labelled, preamble);
        }
        if (source instanceof TagSource.PathGroup path) {
            Spot spot = new Spot(complaints, 0, "tag " + tag.word());
            String from = "path, group '" + path.group() + "'";
            return value(tag, pathGroup(path.group(), spot), path.unit(), spot, from);
        }
        if (source instanceof TagSource.Fixed fixed) {
            Spot spot = new Spot(complaints, 0, "tag " + tag.word());
            // a value of the instrument file: its numbers have a decimal point whatever the raw file has
            return value(tag, fixed.value(), fixed.unit(), '.', spot, "instrument file");
        }
        if (source instanceof TagSource.RunSheet sheet && runSheetRow.isPresent()) {
            return ofRunSheet(tag, sheet, runSheetRow.get());
        }
        return Optional.empty();
    }

    private Optional<TagValue> ofPreamble(TagName tag, TagSource.Preamble source, Preamble preamble)
            throws DecodeException {
        Optional<Preamble.Entry> found = preamble.entry(source.label());
        if (found.isEmpty()) {
            return Optional.empty();
        }
        Preamble.Entry entry = found.get();
        Spot spot = new Spot(complaints, entry.line(), "tag " + tag.word() + ", '" + source.label() + "'");
        Optional<Unit> unit = source.unit();
        if (tag.kind().isPresent()
                && entry.beside().isPresent()
                && !entry.text().isEmpty()) {
            unit = UnitText.beside(entry.beside().get(), tag.kind().get(), spot).or(source::unit);
        }
        return value(tag, entry.text(), unit, spot, "line " + entry.line() + ", '" + source.label() + "'");
    }

    private Optional<TagValue> ofRunSheet(TagName tag, TagSource.RunSheet source, RunSheetRow row)
            throws DecodeException {
        Spot spot = new Spot(new Complaints(row.sheet()), row.line(), "column '" + source.column() + "'");
        String cell = row.cells().get(source.column());
        if (cell == null) {
            throw spot.complaint(
                    "no such column",
                    "one of the run sheet's: "
                            + row.cells().keySet().stream()
                                    .sorted()
                                    .map(Complaints::shown)
                                    .collect(Collectors.joining(", ")));
        }
        String from = "run sheet " + row.sheet() + ", line " + row.line() + ", column '" + source.column() + "'";
        return value(tag, cell, source.unit(), spot, from);
    }

    private String pathGroup(String group, Spot spot) throws DecodeException {
        return PathTags.group(instrument.files().pathPattern(), file.relativePath(), group, spot);
    }

    private Optional<TagValue> value(TagName tag, String text, Optional<Unit> unit, Spot spot, String from)
            throws DecodeException {
        return value(tag, text, unit, instrument.files().decimal(), spot, from);
    }

    /** Makes a value of a text, unless it is empty. */
    static Optional<TagValue> value(TagName tag, String text, Optional<Unit> unit, char decimal, Spot spot, String from)
            throws DecodeException {
        String trimmed = Cells.trim(text);
        if (trimmed.isEmpty()) {
            return Optional.empty();
        }
        if (trimmed.length() > Bounds.TAG_CHARS) {
            throw spot.complaint("a text of " + trimmed.length() + " characters", "at most " + Bounds.TAG_CHARS);
        }
        if (trimmed.chars().anyMatch(c -> c == 0 || c == '\n' || c == '\r')) {
            throw spot.complaint(Complaints.shown(trimmed), "text without line breaks and zero characters");
        }
        OptionalDouble si = OptionalDouble.empty();
        if (tag.kind().isPresent()) {
            si = OptionalDouble.of(Quantities.si(trimmed, tag.kind().get(), unit, decimal, spot));
        }
        return Optional.of(new TagValue(trimmed, si, from));
    }
}

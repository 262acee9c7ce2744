package nightlag.pipeline.decode;

import java.util.EnumMap;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.pipeline.config.Instrument;
import nightlag.pipeline.config.TagName;
import nightlag.pipeline.config.TagSource;
import nightlag.stages.RecordKind;
import nightlag.stages.RecordTags;
import nightlag.stages.geometry.Dimension;
import nightlag.stages.moduli.PointKey;

/** Puts together what is known about one record. */
final class RecordFacts {
    /** The specimen, and the sweep, of a record that names none. */
    static final String FIRST = "1";

    private final Instrument instrument;
    private final boolean runSheetRow;
    private final Complaints complaints;

    /** For one file; {@code runSheetRow}: whether a run sheet speaks of it. */
    RecordFacts(Instrument instrument, boolean runSheetRow, Complaints complaints) {
        this.instrument = instrument;
        this.runSheetRow = runSheetRow;
        this.complaints = complaints;
    }

    /**
     * The tags of a record.
     *
     * @param values its facts
     * @param temperatureK its temperature, where it is not the tag's
     * @param defaultPoint the point's name where no tag gives one
     * @param line the record's line, for complaints
     */
    RecordTags tags(Map<TagName, TagValue> values, OptionalDouble temperatureK, String defaultPoint, int line)
            throws DecodeException {
        PointKey key = new PointKey(
                required(values, TagName.GRADE, line),
                required(values, TagName.LOT, line),
                text(values, TagName.SPECIMEN).orElse(FIRST),
                text(values, TagName.SWEEP).orElse(FIRST),
                text(values, TagName.POINT).orElse(defaultPoint),
                complaints.file());
        Map<Dimension, Double> dimensions = new EnumMap<>(Dimension.class);
        values.forEach((tag, value) -> tag.dimension()
                .ifPresent(dimension -> dimensions.put(dimension, value.si().orElseThrow())));
        return new RecordTags(
                key,
                text(values, TagName.MADE),
                temperatureK.isPresent() ? temperatureK : si(values, TagName.TEMPERATURE),
                si(values, TagName.ELAPSED),
                dimensions);
    }

    /** What a record of samples holds. */
    RecordKind kind() {
        return instrument.records().kind();
    }

    /** The SI value of a quantity tag. */
    static OptionalDouble si(Map<TagName, TagValue> values, TagName tag) {
        TagValue value = values.get(tag);
        return value == null ? OptionalDouble.empty() : value.si();
    }

    /** The complaint about a fact that is needed and not there. */
    DecodeException missing(TagName tag, int line) {
        TagSource source = instrument.tags().get(tag);
        String place = "tag " + tag.word();
        if (source == null) {
            return complaints.at(line, place, "no such tag in the instrument file", "a source for it in [tags]");
        }
        if (source instanceof TagSource.Preamble preamble) {
            return complaints.at(
                    0,
                    place,
                    "nothing for it above the header",
                    "a line " + Complaints.shown(preamble.label()) + " with a value");
        }
        if (source instanceof TagSource.PathGroup path) {
            return complaints.at(0, place, "nothing in the path's group '" + path.group() + "'", "a value");
        }
        if (source instanceof TagSource.DataColumn data) {
            return complaints.at(line, place, "an empty cell in " + data.column(), "a value");
        }
        if (source instanceof TagSource.RunSheet sheet) {
            return complaints.at(
                    0,
                    place,
                    runSheetRow
                            ? "an empty cell in the run sheet's column '" + sheet.column() + "'"
                            : "no row of a run sheet names this file",
                    runSheetRow
                            ? "a value"
                            : "one in "
                                    + instrument
                                            .files()
                                            .runSheet()
                                            .map(Complaints::shown)
                                            .orElse("a run sheet") + " in its folder or a folder above");
        }
        return complaints.at(0, place, "an empty value in the instrument file", "a value");
    }

    private String required(Map<TagName, TagValue> values, TagName tag, int line) throws DecodeException {
        TagValue value = values.get(tag);
        if (value == null) {
            throw missing(tag, line);
        }
        return value.text();
    }

    private static Optional<String> text(Map<TagName, TagValue> values, TagName tag) {
        return Optional.ofNullable(values.get(tag)).map(TagValue::text);
    }
}

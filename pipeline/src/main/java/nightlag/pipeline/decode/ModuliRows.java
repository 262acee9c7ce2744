package nightlag.pipeline.decode;

import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.OptionalDouble;
import nightlag.pipeline.config.ChannelName;
import nightlag.pipeline.config.TagName;
import nightlag.stages.GivenModuli;

/**
 * Records of the layout {@code moduli}: each row is a point reduced elsewhere.
 *
 * <p>A row is left out if it lacks a modulus, or a frequency or temperature that has a column and no tag to stand in for its
 * empty cell. Strain and uncertainties may be empty.
 */
final class ModuliRows implements RowTaker {
    private final FileFacts facts;
    private final Tally tally;
    private final boolean polar;
    private long row;

    ModuliRows(FileFacts facts, Tally tally) throws DecodeException {
        this.facts = facts;
        this.tally = tally;
        boolean cartesian = has(ChannelName.STORAGE_MODULUS) && has(ChannelName.LOSS_MODULUS);
        this.polar = !cartesian;
        if (polar && !(has(ChannelName.COMPLEX_MODULUS) && has(ChannelName.PHASE_ANGLE))) {
            throw facts.complaints()
                    .at(
                            0,
                            "[channels]",
                            "no pair of moduli in the instrument file",
                            "storage_modulus and loss_modulus, or complex_modulus and phase_angle");
        }
    }

    @Override
    public void row(Cells cells, int line) throws DecodeException {
        row++;
        Map<ChannelName, Double> read = new EnumMap<>(ChannelName.class);
        for (Map.Entry<ChannelName, ChannelColumn> channel : facts.channels().entrySet()) {
            double si = channel.getValue().read(cells, line);
            if (!Double.isNaN(si)) {
                read.put(channel.getKey(), si);
            }
        }
        Map<TagName, TagValue> values = new EnumMap<>(TagName.class);
        values.putAll(facts.values());
        for (ColumnTag tag : facts.columnTags()) {
            tag.read(cells, line).ifPresent(value -> values.put(tag.tag(), value));
        }
        OptionalDouble frequencyHz = channelThenTag(read, ChannelName.FREQUENCY, values, TagName.FREQUENCY);
        OptionalDouble temperatureK = channelThenTag(read, ChannelName.TEMPERATURE, values, TagName.TEMPERATURE);
        if (frequencyHz.isEmpty() && !has(ChannelName.FREQUENCY)) {
            throw facts.recordFacts().missing(TagName.FREQUENCY, line);
        }
        if (temperatureK.isEmpty() && !has(ChannelName.TEMPERATURE)) {
            throw facts.recordFacts().missing(TagName.TEMPERATURE, line);
        }
        boolean complete = frequencyHz.isPresent()
                && temperatureK.isPresent()
                && read.keySet().containsAll(pair());
        if (!complete) {
            tally.leaveOut();
            return;
        }
        double first = read.get(pair().get(0));
        double second = read.get(pair().get(1));
        tally.handOver(
                new GivenModuli(
                        facts.recordFacts().tags(values, temperatureK, Long.toString(row), line),
                        frequencyHz.getAsDouble(),
                        polar ? first * Math.cos(second) : first,
                        polar ? first * Math.sin(second) : second,
                        uncertainty(read, ChannelName.STORAGE_MODULUS_U, cells, line),
                        uncertainty(read, ChannelName.LOSS_MODULUS_U, cells, line),
                        of(read, ChannelName.STRAIN)),
                1);
    }

    @Override
    public void end() {
        // each row is whole in itself
    }

    private boolean has(ChannelName name) {
        return facts.channels().containsKey(name);
    }

    private List<ChannelName> pair() {
        return polar
                ? List.of(ChannelName.COMPLEX_MODULUS, ChannelName.PHASE_ANGLE)
                : List.of(ChannelName.STORAGE_MODULUS, ChannelName.LOSS_MODULUS);
    }

    private OptionalDouble uncertainty(Map<ChannelName, Double> read, ChannelName name, Cells cells, int line)
            throws DecodeException {
        OptionalDouble u = of(read, name);
        if (u.isPresent() && u.getAsDouble() < 0) {
            ChannelColumn column = facts.channels().get(name);
            throw column.spot(line)
                    .complaint(Complaints.shown(cells.text(column.index())), "an uncertainty of 0 or more");
        }
        return u;
    }

    private static OptionalDouble channelThenTag(
            Map<ChannelName, Double> read, ChannelName channel, Map<TagName, TagValue> values, TagName tag) {
        OptionalDouble value = of(read, channel);
        return value.isPresent() ? value : RecordFacts.si(values, tag);
    }

    private static OptionalDouble of(Map<ChannelName, Double> read, ChannelName name) {
        Double value = read.get(name);
        return value == null ? OptionalDouble.empty() : OptionalDouble.of(value);
    }
}

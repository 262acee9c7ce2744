package nightlag.pipeline.decode;

import java.util.EnumMap;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import nightlag.pipeline.config.ChannelName;
import nightlag.pipeline.config.TagName;
import nightlag.stages.WaveformRecord;
import nightlag.stages.geometry.DeformationSignal;
import nightlag.stages.geometry.LoadSignal;
import nightlag.stages.waveform.Waveform;

/**
 * Records of samples: the layouts {@code single}, where the file is one, and {@code column}, where the tag {@code point} tells
 * them apart.
 *
 * <p>A row without a time, a deformation or a load is left out, and so is one of the layout {@code column} without a point.
 * A temperature is no needed column: recorders often write it less often than the signals.
 */
final class WaveformRows implements RowTaker {
    private static final Map<ChannelName, DeformationSignal> DEFORMATIONS = Map.of(
            ChannelName.STRAIN, DeformationSignal.STRAIN,
            ChannelName.ANGLE, DeformationSignal.ANGLE,
            ChannelName.DISPLACEMENT, DeformationSignal.DISPLACEMENT);
    private static final Map<ChannelName, LoadSignal> LOADS = Map.of(
            ChannelName.STRESS, LoadSignal.STRESS,
            ChannelName.TORQUE, LoadSignal.TORQUE,
            ChannelName.FORCE, LoadSignal.FORCE);

    private final FileFacts facts;
    private final Tally tally;
    private final Optional<ChannelColumn> time;
    private final ChannelColumn deformation;
    private final ChannelColumn load;
    private final Optional<ChannelColumn> temperature;
    private final Optional<ChannelColumn> frequency;
    private final DeformationSignal deformationSignal;
    private final LoadSignal loadSignal;
    private final Optional<ColumnTag> divider;
    private final List<ColumnTag> columnTags;
    private final Samples samples;

    private final Set<String> pointsDone = new HashSet<>();
    private Map<TagName, TagValue> values;
    private boolean open;
    private int firstLine;
    private long rowOfRecord;
    private int rowsLeftOut;
    private double lastTime;
    private double frequencyHz;

    /** For a file of the layout {@code single}, or {@code column} where a record ends when {@code divided}. */
    WaveformRows(FileFacts facts, boolean divided, Tally tally) throws DecodeException {
        this.facts = facts;
        this.tally = tally;
        Map<ChannelName, ChannelColumn> channels = facts.channels();
        ChannelName deformationName = facts.oneOf(DEFORMATIONS.keySet());
        ChannelName loadName = facts.oneOf(LOADS.keySet());
        this.time = Optional.ofNullable(channels.get(ChannelName.TIME));
        this.deformation = channels.get(deformationName);
        this.load = channels.get(loadName);
        this.temperature = Optional.ofNullable(channels.get(ChannelName.TEMPERATURE));
        this.frequency = Optional.ofNullable(channels.get(ChannelName.FREQUENCY));
        this.deformationSignal = DEFORMATIONS.get(deformationName);
        this.loadSignal = LOADS.get(loadName);
        this.divider = divided ? Optional.of(facts.columnTag(TagName.POINT)) : Optional.empty();
        this.columnTags = facts.columnTags();
        this.samples = new Samples(temperature.isPresent());
        this.values = facts.values();
    }

    @Override
    public void row(Cells cells, int line) throws DecodeException {
        double deformationSi = deformation.read(cells, line);
        double loadSi = load.read(cells, line);
        double temperatureK = temperature.isPresent() ? temperature.get().read(cells, line) : Double.NaN;
        double clockS = time.isPresent() ? time.get().read(cells, line) : Double.NaN;
        if (divider.isPresent() && cells.empty(divider.get().index())) {
            tally.leaveOut();
            return;
        }
        goToRecord(cells, line);
        for (ColumnTag tag : columnTags) {
            tag.takeInto(values, cells, line);
        }
        if (frequency.isPresent()) {
            takeFrequency(frequency.get(), cells, line);
        }
        double timeS = time.isPresent() ? clockS : rowOfRecord;
        rowOfRecord++;
        if (!Double.isNaN(clockS)) {
            checkRise(clockS, cells, line);
        }
        if (Double.isNaN(timeS) || Double.isNaN(deformationSi) || Double.isNaN(loadSi)) {
            rowsLeftOut++;
            tally.leaveOut();
            return;
        }
        if (samples.size() == Bounds.RECORD_ROWS) {
            throw facts.complaints()
                    .at(line, "", "more than " + Bounds.RECORD_ROWS + " rows in one record", "a shorter record");
        }
        samples.add(timeS, deformationSi, loadSi, temperatureK);
    }

    @Override
    public void end() throws DecodeException {
        if (open) {
            close();
        }
    }

    private void goToRecord(Cells cells, int line) throws DecodeException {
        if (open && divider.isPresent()) {
            int index = divider.get().index();
            if (!cells.holds(index, values.get(TagName.POINT).text())) {
                close();
            }
        }
        if (!open) {
            begin(cells, line);
        }
    }

    private void begin(Cells cells, int line) throws DecodeException {
        open = true;
        values = new EnumMap<>(TagName.class);
        values.putAll(facts.values());
        samples.clear();
        firstLine = line;
        rowOfRecord = 0;
        rowsLeftOut = 0;
        lastTime = Double.NEGATIVE_INFINITY;
        frequencyHz = Double.NaN;
        if (divider.isPresent()) {
            String point = cells.text(divider.get().index());
            if (!pointsDone.add(point)) {
                throw divider.get()
                        .spot(line)
                        .complaint(
                                Complaints.shown(point) + " again, after other points",
                                "the rows of one point together");
            }
        }
    }

    /** A frequency in a column of samples is the one the record was driven at; an empty cell says nothing. */
    private void takeFrequency(ChannelColumn column, Cells cells, int line) throws DecodeException {
        double hz = column.read(cells, line);
        if (!Double.isNaN(hz) && !Double.isNaN(frequencyHz) && hz != frequencyHz) {
            throw column.spot(line)
                    .complaint(
                            Complaints.shown(cells.text(column.index())) + ", not that of the rows before",
                            "one frequency throughout a record");
        }
        frequencyHz = Double.isNaN(hz) ? frequencyHz : hz;
    }

    private void checkRise(double timeS, Cells cells, int line) throws DecodeException {
        if (timeS <= lastTime) {
            ChannelColumn clock = time.orElseThrow();
            throw clock.spot(line)
                    .complaint(
                            Complaints.shown(cells.text(clock.index())) + ", no later than the row before",
                            "a time that rises from row to row");
        }
        lastTime = timeS;
    }

    private void close() throws DecodeException {
        open = false;
        double[] timeS = time.isPresent() ? samples.time() : samples.timeOver(sampleRate());
        Waveform waveform = new Waveform(
                timeS,
                samples.deformation(),
                samples.load(),
                samples.temperature(timeS),
                Double.isNaN(frequencyHz) ? RecordFacts.si(values, TagName.FREQUENCY) : OptionalDouble.of(frequencyHz),
                rowsLeftOut);
        tally.handOver(
                new WaveformRecord(
                        facts.recordFacts().tags(values, OptionalDouble.empty(), facts.fileStem(), firstLine),
                        deformationSignal,
                        loadSignal,
                        waveform),
                samples.size());
    }

    private double sampleRate() throws DecodeException {
        OptionalDouble rate = RecordFacts.si(values, TagName.SAMPLE_RATE);
        if (rate.isEmpty()) {
            throw facts.recordFacts().missing(TagName.SAMPLE_RATE, firstLine);
        }
        return rate.getAsDouble();
    }
}

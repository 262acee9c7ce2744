package nightlag.pipeline.decode;

import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.pipeline.config.ChannelName;
import nightlag.pipeline.config.TagName;
import nightlag.stages.geometry.DeformationSignal;
import nightlag.stages.geometry.LoadSignal;

/** The channels of a file of waveforms, row by row: the values of the current row, and what must hold from row to row. */
final class SignalColumns {
    private static final Map<ChannelName, DeformationSignal> DEFORMATIONS = Map.of(
            ChannelName.STRAIN, DeformationSignal.STRAIN,
            ChannelName.ANGLE, DeformationSignal.ANGLE,
            ChannelName.DISPLACEMENT, DeformationSignal.DISPLACEMENT);
    private static final Map<ChannelName, LoadSignal> LOADS = Map.of(
            ChannelName.STRESS, LoadSignal.STRESS,
            ChannelName.TORQUE, LoadSignal.TORQUE,
            ChannelName.FORCE, LoadSignal.FORCE);

    private final FileFacts facts;
    private final Optional<ChannelColumn> time;
    private final ChannelColumn deformation;
    private final ChannelColumn load;
    private final Optional<ChannelColumn> temperature;
    private final Optional<ChannelColumn> frequency;
    private final DeformationSignal deformationSignal;
    private final LoadSignal loadSignal;

    private double clockS;
    private double deformationSi;
    private double loadSi;
    private double temperatureK;
    private double lastTime = Double.NEGATIVE_INFINITY;
    private double frequencyHz = Double.NaN;

    /** The channels of a file, which must be a deformation and a load. */
    SignalColumns(FileFacts facts) throws DecodeException {
        this.facts = facts;
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
    }

    /** What the deformation channel holds. */
    DeformationSignal deformationSignal() {
        return deformationSignal;
    }

    /** What the load channel holds. */
    LoadSignal loadSignal() {
        return loadSignal;
    }

    /** Whether there is a time channel; without one the tag {@code sample_rate} makes times of row numbers. */
    boolean hasTime() {
        return time.isPresent();
    }

    /** Whether there is a temperature channel. */
    boolean hasTemperature() {
        return temperature.isPresent();
    }

    /** Forgets the rows before: a record begins. */
    void begin() {
        lastTime = Double.NEGATIVE_INFINITY;
        frequencyHz = Double.NaN;
    }

    /** Reads a row. */
    void read(Cells cells, int line) throws DecodeException {
        deformationSi = deformation.read(cells, line);
        loadSi = load.read(cells, line);
        temperatureK = temperature.isPresent() ? temperature.get().read(cells, line) : Double.NaN;
        clockS = time.isPresent() ? time.get().read(cells, line) : Double.NaN;
    }

    /** Checks the row just read against those of its record before it: one frequency, a time that rises. */
    void follow(Cells cells, int line) throws DecodeException {
        if (frequency.isPresent()) {
            takeFrequency(frequency.get(), cells, line);
        }
        if (!Double.isNaN(clockS)) {
            checkRise(cells, line);
        }
    }

    /** Time in s; NaN for an empty cell or without the channel. */
    double clockS() {
        return clockS;
    }

    /** Deformation, SI; NaN for an empty cell. */
    double deformation() {
        return deformationSi;
    }

    /** Load, SI; NaN for an empty cell. */
    double load() {
        return loadSi;
    }

    /** Temperature in K; NaN for an empty cell or without the channel. */
    double temperatureK() {
        return temperatureK;
    }

    /** The frequency of the current record in Hz: the channel's, else the tag's. */
    OptionalDouble frequencyHz(Map<TagName, TagValue> values) {
        return Double.isNaN(frequencyHz) ? RecordFacts.si(values, TagName.FREQUENCY) : OptionalDouble.of(frequencyHz);
    }

    /** The rate of a file without a clock, in Hz. */
    double sampleRateHz(Map<TagName, TagValue> values, int line) throws DecodeException {
        OptionalDouble rate = RecordFacts.si(values, TagName.SAMPLE_RATE);
        if (rate.isEmpty()) {
            throw facts.recordFacts().missing(TagName.SAMPLE_RATE, line);
        }
        return rate.getAsDouble();
    }

    /** A complaint about the time of a row: its cell's, or that of the rate it was made of. */
    DecodeException clockComplaint(Cells cells, int line, String found, String expected) {
        if (time.isEmpty()) {
            return facts.complaints().at(line, "tag " + TagName.SAMPLE_RATE.word(), found, expected);
        }
        ChannelColumn clock = time.get();
        return clock.spot(line).complaint(Complaints.shown(cells.text(clock.index())) + ", " + found, expected);
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

    private void checkRise(Cells cells, int line) throws DecodeException {
        if (clockS <= lastTime) {
            ChannelColumn clock = time.orElseThrow();
            throw clock.spot(line)
                    .complaint(
                            Complaints.shown(cells.text(clock.index())) + ", no later than the row before",
                            "a time that rises from row to row");
        }
        lastTime = clockS;
    }
}

package nightlag.pipeline.decode;

import java.util.Arrays;
import java.util.EnumMap;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.pipeline.config.RecordFormat;
import nightlag.pipeline.config.TagName;
import nightlag.stages.WaveformRecord;
import nightlag.stages.waveform.RecordWindow;
import nightlag.stages.waveform.Waveform;

/**
 * The layout {@code rolling}: one long record at one frequency, cut into windows by time. Window k, counted from 0, holds the
 * rows from t₀ + k·advance/f up to t₀ + (k·advance + window)/f, t₀ the time of the first row used and f the frequency. Only
 * the rows of one window are held.
 *
 * <p>Each window is handed over once its end is passed. One of which the rows cover less than half (a gap in the clock) is
 * not, nor is a last one that the record does not fill; their numbers stay free. A row counts as used if it entered a window,
 * however many; rows between windows (advance over window) and behind the last one are left out like those with an empty
 * cell.
 */
final class RollingRows implements RowTaker {
    /** A time this near a window's edge, as part of the window, stands at it. */
    private static final double AT_THE_EDGE = 1e-9;

    private static final double LEAST_COVERED = 0.5;
    /** The last row of a full window lies this many sampling intervals before its end at most. */
    private static final double INTERVALS_TO_THE_END = 1.5;
    /** A row behind more windows than this after the first one is a fault of the clock, not a measurement. */
    private static final double MOST_WINDOWS = 1e9;

    private final FileFacts facts;
    private final RecordFormat format;
    private final Tally tally;
    private final SignalColumns columns;
    private final Map<TagName, TagValue> values = new EnumMap<>(TagName.class);
    private final Samples samples;

    private long row;
    private int firstLine;
    private long leftOut;
    /** For each sample held, the rows with an empty cell before it. */
    private long[] leftOutBefore = new long[0];
    /** So many of the samples held have entered a window. */
    private int entered;

    private boolean begun;
    private boolean some;
    private double beginS;
    private double frequencyHz;
    private double rateHz = Double.NaN;
    private long window;

    /** For a file of the layout {@code rolling}. */
    RollingRows(FileFacts facts, RecordFormat format, Tally tally) throws DecodeException {
        this.facts = facts;
        this.format = format;
        this.tally = tally;
        this.columns = new SignalColumns(facts);
        this.samples = new Samples(columns.hasTemperature());
        this.values.putAll(facts.values());
    }

    /** How many rows are held. */
    int held() {
        return samples.size();
    }

    @Override
    public void row(Cells cells, int line) throws DecodeException {
        columns.read(cells, line);
        for (ColumnTag tag : facts.columnTags()) {
            tag.takeInto(values, cells, line);
        }
        columns.follow(cells, line);
        if (row == 0) {
            firstLine = line;
        }
        double timeS = columns.hasTime() ? columns.clockS() : row / rate(line);
        row++;
        if (Double.isNaN(timeS) || Double.isNaN(columns.deformation()) || Double.isNaN(columns.load())) {
            leftOut++;
            tally.leaveOut();
            return;
        }
        if (!begun) {
            begin(timeS, line);
        }
        checkReach(timeS, cells, line);
        while (samples.size() > 0 && timeS >= endS(window)) {
            handOver(samples.size(), LEAST_COVERED * windowS());
            window++;
            dropBefore(beginS(window));
        }
        if (samples.size() == 0) {
            skipTo(timeS);
        }
        if (samples.size() == Bounds.RECORD_ROWS) {
            throw facts.complaints()
                    .at(line, "", "more than " + Bounds.RECORD_ROWS + " rows in one window", "a shorter window");
        }
        add(timeS);
    }

    @Override
    public void end() throws DecodeException {
        int held = samples.size();
        if (held > 1) {
            double intervalS = (samples.timeAt(held - 1) - samples.timeAt(0)) / (held - 1);
            boolean filled = samples.timeAt(held - 1) + INTERVALS_TO_THE_END * intervalS >= endS(window);
            if (filled) {
                handOver(held, LEAST_COVERED * windowS());
            }
        }
        if (begun && !some) {
            throw facts.complaints()
                    .at(
                            firstLine,
                            "",
                            "a record that ends " + Describing.toTenDigits(lastS() - beginS) + " s after its first row",
                            "at least one window: " + format.windowCycles() + " cycles at "
                                    + Describing.toTenDigits(frequencyHz) + " Hz are "
                                    + Describing.toTenDigits(windowS()) + " s");
        }
        drop(samples.size());
    }

    private double lastS() {
        return samples.size() > 0 ? samples.timeAt(samples.size() - 1) : beginS;
    }

    private void begin(double timeS, int line) throws DecodeException {
        OptionalDouble frequency = columns.frequencyHz(values);
        if (frequency.isEmpty()) {
            throw facts.recordFacts().missing(TagName.FREQUENCY, line);
        }
        frequencyHz = frequency.getAsDouble();
        if (!(frequencyHz > 0)) {
            throw facts.complaints()
                    .at(
                            line,
                            "tag " + TagName.FREQUENCY.word(),
                            Describing.toTenDigits(frequencyHz) + " Hz",
                            "a frequency above 0");
        }
        if (Double.isInfinite(windowS()) || Double.isInfinite(advanceS())) {
            throw facts.complaints()
                    .at(
                            line,
                            "tag " + TagName.FREQUENCY.word(),
                            frequencyHz + " Hz, too slow for a window's length to be a number",
                            "the frequency the record was driven at");
        }
        beginS = timeS;
        begun = true;
    }

    /** Windows can be counted up to this time, and follow one another as numbers do there. */
    private void checkReach(double timeS, Cells cells, int line) throws DecodeException {
        double windows = (timeS - beginS) / advanceS();
        if (!(windows <= MOST_WINDOWS)) {
            throw columns.clockComplaint(
                    cells,
                    line,
                    String.format(Locale.ROOT, "a time so far from the first row (%.3g windows)", windows),
                    String.format(Locale.ROOT, "a time at most %.0f windows after it", MOST_WINDOWS));
        }
        if (Math.ulp(timeS) >= Math.min(windowS(), advanceS())) {
            throw columns.clockComplaint(
                    cells,
                    line,
                    "a time so large that no two within a window can be told apart",
                    "a clock that begins nearer to 0");
        }
    }

    private double rate(int line) throws DecodeException {
        if (Double.isNaN(rateHz)) {
            rateHz = columns.sampleRateHz(values, line);
        }
        return rateHz;
    }

    private double windowS() {
        return format.windowCycles() / frequencyHz;
    }

    private double advanceS() {
        return format.advanceCycles() / frequencyHz;
    }

    private double beginS(long number) {
        return beginS + number * advanceS() - AT_THE_EDGE * windowS();
    }

    private double endS(long number) {
        return beginS(number) + windowS();
    }

    /** To the first window that ends after a time, over a gap in the clock at once. */
    private void skipTo(double timeS) {
        double passed = (timeS - endS(0)) / advanceS();
        window = Math.max(window, (long) Math.floor(passed) + 1);
    }

    private void add(double timeS) {
        if (timeS < beginS(window)) {
            // between two windows
            tally.leaveOutsideWindows();
            return;
        }
        int place = samples.size();
        samples.add(timeS, columns.deformation(), columns.load(), columns.temperatureK());
        if (place == leftOutBefore.length) {
            leftOutBefore = Arrays.copyOf(leftOutBefore, Math.max(1024, 2 * place));
        }
        leftOutBefore[place] = leftOut;
    }

    private void dropBefore(double timeS) {
        int count = 0;
        while (count < samples.size() && samples.timeAt(count) < timeS) {
            count++;
        }
        drop(count);
    }

    private void drop(int count) {
        for (int i = entered; i < count; i++) {
            tally.leaveOutsideWindows();
        }
        entered = Math.max(0, entered - count);
        samples.drop(count);
        System.arraycopy(leftOutBefore, count, leftOutBefore, 0, samples.size());
    }

    /** Hands the samples held over as a window if they cover at least a given time. */
    private void handOver(int held, double leastS) throws DecodeException {
        if (samples.timeAt(held - 1) - samples.timeAt(0) < leastS) {
            return;
        }
        double[] timeS = samples.time();
        Waveform waveform = new Waveform(
                timeS,
                samples.deformation(),
                samples.load(),
                samples.temperatureBetweenReadings(timeS),
                OptionalDouble.of(frequencyHz),
                Math.toIntExact(leftOutBefore[held - 1] - leftOutBefore[0]),
                Optional.of(new RecordWindow(beginS, beginS(window), endS(window))));
        tally.handOver(
                new WaveformRecord(
                        facts.recordFacts().tags(values, OptionalDouble.empty(), Long.toString(window + 1), firstLine),
                        columns.deformationSignal(),
                        columns.loadSignal(),
                        waveform),
                held - entered);
        entered = held;
        some = true;
    }
}

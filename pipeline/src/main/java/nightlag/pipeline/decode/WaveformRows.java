package nightlag.pipeline.decode;

import java.util.EnumMap;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import nightlag.pipeline.config.TagName;
import nightlag.stages.WaveformRecord;
import nightlag.stages.waveform.Waveform;

/**
 * Records of samples: the layouts {@code single}, {@code multisine}, {@code chirp} and {@code creep}, where the file is one, and
 * {@code column}, where the tag {@code point} tells them apart.
 *
 * <p>A row without a time, a deformation or a load is left out, and so is one of the layout {@code column} without a point.
 * A temperature is no needed column: recorders often write it less often than the signals.
 */
final class WaveformRows implements RowTaker {
    private final FileFacts facts;
    private final Tally tally;
    private final SignalColumns columns;
    private final Optional<ColumnTag> divider;
    private final List<ColumnTag> columnTags;
    private final Samples samples;

    private final Set<String> pointsDone = new HashSet<>();
    private Map<TagName, TagValue> values;
    private boolean open;
    private int firstLine;
    private long rowOfRecord;
    private int rowsLeftOut;

    /** For a file that is one record, or of the layout {@code column} where a record ends when {@code divided}. */
    WaveformRows(FileFacts facts, boolean divided, Tally tally) throws DecodeException {
        this.facts = facts;
        this.tally = tally;
        this.columns = new SignalColumns(facts);
        this.divider = divided ? Optional.of(facts.columnTag(TagName.POINT)) : Optional.empty();
        this.columnTags = facts.columnTags();
        this.samples = new Samples(columns.hasTemperature());
        this.values = facts.values();
    }

    @Override
    public void row(Cells cells, int line) throws DecodeException {
        columns.read(cells, line);
        if (divider.isPresent() && cells.empty(divider.get().index())) {
            tally.leaveOut();
            return;
        }
        goToRecord(cells, line);
        for (ColumnTag tag : columnTags) {
            tag.takeInto(values, cells, line);
        }
        columns.follow(cells, line);
        double timeS = columns.hasTime() ? columns.clockS() : rowOfRecord;
        rowOfRecord++;
        if (Double.isNaN(timeS) || Double.isNaN(columns.deformation()) || Double.isNaN(columns.load())) {
            rowsLeftOut++;
            tally.leaveOut();
            return;
        }
        if (samples.size() == Bounds.RECORD_ROWS) {
            throw facts.complaints()
                    .at(line, "", "more than " + Bounds.RECORD_ROWS + " rows in one record", "a shorter record");
        }
        samples.add(timeS, columns.deformation(), columns.load(), columns.temperatureK());
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
        columns.begin();
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

    private void close() throws DecodeException {
        open = false;
        double[] timeS = columns.hasTime() ? samples.time() : samples.timeOver(columns.sampleRateHz(values, firstLine));
        Waveform waveform = new Waveform(
                timeS,
                samples.deformation(),
                samples.load(),
                samples.temperature(timeS),
                columns.frequencyHz(values),
                rowsLeftOut);
        tally.handOver(
                new WaveformRecord(
                        facts.recordFacts().tags(values, OptionalDouble.empty(), facts.fileStem(), firstLine),
                        columns.deformationSignal(),
                        columns.loadSignal(),
                        waveform,
                        facts.recordFacts().kind()),
                samples.size());
    }
}

package nightlag.pipeline.decode;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.charset.Charset;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.regex.Pattern;
import nightlag.pipeline.config.Channel;
import nightlag.pipeline.config.ChannelName;
import nightlag.pipeline.config.ColumnRef;
import nightlag.pipeline.config.FileFormat;
import nightlag.pipeline.config.Instrument;
import nightlag.pipeline.config.Intake;
import nightlag.pipeline.config.Layout;
import nightlag.pipeline.config.QuantityKind;
import nightlag.pipeline.config.RecordFormat;
import nightlag.pipeline.config.TagName;
import nightlag.pipeline.config.TagSource;
import nightlag.pipeline.config.Unit;
import nightlag.pipeline.config.Units;
import nightlag.pipeline.intake.RawFile;
import nightlag.stages.GivenModuli;
import nightlag.stages.MeasuredRecord;
import nightlag.stages.WaveformRecord;
import nightlag.stages.geometry.Corrections;

/** An invented instrument that a test sets up step by step, and its intake folder. Its files have no header row by default. */
final class Bench {
    private final Path folder;
    private final Map<ChannelName, Channel> channels = new EnumMap<>(ChannelName.class);
    private final Map<TagName, TagSource> tags = new EnumMap<>(TagName.class);
    private String match = "**/*.csv";
    private Charset charset = StandardCharsets.UTF_8;
    private char delimiter = ';';
    private char decimal = ',';
    private FileFormat.Header header = new FileFormat.Header.None();
    private boolean unitRow;
    private Optional<String> runSheet = Optional.empty();
    private Optional<Pattern> pathPattern = Optional.empty();
    private Layout layout = Layout.SINGLE;
    private int windowCycles = 6;
    private int advanceCycles = 3;

    private Bench(Path folder) {
        this.folder = folder;
    }

    /** Nothing set but grade and lot. */
    static Bench in(Path folder) {
        return new Bench(folder).fixed(TagName.GRADE, "Heron 3").fixed(TagName.LOT, "L-17");
    }

    /** Time in s, angle in mrad and torque in mN·m under the header {@code t;phi;M}. */
    static Bench melt(Path folder) {
        return in(folder)
                .header("t;")
                .channel(ChannelName.TIME, "t", "s")
                .channel(ChannelName.ANGLE, "phi", "mrad")
                .channel(ChannelName.TORQUE, "M", "mN·m");
    }

    Bench match(String glob) {
        match = glob;
        return this;
    }

    Bench charset(Charset used) {
        charset = used;
        return this;
    }

    Bench dialect(char delimiterUsed, char decimalUsed) {
        delimiter = delimiterUsed;
        decimal = decimalUsed;
        return this;
    }

    Bench header(String start) {
        header = new FileFormat.Header.StartsWith(start);
        return this;
    }

    Bench headerLine(int number) {
        header = new FileFormat.Header.Line(number);
        return this;
    }

    Bench noHeader() {
        header = new FileFormat.Header.None();
        return this;
    }

    Bench unitRow() {
        unitRow = true;
        return this;
    }

    Bench runSheet(String name) {
        runSheet = Optional.of(name);
        return this;
    }

    Bench path(String pattern) {
        pathPattern = Optional.of(Pattern.compile(pattern));
        return this;
    }

    Bench layout(Layout used) {
        layout = used;
        return this;
    }

    /** Layout rolling: cycles per window, and from one to the next. */
    Bench rolling(int window, int advance) {
        windowCycles = window;
        advanceCycles = advance;
        return layout(Layout.ROLLING);
    }

    Bench channel(ChannelName name, String column, String unit) {
        return channel(name, ColumnRef.named(column), unit);
    }

    Bench channel(ChannelName name, int column, String unit) {
        return channel(name, ColumnRef.numbered(column), unit);
    }

    Bench channel(ChannelName name, ColumnRef column, String unit) {
        return channel(name, new Channel(column, unit(unit, name.kind()), OptionalDouble.empty(), 0, false, 0));
    }

    Bench channel(ChannelName name, Channel channel) {
        channels.put(name, channel);
        return this;
    }

    Bench without(ChannelName name) {
        channels.remove(name);
        return this;
    }

    Bench without(TagName name) {
        tags.remove(name);
        return this;
    }

    Bench fixed(TagName name, String value) {
        return tag(name, new TagSource.Fixed(value, Optional.empty()));
    }

    Bench preamble(TagName name, String label, String unit) {
        return tag(name, new TagSource.Preamble(label, optional(name, unit)));
    }

    Bench pathGroup(TagName name, String group, String unit) {
        return tag(name, new TagSource.PathGroup(group, optional(name, unit)));
    }

    Bench column(TagName name, String column, String unit) {
        return tag(name, new TagSource.DataColumn(ColumnRef.named(column), optional(name, unit)));
    }

    Bench runSheetColumn(TagName name, String column, String unit) {
        return tag(name, new TagSource.RunSheet(column, optional(name, unit)));
    }

    Bench tag(TagName name, TagSource source) {
        tags.put(name, source);
        return this;
    }

    Instrument instrument() {
        return new Instrument(
                "bench",
                "An invented bench",
                new FileFormat(match, charset, delimiter, decimal, header, unitRow, runSheet, pathPattern),
                new RecordFormat(layout, windowCycles, advanceCycles, List.of(), 10),
                channels,
                tags,
                Corrections.none(),
                Map.of(),
                Map.of(),
                Optional.empty(),
                "fingerprint");
    }

    Intake intake() {
        return new Intake(folder, "bench", instrument());
    }

    /** Writes a file in the bench's charset; lines end with '\n'. */
    RawFile write(String path, String... lines) {
        return writeBytes(path, (String.join("\n", lines) + "\n").getBytes(charset));
    }

    RawFile writeBytes(String path, byte[] bytes) {
        Path file = folder.resolve(path);
        try {
            Files.createDirectories(file.getParent());
            Files.write(file, bytes);
            return new RawFile(
                    intake(),
                    path,
                    bytes.length,
                    Files.getLastModifiedTime(file).toMillis());
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    /** Decodes a file, its run sheet's row included. */
    static Decoded decode(RawFile file) throws DecodeException, IOException {
        List<MeasuredRecord> records = new ArrayList<>();
        DecodeCounts counts = RawFileDecoder.decode(file, new RunSheets().rowOf(file), records::add);
        return new Decoded(records, counts);
    }

    static Unit unit(String symbol, QuantityKind kind) {
        return Units.parse(symbol, kind).toOptional().orElseThrow();
    }

    private static Optional<Unit> optional(TagName name, String unit) {
        return unit.isEmpty() ? Optional.empty() : name.kind().map(kind -> unit(unit, kind));
    }

    /**
     * What a file gave.
     *
     * @param records its records
     * @param counts where its rows went
     */
    record Decoded(List<MeasuredRecord> records, DecodeCounts counts) {
        WaveformRecord waveform(int index) {
            return (WaveformRecord) records.get(index);
        }

        GivenModuli moduli(int index) {
            return (GivenModuli) records.get(index);
        }
    }
}

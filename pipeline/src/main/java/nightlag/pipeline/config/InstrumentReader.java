package nightlag.pipeline.config;

import java.util.ArrayList;
import java.util.EnumMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalInt;
import java.util.Set;
import java.util.stream.Collectors;
import nightlag.stages.geometry.GeometrySpec;
import nightlag.stages.moduli.SignalRange;

/** Reads an instrument file. */
final class InstrumentReader {
    private final FileSections file;
    private final SectionReader channelSection;
    private final SectionReader tagSection;

    private InstrumentReader(FileSections file) {
        this.file = file;
        this.channelSection = file.section(InstrumentKeys.CHANNELS);
        this.tagSection = file.section(InstrumentKeys.TAGS);
    }

    /**
     * Reads one file.
     *
     * @param id its name without extension
     * @param toml what stands in it
     * @param all where everything wrong with it goes
     * @return empty where anything is wrong
     */
    static Optional<Instrument> read(String id, TomlFile toml, List<Problem> all) {
        Problems problems = new Problems(!toml.whole());
        problems.addAll(toml.problems());
        Optional<Instrument> instrument =
                new InstrumentReader(new FileSections(InstrumentKeys.KIND, toml.root(), problems)).instrument(id);
        all.addAll(problems.inOrder());
        return problems.isEmpty() ? instrument : Optional.empty();
    }

    private Optional<Instrument> instrument(String id) {
        String name = file.top().text(InstrumentKeys.NAME).map(String::strip).orElse(id);
        FilesReader files = new FilesReader(file.section(InstrumentKeys.FILES));
        Optional<RecordFormat> records = records(file.section(InstrumentKeys.RECORDS));
        if (!file.has(InstrumentKeys.CHANNELS)) {
            channelSection.problems().missing(file.at(), "[channels]", "missing", "a section with the columns");
        }
        Map<ChannelName, Channel> channels = ChannelsReader.read(channelSection, files.headless());
        Layout layout = records.map(RecordFormat::layout).orElse(Layout.SINGLE);
        Map<TagName, TagSource> tags = TagsReader.read(tagSection, files, layout);
        if (file.has(InstrumentKeys.CHANNELS) && records.isPresent()) {
            ChannelsReader.checkLayout(channelSection, layout, namedTags());
        }
        CorrectionsReader corrections =
                new CorrectionsReader(file.optional(InstrumentKeys.CORRECTIONS), channels, namedChannels(), layout);
        Map<ChannelName, Double> uncertainty = uncertainty();
        Map<ChannelName, SignalRange> ranges = ranges();
        Optional<GeometrySpec> geometry = file.optional(GeometryKeys.GEOMETRY).flatMap(GeometryReader::read);
        if (files.format().isEmpty()
                || records.isEmpty()
                || corrections.corrections().isEmpty()) {
            return Optional.empty();
        }
        String fingerprint = Fingerprints.of(
                files.format().get(),
                records.get(),
                channels,
                tags,
                corrections.corrections().get(),
                uncertainty,
                ranges,
                geometry);
        return Optional.of(new Instrument(
                id,
                name,
                files.format().get(),
                records.get(),
                channels,
                tags,
                corrections.corrections().get(),
                uncertainty,
                ranges,
                geometry,
                fingerprint));
    }

    /** Tags named in the file, whether or not their source is right, so that one fault is said once. */
    private Set<TagName> namedTags() {
        return java.util.Arrays.stream(TagName.values())
                .filter(name -> tagSection.has(TagsReader.key(name)))
                .collect(Collectors.toSet());
    }

    private Set<ChannelName> namedChannels() {
        return java.util.Arrays.stream(ChannelName.values())
                .filter(name -> channelSection.has(ChannelsReader.key(name)))
                .collect(Collectors.toSet());
    }

    private static Optional<RecordFormat> records(SectionReader section) {
        Optional<Layout> layout = section.word(InstrumentKeys.LAYOUT, Layout.class);
        OptionalInt window = section.whole(InstrumentKeys.WINDOW);
        OptionalInt advance = section.whole(InstrumentKeys.ADVANCE);
        Optional<List<Double>> frequencies = frequencies(section);
        OptionalInt pointsPerDecade = section.whole(InstrumentKeys.POINTS_PER_DECADE);
        if (section.has(InstrumentKeys.FREQUENCIES) && layout.isPresent() && layout.get() != Layout.MULTISINE) {
            section.wrong(
                    InstrumentKeys.FREQUENCIES,
                    "layout " + layout.get().word() + " has one frequency a record",
                    "it with layout multisine");
        }
        if (section.has(InstrumentKeys.POINTS_PER_DECADE) && layout.isPresent() && layout.get() != Layout.CHIRP) {
            section.wrong(
                    InstrumentKeys.POINTS_PER_DECADE,
                    "layout " + layout.get().word() + " has no sweep inside a record",
                    "it with layout chirp");
        }
        if (layout.isEmpty()
                || window.isEmpty()
                || advance.isEmpty()
                || frequencies.isEmpty()
                || pointsPerDecade.isEmpty()) {
            return Optional.empty();
        }
        return Optional.of(new RecordFormat(
                layout.get(), window.getAsInt(), advance.getAsInt(), frequencies.get(), pointsPerDecade.getAsInt()));
    }

    private static Optional<List<Double>> frequencies(SectionReader section) {
        Key key = InstrumentKeys.FREQUENCIES;
        if (!section.has(key)) {
            return Optional.of(List.of());
        }
        Optional<List<Node>> items = section.list(key);
        if (items.isEmpty()) {
            return Optional.empty();
        }
        KeyType.Measured type = new KeyType.Measured(QuantityKind.FREQUENCY, KeyType.Sign.POSITIVE, false);
        Set<Double> distinct = new LinkedHashSet<>();
        List<Double> values = new ArrayList<>();
        for (Node item : items.get()) {
            Optional<Quantity> frequency = section.quantity(key, item, type);
            if (frequency.isEmpty()) {
                continue;
            }
            if (!distinct.add(frequency.get().si())) {
                section.wrong(key, item, "found " + item.found() + " a second time", "each frequency once");
            }
            values.add(frequency.get().si());
        }
        if (items.get().isEmpty()) {
            section.wrong(key, "the list is empty", "frequencies, or no such key to have them found");
        }
        return values.size() == items.get().size() && !values.isEmpty() ? Optional.of(values) : Optional.empty();
    }

    private Map<ChannelName, Double> uncertainty() {
        Map<ChannelName, Double> uncertainty = new EnumMap<>(ChannelName.class);
        file.optional(InstrumentKeys.UNCERTAINTY).ifPresent(section -> {
            for (Key key : InstrumentKeys.UNCERTAINTY.keys()) {
                ChannelName name = ChannelName.valueOf(key.name().toUpperCase(java.util.Locale.ROOT));
                section.si(key).ifPresent(value -> uncertainty.put(name, value));
                boolean tagged = name == ChannelName.TEMPERATURE;
                if (section.has(key) && !tagged) {
                    refuseWithoutChannel(section, key, name);
                }
            }
        });
        return uncertainty;
    }

    private Map<ChannelName, SignalRange> ranges() {
        Map<ChannelName, SignalRange> ranges = new EnumMap<>(ChannelName.class);
        file.optional(InstrumentKeys.RANGE).ifPresent(section -> {
            for (Key key : InstrumentKeys.RANGE.keys()) {
                if (section.has(key)) {
                    ChannelName name = ChannelName.valueOf(key.name().toUpperCase(java.util.Locale.ROOT));
                    range(section, key, name).ifPresent(range -> ranges.put(name, range));
                    refuseWithoutChannel(section, key, name);
                }
            }
        });
        return ranges;
    }

    private void refuseWithoutChannel(SectionReader section, Key key, ChannelName name) {
        if (file.has(InstrumentKeys.CHANNELS) && !channelSection.has(ChannelsReader.key(name))) {
            section.problems()
                    .missing(
                            section.at(key),
                            section.section().heading() + " " + key.name(),
                            "there is no channel " + name.word(),
                            "the name of a channel in [channels]");
        }
    }

    private static Optional<SignalRange> range(SectionReader section, Key key, ChannelName name) {
        Optional<List<Node>> items = section.list(key);
        if (items.isEmpty()) {
            return Optional.empty();
        }
        if (items.get().size() != 2) {
            section.wrong(
                    key, "found a list of " + items.get().size(), key.type().words());
            return Optional.empty();
        }
        KeyType.Measured type =
                new KeyType.Measured(name.kind(), KeyType.Sign.NOT_NEGATIVE, name.kind() == QuantityKind.RATIO);
        OptionalDouble low = si(section.quantity(key, items.get().get(0), type));
        OptionalDouble high = si(section.quantity(key, items.get().get(1), type));
        if (low.isEmpty() || high.isEmpty()) {
            return Optional.empty();
        }
        if (low.getAsDouble() >= high.getAsDouble()) {
            section.wrong(key, "the first is not below the second", key.type().words());
            return Optional.empty();
        }
        return Optional.of(new SignalRange(low.getAsDouble(), high.getAsDouble()));
    }

    private static OptionalDouble si(Optional<Quantity> quantity) {
        return quantity.map(found -> OptionalDouble.of(found.si())).orElseGet(OptionalDouble::empty);
    }
}

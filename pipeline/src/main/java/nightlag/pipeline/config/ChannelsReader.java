package nightlag.pipeline.config;

import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import java.util.stream.Collectors;

/** Reads {@code [channels]} and checks that a layout has the channels it needs. */
final class ChannelsReader {
    static final List<ChannelName> DEFORMATIONS =
            List.of(ChannelName.STRAIN, ChannelName.ANGLE, ChannelName.DISPLACEMENT);
    static final List<ChannelName> LOADS = List.of(ChannelName.STRESS, ChannelName.TORQUE, ChannelName.FORCE);
    private static final List<ChannelName> GIVEN = List.of(
            ChannelName.STORAGE_MODULUS,
            ChannelName.LOSS_MODULUS,
            ChannelName.COMPLEX_MODULUS,
            ChannelName.PHASE_ANGLE,
            ChannelName.STORAGE_MODULUS_U,
            ChannelName.LOSS_MODULUS_U);

    private final SectionReader section;
    private final boolean numbersOnly;

    private ChannelsReader(SectionReader section, boolean numbersOnly) {
        this.section = section;
        this.numbersOnly = numbersOnly;
    }

    /** @param numbersOnly whether columns have no headers */
    static Map<ChannelName, Channel> read(SectionReader section, boolean numbersOnly) {
        ChannelsReader reader = new ChannelsReader(section, numbersOnly);
        Map<ChannelName, Channel> channels = new EnumMap<>(ChannelName.class);
        for (ChannelName name : ChannelName.values()) {
            if (section.has(key(name))) {
                reader.channel(name).ifPresent(channel -> channels.put(name, channel));
            }
        }
        return channels;
    }

    static Key key(ChannelName name) {
        return InstrumentKeys.CHANNELS.key(name.word()).orElseThrow();
    }

    private Optional<Channel> channel(ChannelName name) {
        Optional<SectionReader> inner = section.inner(key(name), InstrumentKeys.CHANNEL);
        if (inner.isEmpty()) {
            return Optional.empty();
        }
        SectionReader reader = inner.get();
        Optional<ColumnRef> column = column(reader, InstrumentKeys.COLUMN, numbersOnly);
        boolean signal = DEFORMATIONS.contains(name) || LOADS.contains(name);
        boolean raw = reader.has(InstrumentKeys.SENSITIVITY);
        QuantityKind cellKind = raw ? QuantityKind.VOLTAGE : name.kind();
        Optional<Unit> unit = unit(reader, InstrumentKeys.UNIT, cellKind);
        OptionalDouble sensitivity = raw ? sensitivity(reader, name) : OptionalDouble.empty();
        OptionalDouble zero = zero(reader, cellKind);
        Optional<Boolean> invert = reader.flag(InstrumentKeys.INVERT);
        OptionalDouble delay = reader.si(InstrumentKeys.DELAY);
        if (reader.has(InstrumentKeys.DELAY) && !signal) {
            reader.wrong(
                    InstrumentKeys.DELAY, "a delay of " + name.word() + " means nothing", "it on deformation or load");
        }
        if (raw && !signal && name != ChannelName.TEMPERATURE) {
            reader.wrong(
                    InstrumentKeys.SENSITIVITY,
                    "a sensitivity of " + name.word() + " means nothing",
                    "it on deformation, load or temperature");
        }
        if (column.isEmpty() || unit.isEmpty() || zero.isEmpty() || invert.isEmpty() || delay.isEmpty()) {
            return Optional.empty();
        }
        return Optional.of(new Channel(
                column.get(), unit.get(), sensitivity, zero.getAsDouble(), invert.get(), delay.getAsDouble()));
    }

    /** A column by header text or number. */
    static Optional<ColumnRef> column(SectionReader reader, Key key, boolean numbersOnly) {
        Optional<Node> node = reader.node(key);
        if (node.isEmpty()) {
            return Optional.empty();
        }
        if (node.get() instanceof Node.Scalar scalar && scalar.value() instanceof Long number) {
            if (number >= 1 && number <= Integer.MAX_VALUE) {
                return Optional.of(ColumnRef.numbered(Math.toIntExact(number)));
            }
        } else if (node.get() instanceof Node.Scalar scalar
                && scalar.value() instanceof String text
                && !text.isBlank()
                && !numbersOnly) {
            return Optional.of(ColumnRef.named(text.strip()));
        }
        reader.wrong(
                key,
                "found " + node.get().found(),
                numbersOnly
                        ? "a column number from 1, as header is \"none\""
                        : key.type().words());
        return Optional.empty();
    }

    static Optional<Unit> unit(SectionReader reader, Key key, QuantityKind kind) {
        if (key.required() && !reader.has(key)) {
            reader.missing(key, Units.allowed(kind));
            return Optional.empty();
        }
        return reader.text(key).flatMap(text -> accept(reader, key, Units.parse(text, kind)));
    }

    private static <T> Optional<T> accept(SectionReader reader, Key key, Parsed<T> parsed) {
        if (parsed instanceof Parsed.Refused<T> refused) {
            reader.wrong(key, refused.found(), refused.allowed());
        }
        return parsed.toOptional();
    }

    private static OptionalDouble sensitivity(SectionReader reader, ChannelName name) {
        Optional<String> text = reader.text(InstrumentKeys.SENSITIVITY);
        Optional<Quantity> quantity = text.flatMap(
                written -> accept(reader, InstrumentKeys.SENSITIVITY, Quantity.parseSensitivity(written, name.kind())));
        if (quantity.isPresent() && quantity.get().si() == 0) {
            reader.wrong(InstrumentKeys.SENSITIVITY, "found 0", "a quantity other than 0");
        }
        return quantity.map(found -> OptionalDouble.of(found.si())).orElseGet(OptionalDouble::empty);
    }

    private static OptionalDouble zero(SectionReader reader, QuantityKind cellKind) {
        if (!reader.has(InstrumentKeys.ZERO)) {
            return OptionalDouble.of(0);
        }
        // A zero of a thermometer is an error of its readings, so a difference.
        QuantityKind kind = cellKind == QuantityKind.TEMPERATURE ? QuantityKind.TEMPERATURE_DIFFERENCE : cellKind;
        KeyType.Measured type = new KeyType.Measured(kind, KeyType.Sign.ANY, kind == QuantityKind.RATIO);
        return reader.node(InstrumentKeys.ZERO)
                .flatMap(node -> reader.quantity(InstrumentKeys.ZERO, node, type))
                .map(quantity -> OptionalDouble.of(quantity.si()))
                .orElseGet(OptionalDouble::empty);
    }

    /** Checks that the layout finds the channels it needs; names are those in the file, right or wrong in themselves. */
    static void checkLayout(SectionReader section, Layout layout, Set<TagName> tags) {
        Set<ChannelName> present = java.util.Arrays.stream(ChannelName.values())
                .filter(name -> section.has(key(name)))
                .collect(Collectors.toSet());
        if (layout == Layout.MODULI) {
            checkModuli(section, present, tags);
        } else {
            checkWaveforms(section, present, tags, layout);
        }
    }

    private static void checkWaveforms(
            SectionReader section, Set<ChannelName> present, Set<TagName> tags, Layout layout) {
        if (!present.contains(ChannelName.TIME) && !tags.contains(TagName.SAMPLE_RATE)) {
            section.missing(key(ChannelName.TIME), "the channel time or the tag sample_rate");
        }
        exactlyOne(section, present, DEFORMATIONS);
        exactlyOne(section, present, LOADS);
        refuse(section, present, ChannelName.ANGLE, ChannelName.FORCE);
        refuse(section, present, ChannelName.DISPLACEMENT, ChannelName.TORQUE);
        for (ChannelName name : GIVEN) {
            if (present.contains(name)) {
                section.wrong(
                        key(name), "the layout " + layout.word() + " has no such channel", "it with layout \"moduli\"");
            }
        }
    }

    private static void exactlyOne(SectionReader section, Set<ChannelName> present, List<ChannelName> names) {
        List<ChannelName> there = names.stream().filter(present::contains).toList();
        String choices = names.stream().map(ChannelName::word).collect(Collectors.joining(", "));
        if (there.isEmpty()) {
            section.missing(key(names.get(0)), "exactly one of the channels " + choices);
        }
        for (ChannelName extra : there.subList(Math.min(1, there.size()), there.size())) {
            section.wrong(
                    key(extra),
                    "a second channel beside " + there.get(0).word(),
                    "exactly one of the channels " + choices);
        }
    }

    private static void refuse(SectionReader section, Set<ChannelName> present, ChannelName one, ChannelName other) {
        if (present.contains(one) && present.contains(other)) {
            section.wrong(
                    key(other),
                    other.word() + " and " + one.word() + " do not go together",
                    "torque with angle, force with displacement");
        }
    }

    private static void checkModuli(SectionReader section, Set<ChannelName> present, Set<TagName> tags) {
        if (!present.contains(ChannelName.FREQUENCY) && !tags.contains(TagName.FREQUENCY)) {
            section.missing(key(ChannelName.FREQUENCY), "the channel or the tag frequency");
        }
        if (!present.contains(ChannelName.TEMPERATURE) && !tags.contains(TagName.TEMPERATURE)) {
            section.missing(key(ChannelName.TEMPERATURE), "the channel or the tag temperature");
        }
        String choice = "storage_modulus and loss_modulus, or complex_modulus and phase_angle";
        boolean parts = present.contains(ChannelName.STORAGE_MODULUS) || present.contains(ChannelName.LOSS_MODULUS);
        boolean polar = present.contains(ChannelName.COMPLEX_MODULUS) || present.contains(ChannelName.PHASE_ANGLE);
        if (parts && polar) {
            ChannelName second = present.contains(ChannelName.COMPLEX_MODULUS)
                    ? ChannelName.COMPLEX_MODULUS
                    : ChannelName.PHASE_ANGLE;
            section.wrong(key(second), "the modulus is there a second time", choice);
        } else if (polar) {
            both(section, present, ChannelName.COMPLEX_MODULUS, ChannelName.PHASE_ANGLE);
        } else if (parts) {
            both(section, present, ChannelName.STORAGE_MODULUS, ChannelName.LOSS_MODULUS);
        } else {
            section.missing(key(ChannelName.STORAGE_MODULUS), choice);
        }
        both(section, present, ChannelName.STORAGE_MODULUS_U, ChannelName.LOSS_MODULUS_U);
        for (ChannelName name : List.of(
                ChannelName.TIME,
                ChannelName.ANGLE,
                ChannelName.DISPLACEMENT,
                ChannelName.STRESS,
                ChannelName.TORQUE,
                ChannelName.FORCE)) {
            if (present.contains(name)) {
                section.wrong(key(name), "the layout moduli has no such channel", "points already reduced");
            }
        }
    }

    private static void both(SectionReader section, Set<ChannelName> present, ChannelName one, ChannelName other) {
        if (present.contains(one) != present.contains(other)) {
            section.missing(
                    key(present.contains(one) ? other : one), one.word() + " and " + other.word() + " together");
        }
    }
}

package nightlag.pipeline.config;

import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import nightlag.stages.geometry.Corrections;
import nightlag.stages.geometry.MeasuringWall;

/** Reads {@code [corrections]}; the channels' own delays go in with them. */
final class CorrectionsReader {
    private final Optional<Corrections> corrections;

    /**
     * @param given the section, if it is there
     * @param channels the channels that could be read
     * @param named the channels the file names
     * @param layout the layout
     */
    CorrectionsReader(
            Optional<SectionReader> given, Map<ChannelName, Channel> channels, Set<ChannelName> named, Layout layout) {
        SectionReader section = given.orElseGet(() -> new SectionReader(
                InstrumentKeys.CORRECTIONS,
                new Node.Table(new At("", 0), Map.of()),
                "[corrections] ",
                new Problems(false)));
        OptionalDouble delay = section.si(InstrumentKeys.SIGNAL_DELAY);
        OptionalDouble inertia = section.si(InstrumentKeys.INERTIA);
        OptionalDouble friction = section.si(InstrumentKeys.FRICTION);
        OptionalDouble mass = section.si(InstrumentKeys.MOVING_MASS);
        OptionalDouble damping = section.si(InstrumentKeys.DAMPING);
        Optional<MeasuringWall> wall = section.word(InstrumentKeys.TORQUE_AT, MeasuringWall.class);
        boolean turns = named.contains(ChannelName.TORQUE) && named.contains(ChannelName.ANGLE);
        boolean pulls = named.contains(ChannelName.FORCE) && named.contains(ChannelName.DISPLACEMENT);
        OptionalDouble compliance = compliance(section, turns, pulls);
        if (layout == Layout.MODULI) {
            given.ifPresent(present -> present.problems()
                    .wrong(
                            present.at(),
                            "[corrections]",
                            "points already reduced cannot be corrected",
                            "no such section with layout moduli"));
        } else {
            refuseUnless(section, turns, "torque and angle", List.of(InstrumentKeys.INERTIA, InstrumentKeys.FRICTION));
            refuseUnless(
                    section,
                    pulls,
                    "force and displacement",
                    List.of(InstrumentKeys.MOVING_MASS, InstrumentKeys.DAMPING));
        }
        boolean complete = delay.isPresent()
                && inertia.isPresent()
                && friction.isPresent()
                && mass.isPresent()
                && damping.isPresent()
                && wall.isPresent()
                && compliance.isPresent();
        this.corrections = complete
                ? Optional.of(new Corrections(
                        delay(channels, ChannelsReader.DEFORMATIONS),
                        delay.getAsDouble() + delay(channels, ChannelsReader.LOADS),
                        inertia.getAsDouble(),
                        friction.getAsDouble(),
                        mass.getAsDouble(),
                        damping.getAsDouble(),
                        turns ? compliance.getAsDouble() : 0,
                        pulls ? compliance.getAsDouble() : 0,
                        wall.get()))
                : Optional.empty();
    }

    /** The corrections; empty where something in them is wrong. */
    Optional<Corrections> corrections() {
        return corrections;
    }

    private static double delay(Map<ChannelName, Channel> channels, List<ChannelName> names) {
        return names.stream()
                .filter(channels::containsKey)
                .mapToDouble(name -> channels.get(name).delayS())
                .sum();
    }

    private static OptionalDouble compliance(SectionReader section, boolean turns, boolean pulls) {
        Key key = InstrumentKeys.COMPLIANCE;
        if (!section.has(key)) {
            return OptionalDouble.of(0);
        }
        if (!turns && !pulls) {
            section.problems()
                    .missing(
                            section.at(key),
                            "[corrections] " + key.name(),
                            "the channels hold no load and movement that go together",
                            "it with the channels torque and angle, or force and displacement");
            return OptionalDouble.of(0);
        }
        QuantityKind kind = turns ? QuantityKind.ANGULAR_COMPLIANCE : QuantityKind.LINEAR_COMPLIANCE;
        return section.node(key)
                .flatMap(node ->
                        section.quantity(key, node, new KeyType.Measured(kind, KeyType.Sign.NOT_NEGATIVE, false)))
                .map(quantity -> OptionalDouble.of(quantity.si()))
                .orElseGet(OptionalDouble::empty);
    }

    private static void refuseUnless(SectionReader section, boolean there, String channels, List<Key> keys) {
        for (Key key : keys) {
            if (section.has(key) && !there) {
                section.problems()
                        .missing(
                                section.at(key),
                                "[corrections] " + key.name(),
                                "the channels are not " + channels,
                                "it with the channels " + channels);
            }
        }
    }
}

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
        // What corrects the other drive is left alone: a bench may name both.
        // Files of stress and strain leave open which of the two it is; a geometry may say so later.
        boolean turns = named.contains(ChannelName.TORQUE) || named.contains(ChannelName.ANGLE);
        boolean pulls = named.contains(ChannelName.FORCE) || named.contains(ChannelName.DISPLACEMENT);
        Compliance compliance = compliance(section, turns, pulls);
        if (layout == Layout.MODULI) {
            given.ifPresent(present -> present.problems()
                    .wrong(
                            present.at(),
                            "[corrections]",
                            "points already reduced cannot be corrected",
                            "no such section with layout moduli"));
        }
        boolean complete = delay.isPresent()
                && inertia.isPresent()
                && friction.isPresent()
                && mass.isPresent()
                && damping.isPresent()
                && wall.isPresent();
        this.corrections = complete
                ? Optional.of(new Corrections(
                        delay(channels, ChannelsReader.DEFORMATIONS),
                        delay.getAsDouble() + delay(channels, ChannelsReader.LOADS),
                        inertia.getAsDouble(),
                        friction.getAsDouble(),
                        mass.getAsDouble(),
                        damping.getAsDouble(),
                        compliance.angular(),
                        compliance.linear(),
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

    /**
     * What the frame gives, of which at most one is not 0.
     *
     * @param angular rad/(N·m)
     * @param linear m/N
     */
    private record Compliance(double angular, double linear) {}

    private static Compliance compliance(SectionReader section, boolean turns, boolean pulls) {
        Key key = InstrumentKeys.COMPLIANCE;
        if (!section.has(key)) {
            return new Compliance(0, 0);
        }
        Node node = section.node(key).orElseThrow();
        boolean linear = pulls || (!turns && isLinear(node));
        QuantityKind kind = linear ? QuantityKind.LINEAR_COMPLIANCE : QuantityKind.ANGULAR_COMPLIANCE;
        double value = section.quantity(key, node, new KeyType.Measured(kind, KeyType.Sign.NOT_NEGATIVE, false))
                .map(Quantity::si)
                .orElse(0.0);
        return linear ? new Compliance(0, value) : new Compliance(value, 0);
    }

    private static boolean isLinear(Node node) {
        return node instanceof Node.Scalar scalar
                && scalar.value() instanceof String text
                && Quantity.parse(text, QuantityKind.LINEAR_COMPLIANCE)
                        .toOptional()
                        .isPresent();
    }
}

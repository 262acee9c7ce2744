package nightlag.pipeline.config;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.stages.moduli.ScreeningPlan;
import nightlag.stages.moduli.Threshold;

/** Reads {@code [screening]}: for each flag one limit or two, the second further out. */
final class ScreeningReader {
    private final SectionReader section;

    private ScreeningReader(SectionReader section) {
        this.section = section;
    }

    /** The thresholds; empty where something in them is wrong. */
    static Optional<ScreeningPlan> read(SectionReader section) {
        ScreeningReader reader = new ScreeningReader(section);
        List<Optional<Threshold>> all = new ArrayList<>();
        for (Key key : GradeKeys.SCREENING.keys()) {
            all.add(reader.threshold(key));
        }
        if (!all.stream().allMatch(Optional::isPresent)) {
            return Optional.empty();
        }
        List<Threshold> read = all.stream().map(Optional::get).toList();
        return Optional.of(new ScreeningPlan(
                read.get(0),
                read.get(1),
                read.get(2),
                read.get(3),
                read.get(4),
                read.get(5),
                read.get(6),
                read.get(7),
                read.get(8),
                read.get(9),
                read.get(10),
                read.get(11),
                read.get(12)));
    }

    private Optional<Threshold> threshold(Key key) {
        Node node = section.node(key).orElseThrow();
        List<Node> items = node instanceof Node.Sequence sequence ? sequence.items() : List.of(node);
        if (items.isEmpty() || items.size() > 2) {
            section.wrong(key, "found " + node.found(), key.type().words());
            return Optional.empty();
        }
        OptionalDouble doubtful = number(key, items.get(0));
        OptionalDouble unusable = items.size() == 2 ? number(key, items.get(1)) : OptionalDouble.empty();
        if (doubtful.isEmpty() || (items.size() == 2 && unusable.isEmpty())) {
            return Optional.empty();
        }
        if (unusable.isPresent() && key.equals(GradeKeys.CLOCK)) {
            section.wrong(key, "a second number", "one number, as an uneven clock never makes a point unusable");
            return Optional.empty();
        }
        boolean below = key.equals(GradeKeys.MIN_CYCLES) || key.equals(GradeKeys.SNR);
        if (unusable.isPresent() && beyond(doubtful.getAsDouble(), unusable.getAsDouble(), below)) {
            section.wrong(
                    key,
                    "the second is " + (below ? "above" : "below") + " the first",
                    "[doubtful, unusable], the second " + (below ? "the smaller" : "the larger") + " one");
            return Optional.empty();
        }
        return Optional.of(new Threshold(doubtful.getAsDouble(), unusable));
    }

    private static boolean beyond(double doubtful, double unusable, boolean below) {
        return below ? unusable > doubtful : unusable < doubtful;
    }

    private OptionalDouble number(Key key, Node node) {
        if (!key.equals(GradeKeys.TEMPERATURE_WANDER)) {
            return section.real(key, node, KeyType.Sign.NOT_NEGATIVE);
        }
        KeyType.Measured type =
                new KeyType.Measured(QuantityKind.TEMPERATURE_DIFFERENCE, KeyType.Sign.NOT_NEGATIVE, false);
        return section.quantity(key, node, type)
                .map(quantity -> OptionalDouble.of(quantity.si()))
                .orElseGet(OptionalDouble::empty);
    }
}

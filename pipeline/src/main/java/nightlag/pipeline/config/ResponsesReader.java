package nightlag.pipeline.config;

import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import nightlag.stages.response.ResponsePlan;
import nightlag.stages.response.ResponsePlan.Controlled;
import nightlag.stages.response.ResponsePlan.Step;

/** Reads the sections {@code [[response]]}. */
final class ResponsesReader {
    private static final KeyType.Measured TEMPERATURE =
            new KeyType.Measured(QuantityKind.TEMPERATURE, KeyType.Sign.ANY, false);

    private ResponsesReader() {}

    /** Those that are right, in the order of the file. */
    static List<ResponsePlan> read(List<SectionReader> sections) {
        Set<String> names = new HashSet<>();
        List<ResponsePlan> responses = new ArrayList<>();
        for (SectionReader section : sections) {
            response(section, names).ifPresent(responses::add);
        }
        return responses;
    }

    private static Optional<ResponsePlan> response(SectionReader section, Set<String> names) {
        Optional<String> name = section.text(GradeKeys.RESPONSE_NAME).map(String::strip);
        if (name.isPresent() && !names.add(name.get())) {
            section.wrong(GradeKeys.RESPONSE_NAME, "a second response \"" + name.get() + "\"", "names that stand once");
        }
        Optional<List<Step>> temperatures = temperatures(section);
        boolean stress = section.has(GradeKeys.STRESS);
        boolean strain = section.has(GradeKeys.STRAIN);
        if (stress && strain) {
            section.wrong(GradeKeys.STRAIN, "stress and strain are both given", "exactly one of stress and strain");
        } else if (!stress && !strain) {
            section.missing(GradeKeys.STRESS, "exactly one of stress and strain");
        }
        Optional<List<Step>> stresses =
                stress ? steps(section, GradeKeys.STRESS, QuantityKind.STRESS) : Optional.empty();
        Optional<List<Step>> strains = strain ? steps(section, GradeKeys.STRAIN, QuantityKind.RATIO) : Optional.empty();
        OptionalDouble until = section.si(GradeKeys.UNTIL);
        Optional<List<Step>> controlled = stress ? stresses : strains;
        if (name.isEmpty() || temperatures.isEmpty() || controlled.isEmpty() || until.isEmpty()) {
            return Optional.empty();
        }
        double last = Math.max(lastStep(controlled.get()), lastStep(temperatures.get()));
        if (until.getAsDouble() <= last) {
            section.wrong(GradeKeys.UNTIL, "the prediction ends before the last step", "a time after every step");
        }
        return Optional.of(new ResponsePlan(
                name.get(),
                temperatures.get(),
                stress ? Controlled.STRESS : Controlled.STRAIN,
                controlled.get(),
                until.getAsDouble()));
    }

    private static double lastStep(List<Step> steps) {
        return steps.isEmpty() ? 0 : steps.get(steps.size() - 1).fromS();
    }

    /** No steps where nothing is said: the reference temperature. */
    private static Optional<List<Step>> temperatures(SectionReader section) {
        Key key = GradeKeys.RESPONSE_TEMPERATURE;
        if (!section.has(key)) {
            return Optional.of(List.of());
        }
        Node node = section.node(key).orElseThrow();
        if (node instanceof Node.Sequence) {
            return steps(section, key, QuantityKind.TEMPERATURE);
        }
        return section.quantity(key, node, TEMPERATURE).map(quantity -> List.of(new Step(0, quantity.si())));
    }

    private static Optional<List<Step>> steps(SectionReader section, Key key, QuantityKind kind) {
        Optional<List<Node>> items = section.list(key);
        if (items.isEmpty()) {
            return Optional.empty();
        }
        KeyType.Measured time = new KeyType.Measured(QuantityKind.TIME, KeyType.Sign.NOT_NEGATIVE, false);
        KeyType.Measured value = new KeyType.Measured(kind, KeyType.Sign.ANY, kind == QuantityKind.RATIO);
        List<Step> steps = new ArrayList<>();
        for (Node item : items.get()) {
            if (!(item instanceof Node.Sequence pair) || pair.items().size() != 2) {
                section.wrong(key, item, "found " + item.found(), key.type().words());
                continue;
            }
            Optional<Quantity> from = section.quantity(key, pair.items().get(0), time);
            Optional<Quantity> level = section.quantity(key, pair.items().get(1), value);
            if (from.isPresent() && level.isPresent()) {
                steps.add(new Step(from.get().si(), level.get().si()));
                checkOrder(section, key, item, steps);
            }
        }
        if (items.get().isEmpty()) {
            section.wrong(key, "there is no step", key.type().words());
        }
        return steps.size() == items.get().size() && !steps.isEmpty() ? Optional.of(steps) : Optional.empty();
    }

    private static void checkOrder(SectionReader section, Key key, Node item, List<Step> steps) {
        int last = steps.size() - 1;
        if (last == 0 && steps.get(0).fromS() != 0) {
            section.wrong(key, item, "the first step does not start at 0 s", "a first step from \"0 s\" on");
        } else if (last > 0 && steps.get(last).fromS() <= steps.get(last - 1).fromS()) {
            section.wrong(key, item, "the step does not start after the one before it", "times that rise");
        }
    }
}

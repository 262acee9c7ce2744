package nightlag.pipeline.config;

import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import nightlag.stages.acceptance.LimitPlan;
import nightlag.stages.acceptance.ShownUnit;

/** Reads the sections {@code [[limit]]}. */
final class LimitsReader {
    private LimitsReader() {}

    /**
     * Those that are right, in the order of the file.
     *
     * @param own what the grade defines for itself
     */
    static List<LimitPlan> read(List<SectionReader> sections, List<LimitSubject> own) {
        List<LimitSubject> subjects =
                Stream.concat(LimitSubject.known().stream(), own.stream()).toList();
        Set<String> columns = new HashSet<>();
        List<LimitPlan> limits = new ArrayList<>();
        for (SectionReader section : sections) {
            limit(section, subjects, columns).ifPresent(limits::add);
        }
        return limits;
    }

    private static Optional<LimitPlan> limit(SectionReader section, List<LimitSubject> subjects, Set<String> columns) {
        Optional<String> name = section.text(GradeKeys.LIMIT_NAME).map(String::strip);
        Optional<LimitSubject> property = section.oneOf(GradeKeys.PROPERTY, subjects, LimitSubject::word);
        OptionalDouble temperature = section.si(GradeKeys.LIMIT_TEMPERATURE);
        OptionalDouble frequency = section.si(GradeKeys.LIMIT_FREQUENCY);
        OptionalDouble coverage = section.real(GradeKeys.COVERAGE);
        if (!section.has(GradeKeys.MIN) && !section.has(GradeKeys.MAX)) {
            section.missing(GradeKeys.MIN, "min, max or both");
        }
        if (property.isEmpty()) {
            return Optional.empty();
        }
        if (property.get().ofPoints()) {
            for (Key key : List.of(GradeKeys.LIMIT_TEMPERATURE, GradeKeys.LIMIT_FREQUENCY)) {
                if (!section.has(key)) {
                    section.missing(key, "where the limit on " + property.get().word() + " holds");
                }
            }
        }
        Optional<Quantity> lowest = bound(section, GradeKeys.MIN, property.get());
        Optional<Quantity> highest = bound(section, GradeKeys.MAX, property.get());
        OptionalDouble min = value(lowest, property.get());
        OptionalDouble max = value(highest, property.get());
        if (min.isPresent() && max.isPresent() && min.getAsDouble() >= max.getAsDouble()) {
            section.wrong(GradeKeys.MAX, "max is not above min", "a max above min");
        }
        String conditions = conditions(section);
        String column = name.orElseGet(() -> (property.get().word() + " " + conditions).strip());
        if (!columns.add(column)) {
            section.wrong(
                    section.has(GradeKeys.LIMIT_NAME) ? GradeKeys.LIMIT_NAME : GradeKeys.PROPERTY,
                    "a second limit that is called \"" + column + "\"",
                    "a name that stands once, as it heads a column");
        }
        if (coverage.isEmpty()) {
            return Optional.empty();
        }
        return Optional.of(new LimitPlan(
                name,
                property.get().word(),
                temperature,
                frequency,
                conditions,
                min,
                max,
                property.get().unit(),
                lowest.or(() -> highest)
                        .map(property.get()::shown)
                        .orElseGet(() -> ShownUnit.plain(property.get().unit())),
                coverage.getAsDouble()));
    }

    private static Optional<Quantity> bound(SectionReader section, Key key, LimitSubject property) {
        if (!section.has(key)) {
            return Optional.empty();
        }
        KeyType.Measured type =
                new KeyType.Measured(property.kind(), KeyType.Sign.ANY, property.kind() == QuantityKind.RATIO);
        return section.node(key).flatMap(node -> section.quantity(key, node, type));
    }

    private static OptionalDouble value(Optional<Quantity> bound, LimitSubject property) {
        return bound.map(quantity -> OptionalDouble.of(property.value(quantity)))
                .orElseGet(OptionalDouble::empty);
    }

    /** Temperature and frequency as written. */
    private static String conditions(SectionReader section) {
        return Stream.of(GradeKeys.LIMIT_TEMPERATURE, GradeKeys.LIMIT_FREQUENCY)
                .filter(section::has)
                .flatMap(key -> section.node(key).stream())
                .filter(node -> node instanceof Node.Scalar)
                .map(node -> String.valueOf(((Node.Scalar) node).value()).strip())
                .collect(Collectors.joining(" "));
    }
}

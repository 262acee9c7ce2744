package nightlag.pipeline.config;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import java.util.TreeSet;
import java.util.regex.Pattern;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import nightlag.stages.moduli.Figure;
import nightlag.stages.moduli.PointQuantity;
import nightlag.stages.sweep.FigureMarkerPlan;
import nightlag.stages.sweep.FigureMarkerPlan.Along;
import nightlag.stages.sweep.FigureMarkerPlan.Scale;
import nightlag.stages.sweep.OwnFigures;

/** Reads the sections {@code [[derived]]} and {@code [[marker]]}: what a grade defines for itself. */
final class OwnFiguresReader {
    private static final Pattern NAME = Pattern.compile("[a-z][a-z0-9_]{0,63}");
    private static final String NAMES = "a name of small letters, digits and _, such as rutting_factor";
    /** Columns that no expression can name, and so no figure can be called by. */
    private static final List<String> OTHER_COLUMNS =
            List.of("grade", "lot", "specimen", "sweep", "point", "deformation", "quality", "flags");

    /** A figure and the unit that decides how its values are written in a grade file. */
    private record Known(Figure figure, OwnUnit unit) {}

    private final Set<String> taken;
    private final Map<String, Known> figures = new LinkedHashMap<>();
    private final List<Figure> derived = new ArrayList<>();
    private final List<FigureMarkerPlan> markers = new ArrayList<>();
    private final List<LimitSubject> subjects = new ArrayList<>();

    private OwnFiguresReader() {
        taken = Stream.of(
                        PointExpression.quantityNames().stream(),
                        LimitSubject.known().stream().map(LimitSubject::word),
                        OTHER_COLUMNS.stream())
                .flatMap(names -> names)
                .collect(Collectors.toCollection(TreeSet::new));
        for (PointQuantity quantity : PointQuantity.values()) {
            figures.put(
                    quantity.word(),
                    new Known(
                            Figure.column(quantity), OwnUnit.of(quantity.unit()).orElseThrow()));
        }
    }

    /** Reads both, figures first, as markers speak of them. */
    static OwnFiguresReader read(List<SectionReader> derived, List<SectionReader> markers) {
        OwnFiguresReader reader = new OwnFiguresReader();
        derived.forEach(reader::figure);
        markers.forEach(reader::marker);
        return reader;
    }

    /** Those that are right. */
    OwnFigures plan() {
        return new OwnFigures(derived, markers);
    }

    /** What a limit can be set on besides what every grade has. */
    List<LimitSubject> limitSubjects() {
        return List.copyOf(subjects);
    }

    private void figure(SectionReader section) {
        Optional<String> name = name(section, GradeKeys.DERIVED_NAME);
        Optional<OwnUnit> unit = section.oneOf(GradeKeys.DERIVED_UNIT, List.of(OwnUnit.values()), OwnUnit::symbol);
        Optional<String> text = section.text(GradeKeys.EXPRESSION);
        Optional<PointExpression.Compiled> compiled = text.flatMap(written -> {
            Parsed<PointExpression.Compiled> parsed = PointExpression.compile(written);
            if (parsed instanceof Parsed.Refused<PointExpression.Compiled> refused) {
                section.wrong(GradeKeys.EXPRESSION, refused.found(), refused.allowed());
            }
            return parsed.toOptional();
        });
        if (name.isEmpty() || unit.isEmpty()) {
            return;
        }
        // a figure that is wrong still lends its name to markers and limits, which are then not wrong as well
        Figure figure = new Figure(
                name.get(),
                unit.get().symbol(),
                text.orElse("").strip(),
                compiled.map(PointExpression.Compiled::uses).orElse(List.of()),
                compiled.map(PointExpression.Compiled::function).orElse(quantities -> Double.NaN));
        derived.add(figure);
        figures.put(name.get(), new Known(figure, unit.get()));
        subjects.add(LimitSubject.own(name.get(), unit.get(), true));
    }

    private void marker(SectionReader section) {
        Optional<String> name = name(section, GradeKeys.MARKER_NAME);
        Optional<Known> quantity = known(section, GradeKeys.MARKER_QUANTITY);
        Optional<Along> along = section.word(GradeKeys.ALONG, Along.class);
        Optional<Scale> scale = section.word(GradeKeys.SCALE, Scale.class);
        OptionalDouble temperature = section.si(GradeKeys.MARKER_TEMPERATURE);
        OptionalDouble frequency = section.si(GradeKeys.MARKER_FREQUENCY);
        Optional<Known> report = section.has(GradeKeys.REPORT) ? known(section, GradeKeys.REPORT) : Optional.empty();
        OptionalDouble reaches =
                quantity.isPresent() ? reaches(section, quantity.get()) : absentUnless(section, GradeKeys.REACHES);
        along.ifPresent(way -> {
            Key meaningless = way == Along.FREQUENCY ? GradeKeys.MARKER_FREQUENCY : GradeKeys.MARKER_TEMPERATURE;
            if (section.has(meaningless)) {
                String word = meaningless.name();
                section.wrong(
                        meaningless,
                        "a fixed " + word + " along " + word,
                        way == Along.FREQUENCY ? "temperature" : "frequency");
            }
        });
        if (scale.isPresent() && scale.get() == Scale.LOG && reaches.isPresent() && reaches.getAsDouble() <= 0) {
            section.wrong(
                    GradeKeys.REACHES,
                    "the value has no logarithm",
                    "a value above 0 in " + quantity.get().unit().symbol() + ", or scale = \"linear\"");
            return;
        }
        if (name.isEmpty() || quantity.isEmpty() || along.isEmpty() || scale.isEmpty() || reaches.isEmpty()) {
            return;
        }
        markers.add(new FigureMarkerPlan(
                name.get(),
                quantity.get().figure(),
                reaches.getAsDouble(),
                along.get(),
                scale.get(),
                temperature,
                frequency,
                report.map(Known::figure)));
        OwnUnit place = along.get() == Along.FREQUENCY ? OwnUnit.HERTZ : OwnUnit.CELSIUS;
        subjects.add(LimitSubject.own(name.get(), report.map(Known::unit).orElse(place), false));
    }

    private static OptionalDouble absentUnless(SectionReader section, Key key) {
        section.node(key);
        return OptionalDouble.empty();
    }

    private Optional<String> name(SectionReader section, Key key) {
        Optional<String> name = section.text(key);
        if (name.isEmpty()) {
            return name;
        }
        if (!NAME.matcher(name.get()).matches()) {
            section.wrong(key, "found \"" + Node.shown(name.get()) + "\"", NAMES);
            return Optional.empty();
        }
        if (!taken.add(name.get())) {
            section.wrong(
                    key,
                    "'" + name.get() + "' is taken",
                    "a name that no column, no marker and no other figure of this grade has");
            return Optional.empty();
        }
        return name;
    }

    private Optional<Known> known(SectionReader section, Key key) {
        return section.oneOf(key, List.copyOf(figures.entrySet()), Map.Entry::getKey)
                .map(Map.Entry::getValue);
    }

    private static OptionalDouble reaches(SectionReader section, Known quantity) {
        QuantityKind kind = quantity.unit().kind();
        KeyType.Measured type = new KeyType.Measured(kind, KeyType.Sign.ANY, kind == QuantityKind.RATIO);
        return section.node(GradeKeys.REACHES)
                .flatMap(node -> section.quantity(GradeKeys.REACHES, node, type))
                .map(found -> OptionalDouble.of(quantity.unit().number(found)))
                .orElseGet(OptionalDouble::empty);
    }
}

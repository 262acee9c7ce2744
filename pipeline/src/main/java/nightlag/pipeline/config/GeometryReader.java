package nightlag.pipeline.config;

import java.util.Arrays;
import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalInt;
import java.util.Set;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import nightlag.stages.geometry.DeformationMode;
import nightlag.stages.geometry.Dimension;
import nightlag.stages.geometry.GeometryKind;
import nightlag.stages.geometry.GeometrySpec;

/** Reads {@code [geometry]}. Dimensions may be missing: they may come as tags, which only a record knows. */
final class GeometryReader {
    private static final double RIGHT_ANGLE = Math.PI / 2;

    private final SectionReader section;
    private final GeometryKind kind;

    private GeometryReader(SectionReader section, GeometryKind kind) {
        this.section = section;
        this.kind = kind;
    }

    /** The geometry; empty where something in it is wrong. */
    static Optional<GeometrySpec> read(SectionReader section) {
        // Every value is read before the kind is looked at, so that all that is wrong is said.
        Map<Dimension, Double> dimensions = new EnumMap<>(Dimension.class);
        for (Dimension dimension : Dimension.values()) {
            section.si(key(dimension)).ifPresent(value -> dimensions.put(dimension, value));
        }
        OptionalInt spans = section.whole(GeometryKeys.SPANS);
        OptionalDouble endFactor = section.real(GeometryKeys.END_FACTOR);
        OptionalDouble poisson = section.real(GeometryKeys.POISSON);
        Optional<DeformationMode> deformation = section.word(GeometryKeys.DEFORMATION, DeformationMode.class);
        Optional<GeometryKind> kind = section.word(GeometryKeys.KIND, GeometryKind.class);
        if (kind.isEmpty() || spans.isEmpty() || endFactor.isEmpty() || deformation.isEmpty()) {
            return Optional.empty();
        }
        GeometryReader reader = new GeometryReader(section, kind.get());
        reader.refuseWhatMeansNothing();
        reader.checkValues(dimensions, poisson);
        return Optional.of(new GeometrySpec(
                kind.get(),
                dimensions,
                spans.getAsInt(),
                endFactor.getAsDouble(),
                poisson,
                kind.get() == GeometryKind.NONE ? deformation : Optional.empty()));
    }

    private static Key key(Dimension dimension) {
        return GeometryKeys.GEOMETRY.key(dimension.word()).orElseThrow();
    }

    /** The keys that mean something for a kind, the kind itself included. */
    static List<String> keysOf(GeometryKind kind) {
        Stream<String> options = switch (kind) {
            case CLAMPED_BENDING -> Stream.of(GeometryKeys.SPANS.name(), GeometryKeys.POISSON.name());
            case THREE_POINT_BENDING -> Stream.of(GeometryKeys.POISSON.name());
            case COAXIAL_CYLINDERS -> Stream.of(GeometryKeys.END_FACTOR.name());
            case NONE -> Stream.of(GeometryKeys.DEFORMATION.name());
            default -> Stream.empty();
        };
        return Stream.of(
                        Stream.of(GeometryKeys.KIND.name()),
                        GeometryRules.dimensions(kind).stream().map(Dimension::word),
                        options)
                .flatMap(words -> words)
                .toList();
    }

    /** Whether an inherited key stays when a file names a new kind: density and Poisson's ratio are the material's. */
    static boolean staysUnder(String key, Object newKind) {
        boolean material = key.equals(Dimension.DENSITY.word()) || key.equals(GeometryKeys.POISSON.name());
        return material
                && Arrays.stream(GeometryKind.values())
                        .anyMatch(kind ->
                                kind.word().equals(newKind) && keysOf(kind).contains(key));
    }

    private void refuseWhatMeansNothing() {
        List<String> meaningful = keysOf(kind);
        for (Key key : GeometryKeys.GEOMETRY.keys()) {
            if (section.has(key) && !meaningful.contains(key.name())) {
                section.wrong(
                        key,
                        "this means nothing for the kind " + kind.word(),
                        "for this kind " + String.join(", ", meaningful.subList(1, meaningful.size())));
            }
        }
        List<Set<Dimension>> sets = GeometryRules.completeSets(kind);
        boolean[] started = new boolean[sets.size()];
        for (int i = 0; i < sets.size(); i++) {
            for (Dimension dimension : sets.get(i)) {
                started[i] |= section.has(key(dimension))
                        && sets.stream().filter(set -> set.contains(dimension)).count() == 1;
            }
        }
        if (started.length == 2 && started[0] && started[1]) {
            Dimension second = sets.get(1).stream()
                    .filter(dimension -> !sets.get(0).contains(dimension))
                    .findFirst()
                    .orElseThrow();
            section.wrong(
                    key(second),
                    "this says the cross-section a second time",
                    "one of these sets: " + GeometryRules.inWords(kind));
        }
    }

    private void checkValues(Map<Dimension, Double> dimensions, OptionalDouble poisson) {
        if (poisson.isPresent() && !(poisson.getAsDouble() > -1 && poisson.getAsDouble() <= 0.5)) {
            section.wrong(GeometryKeys.POISSON, "found " + poisson.getAsDouble(), "a number above -1 up to 0.5");
        }
        Double cone = dimensions.get(Dimension.CONE_ANGLE);
        if (cone != null && cone >= RIGHT_ANGLE) {
            section.wrong(key(Dimension.CONE_ANGLE), "the cone is no cone", "an angle above 0° and below 90°");
        }
        refuseUnless(Dimension.OUTER_DIAMETER, Dimension.INNER_DIAMETER, true, dimensions);
        if (kind == GeometryKind.BAR_TORSION) {
            refuseUnless(Dimension.WIDTH, Dimension.THICKNESS, false, dimensions);
        }
    }

    private void refuseUnless(
            Dimension larger, Dimension smaller, boolean strictly, Map<Dimension, Double> dimensions) {
        Double large = dimensions.get(larger);
        Double small = dimensions.get(smaller);
        if (large == null || small == null) {
            return;
        }
        if (strictly ? large <= small : large < small) {
            section.wrong(
                    key(larger),
                    larger.word() + " is smaller than " + smaller.word() + (strictly ? ", or equal to it" : ""),
                    "the larger one in " + larger.word());
        }
    }

    /** The dimensions a kind still lacks when some are known, as words; empty text if it is complete. */
    static String lacking(GeometryKind kind, Set<Dimension> known) {
        List<Set<Dimension>> sets = GeometryRules.completeSets(kind);
        if (sets.stream().anyMatch(known::containsAll)) {
            return "";
        }
        return sets.stream()
                .map(set -> set.stream()
                        .filter(dimension -> !known.contains(dimension))
                        .map(Dimension::word)
                        .collect(Collectors.joining(" and ")))
                .distinct()
                .collect(Collectors.joining(", or "));
    }
}

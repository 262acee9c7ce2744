package nightlag.pipeline.config;

import java.util.ArrayList;
import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalInt;
import java.util.Set;
import nightlag.stages.geometry.DeformationMode;
import nightlag.stages.geometry.Dimension;
import nightlag.stages.geometry.Geometry;
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
        reader.refuseContradiction();
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

    private void refuseWhatMeansNothing() {
        List<String> meaningful = GeometryRules.keys(kind);
        for (Key key : GeometryKeys.GEOMETRY.keys()) {
            if (section.has(key) && !key.equals(GeometryKeys.KIND) && !meaningful.contains(key.name())) {
                String allowed = String.join(", ", meaningful);
                section.wrong(key, "this means nothing for the kind " + kind.word(), "for this kind " + allowed);
            }
        }
    }

    /** A cross-section said in two ways; dimensions that both ways share say neither. */
    private void refuseContradiction() {
        List<List<Dimension>> given = new ArrayList<>();
        List<Set<Dimension>> ways = Geometry.requiredDimensions(kind);
        for (Set<Dimension> way : ways) {
            given.add(way.stream()
                    .filter(dimension ->
                            ways.stream().filter(set -> set.contains(dimension)).count() == 1)
                    .filter(dimension -> section.has(key(dimension)))
                    .sorted()
                    .toList());
        }
        if (given.size() == 2 && given.stream().noneMatch(List::isEmpty)) {
            section.wrong(
                    key(given.get(1).get(0)),
                    given.get(1).get(0).word() + " and " + given.get(0).get(0).word() + " contradict each other",
                    GeometryRules.inWords(kind) + ", not both");
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
}

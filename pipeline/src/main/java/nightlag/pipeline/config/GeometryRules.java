package nightlag.pipeline.config;

import java.util.Arrays;
import java.util.Collection;
import java.util.EnumSet;
import java.util.List;
import java.util.Set;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import nightlag.stages.geometry.Dimension;
import nightlag.stages.geometry.Geometry;
import nightlag.stages.geometry.GeometryKind;

/** Which keys of {@code [geometry]} each kind has a use for. */
final class GeometryRules {
    private GeometryRules() {}

    /** Every dimension a kind can have. */
    static Set<Dimension> dimensions(GeometryKind kind) {
        Set<Dimension> all = EnumSet.noneOf(Dimension.class);
        Geometry.requiredDimensions(kind).forEach(all::addAll);
        all.addAll(Geometry.optionalDimensions(kind));
        return all;
    }

    /** The keys that mean something for a kind, but for the kind itself. */
    static List<String> keys(GeometryKind kind) {
        Stream<Key> options = switch (kind) {
            case CLAMPED_BENDING -> Stream.of(GeometryKeys.SPANS, GeometryKeys.POISSON);
            case THREE_POINT_BENDING -> Stream.of(GeometryKeys.POISSON);
            case COAXIAL_CYLINDERS -> Stream.of(GeometryKeys.END_FACTOR);
            case NONE -> Stream.of(GeometryKeys.DEFORMATION);
            case PARALLEL_PLATE, CONE_PLATE, ROD_TORSION, BAR_TORSION, TWO_LAYER_SHEAR, TENSION, COMPRESSION ->
                Stream.empty();
        };
        return Stream.concat(dimensions(kind).stream().map(Dimension::word), options.map(Key::name))
                .toList();
    }

    /** Whether an inherited key stays when a file names a new kind: density and Poisson's ratio are the material's. */
    static boolean staysUnder(String key, Object newKind) {
        boolean material = key.equals(Dimension.DENSITY.word()) || key.equals(GeometryKeys.POISSON.name());
        return material
                && Arrays.stream(GeometryKind.values())
                        .anyMatch(kind ->
                                kind.word().equals(newKind) && keys(kind).contains(key));
    }

    /** The dimensions a kind still lacks when some are known, as words; empty text if it is complete. */
    static String lacking(GeometryKind kind, Set<Dimension> known) {
        List<Set<Dimension>> sets = Geometry.requiredDimensions(kind);
        if (sets.stream().anyMatch(known::containsAll)) {
            return "";
        }
        return sets.stream()
                .map(set -> words(
                        set.stream()
                                .filter(dimension -> !known.contains(dimension))
                                .toList(),
                        " and "))
                .distinct()
                .collect(Collectors.joining(", or "));
    }

    /** {@code gap and area, or gap and length and width}, for a message. */
    static String inWords(GeometryKind kind) {
        return Geometry.requiredDimensions(kind).stream()
                .map(set -> words(set, " and "))
                .collect(Collectors.joining(", or "));
    }

    /** The kinds that have a dimension, for the documentation. */
    static String usersOf(Dimension dimension) {
        return Arrays.stream(GeometryKind.values())
                .filter(kind -> dimensions(kind).contains(dimension))
                .map(kind -> "`" + kind.word() + "`")
                .collect(Collectors.joining(", ", "", "."));
    }

    private static String words(Collection<Dimension> dimensions, String between) {
        return dimensions.stream().sorted().map(Dimension::word).collect(Collectors.joining(between));
    }
}

package nightlag.pipeline.config;

import java.util.Arrays;
import java.util.Locale;
import java.util.Optional;
import nightlag.stages.geometry.Dimension;

/** A fact about a record that is not a signal, and the kind of its quantity where it is one. */
public enum TagName {
    GRADE(null),
    LOT(null),
    SPECIMEN(null),
    SWEEP(null),
    POINT(null),
    MADE(null),
    TEMPERATURE(QuantityKind.TEMPERATURE),
    FREQUENCY(QuantityKind.FREQUENCY),
    SAMPLE_RATE(QuantityKind.FREQUENCY),
    ELAPSED(QuantityKind.TIME),
    DIAMETER(QuantityKind.LENGTH),
    GAP(QuantityKind.LENGTH),
    CONE_ANGLE(QuantityKind.ANGLE),
    LENGTH(QuantityKind.LENGTH),
    WIDTH(QuantityKind.LENGTH),
    THICKNESS(QuantityKind.LENGTH),
    INNER_DIAMETER(QuantityKind.LENGTH),
    OUTER_DIAMETER(QuantityKind.LENGTH),
    AREA(QuantityKind.AREA),
    DENSITY(QuantityKind.DENSITY);

    private final Optional<QuantityKind> kind;

    TagName(QuantityKind kind) {
        this.kind = Optional.ofNullable(kind);
    }

    /** The kind of its quantity; empty for text. */
    public Optional<QuantityKind> kind() {
        return kind;
    }

    /** The geometry's dimension of the same name, if it is one. */
    public Optional<Dimension> dimension() {
        return Arrays.stream(Dimension.values())
                .filter(dimension -> dimension.name().equals(name()))
                .findFirst();
    }

    /** The word in configuration. */
    public String word() {
        return name().toLowerCase(Locale.ROOT);
    }
}

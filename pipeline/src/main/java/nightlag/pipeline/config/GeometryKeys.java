package nightlag.pipeline.config;

import java.util.ArrayList;
import java.util.List;
import nightlag.pipeline.config.KeyType.Real;
import nightlag.pipeline.config.KeyType.Sign;
import nightlag.pipeline.config.KeyType.Whole;
import nightlag.stages.geometry.DeformationMode;
import nightlag.stages.geometry.Dimension;
import nightlag.stages.geometry.GeometryKind;

/** The keys of a geometry, in a grade file or an instrument file. */
final class GeometryKeys {
    static final Key KIND = Key.required("kind", KeyType.wordsOf(GeometryKind.class), "The kind of geometry.");
    static final Key SPANS = Key.withDefault(
            "spans",
            new Whole(1, 2),
            "1",
            "`clamped-bending`: clamped spans, 1 or 2; `length` is the free length of one.");
    static final Key END_FACTOR = Key.withDefault(
            "end_factor",
            new Real(Sign.POSITIVE),
            "1.0",
            "`coaxial-cylinders`: what the ends add to the torque, as a factor.");
    static final Key POISSON = Key.optional(
            "poisson",
            new Real(Sign.ANY),
            "Poisson's ratio, above −1 up to 0.5: corrects bending for the deflection by shear.");
    static final Key DEFORMATION = Key.withDefault(
            "deformation",
            KeyType.wordsOf(DeformationMode.class),
            "\"shear\"",
            "`none`: which modulus the file's stress and strain give.");

    static final Section GEOMETRY = new Section(
            "[geometry]",
            "The specimen and what holds it. Required where raw records are torque, angle, force or displacement. In an "
                    + "instrument file it takes the place of the grade's. A dimension may also come as a tag.",
            keys());

    private GeometryKeys() {}

    /** The kind of a dimension's quantity. */
    static QuantityKind kindOf(Dimension dimension) {
        return TagName.valueOf(dimension.name()).kind().orElseThrow();
    }

    private static List<Key> keys() {
        List<Key> keys = new ArrayList<>(List.of(KIND));
        for (Dimension dimension : Dimension.values()) {
            keys.add(Key.optional(
                    dimension.word(),
                    KeyType.quantity(kindOf(dimension), Sign.POSITIVE),
                    dimension == Dimension.DENSITY
                            ? "Density of the specimen: corrects shear for the specimen's own inertia."
                            : GeometryRules.usersOf(dimension)));
        }
        keys.addAll(List.of(SPANS, END_FACTOR, POISSON, DEFORMATION));
        return keys;
    }
}

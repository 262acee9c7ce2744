package nightlag.stages.geometry;

import java.util.Locale;

/** The kinds of geometry; {@code NONE} is a file that already holds stress and strain. */
public enum GeometryKind {
    PARALLEL_PLATE(Movement.TURN, DeformationMode.SHEAR),
    CONE_PLATE(Movement.TURN, DeformationMode.SHEAR),
    COAXIAL_CYLINDERS(Movement.TURN, DeformationMode.SHEAR),
    ROD_TORSION(Movement.TURN, DeformationMode.SHEAR),
    BAR_TORSION(Movement.TURN, DeformationMode.SHEAR),
    TWO_LAYER_SHEAR(Movement.LINE, DeformationMode.SHEAR),
    CLAMPED_BENDING(Movement.LINE, DeformationMode.EXTENSION),
    THREE_POINT_BENDING(Movement.LINE, DeformationMode.EXTENSION),
    TENSION(Movement.LINE, DeformationMode.EXTENSION),
    COMPRESSION(Movement.LINE, DeformationMode.EXTENSION),
    NONE(Movement.UNKNOWN, DeformationMode.SHEAR);

    private final Movement movement;
    private final DeformationMode usualMode;

    GeometryKind(Movement movement, DeformationMode usualMode) {
        this.movement = movement;
        this.usualMode = usualMode;
    }

    /** How it is driven. */
    public Movement movement() {
        return movement;
    }

    /** Which modulus it measures; for {@code NONE} the one taken where nothing is said. */
    public DeformationMode usualMode() {
        return usualMode;
    }

    /** The word in configuration. */
    public String word() {
        return name().toLowerCase(Locale.ROOT).replace('_', '-');
    }
}

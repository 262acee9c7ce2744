package nightlag.stages.geometry;

import java.util.Locale;

/** The kinds of geometry; {@code NONE} is a file that already holds stress and strain. */
public enum GeometryKind {
    PARALLEL_PLATE,
    CONE_PLATE,
    COAXIAL_CYLINDERS,
    ROD_TORSION,
    BAR_TORSION,
    TWO_LAYER_SHEAR,
    CLAMPED_BENDING,
    THREE_POINT_BENDING,
    TENSION,
    COMPRESSION,
    NONE;

    /** The word in configuration. */
    public String word() {
        return name().toLowerCase(Locale.ROOT).replace('_', '-');
    }
}

package nightlag.stages.geometry;

/** What a record holds for the deformation. */
public enum DeformationSignal {
    /** Strain (1). */
    STRAIN,
    /** Angle (rad). */
    ANGLE,
    /** Displacement (m). */
    DISPLACEMENT
}

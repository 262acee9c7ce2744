package nightlag.stages.geometry;

/** What a record holds for the load. */
public enum LoadSignal {
    /** Stress (Pa). */
    STRESS,
    /** Torque (N·m). */
    TORQUE,
    /** Force (N). */
    FORCE
}

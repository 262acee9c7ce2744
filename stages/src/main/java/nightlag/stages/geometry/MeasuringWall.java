package nightlag.stages.geometry;

/** The wall that carries the transducer; it decides how sample inertia shows. */
public enum MeasuringWall {
    FIXED,
    MOVING
}

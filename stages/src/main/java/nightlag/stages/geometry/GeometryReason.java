package nightlag.stages.geometry;

import nightlag.stages.fault.ReasonCode;

/** What can be wrong with a geometry, or keep a correction from being applied. */
enum GeometryReason implements ReasonCode {
    /** {0} kind, {1} dimensions that would do. */
    GEOMETRY_DIMENSION_MISSING("the geometry {0} needs {1}; neither the record nor the configuration gives that"),
    /** {0} dimension, {1} found, {2} unit. */
    GEOMETRY_DIMENSION_NOT_POSITIVE("the {0} is {1} {2}; it must be above zero and finite"),
    /** {0} kind, {1} alternatives. */
    GEOMETRY_DIMENSIONS_CONTRADICT("the geometry {0} takes {1}, but not both at once"),
    /** {0} found, rad. */
    GEOMETRY_CONE_ANGLE_TOO_LARGE("the cone_angle is {0} rad; it must be below a right angle (1.5708 rad)"),
    /** {0} outer, {1} inner diameter, m. */
    GEOMETRY_CYLINDERS_DO_NOT_FIT("the outer_diameter is {0} m; it must be larger than the inner_diameter, {1} m"),
    /** {0} found. */
    GEOMETRY_SPANS("spans is {0}; clamped bending has 1 or 2"),
    /** {0} found. */
    GEOMETRY_END_FACTOR("end_factor is {0}; it must be above zero and finite (1 is no end effect)"),
    /** {0} found. */
    GEOMETRY_POISSON("poisson is {0}; it must lie above -1 and not above 0.5"),
    /** {0} kind, {1} signals it takes, {2} signal found. */
    GEOMETRY_SIGNAL_DOES_NOT_FIT("the geometry {0} takes {1}, but the record holds {2}"),
    /** {0} names of the corrections. */
    GEOMETRY_CORRECTION_NEEDS_KIND(
            "{0} cannot be corrected in stress and strain without a geometry to go back to torque and angle, or force and displacement"),
    /** {0} apparent modulus, Pa, {1} ρω²h², Pa. */
    GEOMETRY_SAMPLE_INERTIA_NO_ROOT(
            "sample inertia cannot be taken out: with |G*| of {0} Pa as measured and an inertia stress of {1} Pa the wave in the gap is at its turning point");

    private final String template;

    GeometryReason(String template) {
        this.template = template;
    }

    @Override
    public String template() {
        return template;
    }
}

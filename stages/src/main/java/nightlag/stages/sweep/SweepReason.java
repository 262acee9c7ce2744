package nightlag.stages.sweep;

import nightlag.stages.fault.ReasonCode;

/** What a point owes to the sweep it belongs to. */
public enum SweepReason implements ReasonCode {
    /** {0} corrected over apparent modulus. */
    SWEEP_RIM_CORRECTED("parallel plates: the modulus at the rim is {0} of what their linear formula gives"),
    /** No parts. */
    SWEEP_NONLINEAR_BY_DESIGN("nonlinear: in an amplitude sweep this makes the point doubtful, not unusable"),
    /** How many points. */
    SWEEP_REPEATS_AVERAGED("the average of {0} repeats"),
    /** Specimen, sweep, how many unusable points, of how many. */
    SWEEP_UNUSABLE_LEFT_OUT(
            "specimen {0}, sweep {1}: {2} of {3} points left out of all that follows, unusable or without a frequency or a modulus"),
    /** How many. */
    SWEEP_SINGLE_POINTS(
            "points with a sweep of their own: {0}; they have their place in points, limits and isotherms, and no markers of a sweep, for which the tag sweep must give them one name"),
    /** Specimen, sweep, how many points, what varies or was asked for. */
    SWEEP_POINTS_IN_NONE("specimen {0}, sweep {1}: points that are part of no {3}: {2}"),
    /** Specimen, sweep, what varies, what they were taken for. */
    SWEEP_AMBIGUOUS(
            "specimen {0}, sweep {1}: {2} vary, taken as {3}; kind of the section sweeps in the grade file decides otherwise"),
    /** Specimen, sweep. */
    SWEEP_REPEATS_WITHOUT_TIME(
            "specimen {0}, sweep {1}: frequencies come again and again, taken as repeats of a frequency sweep; a time sweep needs the tag elapsed"),
    /** Specimen, sweep, how many legs. */
    SWEEP_RAMP_TURNS(
            "specimen {0}, sweep {1}: the ramp turns; its {2} legs of heating and cooling are taken as sweeps of their own, and the method of a marker says which"),
    /** Specimen, sweep. */
    SWEEP_MIXED_DEFORMATION(
            "specimen {0}, sweep {1}: points in shear and in extension, two different moduli, are taken as two sweeps"),
    /** Specimen, sweep, how many points, how many they became, how much larger u became. */
    SWEEP_REPEATS_TOGETHER(
            "specimen {0}, sweep {1}: {2} points, repeats averaged, became {3}; their scatter made u {4} times as large"),
    /** How many points. */
    SWEEP_AMPLITUDE_NOT_SUPERPOSED("points of amplitude sweeps kept out of the isotherms: {0}"),
    /** How many points. */
    SWEEP_RAMP_NOT_SUPERPOSED(
            "points of temperature ramps and time sweeps, which hold no isotherm, kept out of the isotherms: {0}");

    private final String template;

    SweepReason(String template) {
        this.template = template;
    }

    @Override
    public String template() {
        return template;
    }
}

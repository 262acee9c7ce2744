package nightlag.stages.superposition;

import nightlag.stages.fault.ReasonCode;

/** Why the shifts have no law, or not the one that was asked for. */
public enum ShiftLawReason implements ReasonCode {
    /** Isotherms there. */
    SHIFT_LAW_TOO_FEW_ISOTHERMS("no law of the shifts: {0} isotherm is superposed, at least 2 are needed"),
    /** Nothing. */
    SHIFT_LAW_COVARIANCE_SINGULAR(
            "no law of the shifts: their covariance is singular, the isotherms do not fix them one by one"),
    /** Isotherms there. */
    WLF_TOO_FEW_ISOTHERMS(
            "no WLF law: {0} isotherms are superposed, its two constants need at least 3; an Arrhenius law stands in its place"),
    /** Nothing. */
    WLF_STRAIGHT(
            "no WLF law: log a_T does not flatten towards higher temperatures, C2 would be infinite; an Arrhenius law stands"
                    + " in its place"),
    /** C2 and its uncertainty at the reference temperature, K. */
    WLF_NOT_FIXED(
            "no WLF law: the shifts bend too little over the temperatures measured to fix C2, {0} K with u {1} K; an Arrhenius"
                    + " law stands in its place"),
    /** Lowest temperature in °C. */
    WLF_POLE_IN_DATA(
            "no WLF law: its pole, where a_T is infinite, would lie within 1 K of {0} °C, the lowest temperature, or above; an"
                    + " Arrhenius law stands in its place"),
    /** Nothing. */
    WLF_NOT_FALLING(
            "no WLF law: the shifts do not fall as the temperature rises; an Arrhenius law stands in its place");

    private final String template;

    ShiftLawReason(String template) {
        this.template = template;
    }

    @Override
    public String template() {
        return template;
    }
}

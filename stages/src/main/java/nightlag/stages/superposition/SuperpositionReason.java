package nightlag.stages.superposition;

import nightlag.stages.fault.ReasonCode;

/** Why there is no master curve, or what is not in it. */
public enum SuperpositionReason implements ReasonCode {
    /** No parts. */
    SUPERPOSITION_NO_ISOTHERMS("no master curve: no point has a temperature, a frequency and moduli"),
    /** {0} °C reference, {1} and {2} °C lowest and highest isotherm superposed. */
    SUPERPOSITION_REFERENCE_OUTSIDE(
            "no master curve: the reference temperature of {0} °C is outside the isotherms superposed, {1} to {2} °C"),
    /** {0} rms distance from common curves, {1} tolerance, decades. */
    DOES_NOT_SUPERPOSE(
            "the isotherms do not superpose: they lie {0} decades (rms) off common curves, the tolerance is {1}; shifts, spectra,"
                    + " figures and predictions drawn from the master curve are in doubt"),
    /** {0} the isotherms with their verb, {1} frequencies each has, {2} frequencies it needs. */
    ISOTHERM_TOO_FEW_FREQUENCIES(
            "{0} left out of the master curve: {1} with moduli above zero, at least {2} are needed"),
    /** {0} °C of the isotherm. */
    ISOTHERM_WITHOUT_OVERLAP(
            "the isotherm at {0} °C is left out of the master curve: its curves do not overlap with the others''"),
    /** {0} moduli, {1} °C of the isotherm. */
    MODULI_WITHOUT_LOGARITHM("{0} moduli of the isotherm at {1} °C are not above zero and have no part in the shifts"),
    /** No parts. */
    VERTICAL_SHIFT_LIMITED(
            "vertical shifts are limited to a factor of 2: free ones would move isotherms apart until they no longer overlap"),
    /** {0} °C reference, {1} and {2} °C the isotherms beside it. */
    REFERENCE_INTERPOLATED(
            "no isotherm at the reference temperature of {0} °C and no law: shifts are moved to it along a straight line from"
                    + " {1} to {2} °C");

    private final String template;

    SuperpositionReason(String template) {
        this.template = template;
    }

    @Override
    public String template() {
        return template;
    }
}

package nightlag.stages.response;

import nightlag.stages.fault.ReasonCode;

/** Why a response cannot be predicted. */
public enum ResponseReason implements ReasonCode {
    /** Name of the response. */
    RESPONSE_NO_SPECTRUM("no response \"{0}\": there is no spectrum to predict it from"),
    /** Name, temperatures of the spectra, °C. */
    RESPONSE_SEVERAL_SPECTRA(
            "no response \"{0}\": it has no temperature of its own, and there are spectra at {1} °C but no reference temperature"),
    /** Name, temperature asked for, lowest and highest isotherm, °C. */
    RESPONSE_TEMPERATURE_OUTSIDE(
            "no response \"{0}\": {1} °C is outside the isotherms, {2} to {3} °C, and no law of the shift factors leads there"),
    /** Name, temperature asked for, temperature of the spectrum, °C. */
    RESPONSE_OTHER_TEMPERATURE(
            "no response \"{0}\": {1} °C is asked for, but the spectrum is of {2} °C and no isotherms say how times move"),
    /** Name, temperature asked for, °C. */
    RESPONSE_BEYOND_POLE("no response \"{0}\": {1} °C lies beyond the pole of the WLF law, where it says nothing");

    private final String template;

    ResponseReason(String template) {
        this.template = template;
    }

    @Override
    public String template() {
        return template;
    }
}

package nightlag.stages.sweep;

import nightlag.stages.fault.ReasonCode;

/** Why the data give no flow curve. */
public enum FlowCurveReason implements ReasonCode {
    /** Where, how many frequencies, how many are needed. */
    FLOW_CURVE_TOO_FEW_FREQUENCIES("{0}: no flow curve: too few different frequencies, {1} (at least {2} are needed)"),
    /** Where, lowest angular frequency in rad/s. */
    FLOW_CURVE_NO_LIQUID(
            "{0}: no flow curve: the storage modulus is above the loss modulus at the lowest frequency, {1} rad/s; this is no"
                    + " liquid, or one that flows more slowly than the data reach"),
    /** Where, law, which of its constants. */
    FLOW_LAW_NOT_FIXED(
            "{0}: no {1} law of the viscosity: the data do not fix its {2}; the viscosity thins too little, or over too short a"
                    + " window"),
    /** Where, law, zero-rate viscosity over the highest viscosity measured. */
    FLOW_LAW_NO_PLATEAU(
            "{0}: no {1} law of the viscosity: the data do not reach the plateau at low rates, whose viscosity would be {2} times"
                    + " the highest one measured");

    private final String template;

    FlowCurveReason(String template) {
        this.template = template;
    }

    @Override
    public String template() {
        return template;
    }
}

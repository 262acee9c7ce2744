package nightlag.stages.sweep;

import nightlag.stages.fault.ReasonCode;

/** What a point owes to the sweep it belongs to. */
public enum SweepReason implements ReasonCode {
    /** {0} corrected over apparent modulus. */
    SWEEP_RIM_CORRECTED("parallel plates: the modulus at the rim is {0} of what their linear formula gives"),
    /** No parts. */
    SWEEP_NONLINEAR_BY_DESIGN("nonlinear: in an amplitude sweep this makes the point doubtful, not unusable");

    private final String template;

    SweepReason(String template) {
        this.template = template;
    }

    @Override
    public String template() {
        return template;
    }
}

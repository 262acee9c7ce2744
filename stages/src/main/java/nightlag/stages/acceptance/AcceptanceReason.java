package nightlag.stages.acceptance;

import nightlag.stages.fault.ReasonCode;

/** Why a limit has no value to judge, or is judged as it is. */
public enum AcceptanceReason implements ReasonCode {
    /** How many. */
    ACCEPTANCE_ONLY_UNUSABLE("only unusable points there: {0}"),
    /** The figure. */
    ACCEPTANCE_OUTSIDE_THE_POINTS("no usable point with {0} there, nor on both sides of it"),
    /** The property. */
    ACCEPTANCE_NO_MARKER("the lot has no {0}"),
    /** How many, the property. */
    ACCEPTANCE_MARKER_ELSEWHERE("the lot has {0} of {1}, none of them there"),
    /** Nothing. */
    ACCEPTANCE_WITHOUT_U("judged without a guard band, as no uncertainty is known"),
    /** Nothing. */
    ACCEPTANCE_NOT_FINITE("its value is no finite number");

    private final String template;

    AcceptanceReason(String template) {
        this.template = template;
    }

    @Override
    public String template() {
        return template;
    }
}

package nightlag.stages.sweep;

import nightlag.stages.fault.ReasonCode;

/** Why a cure, or another series at several frequencies, shows no gel point. */
public enum GelReason implements ReasonCode {
    /** Where, how many frequencies, how many are needed, how many points each. */
    GEL_TOO_FEW_FREQUENCIES(
            "{0}: no gel point: frequencies of at least {3} points each: {1} (at least {2} are needed)"),
    /** Where. */
    GEL_NOT_CROSSED(
            "{0}: no gel point: the curves of tan delta at the different frequencies do not cross within the data"),
    /** Where. */
    GEL_LOSS_PEAK(
            "{0}: no gel point: the curves of tan delta meet where some rise and others fall, at a peak of the loss; that is a"
                    + " transition"),
    /** Where, rms spread of the loss angle in degrees. */
    GEL_NOT_ONE_POINT(
            "{0}: no gel point: the curves of tan delta cross one another, but not all in one point; the loss angles differ by"
                    + " {1} degrees where they come closest");

    private final String template;

    GelReason(String template) {
        this.template = template;
    }

    @Override
    public String template() {
        return template;
    }
}

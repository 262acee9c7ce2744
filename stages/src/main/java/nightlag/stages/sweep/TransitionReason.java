package nightlag.stages.sweep;

import nightlag.stages.fault.ReasonCode;

/**
 * Why a temperature sweep shows no transition of some kind. The first three parts are specimen, sweep and frequency in Hz,
 * where there is one; temperatures are in °C.
 */
public enum TransitionReason implements ReasonCode {
    /** {3} what was looked for, {4} temperatures with a usable value, {5} those needed. */
    TRANSITION_TOO_FEW_POINTS("specimen {0}, sweep {1}, {2} Hz: no {3}: usable at {4} temperatures, {5} are needed"),
    /** {3} what was looked for, {4} where the figure is highest. */
    TRANSITION_PEAK_AT_THE_EDGE(
            "specimen {0}, sweep {1}, {2} Hz: no {3}: the highest value is at the edge of the data, {4} °C, and no peak stands out inside"),
    /** {3} what was looked for, {4} standard uncertainties asked for. */
    TRANSITION_PEAK_NOT_CLEAR(
            "specimen {0}, sweep {1}, {2} Hz: no {3}: nothing rises by {4} standard uncertainties above both its sides"),
    /** {3} the temperature of the peak. */
    TRANSITION_PEAK_TOO_FLAT(
            "specimen {0}, sweep {1}, {2} Hz: a peak near {3} °C is too flat for its noise, or too near to the edge, to be placed"),
    /** {3} where it falls steepest. */
    TRANSITION_FALL_AT_THE_EDGE(
            "specimen {0}, sweep {1}, {2} Hz: no storage onset: the storage modulus falls steepest at the edge of the data, {3} °C"),
    /** {3} standard uncertainties asked for. */
    TRANSITION_NO_FALL(
            "specimen {0}, sweep {1}, {2} Hz: no storage onset: the storage modulus falls nowhere by {3} standard uncertainties of its slope"),
    /** {3} temperatures on the plateau, {4} its upper end, {5} temperatures needed. */
    TRANSITION_NO_GLASSY_LINE(
            "specimen {0}, sweep {1}, {2} Hz: no storage onset: {3} temperatures below {4} °C, where the glassy line ends; {5} are needed, over at least 0.8 of the distance from the onset to the steepest fall"),
    /** {2} kind of transition temperature, {3} frequencies it is known at, {4} those needed. */
    TRANSITION_TOO_FEW_FREQUENCIES(
            "specimen {0}, sweep {1}: no activation energy from the {2}: known at {3} frequencies, {4} are needed"),
    /** {2} kind of transition temperature, {3} fewest and {4} most at one frequency. */
    TRANSITION_PEAKS_DIFFER(
            "specimen {0}, sweep {1}: no activation energy from the {2}: {3} at one frequency, {4} at another; which belong together is not known"),
    /** {2} kind of transition temperature. */
    TRANSITION_NOT_RISING(
            "specimen {0}, sweep {1}: no activation energy from the {2}: it does not rise clearly with the frequency");

    private final String template;

    TransitionReason(String template) {
        this.template = template;
    }

    @Override
    public String template() {
        return template;
    }
}

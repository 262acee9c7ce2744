package nightlag.stages.sweep;

import nightlag.stages.fault.ReasonCode;

/** Why a marker of a sweep is absent. The first part says whose it would be. */
public enum MarkerReason implements ReasonCode {
    /** How many moduli. */
    MARKER_MODULI_HIDDEN(
            "{0}: points with a modulus that does not stand out from zero by 3 u, left out of its markers: {1}"),
    /** How many frequencies, how many are needed. */
    MARKER_TOO_FEW_FREQUENCIES("{0}: no crossover and no plateau, for it has {1} frequencies and {2} are needed"),
    /** Which modulus is the larger, lowest and highest angular frequency. */
    MARKER_NO_CROSSOVER("{0}: no crossover, {1} throughout, from {2} to {3} rad/s"),
    /** Lowest and highest angular frequency. */
    MARKER_CROSSOVER_UNCLEAR(
            "{0}: no crossover, for storage and loss modulus do not stand apart on both sides of one, from {1} to {2} rad/s"),
    /** Nothing. */
    MARKER_NO_PLATEAU(
            "{0}: no plateau modulus, for tan δ has no minimum below 1 inside the data that noise could not make"),
    /** How many strains, how many are needed. */
    MARKER_TOO_FEW_STRAINS("{0}: no linear limit and no crossover, for it has {1} strains and {2} are needed"),
    /** Smallest and largest strain. */
    MARKER_LESS_THAN_A_DECADE("{0}: no linear limit, for its strains, {1} to {2}, span less than a decade"),
    /** Largest strain. */
    MARKER_LIMIT_NOT_REACHED(
            "{0}: no linear limit, for |G*| stays within 5 % of the mean of its first decade up to a strain of {1}"),
    /** Smallest strain. */
    MARKER_LIMIT_BELOW(
            "{0}: no linear limit, for |G*| is not within 5 % of the mean of its first decade at the smallest strain, {1}"),
    /** Nothing. */
    MARKER_LIMIT_UNCLEAR(
            "{0}: no linear limit, for |G*| is too uncertain to tell where it leaves the mean of its first decade by 5 %"),
    /** Which modulus is the larger, smallest and largest strain. */
    MARKER_NO_STRAIN_CROSSOVER("{0}: no crossover stress, {1} throughout, for strains from {2} to {3}"),
    /** Smallest and largest strain. */
    MARKER_STRAIN_CROSSOVER_UNCLEAR(
            "{0}: no crossover stress, for storage and loss modulus do not stand apart on both sides of one, for strains"
                    + " from {1} to {2}");

    private final String template;

    MarkerReason(String template) {
        this.template = template;
    }

    @Override
    public String template() {
        return template;
    }
}

package nightlag.stages.waveform;

import nightlag.stages.fault.ReasonCode;

/** Why a record is not the mixture or the sweep of frequencies it is said to be, or what to know about its points. */
public enum MultiFrequencyReason implements ReasonCode {
    /** No parts. */
    MULTISINE_NO_TONES("layout multisine: no frequency stands out of the deformation''s noise"),
    /** {0} the frequency in Hz. */
    MULTISINE_ONE_TONE(
            "layout multisine: the deformation holds one frequency only, {0} Hz; layout single reads such a record"),
    /** {0} number of tones, {1} per cent explained, {2} per cent needed. */
    MULTISINE_NOT_TONES(
            "layout multisine: {0} frequencies explain {1} % of the deformation''s power above its drift; at "
                    + "least {2} % are needed, so the record holds something else"),
    /** {0} number of frequencies given, {1} per cent explained, {2} per cent needed, {3} lines found. */
    MULTISINE_OTHER_TONES(
            "layout multisine: the given frequencies ({0}) explain {1} % of the deformation''s power above its drift, and at "
                    + "least {2} % are needed; the lines found in it: {3}. Correct \"frequencies\", or leave it out to "
                    + "have them found"),
    /** {0} frequency in Hz, {1} distance in Hz, {2} per cent explained, {3} per cent needed. */
    MULTISINE_NEAR_ANOTHER(
            "layout multisine: within {1} Hz of {0} Hz the deformation holds another frequency, too near to be found, or that "
                    + "one changes; the frequencies found explain {2} % of its power and {3} % are needed. Give the "
                    + "frequencies, or record for longer"),
    /** {0}, {1} frequencies in Hz, {2} cycles of the record apart, {3} cycles wanted, {4} duration in s. */
    MULTISINE_NEAR_TONES(
            "layout multisine: {0} Hz and {1} Hz lie {2} cycles of the record apart and could not be told from one another; "
                    + "{3} cycles are enough, a record of {4} s. Give the frequencies, or see whether one changes in the "
                    + "course of the record"),
    /** {0} shape, {1} frequency in Hz. */
    MULTISINE_ONE_WAVE(
            "layout multisine: the deformation is one {0} wave of {1} Hz, its lines the odd multiples with the heights and "
                    + "phases of that shape; layout single reads such a record. If these are the driven frequencies, give them"),
    /** {0} frequency in Hz. */
    MULTISINE_TONE_ABSENT(
            "the deformation does not move at {0} Hz by more than its noise: the given frequency is not in it"),
    /** {0} cycles, {1} frequency in Hz. */
    MULTISINE_TOO_SHORT(
            "layout multisine: the record holds {0} cycles of {1} Hz, its slowest frequency; one is needed"),
    /** {0} samples a cycle, {1} frequency in Hz. */
    MULTISINE_TOO_COARSE(
            "layout multisine: {0} samples a cycle do not carry {1} Hz, its fastest frequency; more than two "
                    + "are needed"),
    /** {0}, {1} frequencies in Hz, {2} distance in Hz the record can tell apart. */
    MULTISINE_TOO_NEAR(
            "layout multisine: the record is too short to tell {0} Hz from {1} Hz; it parts frequencies {2} Hz "
                    + "from one another"),
    /** {0} order, {1} frequency in Hz. */
    MULTISINE_OVERTONE(
            "the overtone of order {0} of {1} Hz falls on this frequency; a nonlinear response would be part of the modulus"),
    /** {0} half waves found, {1} half waves needed. */
    CHIRP_TOO_FEW_WAVES("layout chirp: the deformation holds {0} half waves; at least {1} are needed"),
    /** {0} slowest and {1} fastest frequency in Hz, {2} factor needed. */
    CHIRP_ONE_FREQUENCY(
            "layout chirp: the deformation''s frequency stays between {0} and {1} Hz; a sweep covers at least "
                    + "a factor of {2}"),
    /** {0} rms deviation in per cent, {1} allowed, {2} slowest and {3} fastest frequency in Hz. */
    CHIRP_NOT_EXPONENTIAL(
            "layout chirp: the deformation''s frequency is off an exponential in time by {0} % (rms), between "
                    + "{2} and {3} Hz; at most {1} % make a chirp"),
    /** {0} bins found, {1} bins needed. */
    CHIRP_TOO_SHORT("layout chirp: the sweep fills {0} lines of the record''s transform; at least {1} are needed"),
    /** {0} points, {1} lower and {2} upper end in Hz. */
    CHIRP_TOO_COARSE(
            "layout chirp: the record does not carry {0} of the points between {1} and {2} Hz: too few lines of its "
                    + "transform lie around them"),
    /** {0} lower and {1} upper end in Hz. */
    CHIRP_BAND(
            "the sweep is trusted from {0} to {1} Hz, where its spectrum is at least half as strong as in its middle");

    private final String template;

    MultiFrequencyReason(String template) {
        this.template = template;
    }

    @Override
    public String template() {
        return template;
    }
}

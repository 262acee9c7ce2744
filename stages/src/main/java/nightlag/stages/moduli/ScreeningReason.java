package nightlag.stages.moduli;

import nightlag.stages.fault.ReasonCode;

/**
 * The figure and the threshold behind each flag. Parts: {0} figure, {1} threshold passed, {2} what the point becomes by it.
 */
public enum ScreeningReason implements ReasonCode {
    SCREENING_FEW_CYCLES(Flag.FEW_CYCLES, "{0} cycles used, {1} wanted"),
    SCREENING_CLIPPED(Flag.CLIPPED, "{0} of the samples stand at a channel''s limit or are spikes, the limit is {1}"),
    SCREENING_GAPS(Flag.GAPS, "{0} of the record is missing, the limit is {1}"),
    /** Of a creep record. */
    SCREENING_DECADES_MISSING(Flag.GAPS, "{0} of the decades of time after the steps is missing, the limit is {1}"),
    SCREENING_UNEVEN_CLOCK(Flag.UNEVEN_CLOCK, "the sampling interval scatters by {0} of its mean, the limit is {1}"),
    /**
     * Parts: {0} jump in s, {1} smallest step in cycles, {2} what the point becomes, {3} time in s, {4} step in cycles,
     * {5} samples left out.
     */
    SCREENING_CLOCK_JUMPED(
            Flag.UNEVEN_CLOCK,
            "the clock jumped by {0} s at {3} s, the oscillation did not: its phase steps by {4} cycles, the limit is {1};"
                    + " the longest stretch is used, {5} samples are left out"),
    SCREENING_WEAK_SIGNAL(Flag.WEAK_SIGNAL, "{0} dB from signal to noise, {1} dB wanted"),
    /** Parts: {0} dB, {1} dB wanted, {2} what the point becomes, {3} per cent, {4} orders fitted. */
    SCREENING_OVERTONES_LEFT(
            Flag.WEAK_SIGNAL,
            "{0} dB from signal to noise, {1} dB wanted; {3} % of what is left lies at orders above the {4} fitted, so it is"
                    + " the wave''s shape rather than noise"),
    SCREENING_DRIFTING(Flag.DRIFTING, "the mean moves by {0} of the amplitude, the limit is {1}"),
    /** Of a creep record. */
    SCREENING_REST_DRIFTING(
            Flag.DRIFTING,
            "the strain drifts before the load: going on so, it would come to {0} of the largest strain by the end of the"
                    + " record, the limit is {1}"),
    /** Of a creep record. */
    SCREENING_STRESS_NOT_HELD(
            Flag.UNSETTLED, "the stress changes by {0} of its step while it should be held, the limit is {1}"),
    SCREENING_UNSETTLED(Flag.UNSETTLED, "the modulus changes by {0} over the record, the limit is {1}"),
    /** Parts: {0} ratio, {1} limit, {2} what the point becomes, {3} relative u from the cycles, {4} relative u from the noise. */
    SCREENING_CYCLES_DISAGREE(
            Flag.UNSETTLED,
            "the modulus scatters from cycle to cycle {0} times as much as its noise, the limit is {1}: relative u {3} from"
                    + " the cycles, {4} from the noise"),
    /** Parts: {0} motion at the first sample over the amplitude, {1} limit, {2} what the point becomes. */
    SCREENING_SWEEP_IN_MOTION(
            Flag.UNSETTLED,
            "the record begins in motion, {0} of the sweep''s amplitude from rest, the limit is {1}: what the specimen"
                    + " remembers of the time before is in the slowest points; start the recorder before a tapered sweep"),
    SCREENING_NONLINEAR(Flag.NONLINEAR, "the third harmonic is {0} of the first, the limit is {1}"),
    SCREENING_EVEN_HARMONICS(Flag.EVEN_HARMONICS, "an even harmonic is {0} of the first, the limit is {1}"),
    SCREENING_INERTIA_HEAVY(
            Flag.INERTIA_HEAVY, "the load that inertia takes is {0} times the specimen''s own, the limit is {1}"),
    SCREENING_COMPLIANCE_HEAVY(Flag.COMPLIANCE_HEAVY, "the frame makes {0} of the whole movement, the limit is {1}"),
    /** Parts: {0} amplitude, {1} end of the range it lies beyond, {2} what the point becomes, {3} channel. */
    SCREENING_OUT_OF_RANGE(Flag.OUT_OF_RANGE, "the amplitude of the {3} is {0}, the range ends at {1} (SI)"),
    SCREENING_TEMPERATURE_WANDER(
            Flag.TEMPERATURE_WANDER, "the temperature moves by {0} K over the record, the limit is {1} K"),
    SCREENING_FREQUENCY_MISMATCH(
            Flag.FREQUENCY_MISMATCH, "the frequency is off the tagged one by {0} of it, the limit is {1}"),
    /** Parts: {0} share of the sweep's points, {1} limit, {2} what the point becomes. Raised when a lot is concluded. */
    SCREENING_SIGN_OR_DELAY(
            Flag.SIGN_OR_DELAY,
            "the loss modulus is below zero in {0} of the sweep''s points, the limit is {1}: the polarity of a channel or"
                    + " a delay is wrong"),
    /** Parts: {0} storage modulus in Pa, {1} loss modulus in Pa, {2} what the point becomes. */
    SCREENING_INVERTED(
            Flag.SIGN_OR_DELAY,
            "both moduli are below zero, {0} Pa and {1} Pa: the polarity of one of the channels is wrong");

    private final Flag flag;
    private final String template;

    ScreeningReason(Flag flag, String figures) {
        this.flag = flag;
        this.template = flag.word() + ": " + figures + " ({2})";
    }

    /** The flag it explains. */
    public Flag flag() {
        return flag;
    }

    @Override
    public String template() {
        return template;
    }
}

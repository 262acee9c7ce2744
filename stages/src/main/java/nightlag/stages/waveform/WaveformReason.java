package nightlag.stages.waveform;

import nightlag.stages.fault.ReasonCode;

/** Why no amplitudes can be taken out of a record, or what was done differently from the plan. */
public enum WaveformReason implements ReasonCode {
    /** No parts. */
    WAVEFORM_NO_SAMPLES("the record holds no samples"),
    /** {0} samples found, {1} samples needed. */
    WAVEFORM_TOO_FEW_SAMPLES("the record has {0} samples to use; at least {1} are needed"),
    /** {0} name of the channel, {1} number of the sample from 1. */
    WAVEFORM_NOT_FINITE("the {0} of sample {1} is not a finite number"),
    /** {0} number of the sample from 1. */
    WAVEFORM_TIME_NOT_RISING("the time of sample {0} is not after the one before it"),
    /** {0} name of the channel. */
    WAVEFORM_CONSTANT_CHANNEL("the {0} does not move: it holds one value throughout"),
    /** {0} name of the channel, {1} its largest or its smallest extent, {2} and {3} least and most. */
    WAVEFORM_OUT_OF_BOUNDS("the {0} spans {1} in SI units; numbers can be worked with from {2} to {3}"),
    /** {0} name of the channel. */
    WAVEFORM_NO_OSCILLATION("no oscillation is left in the {0} at the frequency of the record"),
    /** {0} start-up cycles, {1} cycles in the record. */
    WAVEFORM_ALL_START_UP("start_up_cycles leaves out {0} cycles, and the record holds only {1}"),
    /** {0} start-up cycles, {1} cycles from the beginning of the record to the end of the window. */
    WAVEFORM_WINDOW_IN_START_UP(
            "start_up_cycles leaves out the first {0} cycles of the record, and this window ends after {1}"),
    /** {0} cycles. */
    WAVEFORM_WINDOW_TOO_SHORT("amplitudes taken as constant within the window: {0} cycles do not tell how they change"),
    /** {0} tagged frequency in Hz. */
    WAVEFORM_BAD_TAG("the tagged frequency is {0} Hz; it must be above zero and finite"),
    /** No parts. */
    WAVEFORM_NOT_SEPARABLE("drift and oscillation cannot be told apart in so short a record"),
    /** {0} samples per cycle, {1} samples per cycle needed. */
    WAVEFORM_TOO_FEW_A_CYCLE(
            "the record has {0} samples a cycle; above {1} are needed, else a wave and its phase cannot be told from them"),
    /** {0} orders fitted, {1} orders wanted, {2} samples per cycle. */
    WAVEFORM_ORDERS_ABOVE_SAMPLING(
            "harmonics end at order {0} instead of {1}: {2} samples a cycle carry no order at or above half their number"),
    /** {0} orders fitted, {1} orders wanted, {2} samples, {3} cycles. */
    WAVEFORM_ORDERS_NOT_SEPARABLE(
            "harmonics end at order {0} instead of {1}: {2} samples over {3} cycles do not tell more apart"),
    /** No parts. */
    WAVEFORM_NO_TAG("frequency_from is \"tag\", but no frequency is tagged; it was taken from the signal"),
    /** {0} name of the channel. */
    WAVEFORM_POOLED_NOISE(
            "too few free bins beside the fundamental of the {0}: its noise is that of all residuals together"),
    /** {0} samples. */
    WAVEFORM_SPIKES_LEFT_OUT("{0} isolated spikes left out"),
    /** {0} samples, {1} samples left out with their neighbours. */
    WAVEFORM_CLIPPED_LEFT_OUT("{0} samples stand at a channel''s limit; {1} left out with one on either side"),
    /** {0} rows. */
    WAVEFORM_ROWS_MISSING("{0} rows without a value in a needed column");

    private final String template;

    WaveformReason(String template) {
        this.template = template;
    }

    @Override
    public String template() {
        return template;
    }
}

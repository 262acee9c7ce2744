package nightlag.stages.moduli;

import nightlag.stages.fault.ReasonCode;

/** Why a record of steps of stress gives no creep curve, or what is worth knowing about it. */
public enum CreepReason implements ReasonCode {
    /** {0} samples found, {1} samples needed. */
    CREEP_TOO_FEW_SAMPLES("the record has {0} samples; at least {1} are needed for a creep curve"),
    /** {0} channel, {1} number of the sample from 1. */
    CREEP_NOT_FINITE("the {0} of sample {1} is not a finite number"),
    /** {0} number of the sample from 1. */
    CREEP_TIME_NOT_RISING("the time of sample {0} is not after the one before it"),
    /** {0} extent of the stress, Pa, {1} its noise, Pa. */
    CREEP_NO_STEP("no step of the load is found: the stress stays within {0} Pa, its noise is {1} Pa"),
    /** No parts. */
    CREEP_NEVER_SETTLES("the stress moves but never settles at a level: no step of the load is found"),
    /** No parts. */
    CREEP_NO_READINGS("no samples are left after the steps of the stress once it has settled"),
    /** {0} times left out, s. */
    CREEP_RAMP_LEFT_OUT("left out after each step while the stress settles, and as long again: {0}"),
    /** No parts. */
    CREEP_BEGINS_UNDER_LOAD(
            "the record begins under load: the first step found is a recovery, and there is no creep before it to read"),
    /** {0} samples. */
    CREEP_SPIKES_LEFT_OUT("{0} isolated spikes of the strain left out"),
    /** {0} correlation of neighbouring samples, {1} factor. */
    CREEP_NOISE_CORRELATED(
            "noise of neighbouring samples goes together by {0}: uncertainties of means are {1} times as large"),
    /** {0} number of steps. */
    CREEP_LATER_LOAD("{0} load steps: after the first, what earlier steps still do is in the compliance"),
    /** {0} rows. */
    CREEP_ROWS_MISSING("{0} rows without a value in a needed column");

    private final String template;

    CreepReason(String template) {
        this.template = template;
    }

    @Override
    public String template() {
        return template;
    }
}

package nightlag.stages.moduli;

import nightlag.stages.fault.ReasonCode;

/** What can be wrong with a modulus. */
public enum ModuliReason implements ReasonCode {
    /** {0} storage modulus, {1} loss modulus, Pa. */
    MODULI_NOT_FINITE("the modulus is not a finite number (storage {0} Pa, loss {1} Pa)"),
    /** No parts. */
    MODULI_ZERO("the modulus is zero"),
    /** {0} frequency, Hz. */
    MODULI_FREQUENCY_NOT_POSITIVE("the frequency is {0} Hz; it must be above zero and finite"),
    /** {0} tagged temperature, {1} mean of the channel, °C. */
    MODULI_TAGGED_TEMPERATURE_OFF(
            "the tag says {0} °C, the channel {1} °C: the point stands at the channel''s, its isotherm is that of the tag"),
    /** {0} loss modulus, Pa. */
    MODULI_LOSS_NEGATIVE(
            "the loss modulus is {0} Pa, below zero: a channel may be inverted, a delay wrong, or the inertia off"),
    /** {0} storage modulus, Pa. */
    MODULI_STORAGE_NEGATIVE(
            "the storage modulus is {0} Pa, below zero: a channel may be inverted, a delay wrong, or the inertia off");

    private final String template;

    ModuliReason(String template) {
        this.template = template;
    }

    @Override
    public String template() {
        return template;
    }
}

package nightlag.pipeline.config;

import java.util.Locale;

/** What a channel of a raw file carries, and the kind of its quantity. */
public enum ChannelName {
    TIME(QuantityKind.TIME),
    STRAIN(QuantityKind.RATIO),
    ANGLE(QuantityKind.ANGLE),
    DISPLACEMENT(QuantityKind.LENGTH),
    STRESS(QuantityKind.STRESS),
    TORQUE(QuantityKind.TORQUE),
    FORCE(QuantityKind.FORCE),
    TEMPERATURE(QuantityKind.TEMPERATURE),
    FREQUENCY(QuantityKind.FREQUENCY),
    STORAGE_MODULUS(QuantityKind.STRESS),
    LOSS_MODULUS(QuantityKind.STRESS),
    COMPLEX_MODULUS(QuantityKind.STRESS),
    PHASE_ANGLE(QuantityKind.ANGLE),
    STORAGE_MODULUS_U(QuantityKind.STRESS),
    LOSS_MODULUS_U(QuantityKind.STRESS);

    private final QuantityKind kind;

    ChannelName(QuantityKind kind) {
        this.kind = kind;
    }

    /** The kind of its quantity. */
    public QuantityKind kind() {
        return kind;
    }

    /** The word in configuration. */
    public String word() {
        return name().toLowerCase(Locale.ROOT);
    }
}

package nightlag.pipeline.config;

import java.util.Locale;

/** What a limit can be set on: the quantities of a point and the markers, each with the kind of its quantity. */
enum LimitProperty {
    STRAIN_AMPLITUDE(QuantityKind.RATIO, true),
    STRESS_AMPLITUDE(QuantityKind.STRESS, true),
    STORAGE_MODULUS(QuantityKind.STRESS, true),
    LOSS_MODULUS(QuantityKind.STRESS, true),
    COMPLEX_MODULUS(QuantityKind.STRESS, true),
    PHASE_ANGLE(QuantityKind.ANGLE, true),
    TAN_DELTA(QuantityKind.RATIO, true),
    COMPLEX_VISCOSITY(QuantityKind.VISCOSITY, true),
    RELATIVE_THIRD_HARMONIC(QuantityKind.RATIO, true),
    CROSSOVER_ANGULAR_FREQUENCY(QuantityKind.FREQUENCY, false),
    CROSSOVER_MODULUS(QuantityKind.STRESS, false),
    CROSSOVER_STRESS(QuantityKind.STRESS, false),
    CROSSOVER_STRAIN(QuantityKind.RATIO, false),
    LINEAR_STRAIN_LIMIT(QuantityKind.RATIO, false),
    ZERO_SHEAR_VISCOSITY(QuantityKind.VISCOSITY, false),
    STEADY_STATE_COMPLIANCE(QuantityKind.COMPLIANCE_OF_MATERIAL, false),
    PLATEAU_MODULUS(QuantityKind.STRESS, false),
    EQUILIBRIUM_MODULUS(QuantityKind.STRESS, false),
    INSTANTANEOUS_MODULUS(QuantityKind.STRESS, false),
    INSTANTANEOUS_COMPLIANCE(QuantityKind.COMPLIANCE_OF_MATERIAL, false),
    MEAN_RELAXATION_TIME(QuantityKind.TIME, false),
    MEAN_RETARDATION_TIME(QuantityKind.TIME, false),
    EQUILIBRIUM_COMPLIANCE(QuantityKind.COMPLIANCE_OF_MATERIAL, false),
    WLF_C1(QuantityKind.RATIO, false),
    WLF_C2(QuantityKind.TEMPERATURE_DIFFERENCE, false),
    ACTIVATION_ENERGY(QuantityKind.ENERGY_PER_MOLE, false),
    GLASS_TRANSITION_STORAGE_ONSET(QuantityKind.TEMPERATURE, false),
    GLASS_TRANSITION_LOSS_PEAK(QuantityKind.TEMPERATURE, false),
    GLASS_TRANSITION_TAN_DELTA_PEAK(QuantityKind.TEMPERATURE, false),
    GEL_TIME(QuantityKind.TIME, false),
    GEL_TEMPERATURE(QuantityKind.TEMPERATURE, false),
    GEL_EXPONENT(QuantityKind.RATIO, false),
    CROSS_ZERO_RATE_VISCOSITY(QuantityKind.VISCOSITY, false),
    CROSS_INFINITE_RATE_VISCOSITY(QuantityKind.VISCOSITY, false),
    CROSS_TIME(QuantityKind.TIME, false),
    CROSS_EXPONENT(QuantityKind.RATIO, false),
    CARREAU_YASUDA_ZERO_RATE_VISCOSITY(QuantityKind.VISCOSITY, false),
    CARREAU_YASUDA_INFINITE_RATE_VISCOSITY(QuantityKind.VISCOSITY, false),
    CARREAU_YASUDA_TIME(QuantityKind.TIME, false),
    CARREAU_YASUDA_WIDTH(QuantityKind.RATIO, false),
    CARREAU_YASUDA_EXPONENT(QuantityKind.RATIO, false),
    SUPERPOSITION_MISFIT(QuantityKind.RATIO, false),
    KRAMERS_KRONIG_MISFIT(QuantityKind.RATIO, false);

    private final QuantityKind kind;
    private final boolean ofPoints;

    LimitProperty(QuantityKind kind, boolean ofPoints) {
        this.kind = kind;
        this.ofPoints = ofPoints;
    }

    QuantityKind kind() {
        return kind;
    }

    /** Whether it is a quantity of the points, which needs a temperature and a frequency. */
    boolean ofPoints() {
        return ofPoints;
    }

    String word() {
        return name().toLowerCase(Locale.ROOT);
    }

    /** The unit its values stand in: SI without prefix, °C for a temperature, rad/s for an angular frequency, ° for an angle. */
    String unit() {
        return switch (kind) {
            case TEMPERATURE -> "°C";
            case FREQUENCY -> "rad/s";
            case ANGLE -> "°";
            default -> kind.si();
        };
    }
}

package nightlag.pipeline.config;

/** What a number stands for; it decides which units are allowed. SI inside, frequencies in Hz, temperatures in K. */
public enum QuantityKind {
    TIME("s"),
    /** Hz or rad/s, never confused: rad/s is divided by 2π. */
    FREQUENCY("Hz"),
    ANGLE("rad"),
    LENGTH("m"),
    AREA("m²"),
    DENSITY("kg/m³"),
    TORQUE("N·m"),
    FORCE("N"),
    /** Stress and modulus. */
    STRESS("Pa"),
    /** Strain, tan δ and other pure numbers. */
    RATIO("1"),
    TEMPERATURE("K"),
    /** A difference of temperatures; °C is refused. */
    TEMPERATURE_DIFFERENCE("K"),
    EXPANSION("1/K"),
    VISCOSITY("Pa·s"),
    COMPLIANCE_OF_MATERIAL("1/Pa"),
    ENERGY_PER_MOLE("J/mol"),
    INERTIA("kg·m²"),
    FRICTION("N·m·s"),
    MASS("kg"),
    DAMPING("N·s/m"),
    ANGULAR_COMPLIANCE("rad/(N·m)"),
    LINEAR_COMPLIANCE("m/N"),
    VOLTAGE("V");

    private final String si;

    QuantityKind(String si) {
        this.si = si;
    }

    /** The SI unit values of this kind are held in. */
    public String si() {
        return si;
    }
}

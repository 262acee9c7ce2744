package nightlag.pipeline.config;

import java.util.List;

/** What a number stands for; it decides which units are allowed. SI inside, frequencies in Hz, temperatures in K. */
public enum QuantityKind {
    TIME("s", "a time", "s ms min h d"),
    /** Hz or rad/s, never confused: rad/s is divided by 2π. */
    FREQUENCY("Hz", "a frequency", "Hz mHz rad/s"),
    ANGLE("rad", "an angle", "rad mrad ° deg"),
    LENGTH("m", "a length", "mm µm cm m"),
    AREA("m²", "an area", "mm² cm² m²"),
    DENSITY("kg/m³", "a density", "kg/m³ g/cm³"),
    TORQUE("N·m", "a torque", "N·m mN·m µN·m"),
    FORCE("N", "a force", "N mN kN"),
    /** Stress and modulus. */
    STRESS("Pa", "a stress or modulus", "Pa kPa MPa GPa"),
    /** Strain, tan δ and other pure numbers. */
    RATIO("1", "a pure number", "1 %"),
    TEMPERATURE("K", "a temperature", "°C degC Cel K"),
    /** A difference of temperatures; °C is refused. */
    TEMPERATURE_DIFFERENCE("K", "a temperature difference", "K mK"),
    EXPANSION("1/K", "a thermal expansion", "1/K"),
    VISCOSITY("Pa·s", "a viscosity", "Pa·s mPa·s kPa·s"),
    COMPLIANCE_OF_MATERIAL("1/Pa", "a compliance", "1/Pa 1/MPa"),
    ENERGY_PER_MOLE("J/mol", "an energy per mole", "kJ/mol J/mol"),
    INERTIA("kg·m²", "a moment of inertia", "kg·m² g·cm² µN·m·s²"),
    FRICTION("N·m·s", "a rotary friction", "N·m·s µN·m·s N·m·s/rad"),
    MASS("kg", "a mass", "kg g"),
    DAMPING("N·s/m", "a damping", "N·s/m"),
    ANGULAR_COMPLIANCE("rad/(N·m)", "a torsional compliance", "rad/(N·m) mrad/(N·m)"),
    LINEAR_COMPLIANCE("m/N", "a linear compliance", "µm/N m/N"),
    VOLTAGE("V", "a voltage", "V mV");

    private final String si;
    private final String noun;
    private final String examples;

    QuantityKind(String si, String noun, String examples) {
        this.si = si;
        this.noun = noun;
        this.examples = examples;
    }

    /** The SI unit values of this kind are held in. */
    public String si() {
        return si;
    }

    /** What it is called in a sentence, with its article. */
    public String noun() {
        return noun;
    }

    /** What it is called, without an article. */
    public String bareNoun() {
        return noun.substring(noun.indexOf(' ') + 1);
    }

    /** Some units people write it in, the usual one first. */
    public List<String> examples() {
        return List.of(examples.split(" "));
    }
}

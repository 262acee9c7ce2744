package nightlag.stages.moduli;

import java.util.Locale;

/** Why a point is not sound, in the order in which flags are listed. */
public enum Flag {
    FEW_CYCLES,
    CLIPPED,
    GAPS,
    UNEVEN_CLOCK,
    WEAK_SIGNAL,
    DRIFTING,
    UNSETTLED,
    NONLINEAR,
    EVEN_HARMONICS,
    INERTIA_HEAVY,
    COMPLIANCE_HEAVY,
    OUT_OF_RANGE,
    TEMPERATURE_WANDER,
    FREQUENCY_MISMATCH,
    SIGN_OR_DELAY;

    /** The word in tables. */
    public String word() {
        return name().toLowerCase(Locale.ROOT).replace('_', '-');
    }
}

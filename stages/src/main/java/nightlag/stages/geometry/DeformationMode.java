package nightlag.stages.geometry;

import java.util.Locale;

/** Which modulus a geometry measures. */
public enum DeformationMode {
    /** G. */
    SHEAR,
    /** E. */
    EXTENSION;

    /** The word in tables and configuration. */
    public String word() {
        return name().toLowerCase(Locale.ROOT);
    }
}

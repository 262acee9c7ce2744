package nightlag.stages;

import nightlag.stages.fault.ReasonCode;

/** What could not be concluded about a lot, and why. */
public enum ConclusionReason implements ReasonCode {
    /** Nothing. */
    CURVE_NO_POINTS(
            "no master curve and no spectrum: the lot has no usable point with a frequency at a temperature that rests"),
    /** How many temperatures. */
    CURVE_SEVERAL_TEMPERATURES(
            "no spectrum: frequency sweeps at {0} temperatures and no reference temperature to bring them to"),
    /** Mean temperature of the isotherm and reference temperature, °C. */
    CURVE_MEASURED_BESIDE_REFERENCE(
            "what is said to hold at the reference temperature {1} °C comes from points measured at {0} °C, not shifted"),
    /** Nothing. */
    CURVE_MIXED_DEFORMATION(
            "no master curve and no spectrum: the lot holds points in shear and in extension, two different moduli"),
    /** How many curves. */
    CREEP_WITHOUT_TEMPERATURE("{0} creep curves have no temperature and are left out of the spectrum"),
    /** Nothing. */
    CREEP_MIXED_DEFORMATION(
            "no spectrum of the creep curves: some are in shear and some in extension, two different compliances"),
    /** Words for the deformation of the creep, and of the moduli. */
    CREEP_OTHER_DEFORMATION(
            "no spectrum of the creep curves: they are in {0}, the moduli in {1}, and the two are different figures"),
    /** Temperature of the creep, lowest and highest isotherm, °C. */
    CREEP_OUTSIDE_ISOTHERMS(
            "creep at {0} °C has a spectrum of its own: it lies outside the isotherms that are superposed, {1} to {2} °C"),
    /** Temperature of the creep, and of the moduli, °C. */
    CREEP_WITHOUT_SHIFT(
            "creep at {0} °C has a spectrum of its own: the moduli are of {1} °C, and no isotherms say how times move"),
    /** How many points, of how many files, the first file, what is said of its first point. */
    TAGGED_TEMPERATURES_OFF(
            "points whose tag and channel give different temperatures: {0}, in files: {1}; the first, {2}: {3}"),
    /** Specimen, sweep, how many strains, how many are needed. */
    RIM_TOO_FEW_STRAINS(
            "specimen {0}, sweep {1}: {2} strains between parallel plates, {3} are needed to correct to the rim; its moduli"
                    + " stand as for a material that is linear");

    private final String template;

    ConclusionReason(String template) {
        this.template = template;
    }

    @Override
    public String template() {
        return template;
    }
}

package nightlag.stages;

import nightlag.stages.fault.ReasonCode;

/** What could not be concluded about a lot, and why. */
public enum ConclusionReason implements ReasonCode {
    /** Nothing. */
    SPECTRUM_NO_POINTS("no spectrum: the lot has no usable point with a temperature and a frequency"),
    /** Reference temperature in °C. */
    SPECTRUM_NO_ISOTHERM_AT_REFERENCE(
            "no spectrum: no frequency sweep within 0.5 K of the reference temperature {0} °C"),
    /** How many temperatures. */
    SPECTRUM_SEVERAL_TEMPERATURES(
            "no spectrum: frequency sweeps at {0} temperatures and no reference temperature to choose by"),
    /** Mean temperature of the isotherm and reference temperature, °C. */
    SPECTRUM_MEASURED_BESIDE_REFERENCE(
            "the spectrum at the reference temperature {1} °C comes from points measured at {0} °C, not shifted"),
    /** Nothing. */
    SPECTRUM_MIXED_DEFORMATION("no spectrum: the lot holds points in shear and in extension, two different moduli"),
    /** How many points. */
    SPECTRUM_WITHOUT_AMPLITUDE_SWEEPS("points of amplitude sweeps kept out of the spectrum: {0}"),
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

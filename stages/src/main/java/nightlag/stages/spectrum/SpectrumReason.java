package nightlag.stages.spectrum;

import nightlag.stages.fault.ReasonCode;

/** Why a lot has no spectrum, or not the one that was asked for. */
public enum SpectrumReason implements ReasonCode {
    /** Frequencies found, frequencies needed. */
    SPECTRUM_TOO_FEW_FREQUENCIES("no spectrum: too few different frequencies, {0} (at least {1} are needed)"),
    /** Modes wanted, readings there, most modes. */
    SPECTRUM_TOO_MANY_MODES("no spectrum: {0} modes are asked for, but {1} points carry at most {2}"),
    /** Nothing. */
    SPECTRUM_NO_MODULUS("no spectrum: every modulus is zero"),
    /** Specimen, sweep, frequencies found, frequencies needed. */
    KRAMERS_KRONIG_TOO_FEW_FREQUENCIES(
            "specimen {0}, sweep {1}: no Kramers–Kronig check, too few different frequencies, {2} (at least {3} are needed)"),
    /** Specimen, sweep. */
    KRAMERS_KRONIG_NO_MODULUS("specimen {0}, sweep {1}: no Kramers–Kronig check, every modulus is zero"),
    /** Specimen, sweep, rms of what the fit leaves, % of |G*|. */
    KRAMERS_KRONIG_INCONSISTENT(
            "specimen {0}, sweep {1}: storage and loss modulus are inconsistent by Kramers–Kronig, the best fit leaves {2} % of"
                    + " |G*|: the specimen changed, a channel is late, or the response is not linear"),
    /** Specimen, sweep, rms of what the fit leaves, % of |G*|. */
    KRAMERS_KRONIG_LEFT_MOST(
            "specimen {0}, sweep {1}: no Kramers–Kronig check, the best fit leaves {2} % of |G*|: these moduli are no linear"
                    + " material''s, as where a channel is inverted, or nothing but noise"),
    /** Decades of frequency found, decades needed. */
    CONTINUOUS_TOO_NARROW(
            "no continuous spectrum: {0} decades of frequency fix it at no time at all (more than {1} are needed)"),
    /** Nothing. */
    CONTINUOUS_NO_SCATTER(
            "no continuous spectrum: the moduli came without u, and there are too few of them to take one from their scatter"),
    /** Readings there, readings needed. */
    CREEP_TOO_FEW_READINGS("no spectrum of the creep curves: {0} readings (at least {1} are needed)"),
    /** Nothing. */
    CREEP_NO_INSTANTANEOUS("no spectrum of the creep curves: neither an instantaneous compliance nor modes are seen"),
    /** Modes wanted, readings there, most modes. */
    CREEP_TOO_MANY_MODES(
            "no spectrum of the creep curves: {0} modes are asked for, but {1} readings carry at most {2}"),
    /** Modes wanted, modes found. */
    CREEP_OTHER_NUMBER_OF_MODES(
            "creep: {0} modes are asked for, but the readings carry {1} whose strength is not zero"),
    /** Nothing. */
    CREEP_MODULI_WITHOUT_U(
            "creep and moduli are not fitted together: moduli came without u, and there are too few of them to take one from their"
                    + " scatter; the modes are those of the creep curves"),
    /** How far off, its u, decades. */
    CREEP_SHIFT_OFF(
            "creep shifted from another temperature lies {0} decades beside where the shift factors put it, their u is {1}: the"
                    + " creep does not go with the oscillation"),
    /** Shortest, longest time, s. */
    CONTINUOUS_CREEP_TOO_SHORT(
            "creep: no continuous spectrum: readings from {0} s to {1} s fix it at no time at all (a factor of more than 4.8"
                    + " is needed)"),
    /** Slowest mode, longest time, s. */
    CREEP_END_NOT_REACHED(
            "creep: the slowest mode, {0} s, is not over within the {1} s measured: no viscosity, no steady-state or"
                    + " equilibrium figures and no mean times"),
    /** Property, the part of it that modes beyond the data make up, longest time they support, s. */
    MARKER_BEYOND_DATA(
            "{0} is left out: {1} of it rests on retardation modes slower than the {2} s that the data support, more than its"
                    + " own u"),
    /** Nothing. */
    EQUILIBRIUM_MODULUS_ZERO(
            "the fitted equilibrium modulus is zero: the spectrum is that of a liquid, with a viscosity in its place");

    private final String template;

    SpectrumReason(String template) {
        this.template = template;
    }

    @Override
    public String template() {
        return template;
    }
}

package nightlag.stages.sweep;

import nightlag.stages.moduli.Findings;

/** The characteristic figures of one sweep that follow from amplitude or frequency alone. */
public final class SweepMarkers {
    private SweepMarkers() {}

    /**
     * Looks for them: of an amplitude sweep {@code linear_strain_limit}, {@code crossover_stress} and {@code crossover_strain};
     * of a frequency sweep {@code crossover_angular_frequency}, {@code crossover_modulus} and {@code plateau_modulus}. Sweeps of
     * temperature and time have none of these.
     */
    public static Findings of(Sweep sweep) {
        return switch (sweep.kind()) {
            case AMPLITUDE -> AmplitudeMarkers.of(sweep);
            case FREQUENCY -> FrequencyMarkers.of(MarkerPlace.of(sweep), Isotherm.readings(sweep.points()));
            case TEMPERATURE, TIME, AUTO -> Findings.NONE;
        };
    }
}

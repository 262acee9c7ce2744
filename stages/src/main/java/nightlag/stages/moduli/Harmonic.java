package nightlag.stages.moduli;

import java.util.OptionalDouble;

/**
 * One order of the stress, phase referred to the corrected strain γ₀ sin ωt'.
 *
 * @param order 1, 2, 3 …
 * @param stressInPhasePa σ'_n in Pa
 * @param stressOutOfPhasePa σ''_n in Pa
 * @param relativeIntensity |σ_n|/|σ_1|
 * @param relativeIntensityU its standard uncertainty
 */
public record Harmonic(
        int order,
        double stressInPhasePa,
        double stressOutOfPhasePa,
        double relativeIntensity,
        OptionalDouble relativeIntensityU) {}

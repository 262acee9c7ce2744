package nightlag.stages.superposition;

import java.util.OptionalDouble;

/**
 * How far one isotherm is moved onto the master curve: its reduced frequency is a·ω, its reduced modulus b·G.
 *
 * @param referenceTemperatureK temperature of the master curve, K
 * @param temperatureK temperature of the isotherm, K
 * @param log10A decadic logarithm of the horizontal shift; empty where the isotherm is left out
 * @param log10AU its standard uncertainty
 * @param log10B decadic logarithm of the vertical shift; 0 where there is none, empty where the isotherm is left out
 * @param log10BU its standard uncertainty; empty where the shift is not fitted
 * @param lawLog10A what the fitted law gives for the horizontal shift; empty without a law
 * @param misfitDecades rms distance of its points from the master curve, decades of modulus
 * @param used whether the isotherm is part of the master curve
 */
public record ShiftFactor(
        double referenceTemperatureK,
        double temperatureK,
        OptionalDouble log10A,
        OptionalDouble log10AU,
        OptionalDouble log10B,
        OptionalDouble log10BU,
        OptionalDouble lawLog10A,
        OptionalDouble misfitDecades,
        boolean used) {}

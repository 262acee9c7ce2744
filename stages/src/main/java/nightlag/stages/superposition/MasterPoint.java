package nightlag.stages.superposition;

import nightlag.stages.moduli.ModulusReading;

/**
 * A measured point moved to the reference temperature.
 *
 * @param referenceTemperatureK temperature of the master curve, K
 * @param temperatureK temperature it was measured at, K
 * @param reduced reduced angular frequency a·ω and reduced modulus b·G with its covariance
 */
public record MasterPoint(double referenceTemperatureK, double temperatureK, ModulusReading reduced) {}

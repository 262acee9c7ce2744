package nightlag.stages.spectrum;

/**
 * A relaxation mode as a part of the whole: G(t)/G(0) = 1 − Σ g (1 − e^{−t/τ}) over all modes of a set.
 *
 * @param referenceTemperatureK the temperature it holds at, K
 * @param mode its number, from 1, times rising
 * @param relativeModulus g_i/(Ge + Σ g)
 * @param timeS relaxation time, s
 */
public record RelativeMode(double referenceTemperatureK, int mode, double relativeModulus, double timeS) {}

package nightlag.stages.moduli;

/**
 * A complex modulus at a frequency: what a spectrum is fitted to.
 *
 * @param angularFrequency ω in rad/s
 * @param moduli G' and G'' with their covariance where it is known
 */
public record ModulusReading(double angularFrequency, Moduli moduli) {}

package nightlag.stages.moduli;

/**
 * The limits of the harmonics, kept with a point whose harmonics its neighbours may still correct.
 *
 * @param third I₃/I₁ beyond which a point of an amplitude sweep is {@code nonlinear}, which makes none of its points unusable
 * @param even largest even order over the first: {@code even-harmonics}
 */
public record HarmonicLimits(double third, Threshold even) {}

package nightlag.stages.spectrum;

import java.util.OptionalInt;

/**
 * What spectra are wanted: the section {@code [spectrum]} of a grade.
 *
 * @param fitEquilibrium true: a solid, its equilibrium modulus is fitted; false: a liquid
 * @param modes a fixed number of modes; empty: as few as the data carry
 * @param continuous whether continuous spectra are wanted too
 */
public record SpectrumPlan(boolean fitEquilibrium, OptionalInt modes, boolean continuous) {}

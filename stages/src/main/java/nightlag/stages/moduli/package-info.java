/**
 * One point: storage and loss modulus, tan δ and harmonics with their uncertainties, the flags it carries and what they
 * make of it.
 *
 * <p>G* = σ*₁/γ*₁ in the convention γ = Re γ* e^{iωt}; uncertainties by the law of propagation (JCGM 100).
 */
package nightlag.stages.moduli;

/**
 * Points that belong together: sweeps, the isotherms of a lot, and what only a sweep as a whole can say about its points.
 *
 * <p>Between parallel plates X_true = X + ¼ dX/d ln γ_R for storage and loss modulus and for each harmonic of the stress.
 */
package nightlag.stages.sweep;

/**
 * Points that belong together: sweeps, the isotherms of a lot, and what only a sweep as a whole can say about its points.
 *
 * <p>Between parallel plates X_true = X + ¼ dX/d ln γ_R for storage and loss modulus and for each harmonic of the stress.
 *
 * <p>A transition temperature is where a smooth curve through a temperature sweep has its top, or where two of its tangents meet.
 */
package nightlag.stages.sweep;

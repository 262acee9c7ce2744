/**
 * From samples against time to complex amplitudes: drift, fundamental and harmonics of both channels of one record at
 * their shared frequency, with the covariance of all of them.
 *
 * <p>Model of each channel: polynomial drift + Σ Re(A_n e^{inωt}) + noise, ω shared by both (Golub &amp; Pereyra,
 * SIAM J. Numer. Anal. 10 (1973) 413, for the separable fit; Rife &amp; Boorstyn, IEEE Trans. Inf. Theory 20 (1974) 591,
 * for the bound it reaches).
 */
package nightlag.stages.waveform;

/**
 * From samples against time to complex amplitudes: drift, fundamental and harmonics of both channels of one record at
 * their shared frequency, with the covariance of all of them.
 *
 * <p>Model of each channel: polynomial drift + Σ Re(A_n e^{inωt}) + noise, ω shared by both (Golub &amp; Pereyra,
 * SIAM J. Numer. Anal. 10 (1973) 413, for the separable fit; Rife &amp; Boorstyn, IEEE Trans. Inf. Theory 20 (1974) 591,
 * for the bound it reaches).
 *
 * <p>A record of one frequency goes through {@link nightlag.stages.waveform.HarmonicAnalysis}: what says nothing about the
 * specimen is left out ({@code LeftOut}: spikes and cut-offs, for every kind of record), the start-up cycles are found
 * ({@code StartUp}), the rest is fitted ({@code HarmonicFit}), and the last fit becomes what is handed on
 * ({@code HarmonicSummary}). {@link nightlag.stages.waveform.MultisineAnalysis} and
 * {@link nightlag.stages.waveform.ChirpAnalysis} take records of several frequencies.
 */
package nightlag.stages.waveform;

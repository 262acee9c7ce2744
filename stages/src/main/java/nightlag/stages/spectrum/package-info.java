/**
 * Relaxation and retardation spectra, each from the other.
 *
 * <p>Discrete: s·Ĝ(s) = Ge + Σ g_i sτ_i/(1 + sτ_i) and s·Ĵ(s) = 1/(s·Ĝ(s)) (Gross 1953; Tschoegl 1989); non-negative
 * least squares after Lawson &amp; Hanson (1974), modes as few as the data carry after Baumgaertel &amp; Winter (1989).
 *
 * <p>Whether a sweep's moduli can belong to one material at all: Kramers–Kronig consistency (Booij &amp; Thoone 1982), by the best
 * generalised Maxwell fit.
 *
 * <p>What the data support ends a little inside their window (Davies &amp; Anderssen 1997); figures that rest on times beyond
 * it carry an uncertainty that allows for modes nobody saw.
 */
package nightlag.stages.spectrum;

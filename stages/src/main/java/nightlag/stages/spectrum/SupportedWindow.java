package nightlag.stages.spectrum;

/**
 * The times a spectrum is fixed at by data between two frequencies: e^{π/2}/ω_max &lt; τ &lt; e^{−π/2}/ω_min (Davies &amp; Anderssen,
 * J. Non-Newtonian Fluid Mech. 73 (1997) 163). Narrower than 1.36 decades of frequency there is none and the shortest lies
 * above the longest.
 *
 * @param shortestS shortest supported time, s
 * @param longestS longest supported time, s
 */
public record SupportedWindow(double shortestS, double longestS) {
    private static final double ROUNDING = 1e-12;

    /** The window of data between two angular frequencies in rad/s. */
    public static SupportedWindow of(double lowest, double highest) {
        double edge = Math.exp(Math.PI / 2);
        return new SupportedWindow(edge / highest, 1 / (edge * lowest));
    }

    /**
     * What it fixes of a density, where it is that of a creep curve from its first reading to its last. A mode shows as a rise
     * of J(t) between about λ/5 and 5λ; of one slower than the last reading only the beginning is seen, a straight line that
     * other modes and a flow have as well. So the long end loses what it loses with frequencies. What is faster than the first
     * reading is over by then and takes nothing from what follows.
     */
    SupportedWindow ofDensity() {
        return new SupportedWindow(shortestS, longestS / Math.exp(Math.PI / 2));
    }

    /** What is left of it where the beginning needs what came before. */
    SupportedWindow later() {
        return new SupportedWindow(shortestS * Math.exp(Math.PI / 2), longestS);
    }

    /** From the earlier beginning to the later end of both. */
    SupportedWindow with(SupportedWindow other) {
        return new SupportedWindow(Math.min(shortestS, other.shortestS), Math.max(longestS, other.longestS));
    }

    /** Whether a time in s is one of them, its ends but for rounding included. */
    boolean holds(double timeS) {
        return timeS >= shortestS * (1 - ROUNDING) && timeS <= longestS * (1 + ROUNDING);
    }
}

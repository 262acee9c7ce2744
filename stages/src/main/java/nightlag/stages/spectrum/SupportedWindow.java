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
    /** The window of data between two angular frequencies in rad/s. */
    public static SupportedWindow of(double lowest, double highest) {
        double edge = Math.exp(Math.PI / 2);
        return new SupportedWindow(edge / highest, 1 / (edge * lowest));
    }

    /** Whether a time in s is one of them. */
    boolean holds(double timeS) {
        return timeS >= shortestS && timeS <= longestS;
    }
}

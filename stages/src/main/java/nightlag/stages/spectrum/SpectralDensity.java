package nightlag.stages.spectrum;

/**
 * A continuous spectrum at even steps of ln τ, with the band its value lies in with 95 % probability.
 *
 * <p>{@code low} is 0 where the data do not tell the spectrum from none. {@code high} is never above what the data leave room
 * for, all parts of a spectrum being positive.
 *
 * @param timesS relaxation or retardation times in s, rising
 * @param values the density per unit of ln τ, in Pa or 1/Pa
 * @param low lower ends of the band
 * @param high upper ends of the band
 */
public record SpectralDensity(double[] timesS, double[] values, double[] low, double[] high) {
    /** Copies the arrays. */
    public SpectralDensity {
        timesS = timesS.clone();
        values = values.clone();
        low = low.clone();
        high = high.clone();
    }

    /** The times in s. */
    @Override
    public double[] timesS() {
        return timesS.clone();
    }

    /** The density at each time. */
    @Override
    public double[] values() {
        return values.clone();
    }

    /** The band's lower end at each time. */
    @Override
    public double[] low() {
        return low.clone();
    }

    /** The band's upper end at each time. */
    @Override
    public double[] high() {
        return high.clone();
    }

    /** How many times there are. */
    public int count() {
        return timesS.length;
    }
}

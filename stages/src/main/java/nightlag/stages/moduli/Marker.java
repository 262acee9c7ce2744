package nightlag.stages.moduli;

import java.util.OptionalDouble;

/**
 * One characteristic figure of a sweep or a lot.
 *
 * @param specimen its specimen; empty text where it is drawn from all points of the lot
 * @param sweep its sweep; empty text likewise
 * @param property what it is, such as {@code zero_shear_viscosity}
 * @param temperatureK where it was found, K; empty where that means nothing
 * @param frequencyHz where it was found, Hz; empty where that means nothing
 * @param value the value in SI (temperatures in K; tables write °C)
 * @param u standard uncertainty; empty where none can be had
 * @param unit SI without prefix, "1" for none; "°C" marks a temperature
 * @param method how it was found, in words
 */
public record Marker(
        String specimen,
        String sweep,
        String property,
        OptionalDouble temperatureK,
        OptionalDouble frequencyHz,
        double value,
        OptionalDouble u,
        String unit,
        String method) {
    /** The same figure, with more to say of how it was found. */
    public Marker saying(String more) {
        return withMethod(method + "; " + more);
    }

    /** The same figure, found in other words. */
    public Marker withMethod(String words) {
        return new Marker(specimen, sweep, property, temperatureK, frequencyHz, value, u, unit, words);
    }
}

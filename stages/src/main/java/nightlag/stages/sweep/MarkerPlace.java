package nightlag.stages.sweep;

import java.util.OptionalDouble;
import nightlag.stages.moduli.Marker;

/**
 * Whose figures a marker's are.
 *
 * @param name the sweep; both names empty where they are drawn from all points of the lot
 * @param temperatureK temperature of the markers, K
 */
public record MarkerPlace(SweepName name, OptionalDouble temperatureK) {
    private static final double KELVIN_AT_ZERO_CELSIUS = 273.15;

    /** One sweep, at its temperature. */
    static MarkerPlace of(Sweep sweep) {
        return new MarkerPlace(sweep.name(), sweep.temperatureK());
    }

    /** The master curve of a lot at its reference temperature, K. */
    public static MarkerPlace masterCurve(double referenceTemperatureK) {
        return new MarkerPlace(new SweepName("", ""), OptionalDouble.of(referenceTemperatureK));
    }

    /** In words, for a reason. */
    String words() {
        String whose = name.specimen().isEmpty() && name.sweep().isEmpty()
                ? "master curve"
                : "specimen " + name.specimen() + ", sweep " + name.sweep();
        // to a hundredth, since a mean of temperatures has digits that mean nothing
        return temperatureK.isEmpty()
                ? whose
                : whose + " at " + Math.round(100 * (temperatureK.getAsDouble() - KELVIN_AT_ZERO_CELSIUS)) / 100.0
                        + " °C";
    }

    /** A marker found there. */
    Marker marker(
            String property, OptionalDouble frequencyHz, double value, OptionalDouble u, String unit, String method) {
        return new Marker(name.specimen(), name.sweep(), property, temperatureK, frequencyHz, value, u, unit, method);
    }
}

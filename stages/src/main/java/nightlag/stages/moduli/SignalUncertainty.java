package nightlag.stages.moduli;

import java.util.Map;
import java.util.OptionalDouble;
import nightlag.stages.geometry.DeformationSignal;
import nightlag.stages.geometry.LoadSignal;

/**
 * Standard uncertainties of an instrument's signals that all its records share.
 *
 * @param deformation of each kind of deformation, as a part of the value
 * @param load of each kind of load, as a part of the value
 * @param temperatureK of the temperature, K
 */
public record SignalUncertainty(
        Map<DeformationSignal, Double> deformation, Map<LoadSignal, Double> load, OptionalDouble temperatureK) {
    /** Nothing is said. */
    public static final SignalUncertainty NONE = new SignalUncertainty(Map.of(), Map.of(), OptionalDouble.empty());

    /** Copies the maps. */
    public SignalUncertainty {
        deformation = Map.copyOf(deformation);
        load = Map.copyOf(load);
    }
}

package nightlag.stages.moduli;

import java.util.Map;
import java.util.OptionalDouble;
import nightlag.stages.geometry.Dimension;

/**
 * How a point moves with what it shares with many other records: they err together by it, so it is not in the point's own
 * uncertainty and does not shrink in a mean.
 *
 * @param signals the effect of one standard uncertainty of each signal's scale, by the signal's name in small letters
 * @param dimensions the effect of each dimension of its geometry, per SI unit of the dimension
 * @param temperatureUK standard uncertainty of its temperature, K; empty where none is said
 */
public record SharedInfluences(
        Map<String, SharedEffect> signals, Map<Dimension, SharedEffect> dimensions, OptionalDouble temperatureUK) {
    /** Copies the maps. */
    public SharedInfluences {
        signals = Map.copyOf(signals);
        dimensions = Map.copyOf(dimensions);
    }
}

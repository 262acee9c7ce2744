package nightlag.stages;

import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.stages.geometry.Dimension;
import nightlag.stages.moduli.PointKey;

/**
 * What is known about a record besides its samples.
 *
 * @param key what its point is called
 * @param made the lot's date as written in the raw file
 * @param temperatureK tagged temperature, K
 * @param elapsedS time since the start of the run, s
 * @param dimensions dimensions of the specimen given with the record, SI; they go before the grade's
 */
public record RecordTags(
        PointKey key,
        Optional<String> made,
        OptionalDouble temperatureK,
        OptionalDouble elapsedS,
        Map<Dimension, Double> dimensions) {
    /** Copies the dimensions. */
    public RecordTags {
        dimensions = Map.copyOf(dimensions);
    }
}

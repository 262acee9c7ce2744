package nightlag.pipeline.config;

import java.util.Map;
import java.util.Optional;
import nightlag.stages.geometry.Corrections;
import nightlag.stages.geometry.GeometrySpec;
import nightlag.stages.moduli.SignalRange;

/**
 * One instrument file.
 *
 * @param id the file's name without extension, as the night file calls it
 * @param name what people call it
 * @param files how its raw files read
 * @param records how records stand in a file
 * @param channels the columns that carry signals
 * @param tags where each fact about a record comes from
 * @param corrections what it adds to a signal, channel delays included
 * @param uncertainty standard uncertainties common to its records: relative for signals, K for the temperature
 * @param ranges trusted amplitudes, SI
 * @param geometry a geometry that takes the place of the grade's
 * @param fingerprint digest of all values but the name; comments and key order do not enter
 */
public record Instrument(
        String id,
        String name,
        FileFormat files,
        RecordFormat records,
        Map<ChannelName, Channel> channels,
        Map<TagName, TagSource> tags,
        Corrections corrections,
        Map<ChannelName, Double> uncertainty,
        Map<ChannelName, SignalRange> ranges,
        Optional<GeometrySpec> geometry,
        String fingerprint) {
    /** Copies the maps. */
    public Instrument {
        channels = Map.copyOf(channels);
        tags = Map.copyOf(tags);
        uncertainty = Map.copyOf(uncertainty);
        ranges = Map.copyOf(ranges);
    }
}

package nightlag.stages.waveform;

import java.util.Optional;
import java.util.OptionalDouble;

/**
 * The figures of one record that the flags are judged by; all of them are shares or ratios unless a unit is given.
 *
 * @param clippedShare share of the samples that stand at a channel's limit
 * @param spikeShare share of the samples left out as isolated spikes
 * @param gapShare share of the record's duration that is missing
 * @param clockJitter standard deviation of the sampling interval over its mean
 * @param deformationSnrDb signal to noise of the deformation in dB: 20 log10(rms of the fundamental / noise)
 * @param loadSnrDb the same of the load
 * @param baseline movement of a channel's mean over the record as part of its amplitude, of the channel where it is larger
 * @param cycleTrend relative change of |load / deformation| over the record; empty where the record is too short to tell
 * @param temperatureWanderK highest less lowest temperature in K, smoothed over a cycle; empty without the channel
 * @param frequencyMismatch |found − tagged| / tagged frequency; empty without a tag
 */
public record ScreeningFigures(
        double clippedShare,
        double spikeShare,
        double gapShare,
        double clockJitter,
        double deformationSnrDb,
        double loadSnrDb,
        Figure baseline,
        Optional<Figure> cycleTrend,
        OptionalDouble temperatureWanderK,
        Optional<Figure> frequencyMismatch) {
    /**
     * A figure and how well it is known.
     *
     * @param value the figure
     * @param u its standard uncertainty from the record's noise
     */
    public record Figure(double value, double u) {
        /** Whether the figure is more than the noise can make of nothing. */
        public boolean significant() {
            return value > 3 * u;
        }
    }
}

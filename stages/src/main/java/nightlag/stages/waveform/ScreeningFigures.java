package nightlag.stages.waveform;

import java.util.OptionalDouble;

/**
 * The figures of one record that the flags are judged by; all of them are shares or ratios unless a unit is given.
 *
 * @param clippedShare share of the samples that stand at a channel's limit
 * @param gapShare share of the record's duration that is missing
 * @param clockJitter standard deviation of the sampling interval over its mean
 * @param deformationSnrDb signal to noise of the deformation in dB: 20 log10(rms of the fundamental / noise)
 * @param loadSnrDb the same of the load
 * @param baselineMove movement of a channel's mean over the record as part of its amplitude, the larger of both channels
 * @param cycleTrend relative change of |load / deformation| over the record; empty where the record is too short to tell
 * @param evenHarmonics the largest even-order intensity of the load over its fundamental
 * @param temperatureWanderK highest less lowest temperature in K, smoothed over a cycle; empty without the channel
 * @param frequencyMismatch |found − tagged| / tagged frequency; empty without a tag
 */
public record ScreeningFigures(
        double clippedShare,
        double gapShare,
        double clockJitter,
        double deformationSnrDb,
        double loadSnrDb,
        double baselineMove,
        OptionalDouble cycleTrend,
        double evenHarmonics,
        OptionalDouble temperatureWanderK,
        OptionalDouble frequencyMismatch) {}

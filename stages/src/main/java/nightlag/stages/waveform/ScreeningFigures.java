package nightlag.stages.waveform;

import java.util.Optional;
import java.util.OptionalDouble;

/**
 * The figures of one record that the flags are judged by; all of them are shares or ratios unless a unit is given.
 *
 * @param clippedShare share of the samples that stand at a channel's limit
 * @param spikeShare share of the samples left out as isolated spikes
 * @param gapShare share of the record's duration, or of what its window was planned to hold, that is missing
 * @param clockJitter standard deviation of the sampling interval over its mean
 * @param deformationSnrDb signal to noise of the deformation in dB: 20 log10(rms of the fundamental / noise)
 * @param loadSnrDb the same of the load
 * @param baseline movement of a channel's mean over the record as part of its amplitude, of the channel where it is larger
 * @param cycleTrend relative change of |load / deformation| over the record; empty where the record is too short to tell
 * @param temperatureWanderK highest less lowest temperature in K, smoothed over a cycle; empty without the channel
 * @param frequencyMismatch |found − tagged| / tagged frequency; empty without a tag
 * @param cycleScatter the uncertainty told twice, by the noise and by the cycles; empty where the record is too short to tell
 * @param clockJump the place where the time stamps jump and the oscillation does not; empty where there is none
 * @param sweepStart how far in motion a sweep's record begins, 0 at rest and 1 in full swing; only at the frequencies that this
 *     puts in doubt
 * @param overtonesLeft share of what the fit left of the weaker channel that lies at orders above those fitted; empty where
 *     nothing was left to look at
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
        Optional<Figure> frequencyMismatch,
        Optional<CycleScatter> cycleScatter,
        Optional<ClockJump> clockJump,
        Optional<Figure> sweepStart,
        OptionalDouble overtonesLeft) {
    /** Figures of a record whose cycles were not compared with each other and whose clock went on. */
    public ScreeningFigures(
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
        this(
                clippedShare,
                spikeShare,
                gapShare,
                clockJitter,
                deformationSnrDb,
                loadSnrDb,
                baseline,
                cycleTrend,
                temperatureWanderK,
                frequencyMismatch,
                Optional.empty(),
                Optional.empty(),
                Optional.empty(),
                OptionalDouble.empty());
    }

    /** The same of a record whose clock jumped. */
    ScreeningFigures with(ClockJump jump) {
        return new ScreeningFigures(
                clippedShare,
                spikeShare,
                gapShare,
                clockJitter,
                deformationSnrDb,
                loadSnrDb,
                baseline,
                cycleTrend,
                temperatureWanderK,
                frequencyMismatch,
                cycleScatter,
                Optional.of(jump),
                sweepStart,
                overtonesLeft);
    }

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

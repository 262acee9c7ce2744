package nightlag.stages.waveform;

/**
 * A place where the time stamps jump and the oscillation does not.
 *
 * @param seconds by how much the stamps are wrong, s; positive where they went ahead
 * @param atS the time of the last sample before it, s
 * @param cycles the step of the phase that shows it, both channels alike, in cycles (no more than a half)
 * @param samplesLeftOut samples on the far sides of such places, which were not used
 */
public record ClockJump(double seconds, double atS, double cycles, int samplesLeftOut) {
    /** A step of the phase by no more cycles than this hardly bends the ratio of the channels, and is none. */
    public static final double SMALLEST_CYCLES = 0.01;
}

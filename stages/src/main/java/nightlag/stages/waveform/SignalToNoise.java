package nightlag.stages.waveform;

/** The ratio of signal to noise of a channel. */
final class SignalToNoise {
    /** Stands for "no noise seen in double numbers". */
    private static final double HIGHEST_DB = 300;

    private SignalToNoise() {}

    /**
     * 20 log10(rms of the fundamental / noise), in dB, at most 300.
     *
     * @param amplitude of the fundamental
     * @param deviation standard deviation of the noise, in the same unit
     */
    static double decibels(double amplitude, double deviation) {
        return Math.min(HIGHEST_DB, 20 * Math.log10(amplitude / Math.sqrt(2) / deviation));
    }
}

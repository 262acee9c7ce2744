package nightlag.stages.moduli;

/**
 * The measured amplitudes an instrument is trusted with, in the SI unit of the channel.
 *
 * @param low smallest trusted amplitude
 * @param high largest trusted amplitude
 */
public record SignalRange(double low, double high) {}

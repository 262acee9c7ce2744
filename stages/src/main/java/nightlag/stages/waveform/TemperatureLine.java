package nightlag.stages.waveform;

import java.util.OptionalDouble;

/**
 * The temperature of a record, and what of its movement is not accounted for: in a whole record all of it, in a window of a
 * longer record, where a ramp is meant and the amplitudes follow it, what is left beside a straight line.
 *
 * @param middleK the temperature that the amplitudes belong to, K: the mean, or the line in the middle of the samples used
 * @param about the temperatures less the slope of the line, K; as they are in a whole record
 */
record TemperatureLine(OptionalDouble middleK, double[] about) {
    /** The mean over the samples used. */
    static TemperatureLine flat(double[] temperatureK, Samples samples) {
        return new TemperatureLine(Steadiness.meanTemperature(temperatureK, samples.indices()), temperatureK);
    }

    /** The best straight line in time through the samples used. */
    static TemperatureLine through(double[] temperatureK, Samples samples) {
        OptionalDouble mean = Steadiness.meanTemperature(temperatureK, samples.indices());
        if (mean.isEmpty()) {
            return new TemperatureLine(mean, temperatureK);
        }
        double[] seconds = samples.seconds();
        double meanSeconds = 0;
        int count = 0;
        for (int i = 0; i < seconds.length; i++) {
            if (Double.isFinite(temperatureK[samples.indices()[i]])) {
                meanSeconds += seconds[i];
                count++;
            }
        }
        meanSeconds /= count;
        double products = 0;
        double squares = 0;
        for (int i = 0; i < seconds.length; i++) {
            double value = temperatureK[samples.indices()[i]];
            if (Double.isFinite(value)) {
                double since = seconds[i] - meanSeconds;
                products += since * (value - mean.getAsDouble());
                squares += since * since;
            }
        }
        double slope = squares > 0 ? products / squares : 0;
        double[] about = temperatureK.clone();
        for (int i = 0; i < seconds.length; i++) {
            about[samples.indices()[i]] -= slope * seconds[i];
        }
        // seconds count from the middle
        return new TemperatureLine(OptionalDouble.of(mean.getAsDouble() - slope * meanSeconds), about);
    }
}

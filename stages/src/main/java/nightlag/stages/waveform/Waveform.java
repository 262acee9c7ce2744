package nightlag.stages.waveform;

import java.util.Optional;
import java.util.OptionalDouble;

/**
 * The samples of one record. The arrays are handed over: nobody changes them afterwards.
 *
 * @param timeS strictly rising times in s
 * @param deformation strain (1), angle (rad) or displacement (m), one value a time
 * @param load stress (Pa), torque (N·m) or force (N), one value a time
 * @param temperatureK temperature in K, one value a time, or an empty array without such a channel
 * @param nominalFrequencyHz the frequency the record is tagged with, in Hz
 * @param rowsLeftOut rows of the record without a value in a needed column
 * @param window for a window cut out of a longer record, in which the specimen may change: what it was planned to hold;
 *     empty where these samples are the whole record
 */
public record Waveform(
        double[] timeS,
        double[] deformation,
        double[] load,
        double[] temperatureK,
        OptionalDouble nominalFrequencyHz,
        int rowsLeftOut,
        Optional<RecordWindow> window) {
    /** A whole record. */
    public Waveform(
            double[] timeS,
            double[] deformation,
            double[] load,
            double[] temperatureK,
            OptionalDouble nominalFrequencyHz,
            int rowsLeftOut) {
        this(timeS, deformation, load, temperatureK, nominalFrequencyHz, rowsLeftOut, Optional.empty());
    }

    /** Checks the shapes. */
    public Waveform {
        if (deformation.length != timeS.length
                || load.length != timeS.length
                || (temperatureK.length != 0 && temperatureK.length != timeS.length)) {
            throw new IllegalArgumentException("channels of unequal length");
        }
    }

    /** Whether it is a window cut out of a longer record. */
    public boolean isWindow() {
        return window.isPresent();
    }

    /** The number of samples. */
    public int size() {
        return timeS.length;
    }
}

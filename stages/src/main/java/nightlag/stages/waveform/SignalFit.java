package nightlag.stages.waveform;

import java.util.List;
import java.util.OptionalDouble;
import nightlag.stages.fault.Reason;
import nightlag.stages.numeric.Complex;

/**
 * What {@link HarmonicAnalysis} found in one record. Amplitudes are in the convention x(t) = Re Σ A_n e^{inω(t − origin)}
 * and in the units of the record's channels. Arrays are handed over: nobody changes them afterwards.
 *
 * @param frequencyHz the fundamental's frequency in Hz
 * @param frequencyUHz its standard uncertainty in Hz (0 where the tag is exact)
 * @param originS the time at which the phases are given, in s (the middle of the samples used)
 * @param deformation amplitudes of the deformation, order n at index n − 1
 * @param load amplitudes of the load, order n at index n − 1
 * @param covariance covariance of all real parameters, the effect of the shared frequency included; rows and columns are
 *     Re, Im of deformation order 1, 2 … H, then Re, Im of load order 1, 2 … H (4H × 4H)
 * @param degreesOfFreedom effective degrees of freedom behind the covariance (Welch–Satterthwaite)
 * @param deformationNoise standard deviation of the deformation's residuals
 * @param loadNoise standard deviation of the load's residuals
 * @param cyclesUsed cycles covered by the samples used
 * @param firstSample place in the record of the first sample after the start-up cycles, from 0
 * @param samplesUsed samples that entered the fit
 * @param samplesLeftOut samples left out, start-up cycles, spikes and clipped runs included
 * @param meanTemperatureK mean of the temperature channel in K over the samples used
 * @param screening the figures the flags are judged by
 * @param notes what was done differently from the plan, and why
 */
public record SignalFit(
        double frequencyHz,
        double frequencyUHz,
        double originS,
        Complex[] deformation,
        Complex[] load,
        double[][] covariance,
        double degreesOfFreedom,
        double deformationNoise,
        double loadNoise,
        double cyclesUsed,
        int firstSample,
        int samplesUsed,
        int samplesLeftOut,
        OptionalDouble meanTemperatureK,
        ScreeningFigures screening,
        List<Reason> notes) {
    /** The angular frequency in rad/s. */
    public double angularFrequency() {
        return 2 * Math.PI * frequencyHz;
    }

    /** The highest order fitted. */
    public int harmonics() {
        return load.length;
    }

    /** The same as of a longer record, from whose sample {@code from} on the samples fitted were taken. */
    SignalFit outOf(int from, ClockJump jump) {
        return new SignalFit(
                frequencyHz,
                frequencyUHz,
                originS,
                deformation,
                load,
                covariance,
                degreesOfFreedom,
                deformationNoise,
                loadNoise,
                cyclesUsed,
                from + firstSample,
                samplesUsed,
                samplesLeftOut + jump.samplesLeftOut(),
                meanTemperatureK,
                screening.with(jump),
                notes);
    }
}

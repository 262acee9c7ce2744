package nightlag.stages.waveform;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import nightlag.stages.fault.ReductionFault;

/**
 * How the frequency of a chirp runs: ln f = a + b t, a straight line through the logarithms of the frequencies that the
 * deformation's zero crossings show, each over the two half waves around it and weighted by the time it stands for.
 *
 * @param logStart a, the logarithm of the frequency in Hz at time 0 of the samples
 * @param rate b, 1/s; below zero where the sweep runs down
 * @param beginS the first zero crossing, s
 * @param endS the last zero crossing, s
 */
record SweepLaw(double logStart, double rate, double beginS, double endS) {
    /** Part of the amplitude a half wave must reach, so that noise at a zero crossing makes none. */
    private static final double HALF_WAVE_HEIGHT = 0.3;

    private static final double NEARLY_ALL = 0.95;
    private static final int FEWEST_HALF_WAVES = 9;
    /** A sweep covers at least this factor. */
    private static final double LEAST_FACTOR = 2;
    /** Rms distance of ln f from the line. A sweep linear in time over a decade is 0.2 off. */
    private static final double MOST_DEVIATION = 0.1;

    /**
     * The law of a record.
     *
     * @throws ReductionFault if the deformation is no exponential sweep
     */
    static SweepLaw of(Samples samples) throws ReductionFault {
        double[] crossings = crossings(samples);
        if (crossings.length < FEWEST_HALF_WAVES) {
            throw new ReductionFault(
                    MultiFrequencyReason.CHIRP_TOO_FEW_WAVES.with(crossings.length, FEWEST_HALF_WAVES));
        }
        int count = crossings.length - 2;
        double[] times = new double[count];
        double[] logs = new double[count];
        double[] weights = new double[count];
        double sumW = 0;
        double sumT = 0;
        double sumL = 0;
        for (int k = 0; k < count; k++) {
            double period = crossings[k + 2] - crossings[k];
            times[k] = crossings[k + 1];
            logs[k] = -Math.log(period);
            weights[k] = period;
            sumW += period;
            sumT += period * times[k];
            sumL += period * logs[k];
        }
        double meanT = sumT / sumW;
        double meanL = sumL / sumW;
        double squares = 0;
        double products = 0;
        for (int k = 0; k < count; k++) {
            squares += weights[k] * (times[k] - meanT) * (times[k] - meanT);
            products += weights[k] * (times[k] - meanT) * (logs[k] - meanL);
        }
        double rate = products / squares;
        SweepLaw law = new SweepLaw(meanL - rate * meanT, rate, crossings[0], crossings[crossings.length - 1]);
        law.requireSweep(times, logs, weights, sumW);
        return law;
    }

    private void requireSweep(double[] times, double[] logs, double[] weights, double sumW) throws ReductionFault {
        double squares = 0;
        for (int k = 0; k < times.length; k++) {
            double off = logs[k] - logStart - rate * times[k];
            squares += weights[k] / sumW * off * off;
        }
        double deviation = Math.sqrt(squares);
        double slowest = Math.exp(Arrays.stream(logs).min().orElseThrow());
        double fastest = Math.exp(Arrays.stream(logs).max().orElseThrow());
        if (deviation > MOST_DEVIATION) {
            throw new ReductionFault(MultiFrequencyReason.CHIRP_NOT_EXPONENTIAL.with(
                    100 * deviation, 100 * MOST_DEVIATION, slowest, fastest));
        }
        if (fastestHz() < LEAST_FACTOR * slowestHz()) {
            throw new ReductionFault(MultiFrequencyReason.CHIRP_ONE_FREQUENCY.with(slowest, fastest, LEAST_FACTOR));
        }
    }

    /** Where the deformation passes zero between half waves that reach a part of its amplitude. */
    private static double[] crossings(Samples samples) {
        int count = samples.size();
        double[] values = FrequencySearch.detrended(samples, samples.channels()[Samples.DEFORMATION], count);
        double[] sorted = Arrays.stream(values).map(Math::abs).sorted().toArray();
        double height = HALF_WAVE_HEIGHT * sorted[(int) (NEARLY_ALL * (count - 1))];
        List<Double> crossings = new ArrayList<>();
        int last = -1;
        for (int i = 0; i < count; i++) {
            if (Math.abs(values[i]) >= height) {
                if (last >= 0 && values[i] * values[last] < 0) {
                    crossings.add(zero(samples.seconds(), values, last, i));
                }
                last = i;
            }
        }
        return crossings.stream().mapToDouble(Double::doubleValue).toArray();
    }

    /** Zero of the straight line through the samples from one half wave's flank to the next. */
    private static double zero(double[] seconds, double[] values, int from, int to) {
        double meanT = 0;
        double meanX = 0;
        int count = to - from + 1;
        for (int i = from; i <= to; i++) {
            meanT += seconds[i] / count;
            meanX += values[i] / count;
        }
        double squares = 0;
        double products = 0;
        for (int i = from; i <= to; i++) {
            squares += (seconds[i] - meanT) * (seconds[i] - meanT);
            products += (seconds[i] - meanT) * (values[i] - meanX);
        }
        double slope = products / squares;
        double zero = slope == 0 ? meanT : meanT - meanX / slope;
        return Math.max(seconds[from], Math.min(seconds[to], zero));
    }

    /** The frequency at a time, Hz. */
    double frequencyHz(double seconds) {
        return Math.exp(logStart + rate * seconds);
    }

    /** The time at which the sweep passes a frequency, s. */
    double passes(double frequencyHz) {
        return (Math.log(frequencyHz) - logStart) / rate;
    }

    /** The slowest frequency between the first and the last crossing, Hz. */
    double slowestHz() {
        return Math.min(frequencyHz(beginS), frequencyHz(endS));
    }

    /** The fastest frequency between the first and the last crossing, Hz. */
    double fastestHz() {
        return Math.max(frequencyHz(beginS), frequencyHz(endS));
    }
}

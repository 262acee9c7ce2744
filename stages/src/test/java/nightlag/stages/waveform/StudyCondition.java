package nightlag.stages.waveform;

import java.util.Random;
import nightlag.stages.numeric.Complex;

/**
 * One kind of record of {@link ExtractionStudyTest}: 2 Hz, a material with harmonics in both channels, on a drift.
 *
 * @param cycles cycles in the record
 * @param samplesPerCycle samples a cycle
 * @param snrDb signal to noise of either channel, 20 log₁₀(rms of the fundamental / σ)
 * @param drift the drift there is and that is fitted
 * @param memory coefficient of first-order memory of the noise, 0 for white
 * @param missing share of rows missing
 * @param jitter scatter of the sampling instants over their interval; the true ones are in the record
 * @param spikes share of samples with a spike of ten amplitudes in one channel
 */
record StudyCondition(
        double cycles,
        double samplesPerCycle,
        double snrDb,
        Drift drift,
        double memory,
        double missing,
        double jitter,
        double spikes) {
    static final double FREQUENCY_HZ = 2;
    static final Complex STRAIN = Complex.polar(0.01, 0.4);
    static final Complex STRESS = Complex.polar(500, 1.1);
    static final Complex MODULUS = STRESS.over(STRAIN);
    private static final int MOST_ORDERS = 7;

    static StudyCondition white(double cycles, double samplesPerCycle, double snrDb, Drift drift) {
        return new StudyCondition(cycles, samplesPerCycle, snrDb, drift, 0, 0, 0, 0);
    }

    /** Amplitudes of both channels by order. */
    static Complex[][] amplitudes() {
        return new Complex[][] {
            {STRAIN, Complex.ZERO, STRAIN.times(0.002)},
            {STRESS, STRESS.times(0.001), STRESS.times(Complex.polar(0.02, 1))},
        };
    }

    ExtractionPlan plan() {
        return new ExtractionPlan(0, MOST_ORDERS, drift, FrequencySource.SIGNAL);
    }

    /** The orders below half the samples a cycle. */
    int orders() {
        int orders = MOST_ORDERS;
        while (orders >= samplesPerCycle / 2) {
            orders--;
        }
        return orders;
    }

    /** Standard deviation of the noise as part of the amplitude of its channel. */
    double relativeNoise() {
        return Math.pow(10, -snrDb / 20) / Math.sqrt(2);
    }

    /** Whether every draw has its own time stamps, and so its own bound. */
    boolean variesInTime() {
        return missing > 0 || jitter > 0;
    }

    Waveform draw(long seed) {
        double[] strainDrift = {0.3, drift.degree() > 0 ? 0.2 : 0, drift.degree() > 1 ? -0.1 : 0};
        double[] stressDrift = strainDrift.clone();
        for (int p = 0; p < 3; p++) {
            strainDrift[p] *= STRAIN.abs();
            stressDrift[p] *= -STRESS.abs();
        }
        Complex[][] amplitudes = amplitudes();
        Waveform waveform = Recording.of(FREQUENCY_HZ, cycles, samplesPerCycle)
                .deformation(amplitudes[0])
                .load(amplitudes[1])
                .drifts(strainDrift, stressDrift)
                .noise(relativeNoise() * STRAIN.abs(), relativeNoise() * STRESS.abs())
                .noiseMemory(memory)
                .missing(missing)
                .jitter(jitter)
                .tagged(FREQUENCY_HZ)
                .seed(seed)
                .build();
        return spikes == 0 ? waveform : spiked(waveform, new Random(seed));
    }

    private Waveform spiked(Waveform waveform, Random random) {
        double[] deformation = waveform.deformation().clone();
        double[] load = waveform.load().clone();
        for (int k = 0; k < Math.round(spikes * waveform.size()); k++) {
            double height = random.nextBoolean() ? 10 : -10;
            int place = random.nextInt(waveform.size());
            if (random.nextBoolean()) {
                load[place] += height * STRESS.abs();
            } else {
                deformation[place] += height * STRAIN.abs();
            }
        }
        return new Waveform(waveform.timeS(), deformation, load, new double[0], waveform.nominalFrequencyHz(), 0);
    }
}

package nightlag.stages.waveform;

import java.util.Arrays;
import java.util.OptionalDouble;
import java.util.Random;
import java.util.function.DoubleUnaryOperator;
import nightlag.stages.numeric.Complex;

/** Builds records for tests: two channels of known harmonics on a drift, with noise if wanted. */
public final class Recording {
    private double frequencyHz = 1;
    private double cycles = 5;
    private double samplesPerCycle = 64;
    private double startS;
    private double jitter;
    private double missing;
    private OptionalDouble tag = OptionalDouble.empty();
    private Complex[] deformation = {Complex.polar(0.01, 0.3)};
    private Complex[] load = {Complex.polar(500, 0.9)};
    private double[] deformationDrift = {0};
    private double[] loadDrift = {0};
    private double deformationNoise;
    private double loadNoise;
    private double noiseMemory;
    private DoubleUnaryOperator temperatureK = t -> Double.NaN;
    private long seed = 1;

    public static Recording of(double frequencyHz, double cycles, double samplesPerCycle) {
        Recording recording = new Recording();
        recording.frequencyHz = frequencyHz;
        recording.cycles = cycles;
        recording.samplesPerCycle = samplesPerCycle;
        return recording;
    }

    public Recording startingAt(double seconds) {
        startS = seconds;
        return this;
    }

    public Recording tagged(double hz) {
        tag = OptionalDouble.of(hz);
        return this;
    }

    /** Amplitudes by order, phase counted from the first sample. */
    public Recording deformation(Complex... amplitudes) {
        deformation = amplitudes;
        return this;
    }

    public Recording load(Complex... amplitudes) {
        load = amplitudes;
        return this;
    }

    /** Polynomials in t/duration, lowest power first. */
    public Recording drifts(double[] ofDeformation, double[] ofLoad) {
        deformationDrift = ofDeformation;
        loadDrift = ofLoad;
        return this;
    }

    public Recording jitter(double partOfInterval) {
        jitter = partOfInterval;
        return this;
    }

    public Recording missing(double share) {
        missing = share;
        return this;
    }

    public Recording noise(double ofDeformation, double ofLoad) {
        deformationNoise = ofDeformation;
        loadNoise = ofLoad;
        return this;
    }

    /** Noise of first-order memory: n_i = a n_(i−1) + white, of the same total variance. */
    public Recording noiseMemory(double coefficient) {
        noiseMemory = coefficient;
        return this;
    }

    public Recording temperature(DoubleUnaryOperator kelvin) {
        temperatureK = kelvin;
        return this;
    }

    public Recording seed(long value) {
        seed = value;
        return this;
    }

    public double durationS() {
        return cycles / frequencyHz;
    }

    public Waveform build() {
        Random random = new Random(seed);
        int count = (int) Math.round(cycles * samplesPerCycle);
        double interval = 1 / (frequencyHz * samplesPerCycle);
        double[] t = new double[count];
        double[] d = new double[count];
        double[] l = new double[count];
        double[] k = new double[count];
        double[] memory = new double[2];
        int kept = 0;
        for (int i = 0; i < count; i++) {
            double seconds = interval * (i + (jitter > 0 ? jitter * random.nextGaussian() : 0));
            boolean drop = missing > 0 && random.nextDouble() < missing;
            double noiseD = noise(random, memory, 0, deformationNoise);
            double noiseL = noise(random, memory, 1, loadNoise);
            if (drop) {
                continue;
            }
            t[kept] = startS + seconds;
            // what was written is what the model is taken at
            double since = t[kept] - startS;
            d[kept] = value(deformation, deformationDrift, since) + noiseD;
            l[kept] = value(load, loadDrift, since) + noiseL;
            k[kept] = temperatureK.applyAsDouble(since);
            kept++;
        }
        boolean hasTemperature = !Double.isNaN(k[0]);
        return new Waveform(
                Arrays.copyOf(t, kept),
                Arrays.copyOf(d, kept),
                Arrays.copyOf(l, kept),
                hasTemperature ? Arrays.copyOf(k, kept) : new double[0],
                tag,
                0);
    }

    private double noise(Random random, double[] memory, int channel, double deviation) {
        if (deviation == 0) {
            return 0;
        }
        double fresh = random.nextGaussian();
        memory[channel] = noiseMemory == 0
                ? fresh
                : noiseMemory * memory[channel] + Math.sqrt(1 - noiseMemory * noiseMemory) * fresh;
        return deviation * memory[channel];
    }

    private double value(Complex[] amplitudes, double[] drift, double since) {
        double value = 0;
        double part = since / durationS();
        for (int p = drift.length - 1; p >= 0; p--) {
            value = value * part + drift[p];
        }
        for (int n = 1; n <= amplitudes.length; n++) {
            double phase = 2 * Math.PI * frequencyHz * n * since;
            value += amplitudes[n - 1].re() * Math.cos(phase) - amplitudes[n - 1].im() * Math.sin(phase);
        }
        return value;
    }
}

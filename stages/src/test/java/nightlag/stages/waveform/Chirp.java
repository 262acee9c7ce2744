package nightlag.stages.waveform;

import java.util.Arrays;
import java.util.OptionalDouble;
import java.util.Random;
import nightlag.stages.numeric.Complex;

/**
 * Records of exponential chirps with a Tukey window (Geri et al., Phys. Rev. X 8 (2018) 041042) on a material of
 * relaxation modes. The strain is γ₀ w(t) sin[2π f₁ (T/L)(e^{Lt/T} − 1)] with L = ln f₂/f₁; the stress of each mode,
 * dσ/dt = g dγ/dt − σ/τ, is advanced exactly but for a five-point Gauss–Legendre quadrature of dγ/dt over each part of a
 * sampling interval.
 */
public final class Chirp {
    private static final double[] NODES = {
        -0.906179845938664, -0.5384693101056831, 0, 0.5384693101056831, 0.906179845938664
    };
    private static final double[] WEIGHTS = {
        0.23692688505618908, 0.47862867049936647, 0.5688888888888889, 0.47862867049936647, 0.23692688505618908
    };
    private static final int PARTS = 2;

    private final double slowestHz;
    private final double fastestHz;
    private final double seconds;
    private final double[] strengthsPa;
    private final double[] timesS;
    private double equilibriumPa;
    private double taper = 0.1;
    private double before;
    private double after;
    private double cut;
    private double rateHz;
    private double noise;
    private double drift;
    private double jitter;
    private long seed = 1;

    private Chirp(double slowestHz, double fastestHz, double seconds, double[] strengthsPa, double[] timesS) {
        this.slowestHz = slowestHz;
        this.fastestHz = fastestHz;
        this.seconds = seconds;
        this.rateHz = 20 * Math.max(slowestHz, fastestHz);
        this.strengthsPa = strengthsPa;
        this.timesS = timesS;
    }

    /** A sweep on a liquid of relaxation modes; 20 samples a cycle of the fastest frequency. */
    public static Chirp of(double slowestHz, double fastestHz, double seconds, double[] strengthsPa, double[] timesS) {
        return new Chirp(slowestHz, fastestHz, seconds, strengthsPa, timesS);
    }

    /** With an equilibrium modulus: a solid. */
    public Chirp equilibrium(double pa) {
        equilibriumPa = pa;
        return this;
    }

    /** Share of the sweep that is tapered, half at each end. */
    public Chirp taper(double share) {
        taper = share;
        return this;
    }

    /** Rest before and after the sweep, s. */
    public Chirp rest(double beforeS, double afterS) {
        before = beforeS;
        after = afterS;
        return this;
    }

    /** A recorder that is started so late, s. */
    public Chirp startedLate(double seconds) {
        cut = seconds;
        return this;
    }

    /** Noise of both channels as part of their amplitudes (|G*| at the middle of the sweep). */
    public Chirp noise(double part) {
        noise = part;
        return this;
    }

    /** How far both means move over the record, as part of their amplitudes. */
    public Chirp drift(double part) {
        drift = part;
        return this;
    }

    /** Standard deviation of the time stamps as part of the interval. */
    public Chirp jitter(double part) {
        jitter = part;
        return this;
    }

    public Chirp rate(double hz) {
        rateHz = hz;
        return this;
    }

    public Chirp seed(long number) {
        seed = number;
        return this;
    }

    /** G* of the material. */
    public Complex modulus(double hz) {
        Complex modulus = new Complex(equilibriumPa, 0);
        for (int i = 0; i < timesS.length; i++) {
            Complex x = new Complex(0, 2 * Math.PI * hz * timesS[i]);
            modulus = modulus.plus(x.over(Complex.ONE.plus(x)).times(strengthsPa[i]));
        }
        return modulus;
    }

    private double window(double t) {
        double flank = taper * seconds / 2;
        double inside = Math.min(t, seconds - t);
        return inside <= 0 ? 0 : inside >= flank ? 1 : 0.5 - 0.5 * Math.cos(Math.PI * inside / flank);
    }

    private double windowSlope(double t) {
        double flank = taper * seconds / 2;
        double inside = Math.min(t, seconds - t);
        double slope = inside <= 0 || inside >= flank ? 0 : 0.5 * Math.PI / flank * Math.sin(Math.PI * inside / flank);
        return t < seconds / 2 ? slope : -slope;
    }

    private double phase(double t) {
        double rate = Math.log(fastestHz / slowestHz) / seconds;
        return 2 * Math.PI * slowestHz * Math.expm1(rate * t) / rate;
    }

    private double strain(double t) {
        return 0.01 * window(t) * Math.sin(phase(t));
    }

    private double strainRate(double t) {
        double hz = slowestHz * Math.exp(Math.log(fastestHz / slowestHz) * t / seconds);
        return 0.01 * (windowSlope(t) * Math.sin(phase(t)) + window(t) * 2 * Math.PI * hz * Math.cos(phase(t)));
    }

    /** The record. */
    public Waveform build() {
        Random random = new Random(seed);
        double duration = before + seconds + after;
        int count = (int) Math.round(duration * rateHz);
        double[] time = new double[count];
        double[] strain = new double[count];
        double[] stress = new double[count];
        double[] modes = new double[timesS.length];
        double middle = modulus(Math.sqrt(slowestHz * fastestHz)).abs() * 0.01;
        double last = -before;
        for (int i = 0; i < count; i++) {
            double t = i / rateHz - before + jitter * random.nextGaussian() / rateHz;
            for (int part = 0; part < PARTS; part++) {
                double from = last + (t - last) * part / PARTS;
                advance(modes, from, (t - last) / PARTS);
            }
            last = t;
            time[i] = t + before;
            strain[i] = strain(t) + 0.01 * (noise * random.nextGaussian() + drift * t / duration);
            stress[i] = equilibriumPa * strain(t) + middle * (noise * random.nextGaussian() - drift * t / duration);
            for (double mode : modes) {
                stress[i] += mode;
            }
        }
        int first = (int) Math.round(cut * rateHz);
        return new Waveform(
                Arrays.copyOfRange(time, first, count),
                Arrays.copyOfRange(strain, first, count),
                Arrays.copyOfRange(stress, first, count),
                new double[0],
                OptionalDouble.empty(),
                0);
    }

    private void advance(double[] modes, double from, double step) {
        double[] rates = new double[NODES.length];
        for (int n = 0; n < NODES.length; n++) {
            rates[n] = strainRate(from + step * (1 + NODES[n]) / 2);
        }
        for (int m = 0; m < modes.length; m++) {
            double added = 0;
            for (int n = 0; n < NODES.length; n++) {
                added += WEIGHTS[n] * step / 2 * rates[n] * Math.exp(-step * (1 - NODES[n]) / 2 / timesS[m]);
            }
            modes[m] = modes[m] * Math.exp(-step / timesS[m]) + strengthsPa[m] * added;
        }
    }
}

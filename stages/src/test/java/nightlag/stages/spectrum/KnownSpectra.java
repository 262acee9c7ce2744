package nightlag.stages.spectrum;

import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.Random;
import java.util.function.DoubleFunction;
import java.util.function.DoubleUnaryOperator;
import java.util.stream.IntStream;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.numeric.Complex;

/** Materials whose continuous spectra are known, and readings of them. */
final class KnownSpectra {
    private KnownSpectra() {}

    /**
     * The double log-normal of Honerkamp &amp; Weese, Macromolecules 22 (1989) 4372: peaks at 0.05 s and 5 s (from memory; the
     * prefactor makes the total modulus 1).
     */
    static double doubleLogNormal(double time) {
        return (logNormal(time / 0.05) + logNormal(time / 5)) / 2;
    }

    private static double logNormal(double ratio) {
        double log = Math.log(ratio);
        return Math.exp(-log * log / 2) / Math.sqrt(2 * Math.PI);
    }

    /** G* of a smooth H by the trapezoidal rule in ln τ, far finer and wider than any fit. */
    static DoubleFunction<Complex> modulusOf(DoubleUnaryOperator spectrum) {
        double step = 0.02;
        double[] times = IntStream.rangeClosed(-1500, 1500)
                .mapToDouble(i -> Math.exp(i * step))
                .toArray();
        double[] strengths = IntStream.range(0, times.length)
                .mapToDouble(i -> step * spectrum.applyAsDouble(times[i]))
                .toArray();
        RelaxationModes modes = RelaxationModes.of(0, times, strengths);
        return modes::modulusPa;
    }

    /** J0, 1/η0 and a smooth L as modes, by the trapezoidal rule in ln λ, far wider than any record. */
    static RetardationModes retardationOf(
            double instantaneousPerPa, double fluidityPerPaS, DoubleUnaryOperator spectrum) {
        double step = 0.1;
        double[] times = IntStream.rangeClosed(-1000, 1000)
                .mapToDouble(i -> Math.exp(i * step))
                .toArray();
        double[] strengths = Arrays.stream(times)
                .map(time -> step * spectrum.applyAsDouble(time))
                .toArray();
        return RetardationModes.of(instantaneousPerPa, fluidityPerPaS, times, strengths);
    }

    /**
     * The fractional solid G* = Ge + (Gg − Ge)(iωτ)^α/(1 + (iωτ)^α) with τ = 1 s, whose spectra are closed (Cole &amp; Cole,
     * J. Chem. Phys. 9 (1941) 341).
     */
    record FractionalSolid(double equilibriumPa, double glassyPa, double exponent) {
        Complex modulusPa(double angularFrequency) {
            return at(Complex.polar(Math.pow(angularFrequency, exponent), exponent * Math.PI / 2));
        }

        private Complex at(Complex power) {
            return Complex.ONE
                    .times(equilibriumPa)
                    .plus(power.over(Complex.ONE.plus(power)).times(glassyPa - equilibriumPa));
        }

        /** Just below the cut along the negative real axis. */
        private Complex onTheCut(double time) {
            return at(Complex.polar(Math.pow(time, -exponent), -exponent * Math.PI));
        }

        /** H in Pa: −Im G*(−1/τ)/π on the cut's lower side. */
        double relaxationPa(double time) {
            return Math.abs(onTheCut(time).im()) / Math.PI;
        }

        /** L in 1/Pa. */
        double retardationPerPa(double time) {
            return Math.abs(Complex.ONE.over(onTheCut(time)).im()) / Math.PI;
        }
    }

    /** Readings at ten frequencies a decade, each modulus with an error of its own of a share of itself. */
    static List<ModulusReading> readings(
            DoubleFunction<Complex> modulus, double lowestDecade, double highestDecade, double noise, long seed) {
        Random random = new Random(seed);
        int count = (int) Math.round(10 * (highestDecade - lowestDecade)) + 1;
        return IntStream.range(0, count)
                .mapToObj(i -> {
                    double angularFrequency = Math.pow(10, lowestDecade + i / 10.0);
                    Complex exact = modulus.apply(angularFrequency);
                    double storageU = noise * exact.re();
                    double lossU = noise * exact.im();
                    Moduli moduli = new Moduli(
                            exact.re() + storageU * random.nextGaussian(),
                            exact.im() + lossU * random.nextGaussian(),
                            Optional.of(new ModuliCovariance(storageU * storageU, lossU * lossU, 0)));
                    return new ModulusReading(angularFrequency, moduli);
                })
                .toList();
    }

    /** The same without covariances. */
    static List<ModulusReading> bare(List<ModulusReading> readings) {
        return readings.stream()
                .map(reading -> new ModulusReading(
                        reading.angularFrequency(),
                        new Moduli(
                                reading.moduli().storagePa(), reading.moduli().lossPa(), Optional.empty())))
                .toList();
    }
}

package nightlag.stages.response;

import java.util.List;
import java.util.Optional;
import java.util.Random;
import java.util.stream.IntStream;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.spectrum.RelaxationModes;
import nightlag.stages.spectrum.RetardationModes;

/**
 * The fractional solid G* = Ge + (Gg − Ge)(iωτ)^α/(1 + (iωτ)^α) (Cole &amp; Cole, J. Chem. Phys. 9 (1941) 341). With the Mittag-Leffler
 * function E, G(t) = Ge + (Gg − Ge) E(−(t/τ)^α) and J(t) = 1/Ge − (1/Ge − 1/Gg) E(−(t/τ')^α), τ' = τ (Gg/Ge)^{1/α}.
 */
record FractionalSolid(double equilibriumPa, double glassPa, double timeS, double alpha) {
    /** Step in ln τ at which a sum over modes is the integral over the spectrum to the last digits. */
    private static final double STEP = 0.2;

    private static final double SMALLEST = 1e-13;

    /** E_α(−x^α) by its spectrum, sin(απ)/π ∫ s/(s² + 2 s cos απ + 1) e^{−rx} d ln r with s = r^α. */
    static double mittagLeffler(double alpha, double x) {
        int reach = reach(alpha);
        return IntStream.rangeClosed(-reach, reach)
                .mapToDouble(i -> density(alpha, Math.exp(i * STEP)) * Math.exp(-x * Math.exp(i * STEP)) * STEP)
                .sum();
    }

    private static int reach(double alpha) {
        return (int) Math.ceil(-Math.log(SMALLEST) / alpha / STEP);
    }

    private static double density(double alpha, double rate) {
        double s = Math.pow(rate, alpha);
        return Math.sin(alpha * Math.PI) / Math.PI / (s + 2 * Math.cos(alpha * Math.PI) + 1 / s);
    }

    double relaxationPa(double t) {
        return equilibriumPa + (glassPa - equilibriumPa) * mittagLeffler(alpha, t / timeS);
    }

    double creepPerPa(double t) {
        return 1 / equilibriumPa - (1 / equilibriumPa - 1 / glassPa) * mittagLeffler(alpha, t / retardationTimeS());
    }

    private double retardationTimeS() {
        return timeS * Math.pow(glassPa / equilibriumPa, 1 / alpha);
    }

    /** So many modes that they are the spectrum. */
    RelaxationModes relaxationModes() {
        return RelaxationModes.of(equilibriumPa, times(timeS), strengths(glassPa - equilibriumPa));
    }

    /** The same for compliances. */
    RetardationModes retardationModes() {
        return RetardationModes.of(
                1 / glassPa, 0, times(retardationTimeS()), strengths(1 / equilibriumPa - 1 / glassPa));
    }

    private double[] times(double about) {
        int reach = reach(alpha);
        return IntStream.rangeClosed(-reach, reach)
                .mapToDouble(i -> about * Math.exp(-i * STEP))
                .toArray();
    }

    private double[] strengths(double sum) {
        int reach = reach(alpha);
        return IntStream.rangeClosed(-reach, reach)
                .mapToDouble(i -> sum * density(alpha, Math.exp(i * STEP)) * STEP)
                .toArray();
    }

    /** Ten readings a decade, with relative noise and that for u. */
    List<ModulusReading> readings(double lowest, double highest, double noise, double saidU, long seed) {
        Random random = new Random(seed);
        RelaxationModes modes = relaxationModes();
        int count = (int) Math.round(10 * Math.log10(highest / lowest));
        return IntStream.rangeClosed(0, count)
                .mapToObj(i -> {
                    double frequency = lowest * Math.pow(highest / lowest, (double) i / count);
                    double storage = modes.modulusPa(frequency).re() * (1 + noise * random.nextGaussian());
                    double loss = modes.modulusPa(frequency).im() * (1 + noise * random.nextGaussian());
                    ModuliCovariance covariance =
                            new ModuliCovariance(Math.pow(saidU * storage, 2), Math.pow(saidU * loss, 2), 0);
                    return new ModulusReading(frequency, new Moduli(storage, loss, Optional.of(covariance)));
                })
                .toList();
    }
}

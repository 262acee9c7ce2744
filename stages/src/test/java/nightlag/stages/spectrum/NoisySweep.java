package nightlag.stages.spectrum;

import java.util.List;
import java.util.Optional;
import java.util.Random;
import java.util.function.DoubleFunction;
import java.util.stream.IntStream;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.numeric.Complex;

/** A frequency sweep over a material whose moduli are known in closed form: {@code count} frequencies, evenly in ln ω. */
record NoisySweep(String name, DoubleFunction<Complex> material, double lowest, double highest, int count) {
    /** Invented materials beside two published ones; what they have in common is that they are different in kind. */
    static final List<NoisySweep> MATERIALS = List.of(
            new NoisySweep("LDPE melt, 4 decades", PublishedSpectraValidationTest.LAUN::modulusPa, 1e-2, 1e2, 21),
            new NoisySweep("LDPE melt, 3 decades", PublishedSpectraValidationTest.LAUN::modulusPa, 1e-1, 1e2, 31),
            new NoisySweep(
                    "PMMA, 3 decades",
                    omega -> PublishedSpectraValidationTest.PMMA.modulusPa(omega / 1e3),
                    1e-1,
                    1e2,
                    16),
            new NoisySweep(
                    "one Maxwell mode",
                    RelaxationModes.of(0, new double[] {1}, new double[] {1e4})::modulusPa,
                    1e-2,
                    1e2,
                    21),
            new NoisySweep("fractional solid", omega -> fractional(omega, 1e5, 1e7, 1, 0.5), 1e-2, 1e2, 21),
            new NoisySweep("fractional liquid", omega -> fractional(omega, 0, 1e6, 1, 0.8), 1e-2, 1e2, 41),
            new NoisySweep("rubber", omega -> fractional(omega, 1e6, 1.5e6, 0.01, 0.4), 1e-1, 1e2, 31));

    /** What the noise grows with. */
    enum Noise {
        OF_EACH,
        OF_MAGNITUDE
    }

    /** What is wrong with a sweep: the modulus at ω, {@code part} of the way through the sweep. */
    interface Spoiling {
        Complex of(Complex modulus, double omega, double part);
    }

    /** Ge + (Gg − Ge)(iωτ)^α/(1 + (iωτ)^α) (Cole &amp; Cole, J. Chem. Phys. 9 (1941) 341, for moduli). */
    static Complex fractional(double omega, double equilibrium, double glassy, double time, double power) {
        double size = Math.pow(omega * time, power);
        Complex term = new Complex(size * Math.cos(power * Math.PI / 2), size * Math.sin(power * Math.PI / 2));
        Complex share = term.over(new Complex(1 + term.re(), term.im()));
        return new Complex(equilibrium + (glassy - equilibrium) * share.re(), (glassy - equilibrium) * share.im());
    }

    /** The same sweep with something wrong. */
    NoisySweep spoilt(Spoiling spoiling) {
        DoubleFunction<Complex> wrong = omega ->
                spoiling.of(material.apply(omega), omega, Math.log(omega / lowest) / Math.log(highest / lowest));
        return new NoisySweep(name, wrong, lowest, highest, count);
    }

    /** Its readings, with noise of this size. */
    List<ModulusReading> readings(Noise noise, double size, boolean withU, long seed) {
        Random random = new Random(7919 * seed + 17);
        return IntStream.range(0, count)
                .mapToObj(i -> {
                    double omega = lowest * Math.pow(highest / lowest, i / (count - 1.0));
                    Complex modulus = material.apply(omega);
                    double storageU = size * (noise == Noise.OF_EACH ? Math.abs(modulus.re()) : modulus.abs());
                    double lossU = size * (noise == Noise.OF_EACH ? Math.abs(modulus.im()) : modulus.abs());
                    return new ModulusReading(
                            omega,
                            new Moduli(
                                    modulus.re() + storageU * random.nextGaussian(),
                                    modulus.im() + lossU * random.nextGaussian(),
                                    withU
                                            ? Optional.of(new ModuliCovariance(storageU * storageU, lossU * lossU, 0))
                                            : Optional.empty()));
                })
                .toList();
    }

    /** The same reading, each modulus said to be known to this part of itself. */
    static ModulusReading withU(ModulusReading reading, double relativeU) {
        Moduli moduli = reading.moduli();
        double storageU = relativeU * moduli.storagePa();
        double lossU = relativeU * moduli.lossPa();
        return new ModulusReading(
                reading.angularFrequency(),
                new Moduli(
                        moduli.storagePa(),
                        moduli.lossPa(),
                        Optional.of(new ModuliCovariance(storageU * storageU, lossU * lossU, 0))));
    }

    /** The same reading in another unit. */
    static ModulusReading scaled(ModulusReading reading, double factor) {
        Moduli moduli = reading.moduli();
        return new ModulusReading(
                reading.angularFrequency(),
                new Moduli(
                        factor * moduli.storagePa(),
                        factor * moduli.lossPa(),
                        moduli.covariance()
                                .map(known -> new ModuliCovariance(
                                        factor * factor * known.storageVariance(),
                                        factor * factor * known.lossVariance(),
                                        factor * factor * known.covariance()))));
    }

    @Override
    public String toString() {
        return name;
    }
}

package nightlag.stages;

import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.stages.geometry.DeformationMode;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.PointKey;
import nightlag.stages.moduli.Quality;
import nightlag.stages.numeric.Complex;

/** Points for tests, built up from a sound one at 190 °C and 1 Hz. */
public record TestPoints(
        PointKey key,
        DeformationMode deformation,
        double temperatureK,
        OptionalDouble tagK,
        double frequencyHz,
        Complex modulus,
        double relativeU,
        Quality quality) {
    /** The plain one. */
    public static TestPoints point() {
        return new TestPoints(
                new PointKey("Heron 3", "L1", "1", "1", "1", "bench/a.csv"),
                DeformationMode.SHEAR,
                463.15,
                OptionalDouble.empty(),
                1,
                new Complex(1000, 2000),
                0.01,
                Quality.SOUND);
    }

    public TestPoints named(String specimen, String sweep, String point, String sourceFile) {
        PointKey renamed = new PointKey(key.grade(), key.lot(), specimen, sweep, point, sourceFile);
        return new TestPoints(renamed, deformation, temperatureK, tagK, frequencyHz, modulus, relativeU, quality);
    }

    public TestPoints at(double temperature) {
        return new TestPoints(key, deformation, temperature, tagK, frequencyHz, modulus, relativeU, quality);
    }

    public TestPoints tagged(double tag) {
        return new TestPoints(
                key, deformation, temperatureK, OptionalDouble.of(tag), frequencyHz, modulus, relativeU, quality);
    }

    public TestPoints hz(double frequency) {
        return new TestPoints(key, deformation, temperatureK, tagK, frequency, modulus, relativeU, quality);
    }

    public TestPoints modulus(Complex value) {
        return new TestPoints(key, deformation, temperatureK, tagK, frequencyHz, value, relativeU, quality);
    }

    public TestPoints relativeU(double u) {
        return new TestPoints(key, deformation, temperatureK, tagK, frequencyHz, modulus, u, quality);
    }

    public TestPoints in(DeformationMode mode) {
        return new TestPoints(key, mode, temperatureK, tagK, frequencyHz, modulus, relativeU, quality);
    }

    public TestPoints quality(Quality value) {
        return new TestPoints(key, deformation, temperatureK, tagK, frequencyHz, modulus, relativeU, value);
    }

    /** The point itself; without uncertainty where the relative one is zero. */
    public ModulusPoint build() {
        double storageU = relativeU * modulus.re();
        double lossU = relativeU * modulus.im();
        Optional<ModuliCovariance> covariance = relativeU > 0
                ? Optional.of(new ModuliCovariance(storageU * storageU, lossU * lossU, 0))
                : Optional.empty();
        return new ModulusPoint(
                key,
                Optional.empty(),
                deformation,
                OptionalDouble.of(temperatureK),
                tagK,
                OptionalDouble.of(frequencyHz),
                OptionalDouble.empty(),
                OptionalDouble.empty(),
                OptionalDouble.empty(),
                Optional.of(new Moduli(modulus.re(), modulus.im(), covariance)),
                List.of(),
                quality,
                List.of(),
                OptionalDouble.empty(),
                0,
                OptionalDouble.empty(),
                OptionalDouble.empty(),
                OptionalDouble.empty(),
                List.of(),
                List.of(),
                Optional.empty(),
                Optional.empty(),
                Optional.empty(),
                OptionalDouble.empty());
    }
}

package nightlag.stages.sweep;

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

/** One point of a series, for tests; sound, in shear, without time and strain unless changed. */
public record SeriesPoint(
        String sweep,
        String point,
        String file,
        double temperatureK,
        double frequencyHz,
        OptionalDouble elapsedS,
        OptionalDouble strain,
        DeformationMode deformation,
        Quality quality,
        Moduli moduli) {
    /** The point itself, named by its number. */
    public static SeriesPoint of(int number, double temperatureK, double frequencyHz) {
        return new SeriesPoint(
                "1",
                String.valueOf(number),
                "bench/" + number + ".csv",
                temperatureK,
                frequencyHz,
                OptionalDouble.empty(),
                OptionalDouble.empty(),
                DeformationMode.SHEAR,
                Quality.SOUND,
                exact(1000, 2000, 0.01));
    }

    /** Moduli with the same relative u, uncorrelated; without covariance where it is zero. */
    public static Moduli exact(double storagePa, double lossPa, double relativeU) {
        double storageU = relativeU * storagePa;
        double lossU = relativeU * lossPa;
        return new Moduli(
                storagePa,
                lossPa,
                relativeU > 0
                        ? Optional.of(new ModuliCovariance(storageU * storageU, lossU * lossU, 0))
                        : Optional.empty());
    }

    /** A modulus with the same relative u of both parts. */
    public SeriesPoint modulus(Complex value, double relativeU) {
        return moduli(exact(value.re(), value.im(), relativeU));
    }

    public SeriesPoint moduli(Moduli value) {
        return new SeriesPoint(
                sweep, point, file, temperatureK, frequencyHz, elapsedS, strain, deformation, quality, value);
    }

    public SeriesPoint named(String newSweep, String newPoint, String newFile) {
        return new SeriesPoint(
                newSweep, newPoint, newFile, temperatureK, frequencyHz, elapsedS, strain, deformation, quality, moduli);
    }

    public SeriesPoint after(double seconds) {
        return new SeriesPoint(
                sweep,
                point,
                file,
                temperatureK,
                frequencyHz,
                OptionalDouble.of(seconds),
                strain,
                deformation,
                quality,
                moduli);
    }

    public SeriesPoint strained(double amplitude) {
        return new SeriesPoint(
                sweep,
                point,
                file,
                temperatureK,
                frequencyHz,
                elapsedS,
                OptionalDouble.of(amplitude),
                deformation,
                quality,
                moduli);
    }

    public SeriesPoint in(DeformationMode mode) {
        return new SeriesPoint(sweep, point, file, temperatureK, frequencyHz, elapsedS, strain, mode, quality, moduli);
    }

    public SeriesPoint unusable() {
        return new SeriesPoint(
                sweep, point, file, temperatureK, frequencyHz, elapsedS, strain, deformation, Quality.UNUSABLE, moduli);
    }

    public ModulusPoint build() {
        return new ModulusPoint(
                new PointKey("Heron 3", "L1", "1", sweep, point, file),
                Optional.empty(),
                deformation,
                OptionalDouble.of(temperatureK),
                OptionalDouble.empty(),
                OptionalDouble.of(frequencyHz),
                elapsedS,
                strain,
                strain.isPresent() ? OptionalDouble.of(strain.getAsDouble() * moduli.magnitudePa()) : strain,
                Optional.of(moduli),
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

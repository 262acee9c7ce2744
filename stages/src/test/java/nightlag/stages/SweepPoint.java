package nightlag.stages;

import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.stages.geometry.DeformationMode;
import nightlag.stages.geometry.GeometryKind;
import nightlag.stages.moduli.Flag;
import nightlag.stages.moduli.Harmonic;
import nightlag.stages.moduli.HarmonicLimits;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.PointKey;
import nightlag.stages.moduli.Quality;
import nightlag.stages.numeric.Complex;

/** One point of an amplitude sweep, for tests; a sound one between parallel plates at 25 °C and 1 Hz unless changed. */
public record SweepPoint(
        double strain,
        Complex modulus,
        double relativeU,
        List<Harmonic> harmonics,
        Optional<GeometryKind> torqueGeometry,
        Quality quality,
        List<Flag> flags,
        Optional<Flag> unusableOnlyBy,
        double frequencyHz,
        Optional<HarmonicLimits> harmonicLimits,
        OptionalDouble windowS) {
    public static SweepPoint of(double strain, Complex modulus, double relativeU) {
        return new SweepPoint(
                strain,
                modulus,
                relativeU,
                List.of(),
                Optional.of(GeometryKind.PARALLEL_PLATE),
                Quality.SOUND,
                List.of(),
                Optional.empty(),
                1,
                Optional.empty(),
                OptionalDouble.empty());
    }

    public SweepPoint harmonics(List<Harmonic> orders) {
        return new SweepPoint(
                strain,
                modulus,
                relativeU,
                orders,
                torqueGeometry,
                quality,
                flags,
                unusableOnlyBy,
                frequencyHz,
                harmonicLimits,
                windowS);
    }

    public SweepPoint between(Optional<GeometryKind> geometry) {
        return new SweepPoint(
                strain,
                modulus,
                relativeU,
                harmonics,
                geometry,
                quality,
                flags,
                unusableOnlyBy,
                frequencyHz,
                harmonicLimits,
                windowS);
    }

    public SweepPoint unusable(List<Flag> raised, Optional<Flag> onlyBy) {
        return new SweepPoint(
                strain,
                modulus,
                relativeU,
                harmonics,
                torqueGeometry,
                Quality.UNUSABLE,
                raised,
                onlyBy,
                frequencyHz,
                harmonicLimits,
                windowS);
    }

    public SweepPoint hz(double frequency) {
        return new SweepPoint(
                strain,
                modulus,
                relativeU,
                harmonics,
                torqueGeometry,
                quality,
                flags,
                unusableOnlyBy,
                frequency,
                harmonicLimits,
                windowS);
    }

    /** With the limits its harmonics are judged by at the rim. */
    public SweepPoint judgedBy(HarmonicLimits limits) {
        return new SweepPoint(
                strain,
                modulus,
                relativeU,
                harmonics,
                torqueGeometry,
                quality,
                flags,
                unusableOnlyBy,
                frequencyHz,
                Optional.of(limits),
                windowS);
    }

    /** One of the windows of a longer record. */
    public SweepPoint inWindow(double lengthS) {
        return new SweepPoint(
                strain,
                modulus,
                relativeU,
                harmonics,
                torqueGeometry,
                quality,
                flags,
                unusableOnlyBy,
                frequencyHz,
                harmonicLimits,
                OptionalDouble.of(lengthS));
    }

    public ModulusPoint build() {
        double deviation = relativeU * modulus.abs();
        return new ModulusPoint(
                new PointKey("Heron 3", "L1", "1", "1", String.valueOf(strain), "bench/a.csv"),
                Optional.empty(),
                DeformationMode.SHEAR,
                OptionalDouble.of(298.15),
                OptionalDouble.empty(),
                OptionalDouble.of(frequencyHz),
                OptionalDouble.empty(),
                OptionalDouble.of(strain),
                OptionalDouble.of(strain * modulus.abs()),
                Optional.of(new Moduli(
                        modulus.re(),
                        modulus.im(),
                        Optional.of(new ModuliCovariance(deviation * deviation, deviation * deviation, 0)))),
                harmonics,
                quality,
                flags,
                OptionalDouble.of(5),
                320,
                OptionalDouble.empty(),
                OptionalDouble.empty(),
                OptionalDouble.of(300),
                List.of(),
                List.of(),
                torqueGeometry,
                unusableOnlyBy,
                harmonicLimits,
                windowS);
    }
}

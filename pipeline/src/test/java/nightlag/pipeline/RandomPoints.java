package nightlag.pipeline;

import java.util.ArrayList;
import java.util.EnumSet;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;
import java.util.Set;
import java.util.stream.IntStream;
import nightlag.stages.Reduction;
import nightlag.stages.fault.Reason;
import nightlag.stages.geometry.DeformationMode;
import nightlag.stages.geometry.GeometryKind;
import nightlag.stages.moduli.Flag;
import nightlag.stages.moduli.Harmonic;
import nightlag.stages.moduli.HarmonicLimits;
import nightlag.stages.moduli.LoopPair;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.PointKey;
import nightlag.stages.moduli.Quality;
import nightlag.stages.moduli.Threshold;

/** Points of no material: everything a point can hold, and doubles from the whole range a double has. */
public final class RandomPoints {
    private final Random random;

    /** The same seed gives the same points. */
    public RandomPoints(long seed) {
        random = new Random(seed);
    }

    /** Reductions of one point each, in one lot. */
    public List<Reduction> reductions(String grade, String lot, String sourceFile, int count) {
        return IntStream.rangeClosed(1, count)
                .mapToObj(number -> new Reduction(List.of(
                        point(new PointKey(grade, lot, "specimen 1", "1", Integer.toString(number), sourceFile)))))
                .toList();
    }

    /** A point with this key and anything else. */
    public ModulusPoint point(PointKey key) {
        boolean hasModuli = random.nextInt(5) > 0;
        Quality quality = anyOf(Quality.values());
        return new ModulusPoint(
                key,
                random.nextBoolean() ? Optional.of("2026-03-0" + random.nextInt(1, 10)) : Optional.empty(),
                random.nextBoolean() ? DeformationMode.SHEAR : DeformationMode.EXTENSION,
                maybe(random.nextDouble(200, 500)),
                maybe(random.nextInt(200, 500) + 0.15),
                maybe(Math.exp(random.nextDouble(-10, 10))),
                maybe(random.nextInt(100_000)),
                maybe(positive()),
                maybe(positive()),
                hasModuli ? Optional.of(moduli()) : Optional.empty(),
                harmonics(hasModuli ? random.nextInt(8) : 0),
                quality,
                flags(),
                maybe(random.nextDouble(1, 50)),
                random.nextInt(10_000),
                maybe(number()),
                maybe(random.nextDouble(0, 100)),
                maybe(random.nextDouble(1, 4000)),
                List.of(new Reason(
                        "FEW_CYCLES", "1.2 cycles, at least 3 are wanted; \"quoted\", ümläuts, \u2028 and \u0007")),
                loop(quality == Quality.SOUND ? 0 : random.nextInt(257)),
                random.nextBoolean() ? Optional.of(anyOf(GeometryKind.values())) : Optional.empty(),
                random.nextBoolean() ? Optional.of(anyOf(Flag.values())) : Optional.empty(),
                random.nextBoolean()
                        ? Optional.of(new HarmonicLimits(positive(), new Threshold(positive(), maybe(positive()))))
                        : Optional.empty(),
                maybe(positive()));
    }

    /** Any finite double, the ends of the range and zeros of both signs among them. */
    public double number() {
        return switch (random.nextInt(12)) {
            case 0 -> Double.MIN_VALUE * (1 + random.nextInt(1000));
            case 1 -> -0.0;
            case 2 -> Double.MAX_VALUE;
            case 3 -> random.nextInt(2000) - 1000;
            case 4, 5, 6 -> random.nextGaussian();
            default -> anyBits();
        };
    }

    private double anyBits() {
        double value = Double.longBitsToDouble(random.nextLong());
        return Double.isFinite(value) ? value : 0.1;
    }

    private double positive() {
        return Math.abs(number());
    }

    private OptionalDouble maybe(double value) {
        return random.nextInt(4) == 0 ? OptionalDouble.empty() : OptionalDouble.of(value);
    }

    private <T> T anyOf(T[] values) {
        return List.of(values).get(random.nextInt(values.length));
    }

    private Moduli moduli() {
        return new Moduli(
                number(),
                number(),
                random.nextBoolean()
                        ? Optional.of(new ModuliCovariance(positive(), positive(), number()))
                        : Optional.empty());
    }

    private List<Harmonic> harmonics(int highest) {
        return IntStream.rangeClosed(1, highest)
                .mapToObj(order -> new Harmonic(order, number(), number(), positive(), maybe(positive())))
                .toList();
    }

    private List<Flag> flags() {
        Set<Flag> flags = EnumSet.noneOf(Flag.class);
        int count = random.nextInt(4);
        for (int i = 0; i < count; i++) {
            flags.add(anyOf(Flag.values()));
        }
        return List.copyOf(flags);
    }

    private List<LoopPair> loop(int pairs) {
        List<LoopPair> loop = new ArrayList<>();
        for (int i = 0; i < pairs; i++) {
            loop.add(new LoopPair(number(), number()));
        }
        return loop;
    }
}

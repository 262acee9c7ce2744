package nightlag.pipeline.samples;

import java.util.Random;

/**
 * Gaussian noise that is the same on every machine: the generator of {@link Random} is laid down bit by bit, and the
 * transform of Box &amp; Muller (Ann. Math. Stat. 29 (1958) 610) uses strict mathematics only.
 */
final class Noise {
    private final Random random;

    Noise(long seed) {
        random = new Random(seed);
    }

    /** The next value with this standard deviation. */
    double next(double deviation) {
        double radius = StrictMath.sqrt(-2 * StrictMath.log(1 - random.nextDouble()));
        return deviation * radius * StrictMath.cos(2 * StrictMath.PI * random.nextDouble());
    }
}

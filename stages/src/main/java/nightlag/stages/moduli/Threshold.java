package nightlag.stages.moduli;

import java.util.OptionalDouble;

/**
 * Two limits of a screening figure.
 *
 * @param doubtful beyond it a point is doubtful
 * @param unusable beyond it a point is unusable; empty: the flag alone never makes a point unusable
 */
public record Threshold(double doubtful, OptionalDouble unusable) {
    /** Both limits. */
    public static Threshold of(double doubtful, double unusable) {
        return new Threshold(doubtful, OptionalDouble.of(unusable));
    }
}

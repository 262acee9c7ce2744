package nightlag.stages.moduli;

import java.util.Map;

/** A number worked out of a point's other numbers, always the same from the same ones. It may be asked by several threads. */
@FunctionalInterface
public interface PointFunction {
    /**
     * Its value; NaN where it has none, as a logarithm of zero.
     *
     * @param quantities finite values in the units of {@link PointQuantity#unit()}, at least those it is known to use
     */
    double valueOf(Map<PointQuantity, Double> quantities);
}

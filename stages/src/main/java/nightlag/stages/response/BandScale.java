package nightlag.stages.response;

import java.util.Arrays;
import java.util.stream.IntStream;
import nightlag.stages.response.ResponsePlan.Controlled;
import nightlag.stages.response.ResponseRow.Band;

/**
 * The scale on which a prediction lies in the middle of its band. Where it can have but one sign, that is its logarithm: what is
 * fitted are logarithms of strengths and times, and a strain under a load cannot be below zero. Elsewhere it is the value itself.
 *
 * @param sign 1 or −1 where all values have that sign, 0 where they may have both
 * @param trace what is nothing against the largest value; it is added before the logarithm is taken, for a stress relaxes to zero
 */
record BandScale(int sign, double trace) {
    /** A part of the largest value that is nothing. */
    private static final double NOTHING = 1e-9;

    /**
     * The scale for one programme. Under stresses of one sign all strains have that sign; under strains, all stresses where every
     * step goes the same way.
     */
    static BandScale of(Programme programme, Controlled controlled, double[] predicted) {
        double[] deciding = IntStream.range(0, programme.segments().size())
                .mapToDouble(s -> controlled == Controlled.STRESS
                        ? programme.segments().get(s).value()
                        : programme.stepAt(s))
                .toArray();
        double largest = Arrays.stream(predicted).map(Math::abs).max().orElse(0);
        boolean up = Arrays.stream(deciding).allMatch(value -> value >= 0);
        boolean down = Arrays.stream(deciding).allMatch(value -> value <= 0);
        return new BandScale(up == down ? 0 : up ? 1 : -1, NOTHING * largest);
    }

    /** Values on the scale. */
    double[] of(double[] values) {
        return Arrays.stream(values).map(this::of).toArray();
    }

    private double of(double value) {
        return sign == 0 ? value : Math.log(Math.max(0, sign * value) + trace);
    }

    /** The band about a value, so wide to either side on the scale. */
    Band band(double value, double halfWidth) {
        if (sign == 0 || halfWidth == 0) {
            return new Band(value - halfWidth, value + halfWidth);
        }
        double near = Math.max(0, Math.exp(of(value) - halfWidth) - trace);
        double far = Math.exp(of(value) + halfWidth) - trace;
        return sign > 0 ? new Band(near, far) : new Band(-far, -near);
    }
}

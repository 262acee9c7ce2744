package nightlag.stages.acceptance;

import java.util.OptionalDouble;

/**
 * The decision rule with a guard band on both sides of a limit (JCGM 106:2012, 8.3.2 and 8.3.3): a value conforms when value ±
 * coverage · u lies wholly inside the limits, a limit itself included, and does not when that lies wholly outside; between
 * them it is undecided. With a guard band of 2 u a value at the edge of acceptance is outside the limit with a probability of
 * 2.3 %.
 */
final class GuardBand {
    private GuardBand() {}

    /**
     * The verdict on a finite value; without a u there is no guard band.
     *
     * @param value in the limit's unit
     * @param u in the limit's unit
     */
    static Verdict verdict(double value, OptionalDouble u, LimitPlan limit) {
        double band = band(u, limit);
        double min = limit.min().orElse(Double.NEGATIVE_INFINITY);
        double max = limit.max().orElse(Double.POSITIVE_INFINITY);
        if (value - band >= min && value + band <= max) {
            return Verdict.CONFORMING;
        }
        return value + band < min || value - band > max ? Verdict.NONCONFORMING : Verdict.UNDECIDED;
    }

    /** How far a value is inside the limits, the guard band taken off; below zero where it is not. */
    static double margin(double value, OptionalDouble u, LimitPlan limit) {
        double room = Math.min(
                value - limit.min().orElse(Double.NEGATIVE_INFINITY),
                limit.max().orElse(Double.POSITIVE_INFINITY) - value);
        return room - band(u, limit);
    }

    private static double band(OptionalDouble u, LimitPlan limit) {
        return limit.coverage() == 0 ? 0 : limit.coverage() * u.orElse(0);
    }
}

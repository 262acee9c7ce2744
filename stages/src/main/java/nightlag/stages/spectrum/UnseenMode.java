package nightlag.stages.spectrum;

import java.util.Arrays;

/**
 * What could hide beyond the data: the strongest mode half a decade further out than any fitted one may go that the readings
 * still allow, all other modes making room for it. Allowed is what raises χ² by no more than the scatter's variance, one
 * standard uncertainty.
 */
final class UnseenMode {
    /** How far beyond the data's ends it sits, in time. */
    private static final double REACH = Math.pow(10, 1.5);

    /** The same for a mode that stands in for an equilibrium modulus. */
    private static final double REACH_OF_A_SOLID = 1e5;

    /** Strength is sought to this factor. */
    private static final double FINENESS = 1.1;

    private static final int MAX_TRIALS = 40;

    private final WeightedReadings readings;
    private final ModeRefinement refinement;
    private final FittedModes modes;
    private final double allowed;

    /**
     * A search about a best fit.
     *
     * @param variance variance of the weighted residuals about it
     */
    UnseenMode(WeightedReadings readings, ModeRefinement refinement, FittedModes modes, double variance) {
        this.readings = readings;
        this.refinement = refinement;
        this.modes = modes;
        this.allowed = modes.chiSquared() + variance;
    }

    /** The material with the strongest unseen slow mode. */
    RelaxationModes slow() {
        return with(REACH / readings.lowestFrequency());
    }

    /** The material with the strongest unseen mode so slow that only an equilibrium modulus would be slower. */
    RelaxationModes nearlySolid() {
        return with(REACH_OF_A_SOLID / readings.lowestFrequency());
    }

    /** The material with the strongest unseen fast mode. */
    RelaxationModes fast() {
        return with(1 / (REACH * readings.highestFrequency()));
    }

    private RelaxationModes with(double time) {
        double[] column = readings.mode(time);
        double weight = Math.sqrt(Arrays.stream(column).map(v -> v * v).sum());
        // alone, with nothing making room, a mode this strong would be seen
        double strength = Math.sqrt(allowed - modes.chiSquared()) / weight;
        FittedModes last = modes;
        double lastStrength = 0;
        double factor = 4;
        double ceiling = Double.POSITIVE_INFINITY;
        for (int trial = 0; trial < MAX_TRIALS && factor > FINENESS; trial++) {
            FittedModes others = refinement.refineBeside(last, column, strength);
            if (others.chiSquared() <= allowed) {
                last = others;
                lastStrength = strength;
            } else {
                ceiling = strength;
                factor = Math.sqrt(factor);
            }
            strength = lastStrength == 0
                    ? strength / factor
                    : Math.min(lastStrength * factor, Math.sqrt(lastStrength * ceiling));
        }
        RelaxationModes seen = RelaxationModes.of(last.equilibrium(), last.times(), last.strengths());
        return lastStrength == 0 ? seen : seen.with(time, lastStrength);
    }
}

package nightlag.stages.moduli;

import java.util.OptionalDouble;

/**
 * One step of the stress.
 *
 * @param part load or recovery
 * @param atS its instant, the centre of the rise, in s after that of the first step
 * @param atUS standard uncertainty of the instant, s: it lies somewhere between two samples
 * @param riseS from the last sample before it to the first at the new stress, s
 * @param changePa change of the stress, Pa
 * @param changeUPa standard uncertainty of the change, Pa
 * @param strainBefore strain at its instant
 * @param strainBeforeU standard uncertainty of that; that of the first step's is in every strain of the record
 * @param stressBeforeUPa standard uncertainty of the level of stress before it, Pa: the part of {@code changeUPa} that it
 *     shares with the step before; empty where it is not known apart
 */
public record CreepStep(
        CreepPart part,
        double atS,
        double atUS,
        double riseS,
        double changePa,
        double changeUPa,
        double strainBefore,
        double strainBeforeU,
        OptionalDouble stressBeforeUPa) {
    /** A step of which only the u of the whole change is known. */
    public CreepStep(
            CreepPart part,
            double atS,
            double atUS,
            double riseS,
            double changePa,
            double changeUPa,
            double strainBefore,
            double strainBeforeU) {
        this(part, atS, atUS, riseS, changePa, changeUPa, strainBefore, strainBeforeU, OptionalDouble.empty());
    }
}

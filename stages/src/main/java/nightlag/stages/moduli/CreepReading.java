package nightlag.stages.moduli;

/**
 * One reading of a creep curve: the mean of some samples that follow each other.
 *
 * @param step number of the step it follows, from 1
 * @param timeS mean time after the first step of the record, s
 * @param sinceStepS mean time after its own step, s
 * @param stressPa mean stress, Pa
 * @param strain mean strain, as recorded but for the corrections: its zero is not taken off
 * @param strainU standard uncertainty of the mean strain from the noise of its samples
 * @param compliancePerPa strain since just before the step over the step's stress, 1/Pa: J(t) after a load, the recovered
 *     compliance after an unload
 * @param complianceUPerPa its standard uncertainty, 1/Pa; what it shares with the step's other readings is in it
 */
public record CreepReading(
        int step,
        double timeS,
        double sinceStepS,
        double stressPa,
        double strain,
        double strainU,
        double compliancePerPa,
        double complianceUPerPa) {}

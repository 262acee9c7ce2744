package nightlag.stages.moduli;

import java.util.OptionalDouble;

/**
 * What a creep record is screened by.
 *
 * @param snrDb signal to noise of the weaker channel, dB: its movement over the noise of a sample
 * @param clippedShare share of the deformation's samples that stand at its limit
 * @param gapShare share of the decades of time after the steps that is missing
 * @param baseline what the drift before the load would come to over the record, over the largest strain
 * @param stressChange largest change of the stress within a hold, over its step
 * @param complianceRatio the frame's share of the movement
 * @param temperatureWanderK how far the temperature moves, K; empty without the channel
 * @param deformation largest deformation from its zero, as recorded
 * @param load largest load from its zero, as recorded
 */
record CreepFigures(
        double snrDb,
        double clippedShare,
        double gapShare,
        double baseline,
        double stressChange,
        double complianceRatio,
        OptionalDouble temperatureWanderK,
        double deformation,
        double load) {}

package nightlag.stages;

import java.util.OptionalDouble;

/**
 * One row of moduli reduced elsewhere.
 *
 * @param tags what is known about it; its temperature is the row's
 * @param frequencyHz frequency, Hz
 * @param storagePa storage modulus, Pa
 * @param lossPa loss modulus, Pa
 * @param storageUPa standard uncertainty of the storage modulus, Pa
 * @param lossUPa standard uncertainty of the loss modulus, Pa
 * @param strainAmplitude strain amplitude
 */
public record GivenModuli(
        RecordTags tags,
        double frequencyHz,
        double storagePa,
        double lossPa,
        OptionalDouble storageUPa,
        OptionalDouble lossUPa,
        OptionalDouble strainAmplitude)
        implements MeasuredRecord {}

package nightlag.stages.moduli;

import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.stages.fault.Reason;
import nightlag.stages.geometry.DeformationMode;

/**
 * One point as reduced. A record that can be read but gives no modulus is a point without {@code moduli} and of quality
 * {@link Quality#UNUSABLE}.
 *
 * @param key what it is called
 * @param made the lot's date as tagged
 * @param deformation shear or extension
 * @param temperatureK the channel's mean if there is one, else the tag, K
 * @param taggedTemperatureK the tag, K; it groups isotherms where it is there
 * @param frequencyHz frequency in Hz; empty only where none could be found
 * @param elapsedS time since the start of the run, s
 * @param strainAmplitude corrected strain amplitude
 * @param stressAmplitudePa corrected stress amplitude, Pa
 * @param moduli the modulus
 * @param harmonics orders 1 … H, empty for given moduli
 * @param quality how far it can be trusted
 * @param flags why it is not sound, in the order of {@link Flag}
 * @param cyclesUsed cycles that entered; empty for given moduli
 * @param samplesUsed samples that entered; 0 for given moduli
 * @param strainSnrDb signal to noise of the deformation, dB
 * @param stressSnrDb signal to noise of the load, dB
 * @param degreesOfFreedom effective degrees of freedom behind the uncertainties
 * @param reasons the figure and the threshold behind each flag, and whatever else is worth knowing
 * @param loop at most 256 pairs of strain and stress from the last cycles, where the point is not sound
 */
public record ModulusPoint(
        PointKey key,
        Optional<String> made,
        DeformationMode deformation,
        OptionalDouble temperatureK,
        OptionalDouble taggedTemperatureK,
        OptionalDouble frequencyHz,
        OptionalDouble elapsedS,
        OptionalDouble strainAmplitude,
        OptionalDouble stressAmplitudePa,
        Optional<Moduli> moduli,
        List<Harmonic> harmonics,
        Quality quality,
        List<Flag> flags,
        OptionalDouble cyclesUsed,
        int samplesUsed,
        OptionalDouble strainSnrDb,
        OptionalDouble stressSnrDb,
        OptionalDouble degreesOfFreedom,
        List<Reason> reasons,
        List<LoopPair> loop) {
    /** Copies the lists. */
    public ModulusPoint {
        harmonics = List.copyOf(harmonics);
        flags = List.copyOf(flags);
        reasons = List.copyOf(reasons);
        loop = List.copyOf(loop);
    }
}

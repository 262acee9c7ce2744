package nightlag.stages.moduli;

import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.Stream;
import nightlag.stages.fault.Reason;
import nightlag.stages.geometry.DeformationMode;
import nightlag.stages.geometry.GeometryKind;

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
 * @param loop at most 256 pairs of strain and stress from the last cycles, where the record alone is not sound
 * @param torqueGeometry the geometry by which a torque was made the stress; empty where the record held another load
 * @param unusableOnlyBy the flag that alone makes the point unusable; empty where none does, or more than one
 * @param harmonicLimits the limits its harmonics are judged by again at the rim of parallel plates; empty where they are
 *     what they are
 * @param windowS the planned length of the window of a longer record that it comes from, s; empty for a record of its own
 * @param shared how it moves with what it shares with other records; empty where that is not known
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
        List<LoopPair> loop,
        Optional<GeometryKind> torqueGeometry,
        Optional<Flag> unusableOnlyBy,
        Optional<HarmonicLimits> harmonicLimits,
        OptionalDouble windowS,
        Optional<SharedInfluences> shared) {
    /** Copies the lists. */
    public ModulusPoint {
        harmonics = List.copyOf(harmonics);
        flags = List.copyOf(flags);
        reasons = List.copyOf(reasons);
        loop = List.copyOf(loop);
    }

    /** A point of which nothing is known that it shares with others. */
    public ModulusPoint(
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
            List<LoopPair> loop,
            Optional<GeometryKind> torqueGeometry,
            Optional<Flag> unusableOnlyBy,
            Optional<HarmonicLimits> harmonicLimits,
            OptionalDouble windowS) {
        this(
                key,
                made,
                deformation,
                temperatureK,
                taggedTemperatureK,
                frequencyHz,
                elapsedS,
                strainAmplitude,
                stressAmplitudePa,
                moduli,
                harmonics,
                quality,
                flags,
                cyclesUsed,
                samplesUsed,
                strainSnrDb,
                stressSnrDb,
                degreesOfFreedom,
                reasons,
                loop,
                torqueGeometry,
                unusableOnlyBy,
                harmonicLimits,
                windowS,
                Optional.empty());
    }

    /** The same point, known to move with these. */
    public ModulusPoint sharing(SharedInfluences influences) {
        return placed(
                temperatureK, taggedTemperatureK, strainAmplitude, stressAmplitudePa, moduli, Optional.of(influences));
    }

    /** The same point if what it shares with others were off by this. */
    public ModulusPoint moved(SharedEffect effect) {
        return placed(
                temperatureK,
                taggedTemperatureK,
                times(strainAmplitude, effect.lnStrain()),
                times(stressAmplitudePa, effect.lnStrain() + effect.lnModulus()),
                moduli.map(own -> own.turned(effect.lnModulus(), effect.phaseRad())),
                shared);
    }

    /** The same point if it had been so much warmer, K. */
    public ModulusPoint warmer(double kelvin) {
        OptionalDouble warmerTag =
                taggedTemperatureK.equals(temperatureK) ? plus(taggedTemperatureK, kelvin) : taggedTemperatureK;
        return placed(plus(temperatureK, kelvin), warmerTag, strainAmplitude, stressAmplitudePa, moduli, shared);
    }

    private static OptionalDouble times(OptionalDouble value, double logFactor) {
        return value.isPresent() ? OptionalDouble.of(value.getAsDouble() * Math.exp(logFactor)) : value;
    }

    private static OptionalDouble plus(OptionalDouble value, double more) {
        return value.isPresent() ? OptionalDouble.of(value.getAsDouble() + more) : value;
    }

    private ModulusPoint placed(
            OptionalDouble newTemperatureK,
            OptionalDouble newTagK,
            OptionalDouble newStrain,
            OptionalDouble newStressPa,
            Optional<Moduli> newModuli,
            Optional<SharedInfluences> newShared) {
        return new ModulusPoint(
                key,
                made,
                deformation,
                newTemperatureK,
                newTagK,
                frequencyHz,
                elapsedS,
                newStrain,
                newStressPa,
                newModuli,
                harmonics,
                quality,
                flags,
                cyclesUsed,
                samplesUsed,
                strainSnrDb,
                stressSnrDb,
                degreesOfFreedom,
                reasons,
                loop,
                torqueGeometry,
                unusableOnlyBy,
                harmonicLimits,
                windowS,
                newShared);
    }

    /**
     * The same point with the stress of the plates' rim; the flags of its harmonics are those that they raise there.
     *
     * @param rim the modulus there
     * @param rimStressPa the stress amplitude there, Pa
     * @param rimHarmonics the orders of the stress there
     * @param why what was done
     */
    public ModulusPoint atRim(Moduli rim, double rimStressPa, List<Harmonic> rimHarmonics, Reason why) {
        ModulusPoint moved = changed(
                OptionalDouble.of(rimStressPa),
                Optional.of(rim),
                rimHarmonics,
                quality,
                flags,
                and(why),
                unusableOnlyBy);
        return harmonicLimits.map(moved::withHarmonicsJudged).orElse(moved);
    }

    private ModulusPoint withHarmonicsJudged(HarmonicLimits limits) {
        Screening anew =
                Screening.ofHarmonics(harmonics, new Threshold(limits.third(), OptionalDouble.empty()), limits.even());
        List<Flag> otherFlags = flags.stream()
                .filter(flag -> !Screening.OF_HARMONICS.contains(flag))
                .toList();
        boolean unusableOtherwise = quality == Quality.UNUSABLE
                && unusableOnlyBy.filter(Screening.OF_HARMONICS::contains).isEmpty();
        Quality otherwise =
                unusableOtherwise ? Quality.UNUSABLE : otherFlags.isEmpty() ? Quality.SOUND : Quality.DOUBTFUL;
        Optional<Flag> alone = !unusableOtherwise
                ? anew.unusableOnlyBy()
                : anew.quality() == Quality.UNUSABLE ? Optional.empty() : unusableOnlyBy;
        return changed(
                stressAmplitudePa,
                moduli,
                harmonics,
                otherwise.compareTo(anew.quality()) > 0 ? otherwise : anew.quality(),
                Stream.concat(otherFlags.stream(), anew.flags().stream())
                        .sorted()
                        .toList(),
                Stream.concat(
                                anew.reasons().stream(),
                                reasons.stream().filter(reason -> !Screening.isOfHarmonics(reason)))
                        .toList(),
                alone);
    }

    /** The same point with another modulus, nothing else changed. */
    public ModulusPoint withModuli(Moduli other) {
        return changed(stressAmplitudePa, Optional.of(other), harmonics, quality, flags, reasons, unusableOnlyBy);
    }

    /** The same point with one more flag; it is no better than doubtful. */
    public ModulusPoint flagged(Flag flag, Reason why) {
        List<Flag> more = Stream.concat(flags.stream(), Stream.of(flag))
                .distinct()
                .sorted()
                .toList();
        Quality worse = quality == Quality.SOUND ? Quality.DOUBTFUL : quality;
        return changed(stressAmplitudePa, moduli, harmonics, worse, more, and(why), unusableOnlyBy);
    }

    /** The same point with one more flag, which makes it unusable whatever else it is. */
    ModulusPoint unusable(Flag flag, Reason why) {
        ModulusPoint flagged = flagged(flag, why);
        return changed(
                stressAmplitudePa,
                moduli,
                harmonics,
                Quality.UNUSABLE,
                flagged.flags(),
                flagged.reasons(),
                Optional.empty());
    }

    /** The same point, its unusable verdict softened to doubtful. */
    public ModulusPoint merelyDoubtful(Reason why) {
        return changed(stressAmplitudePa, moduli, harmonics, Quality.DOUBTFUL, flags, and(why), Optional.empty());
    }

    private List<Reason> and(Reason why) {
        return Stream.concat(reasons.stream(), Stream.of(why)).toList();
    }

    private ModulusPoint changed(
            OptionalDouble newStressPa,
            Optional<Moduli> newModuli,
            List<Harmonic> newHarmonics,
            Quality newQuality,
            List<Flag> newFlags,
            List<Reason> newReasons,
            Optional<Flag> newUnusableOnlyBy) {
        return new ModulusPoint(
                key,
                made,
                deformation,
                temperatureK,
                taggedTemperatureK,
                frequencyHz,
                elapsedS,
                strainAmplitude,
                newStressPa,
                newModuli,
                newHarmonics,
                newQuality,
                newFlags,
                cyclesUsed,
                samplesUsed,
                strainSnrDb,
                stressSnrDb,
                degreesOfFreedom,
                newReasons,
                loop,
                torqueGeometry,
                newUnusableOnlyBy,
                harmonicLimits,
                windowS,
                shared);
    }
}

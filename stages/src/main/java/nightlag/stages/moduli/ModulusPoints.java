package nightlag.stages.moduli;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.stages.fault.Reason;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.geometry.DeformationMode;
import nightlag.stages.geometry.GeometryKind;
import nightlag.stages.geometry.SignalCorrection;
import nightlag.stages.waveform.RecordWindow;
import nightlag.stages.waveform.SignalFit;
import nightlag.stages.waveform.Waveform;

/** Points, from fitted records, from moduli reduced elsewhere, and from records that give none. */
public final class ModulusPoints {
    /** Standard uncertainties by which a figure stands out of its noise. */
    private static final double STANDS_OUT = 3;

    private static final double TAG_OFF_K = 5;
    private static final double KELVIN_AT_ZERO_CELSIUS = 273.15;

    private ModulusPoints() {}

    /**
     * What is known about a point besides what was measured.
     *
     * @param key what it is called
     * @param made the lot's date as tagged
     * @param taggedTemperatureK the tag, K
     * @param elapsedS time since the start of the run, s
     */
    public record Origin(
            PointKey key, Optional<String> made, OptionalDouble taggedTemperatureK, OptionalDouble elapsedS) {
        /** The same so much later, s; without a time as if the run had begun at 0. */
        public Origin after(double seconds) {
            return new Origin(key, made, taggedTemperatureK, OptionalDouble.of(elapsedS.orElse(0) + seconds));
        }
    }

    /**
     * The amplitudes a record is trusted with.
     *
     * @param deformation of its deformation channel, in that channel's SI unit
     * @param load of its load channel, in that channel's SI unit
     */
    public record Ranges(Optional<SignalRange> deformation, Optional<SignalRange> load) {
        /** The ranges of the signals a record holds. */
        public static <D, L> Ranges of(
                Map<D, SignalRange> deformation, D deformationSignal, Map<L, SignalRange> load, L loadSignal) {
            return new Ranges(
                    Optional.ofNullable(deformation.get(deformationSignal)), Optional.ofNullable(load.get(loadSignal)));
        }
    }

    /**
     * The point of a fitted record.
     *
     * @throws ReductionFault if the corrected amplitudes give no modulus
     */
    public static ModulusPoint of(
            Origin origin,
            Waveform waveform,
            SignalFit fit,
            SignalCorrection correction,
            Ranges ranges,
            ScreeningPlan plan)
            throws ReductionFault {
        return of(origin, Optional.of(waveform), fit, correction, ranges, plan);
    }

    /**
     * The point of one frequency out of a record of several. It has no harmonics, because they are other frequencies of the
     * record, and no loop.
     *
     * @param fit a fit of one order
     * @throws ReductionFault if the corrected amplitudes give no modulus
     */
    public static ModulusPoint amongOthers(
            Origin origin, SignalFit fit, SignalCorrection correction, Ranges ranges, ScreeningPlan plan)
            throws ReductionFault {
        return of(origin, Optional.empty(), fit, correction, ranges, plan);
    }

    /** With the waveform where the record is of one frequency. */
    private static ModulusPoint of(
            Origin origin,
            Optional<Waveform> waveform,
            SignalFit fit,
            SignalCorrection correction,
            Ranges ranges,
            ScreeningPlan plan)
            throws ReductionFault {
        StressHarmonics stress = new StressHarmonics(fit, correction);
        List<Harmonic> harmonics = waveform.isPresent() ? stress.harmonics() : List.of();
        Screening screening = Screening.of(
                fit,
                harmonics,
                stress.inertiaRatio(),
                stress.complianceRatio(),
                ranges.deformation(),
                ranges.load(),
                windowS(waveform).isPresent() ? plan.ofWindow() : plan);
        Moduli moduli = stress.moduli();
        List<Reason> reasons = new ArrayList<>(screening.reasons());
        reasons.addAll(fit.notes());
        reasons.addAll(signs(moduli));
        taggedTemperatureOff(origin, fit.meanTemperatureK()).ifPresent(reasons::add);
        boolean inverted = isInverted(moduli);
        ModulusPoint screened = new ModulusPoint(
                origin.key(),
                origin.made(),
                correction.deformationMode(),
                fit.meanTemperatureK().isPresent() ? fit.meanTemperatureK() : origin.taggedTemperatureK(),
                origin.taggedTemperatureK(),
                OptionalDouble.of(fit.frequencyHz()),
                origin.elapsedS(),
                OptionalDouble.of(stress.strainAmplitude()),
                OptionalDouble.of(stress.stressAmplitudePa()),
                Optional.of(moduli),
                harmonics,
                screening.quality(),
                screening.flags(),
                OptionalDouble.of(fit.cyclesUsed()),
                fit.samplesUsed(),
                OptionalDouble.of(fit.screening().deformationSnrDb()),
                OptionalDouble.of(fit.screening().loadSnrDb()),
                OptionalDouble.of(fit.degreesOfFreedom()),
                reasons,
                waveform.filter(samples -> inverted || screening.quality() != Quality.SOUND)
                        .map(samples -> Loop.of(samples, fit, correction.at(0)))
                        .orElse(List.of()),
                correction.torqueGeometry(),
                screening.unusableOnlyBy(),
                correction
                        .torqueGeometry()
                        .filter(kind -> kind == GeometryKind.PARALLEL_PLATE && !harmonics.isEmpty())
                        .map(kind -> new HarmonicLimits(plan.thirdHarmonic().doubtful(), plan.evenHarmonics())),
                windowS(waveform));
        return inverted ? inverted(screened, moduli) : screened;
    }

    /** A controller is seldom off by more; further apart, tag and channel speak of two temperatures. */
    static Optional<Reason> taggedTemperatureOff(Origin origin, OptionalDouble meanK) {
        if (origin.taggedTemperatureK().isEmpty() || meanK.isEmpty()) {
            return Optional.empty();
        }
        double tagged = origin.taggedTemperatureK().getAsDouble();
        double measured = meanK.getAsDouble();
        return Math.abs(measured - tagged) <= TAG_OFF_K
                ? Optional.empty()
                : Optional.of(ModuliReason.MODULI_TAGGED_TEMPERATURE_OFF.with(
                        tagged - KELVIN_AT_ZERO_CELSIUS, measured - KELVIN_AT_ZERO_CELSIUS));
    }

    /**
     * The point of a row of moduli reduced elsewhere. It is sound unless it gives no modulus.
     *
     * @param frequencyHz frequency, Hz
     * @param moduli as given
     * @param strainAmplitude as given
     */
    public static ModulusPoint given(
            Origin origin,
            DeformationMode deformation,
            double frequencyHz,
            Moduli moduli,
            OptionalDouble strainAmplitude) {
        if (!(frequencyHz > 0 && frequencyHz < Double.POSITIVE_INFINITY)) {
            return unusable(
                    origin,
                    deformation,
                    OptionalDouble.empty(),
                    ModuliReason.MODULI_FREQUENCY_NOT_POSITIVE.with(frequencyHz));
        }
        OptionalDouble frequency = OptionalDouble.of(frequencyHz);
        if (!moduli.complex().isFinite()) {
            return unusable(
                    origin,
                    deformation,
                    frequency,
                    ModuliReason.MODULI_NOT_FINITE.with(moduli.storagePa(), moduli.lossPa()));
        }
        if (moduli.magnitudePa() == 0) {
            return unusable(origin, deformation, frequency, ModuliReason.MODULI_ZERO.with());
        }
        OptionalDouble stress = strainAmplitude.isPresent()
                ? OptionalDouble.of(strainAmplitude.getAsDouble() * moduli.magnitudePa())
                : OptionalDouble.empty();
        ModulusPoint sound = point(
                origin,
                deformation,
                frequency,
                strainAmplitude,
                stress,
                Optional.of(moduli),
                Quality.SOUND,
                signs(moduli));
        return isInverted(moduli) ? inverted(sound, moduli) : sound;
    }

    /** A record that can be read but gives no modulus. */
    public static ModulusPoint unusable(
            Origin origin, DeformationMode deformation, OptionalDouble frequencyHz, Reason reason) {
        return point(
                origin,
                deformation,
                frequencyHz,
                OptionalDouble.empty(),
                OptionalDouble.empty(),
                Optional.empty(),
                Quality.UNUSABLE,
                List.of(reason));
    }

    private static ModulusPoint point(
            Origin origin,
            DeformationMode deformation,
            OptionalDouble frequencyHz,
            OptionalDouble strainAmplitude,
            OptionalDouble stressAmplitudePa,
            Optional<Moduli> moduli,
            Quality quality,
            List<Reason> reasons) {
        return new ModulusPoint(
                origin.key(),
                origin.made(),
                deformation,
                origin.taggedTemperatureK(),
                origin.taggedTemperatureK(),
                frequencyHz,
                origin.elapsedS(),
                strainAmplitude,
                stressAmplitudePa,
                moduli,
                List.of(),
                quality,
                List.of(),
                OptionalDouble.empty(),
                0,
                OptionalDouble.empty(),
                OptionalDouble.empty(),
                OptionalDouble.empty(),
                reasons,
                List.of(),
                Optional.empty(),
                Optional.empty(),
                Optional.empty(),
                OptionalDouble.empty());
    }

    private static OptionalDouble windowS(Optional<Waveform> waveform) {
        return waveform.flatMap(Waveform::window).stream()
                .mapToDouble(RecordWindow::lengthS)
                .findFirst();
    }

    /**
     * Whether both moduli are below zero. Inertia that is badly known can turn the one and a wrong delay the other, but a phase
     * beyond 180° is a specimen that pulls where it is pushed: no modulus of anything.
     */
    private static boolean isInverted(Moduli moduli) {
        return lossNegative(moduli) && storageNegative(moduli);
    }

    private static ModulusPoint inverted(ModulusPoint point, Moduli moduli) {
        return point.unusable(
                Flag.SIGN_OR_DELAY,
                ScreeningReason.SCREENING_INVERTED.with(moduli.storagePa(), moduli.lossPa(), Quality.UNUSABLE.word()));
    }

    /** One modulus below zero; of both together there is more to say. */
    private static List<Reason> signs(Moduli moduli) {
        if (isInverted(moduli)) {
            return List.of();
        }
        if (lossNegative(moduli)) {
            return List.of(ModuliReason.MODULI_LOSS_NEGATIVE.with(moduli.lossPa()));
        }
        return storageNegative(moduli)
                ? List.of(ModuliReason.MODULI_STORAGE_NEGATIVE.with(moduli.storagePa()))
                : List.of();
    }

    /** Below zero by more than noise makes of a small one; without an uncertainty, below zero at all. */
    private static boolean lossNegative(Moduli moduli) {
        return moduli.lossPa()
                < -STANDS_OUT * moduli.covariance().map(ModuliCovariance::lossU).orElse(0.0);
    }

    private static boolean storageNegative(Moduli moduli) {
        return moduli.storagePa()
                < -STANDS_OUT
                        * moduli.covariance().map(ModuliCovariance::storageU).orElse(0.0);
    }
}

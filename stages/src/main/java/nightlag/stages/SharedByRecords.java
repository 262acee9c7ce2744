package nightlag.stages;

import java.util.EnumMap;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.TreeMap;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.geometry.CorrectedAmplitudes;
import nightlag.stages.geometry.Dimension;
import nightlag.stages.geometry.GeometrySpec;
import nightlag.stages.geometry.SampleInertia;
import nightlag.stages.geometry.SignalCorrection;
import nightlag.stages.moduli.SharedEffect;
import nightlag.stages.moduli.SharedInfluences;
import nightlag.stages.numeric.Complex;
import nightlag.stages.waveform.SignalFit;

/**
 * How the point of a record moves with the scale of its signals and with the dimensions of its specimen: the amplitudes are
 * taken through corrections and geometry again with each of them changed (JCGM 100:2008, 5.1.3, note 2). So whatever a
 * correction makes of an error is in it: the same error of a torque turns the phase where inertia is taken off.
 */
final class SharedByRecords {
    /** Central differences: their error, of its square, and rounding are both near 1e-10. */
    private static final double STEP = 1e-5;

    private final WaveformRecord record;
    private final ReductionPlan plan;
    private final GeometrySpec spec;
    private final SignalFit fit;

    private SharedByRecords(WaveformRecord record, ReductionPlan plan, GeometrySpec spec, SignalFit fit) {
        this.record = record;
        this.plan = plan;
        this.spec = spec;
        this.fit = fit;
    }

    /**
     * The influences on one point.
     *
     * @param spec the geometry, the record's own dimensions laid over it
     * @param fit what the point was made of
     */
    static SharedInfluences of(WaveformRecord record, ReductionPlan plan, GeometrySpec spec, SignalFit fit) {
        return new SharedByRecords(record, plan, spec, fit).influences();
    }

    /** Those on a point that was reduced elsewhere: its temperature, and the strain it was measured at. */
    static SharedInfluences ofGiven(ReductionPlan plan) {
        return new SharedInfluences(Map.of(), Map.of(), plan.uncertainty().temperatureK());
    }

    private SharedInfluences influences() {
        Map<String, SharedEffect> signals = new TreeMap<>();
        Double ofDeformation = plan.uncertainty().deformation().get(record.deformationSignal());
        if (ofDeformation != null) {
            slope(step -> amplitudes(spec, 1 + step, 1), STEP)
                    .ifPresent(effect ->
                            signals.put(word(record.deformationSignal().name()), effect.times(ofDeformation)));
        }
        Double ofLoad = plan.uncertainty().load().get(record.loadSignal());
        if (ofLoad != null) {
            slope(step -> amplitudes(spec, 1, 1 + step), STEP)
                    .ifPresent(effect -> signals.put(word(record.loadSignal().name()), effect.times(ofLoad)));
        }
        Map<Dimension, SharedEffect> dimensions = new EnumMap<>(Dimension.class);
        spec.dimensions()
                .forEach((dimension, size) -> slope(
                                step -> amplitudes(spec.with(Map.of(dimension, size + step)), 1, 1), STEP * size)
                        .filter(SharedByRecords::isAnEffect)
                        .ifPresent(effect -> dimensions.put(dimension, effect)));
        OptionalDouble temperatureUK = plan.uncertainty().temperatureK();
        return new SharedInfluences(signals, dimensions, temperatureUK);
    }

    private static boolean isAnEffect(SharedEffect effect) {
        return effect.lnModulus() != 0 || effect.phaseRad() != 0 || effect.lnStrain() != 0;
    }

    private static String word(String name) {
        return name.toLowerCase(Locale.ROOT);
    }

    /** Modulus and strain amplitude of a point. */
    private record Amplitudes(Complex modulus, double strain) {}

    /** The amplitudes with something changed. */
    private interface Changed {
        Amplitudes by(double step) throws ReductionFault;
    }

    /** Per unit of the step; from one side where the other is no geometry, as a bar thicker than wide. */
    private static Optional<SharedEffect> slope(Changed changed, double step) {
        Optional<Amplitudes> here = tried(changed, 0);
        Optional<Amplitudes> above = tried(changed, step);
        Optional<Amplitudes> below = tried(changed, -step);
        double run = (above.isPresent() ? step : 0) + (below.isPresent() ? step : 0);
        if (here.isEmpty() || run == 0) {
            return Optional.empty();
        }
        Amplitudes from = below.orElse(here.get());
        Amplitudes to = above.orElse(here.get());
        Complex ratio = to.modulus().over(from.modulus());
        SharedEffect effect = new SharedEffect(
                Math.log(ratio.abs()) / run, ratio.argument() / run, Math.log(to.strain() / from.strain()) / run);
        return Double.isFinite(effect.lnModulus() + effect.phaseRad() + effect.lnStrain())
                ? Optional.of(effect)
                : Optional.empty();
    }

    private static Optional<Amplitudes> tried(Changed changed, double step) {
        try {
            return Optional.of(changed.by(step));
        } catch (ReductionFault noGeometry) {
            return Optional.empty();
        }
    }

    private Amplitudes amplitudes(GeometrySpec changed, double deformation, double load) throws ReductionFault {
        SignalCorrection correction =
                SignalCorrection.of(changed, plan.corrections(), record.deformationSignal(), record.loadSignal());
        double omega = fit.angularFrequency();
        CorrectedAmplitudes own =
                correction.correct(omega, fit.deformation()[0].times(deformation), fit.load()[0].times(load));
        Optional<SampleInertia> inertia = correction.sampleInertia();
        Complex modulus = inertia.isPresent() ? inertia.get().correct(own.modulusPa(), omega) : own.modulusPa();
        return new Amplitudes(modulus, own.strain().abs());
    }
}

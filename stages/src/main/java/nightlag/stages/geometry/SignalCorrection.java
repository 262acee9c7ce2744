package nightlag.stages.geometry;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.numeric.Complex;

/**
 * From the amplitudes of a record, as its channels hold them, to stress and strain: what the instrument adds is taken out
 * first, then the geometry's factors are applied. On complex amplitudes in the convention x(t) = Re X e^{iωt}, each order
 * at its own angular frequency, in this order:
 *
 * <ol>
 *   <li>delays: M ← M e^{iωΔt}, and the same for the deformation with its own;
 *   <li>inertia I and friction b: M ← M + Iω²θ − ibωθ, with θ as measured;
 *   <li>compliance C: θ ← θ − CM, with the M just corrected.
 * </ol>
 *
 * <p>For force and displacement moving mass and damping take the place of inertia and friction. What belongs to the other
 * kind of drive is left alone: it has nothing to act on.
 *
 * <p>A channel that holds stress or strain was made from the torque or angle by the geometry's factor; inertia, friction
 * and compliance act before that. So such a channel is taken back by the same factor, corrected, and made stress or strain
 * again. Where no geometry is known there is no way back, and such a correction is refused.
 */
public final class SignalCorrection {
    private static final String MEASURED_LOAD = "the measured load";

    private final Geometry geometry;
    private final LoadSignal load;
    private final double deformationDelayS;
    private final double loadDelayS;
    private final double inertia;
    private final double friction;
    private final double compliance;
    private final double rawDeformation;
    private final double rawLoad;
    private final Optional<SampleInertia> sampleInertia;

    private SignalCorrection(
            Geometry geometry,
            LoadSignal load,
            Corrections corrections,
            double rawDeformation,
            double rawLoad,
            Optional<SampleInertia> sampleInertia) {
        this.geometry = geometry;
        this.load = load;
        this.deformationDelayS = corrections.deformationDelayS();
        this.loadDelayS = corrections.loadDelayS();
        Movement movement = geometry.kind().movement();
        this.inertia = forMovement(movement, corrections.inertiaKgM2(), corrections.movingMassKg());
        this.friction = forMovement(movement, corrections.frictionNMS(), corrections.dampingNSPerM());
        this.compliance =
                forMovement(movement, corrections.angularComplianceRadPerNM(), corrections.linearComplianceMPerN());
        this.rawDeformation = rawDeformation;
        this.rawLoad = rawLoad;
        this.sampleInertia = sampleInertia;
    }

    /**
     * The corrections for records of one kind. The dimensions of the geometry are needed only where something rests on
     * them: a channel of torque, angle, force or displacement, a correction that acts on these, or a density.
     *
     * @param spec the geometry, the record's own dimensions laid over it
     * @throws ReductionFault if the geometry is wrong or incomplete, does not fit the signals, or a correction has nothing
     *     to act on
     */
    public static SignalCorrection of(
            GeometrySpec spec, Corrections corrections, DeformationSignal deformation, LoadSignal load)
            throws ReductionFault {
        Movement movement = spec.kind().movement();
        if (!movement.gives(deformation)) {
            throw unfit(spec, deformation.name());
        }
        if (!movement.gives(load)) {
            throw unfit(spec, load.name());
        }
        boolean direct = deformation == DeformationSignal.STRAIN && load == LoadSignal.STRESS;
        List<String> acting = acting(movement, corrections);
        if (movement == Movement.UNKNOWN && !acting.isEmpty()) {
            throw new ReductionFault(GeometryReason.GEOMETRY_CORRECTION_NEEDS_KIND.with(String.join(" and ", acting)));
        }
        boolean inertial =
                SampleInertia.knownFor(spec.kind()) && spec.dimensions().containsKey(Dimension.DENSITY);
        if (direct && acting.isEmpty() && !inertial) {
            return new SignalCorrection(
                    new GivenStressAndStrain(spec.deformation()
                            .filter(mode -> spec.kind() == GeometryKind.NONE)
                            .orElse(spec.kind().usualMode())),
                    load,
                    corrections,
                    1,
                    1,
                    Optional.empty());
        }
        Geometry geometry = Geometry.of(spec);
        return new SignalCorrection(
                geometry,
                load,
                corrections,
                deformation == DeformationSignal.STRAIN ? 1 / geometry.strainPerDeformation() : 1,
                load == LoadSignal.STRESS ? 1 / geometry.stressPerLoad() : 1,
                inertial ? Optional.of(SampleInertia.of(spec, corrections.wall())) : Optional.empty());
    }

    /** Which modulus the record gives. */
    public DeformationMode deformationMode() {
        return geometry.deformationMode();
    }

    /** The geometry whose factor makes a torque the stress; empty where the record holds another load. */
    public Optional<GeometryKind> torqueGeometry() {
        return load == LoadSignal.TORQUE ? Optional.of(geometry.kind()) : Optional.empty();
    }

    /** Sample inertia, to be taken out of the modulus; empty where no density is given or the kind has no gap. */
    public Optional<SampleInertia> sampleInertia() {
        return sampleInertia;
    }

    /** The corrections at an angular frequency in rad/s (for the n-th order nω). */
    public CorrectionMap at(double angularFrequency) {
        Complex deformation = Complex.polar(rawDeformation, angularFrequency * deformationDelayS);
        Complex load = Complex.polar(rawLoad, angularFrequency * loadDelayS);
        Complex added = drag(angularFrequency).times(deformation);
        double toStrain = geometry.strainPerDeformation();
        double toStress = geometry.stressPerLoad();
        return new CorrectionMap(
                deformation.minus(added.times(compliance)).times(toStrain),
                load.times(-compliance * toStrain),
                added.times(toStress),
                load.times(toStress));
    }

    /**
     * Corrects one order.
     *
     * @param angularFrequency nω, rad/s
     * @param deformation amplitude as recorded: strain, rad or m
     * @param load amplitude as recorded: Pa, N·m or N
     */
    public CorrectedAmplitudes correct(double angularFrequency, Complex deformation, Complex load) {
        Complex movement = Complex.polar(rawDeformation, angularFrequency * deformationDelayS)
                .times(deformation);
        Complex own = Complex.polar(rawLoad, angularFrequency * loadDelayS)
                .times(load)
                .plus(drag(angularFrequency).times(movement));
        Complex given = own.times(compliance);
        double inertial = inertia * angularFrequency * angularFrequency * movement.abs();
        return new CorrectedAmplitudes(
                movement.minus(given).times(geometry.strainPerDeformation()),
                own.times(geometry.stressPerLoad()),
                inertial == 0 ? 0 : inertial / own.abs(),
                compliance == 0 ? 0 : given.abs() / movement.abs());
    }

    /** The geometry the amplitudes go through. */
    public Geometry geometry() {
        return geometry;
    }

    /**
     * What each correction that was asked for comes to, in the order in which they are made. The signals as recorded follow
     * from the result, for every correction can be undone.
     *
     * @param angularFrequency ω, rad/s
     * @param strainAmplitude corrected strain amplitude
     * @param modulus corrected modulus, Pa
     */
    public List<CorrectionSize> sizes(double angularFrequency, double strainAmplitude, Complex modulus) {
        Complex apparent = sampleInertia
                .map(inertial -> inertial.apparent(modulus, angularFrequency))
                .orElse(modulus);
        Complex own = apparent.times(strainAmplitude / geometry.stressPerLoad());
        Complex given = own.times(compliance);
        Complex movement = given.plus(new Complex(strainAmplitude / geometry.strainPerDeformation(), 0));
        double measured = own.minus(drag(angularFrequency).times(movement)).abs();
        boolean turns = geometry.kind().movement() == Movement.TURN;
        double rate = angularFrequency * movement.abs();
        List<CorrectionSize> sizes = new ArrayList<>();
        sizes.add(delay("delay of the deformation", deformationDelayS, angularFrequency, "deformation"));
        sizes.add(delay("delay of the load", loadDelayS, angularFrequency, "load"));
        sizes.add(new CorrectionSize(
                turns ? "inertia" : "moving mass",
                inertia,
                turns ? "kg·m²" : "kg",
                inertia * angularFrequency * rate / measured,
                MEASURED_LOAD));
        sizes.add(new CorrectionSize(
                turns ? "friction" : "damping",
                friction,
                turns ? "N·m·s" : "N·s/m",
                friction * rate / measured,
                MEASURED_LOAD));
        sizes.add(new CorrectionSize(
                "compliance",
                compliance,
                turns ? "rad/(N·m)" : "m/N",
                given.abs() / movement.abs(),
                "the measured movement"));
        sizes.removeIf(size -> size.value() == 0);
        sampleInertia.ifPresent(inertial -> sizes.add(new CorrectionSize(
                "inertia of the specimen",
                inertial.massTimesSquaredGap(),
                "kg/m",
                modulus.minus(apparent).abs() / apparent.abs(),
                "the modulus without it")));
        return sizes;
    }

    private static CorrectionSize delay(String name, double delayS, double angularFrequency, String channel) {
        return new CorrectionSize(
                name, delayS, "s", 2 * Math.abs(Math.sin(angularFrequency * delayS / 2)), "the " + channel);
    }

    /** Iω² − ibω: what is to be added to the load per unit of movement. */
    private Complex drag(double angularFrequency) {
        return new Complex(inertia * angularFrequency * angularFrequency, -friction * angularFrequency);
    }

    private static double forMovement(Movement movement, double turning, double linear) {
        return switch (movement) {
            case TURN -> turning;
            case LINE -> linear;
            case UNKNOWN -> 0;
        };
    }

    /** The keys of the corrections that act on a drive; all of them where the drive is not known. */
    private static List<String> acting(Movement movement, Corrections corrections) {
        List<String> keys = new ArrayList<>();
        boolean turn = movement != Movement.LINE;
        boolean line = movement != Movement.TURN;
        if (turn && corrections.inertiaKgM2() != 0) {
            keys.add("inertia");
        }
        if (turn && corrections.frictionNMS() != 0) {
            keys.add("friction");
        }
        if (line && corrections.movingMassKg() != 0) {
            keys.add("moving_mass");
        }
        if (line && corrections.dampingNSPerM() != 0) {
            keys.add("damping");
        }
        if ((turn && corrections.angularComplianceRadPerNM() != 0)
                || (line && corrections.linearComplianceMPerN() != 0)) {
            keys.add("compliance");
        }
        return keys;
    }

    private static ReductionFault unfit(GeometrySpec spec, String signal) {
        return new ReductionFault(GeometryReason.GEOMETRY_SIGNAL_DOES_NOT_FIT.with(
                spec.kind().word(), spec.kind().movement().signals(), signal.toLowerCase(Locale.ROOT)));
    }
}

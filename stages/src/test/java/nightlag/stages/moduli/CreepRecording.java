package nightlag.stages.moduli;

import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;
import java.util.function.DoubleUnaryOperator;
import java.util.stream.DoubleStream;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.geometry.Corrections;
import nightlag.stages.geometry.DeformationSignal;
import nightlag.stages.geometry.GeometrySpec;
import nightlag.stages.geometry.LoadSignal;
import nightlag.stages.geometry.SignalCorrection;
import nightlag.stages.moduli.ModulusPoints.Origin;
import nightlag.stages.moduli.ModulusPoints.Ranges;
import nightlag.stages.waveform.Waveform;

/** A creep record made of a compliance by the superposition of steps of stress (Boltzmann), with noise of a seed. */
public final class CreepRecording {
    private final DoubleUnaryOperator compliance;
    private final double[] timeS;
    private double[] stepS = {0};
    private double[] levelPa = {1000};
    private double strainNoise;
    private double stressNoise;
    private double correlated;
    private double riseS;
    private long seed = 1;

    private CreepRecording(DoubleUnaryOperator compliance, double[] timeS) {
        this.compliance = compliance;
        this.timeS = timeS;
    }

    /** J(t) in 1/Pa read at some times; a step to 1 kPa at 0 s. */
    public static CreepRecording of(DoubleUnaryOperator compliance, double[] timeS) {
        return new CreepRecording(compliance, timeS);
    }

    /** Stresses from some instants on. */
    public CreepRecording steps(double[] atS, double... toPa) {
        this.stepS = atS;
        this.levelPa = toPa;
        return this;
    }

    /** Noise of both channels. */
    public CreepRecording noise(double ofStrain, double ofStressPa, long ofSeed) {
        this.strainNoise = ofStrain;
        this.stressNoise = ofStressPa;
        this.seed = ofSeed;
        return this;
    }

    /** Noise of the strain of first order: so much of each sample's is the one before it. */
    CreepRecording correlated(double share) {
        this.correlated = share;
        return this;
    }

    /** Straight rises of such a length, each begun at its instant. */
    public CreepRecording rise(double seconds) {
        this.riseS = seconds;
        return this;
    }

    /** Even samples from {@code from} to {@code to}. */
    public static double[] even(double from, double to, double interval) {
        int count = (int) Math.round((to - from) / interval) + 1;
        return DoubleStream.iterate(from, t -> t + interval).limit(count).toArray();
    }

    /** Samples before a step, then evenly many to each decade after it. */
    static double[] logarithmic(double first, double last, int perDecade) {
        int count = (int) Math.round(perDecade * Math.log10(last / first)) + 1;
        return DoubleStream.concat(
                        DoubleStream.of(-5, -4, -3, -2, -1, -first / 2),
                        DoubleStream.iterate(0, i -> i + 1).limit(count).map(i -> first * Math.pow(10, i / perDecade)))
                .toArray();
    }

    Waveform waveform() {
        Random random = new Random(seed);
        double[] strain = new double[timeS.length];
        double[] stress = new double[timeS.length];
        double noise = 0;
        for (int i = 0; i < timeS.length; i++) {
            double before = 0;
            for (int k = 0; k < stepS.length; k++) {
                double change = levelPa[k] - before;
                before = levelPa[k];
                double since = timeS[i] - stepS[k];
                if (since >= 0) {
                    stress[i] += change * (riseS > 0 ? Math.min(1, since / riseS) : 1);
                    strain[i] += change * ramped(since);
                }
            }
            noise = correlated * noise + Math.sqrt(1 - correlated * correlated) * strainNoise * random.nextGaussian();
            strain[i] += noise;
            stress[i] += stressNoise * random.nextGaussian();
        }
        return new Waveform(timeS, strain, stress, new double[0], OptionalDouble.empty(), 0);
    }

    /** The mean of J over the part of the rise that is done, by its straight pieces. */
    private double ramped(double since) {
        if (riseS == 0) {
            return compliance.applyAsDouble(since);
        }
        int pieces = 200;
        double done = Math.min(since, riseS);
        double sum = 0;
        for (int p = 0; p < pieces; p++) {
            sum += compliance.applyAsDouble(since - done * (p + 0.5) / pieces);
        }
        return sum / pieces * done / riseS;
    }

    /** What the analysis makes of it. */
    public CreepCurve curve() throws ReductionFault {
        return curve(waveform());
    }

    static CreepCurve curve(Waveform waveform) throws ReductionFault {
        return CreepAnalysis.of(
                new Origin(
                        new PointKey("plover", "L1", "1", "1", "run", "bench/run.csv"),
                        Optional.empty(),
                        OptionalDouble.of(298.15),
                        OptionalDouble.empty()),
                waveform,
                SignalCorrection.of(
                        GeometrySpec.none(), Corrections.none(), DeformationSignal.STRAIN, LoadSignal.STRESS),
                new Ranges(Optional.empty(), Optional.empty()),
                ScreeningPlan.withDefaults());
    }

    /** The readings after one of the steps. */
    static List<CreepReading> after(CreepCurve curve, int step) {
        return curve.readings().stream()
                .filter(reading -> reading.step() == step)
                .toList();
    }
}

package nightlag.stages.waveform;

import java.util.List;
import java.util.stream.IntStream;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.numeric.Complex;
import org.apache.commons.math3.distribution.TDistribution;

/**
 * What many draws of one kind of record gave, for G', G'' and δ in this order.
 *
 * @param draws number of draws
 * @param ratio rms error over that of the reference
 * @param ratioError standard error of the ratio from the draws themselves
 * @param held share of the draws whose 95 % interval holds the truth
 */
record StudyOutcome(int draws, double[] ratio, double[] ratioError, double[] held) {
    static final int QUANTITIES = 3;

    /** Squared errors of one draw and of its reference, and whether the intervals hold the truth. */
    private record Draw(double[] squares, double[] reference, boolean[] held) {}

    /** Against maximum likelihood by brute force on the same draws, or else against the Cramér–Rao bound. */
    static StudyOutcome of(StudyCondition condition, int draws, long firstSeed, boolean byLikelihood) {
        double[] bound = FisherBound.variances(condition, condition.draw(firstSeed));
        List<Draw> all = IntStream.range(0, draws)
                .parallel()
                .mapToObj(k -> draw(condition, firstSeed + k, bound, byLikelihood))
                .toList();
        double[] ratio = new double[QUANTITIES];
        double[] error = new double[QUANTITIES];
        double[] held = new double[QUANTITIES];
        for (int q = 0; q < QUANTITIES; q++) {
            int place = q;
            double ours =
                    all.stream().mapToDouble(d -> d.squares()[place]).average().orElseThrow();
            double reference = all.stream()
                    .mapToDouble(d -> d.reference()[place])
                    .average()
                    .orElseThrow();
            // d ln(ratio²) of one draw
            double scatter = all.stream()
                    .mapToDouble(d -> Math.pow(d.squares()[place] / ours - d.reference()[place] / reference, 2))
                    .sum();
            ratio[q] = Math.sqrt(ours / reference);
            error[q] = ratio[q] / 2 * Math.sqrt(scatter) / draws;
            held[q] = all.stream().filter(d -> d.held()[place]).count() / (double) draws;
        }
        return new StudyOutcome(draws, ratio, error, held);
    }

    /** Several kinds of record together, each counting the same. */
    static StudyOutcome pooled(List<StudyOutcome> outcomes) {
        int draws = outcomes.stream().mapToInt(StudyOutcome::draws).sum();
        double[] ratio = new double[QUANTITIES];
        double[] error = new double[QUANTITIES];
        double[] held = new double[QUANTITIES];
        for (int q = 0; q < QUANTITIES; q++) {
            for (StudyOutcome outcome : outcomes) {
                ratio[q] += Math.pow(outcome.ratio[q], 2) / outcomes.size();
                error[q] += Math.pow(outcome.ratio[q] * outcome.ratioError[q] / outcomes.size(), 2);
                held[q] += outcome.held[q] * outcome.draws / draws;
            }
            ratio[q] = Math.sqrt(ratio[q]);
            error[q] = Math.sqrt(error[q]) / ratio[q];
        }
        return new StudyOutcome(draws, ratio, error, held);
    }

    private static Draw draw(StudyCondition condition, long seed, double[] bound, boolean byLikelihood) {
        Waveform waveform = condition.draw(seed);
        SignalFit fit;
        try {
            fit = HarmonicAnalysis.analyse(waveform, condition.plan());
        } catch (ReductionFault fault) {
            throw new AssertionError(
                    condition + ", seed " + seed + ": " + fault.reason().sentence(), fault);
        }
        Complex modulus = fit.load()[0].over(fit.deformation()[0]);
        double[] errors = errors(modulus);
        double[] u = uncertainties(fit, modulus);
        double wide = new TDistribution(null, fit.degreesOfFreedom()).inverseCumulativeProbability(0.975);
        double[] reference;
        if (byLikelihood) {
            reference = errors(BruteForceLikelihood.modulus(condition, waveform));
            for (int q = 0; q < QUANTITIES; q++) {
                reference[q] *= reference[q];
            }
        } else {
            reference = condition.variesInTime() ? FisherBound.variances(condition, waveform) : bound;
        }
        double[] squares = new double[QUANTITIES];
        boolean[] held = new boolean[QUANTITIES];
        for (int q = 0; q < QUANTITIES; q++) {
            squares[q] = errors[q] * errors[q];
            held[q] = Math.abs(errors[q]) <= wide * u[q];
        }
        return new Draw(squares, reference, held);
    }

    private static double[] errors(Complex modulus) {
        return new double[] {
            modulus.re() - StudyCondition.MODULUS.re(),
            modulus.im() - StudyCondition.MODULUS.im(),
            modulus.over(StudyCondition.MODULUS).argument(),
        };
    }

    private static double[] uncertainties(SignalFit fit, Complex modulus) {
        Complex byLoad = Complex.ONE.over(fit.deformation()[0]);
        Complex byStrain = modulus.times(-1).over(fit.deformation()[0]);
        double[] re = {byStrain.re(), -byStrain.im(), byLoad.re(), -byLoad.im()};
        double[] im = {byStrain.im(), byStrain.re(), byLoad.im(), byLoad.re()};
        double[] phase = new double[4];
        double square = modulus.abs() * modulus.abs();
        for (int i = 0; i < 4; i++) {
            phase[i] = (modulus.re() * im[i] - modulus.im() * re[i]) / square;
        }
        return new double[] {deviation(fit, re), deviation(fit, im), deviation(fit, phase)};
    }

    private static double deviation(SignalFit fit, double[] derivative) {
        int load = 2 * fit.harmonics();
        int[] places = {0, 1, load, load + 1};
        double variance = 0;
        for (int i = 0; i < 4; i++) {
            for (int j = 0; j < 4; j++) {
                variance += derivative[i] * derivative[j] * fit.covariance()[places[i]][places[j]];
            }
        }
        return Math.sqrt(variance);
    }
}

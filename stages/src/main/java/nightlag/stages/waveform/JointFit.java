package nightlag.stages.waveform;

import java.util.Optional;
import nightlag.stages.numeric.Cholesky;

/**
 * Drift, harmonics and the shared frequency of both channels by separable least squares (Golub &amp; Pereyra, SIAM J. Numer.
 * Anal. 10 (1973) 413). For a given ω both channels are linear in their own coefficients and have the same columns A, so
 * one factored AᵀA serves both; ω is moved by Gauss–Newton on what A leaves of the derivative g_c of each channel:
 * δ = Σ w_c g_c⊥ᵀ r_c / Σ w_c |g_c⊥|². Each channel is weighted by its own residual variance, which maximises the likelihood
 * of two channels with unknown noise. Each step works from residuals taken anew, so normal equations cost no digits.
 */
final class JointFit {
    private static final int BLOCK = 256;
    private static final int MOST_STEPS = 40;
    private static final double LARGEST_PHASE_STEP = 0.7;
    /** A step of ω this part of its uncertainty is the last: what it leaves is of second order. */
    private static final double SETTLED_SHARE = 0.1;

    /** … if it is also this small, in rad at the record's end. */
    private static final double LINEAR_PHASE = 1e-3;

    private static final double ROUGH_PHASE = 0.02;
    /** AᵀA taken at a frequency serves until the phase at the record's end has moved so far, rad. */
    private static final double SAME_GRAM = 1e-4;

    private final Samples samples;
    private final Basis basis;
    private final int columns;
    private final double[][] block;
    private final double[][] blockSlope = new double[Samples.CHANNELS][BLOCK];
    private final double[][] residuals;
    private final double[] totalSquares = new double[Samples.CHANNELS];
    private double[][] gram = new double[0][0];
    private double gramFrequency = Double.NaN;
    private Optional<Cholesky> normal = Optional.empty();

    JointFit(Samples samples, int harmonics, int driftDegree) {
        this(samples, harmonics, driftDegree, 0);
    }

    /** With a polynomial of this degree for the amplitude of the fundamental. */
    JointFit(Samples samples, int harmonics, int driftDegree, int trendDegree) {
        this.samples = samples;
        this.basis = new Basis(samples, harmonics, driftDegree, trendDegree);
        this.columns = basis.columns();
        this.block = new double[columns][BLOCK];
        this.residuals = new double[Samples.CHANNELS][samples.size()];
        for (int c = 0; c < Samples.CHANNELS; c++) {
            double[] values = samples.channels()[c];
            totalSquares[c] = dot(values, 0, values, 0, values.length);
        }
    }

    /** The columns of the model. */
    Basis basis() {
        return basis;
    }

    /**
     * One point on the way: sums over the samples at given ω and coefficients.
     *
     * @param slopes Aᵀg_c
     * @param gradient Aᵀr_c
     * @param slopeSquares |g_c|²
     * @param slopeGradient g_cᵀr_c
     * @param residualSquares |r_c|²
     */
    private record Sums(
            double[][] slopes,
            double[][] gradient,
            double[] slopeSquares,
            double[] slopeGradient,
            double[] residualSquares) {}

    /**
     * A fit.
     *
     * @param angularFrequency ω, rad/s
     * @param coefficients of each channel, in the order of {@link Basis}
     * @param residuals of each channel
     * @param residualSquares their sums of squares
     * @param normal AᵀA, factored
     * @param pull (AᵀA)⁻¹Aᵀg_c: what a phase δ at the record's end takes from the coefficients
     * @param freeSlopeSquares |g_c⊥|², what A leaves of the derivative
     * @param phaseStep the step δ still open: nothing to speak of where ω was free, else how far the signal would move it
     */
    record Result(
            double angularFrequency,
            double[][] coefficients,
            double[][] residuals,
            double[] residualSquares,
            Cholesky normal,
            double[][] pull,
            double[] freeSlopeSquares,
            double phaseStep) {
        /** Weight of each channel: the inverse of its residual variance, up to a common factor. */
        double[] weights() {
            double[] weights = new double[residualSquares.length];
            for (int c = 0; c < weights.length; c++) {
                weights[c] = 1 / Math.max(residualSquares[c], Double.MIN_NORMAL);
            }
            return weights;
        }

        /** −2 ln of the likelihood per sample, the noise of each channel at its best; only differences mean anything. */
        double misfit() {
            double sum = 0;
            for (double squares : residualSquares) {
                sum += Math.log(Math.max(squares, Double.MIN_NORMAL));
            }
            return sum;
        }
    }

    /** The linear fit at a fixed frequency. */
    Optional<Result> atFixed(double angularFrequency) {
        return iterate(angularFrequency, new double[Samples.CHANNELS][columns], false, 0);
    }

    /** The residuals and sums of given coefficients, which stay as they are. */
    Optional<Result> given(double angularFrequency, double[][] coefficients) {
        Sums sums = sums(angularFrequency, coefficients);
        return normal.map(factored -> result(angularFrequency, coefficients, sums, factored, step(sums, factored)));
    }

    /**
     * {@link Result#misfit} of the linear fit at a frequency in one pass, good enough to compare frequencies by; infinite
     * where the columns cannot be told apart.
     */
    double misfitAt(double angularFrequency) {
        Sums sums = sums(angularFrequency, new double[Samples.CHANNELS][columns]);
        if (normal.isEmpty()) {
            return Double.POSITIVE_INFINITY;
        }
        double misfit = 0;
        for (int c = 0; c < Samples.CHANNELS; c++) {
            double rest = sums.residualSquares()[c] - normal.get().inverseForm(sums.gradient()[c]);
            misfit += Math.log(Math.max(rest, 1e-14 * totalSquares[c]));
        }
        return misfit;
    }

    /**
     * The fit with ω free.
     *
     * @param start where ω starts, rad/s; it must lie within about a third of a bin of the truth
     */
    Optional<Result> refined(double start) {
        return iterate(start, new double[Samples.CHANNELS][columns], true, 0);
    }

    /** The same as far as another fit needs it to start from: the last step may have been {@link #ROUGH_PHASE}. */
    Optional<Result> roughlyRefined(double start) {
        return iterate(start, new double[Samples.CHANNELS][columns], true, ROUGH_PHASE);
    }

    private Optional<Result> iterate(double start, double[][] startCoefficients, boolean free, double settledPhase) {
        double halfSpan = samples.halfSpanS();
        double omega = start;
        double[][] x = startCoefficients;
        double baseOmega = omega;
        double[][] baseX = x;
        double baseMisfit = Double.POSITIVE_INFINITY;
        Step step = null;
        double share = 1;
        double lastSize = Double.POSITIVE_INFINITY;
        for (int count = 0; count < MOST_STEPS; count++) {
            Sums sums = sums(omega, x);
            double misfit = misfit(sums);
            if (step != null && share > 1e-3 && misfit > baseMisfit + 1e-6 && Math.abs(step.phase()) > 1e-6) {
                // worse than before: go half as far
                share /= 2;
                omega = baseOmega + share * step.phase() / halfSpan;
                x = moved(baseX, step, share);
                continue;
            }
            if (normal.isEmpty()) {
                return Optional.empty();
            }
            Step next = step(sums, normal.get());
            double size = Math.abs(next.phase());
            double rounding = 1e-15 * Math.max(1, Math.abs(omega) * halfSpan);
            boolean settled = free
                    ? count > 0
                            && (size <= Math.max(rounding, settledPhase)
                                    || size <= Math.min(LINEAR_PHASE, SETTLED_SHARE * next.phaseU())
                                    || (size < 1e-9 && size > lastSize / 2))
                    : count > 0;
            if (settled) {
                x = moved(x, free ? next : next.withoutPhase(), 1);
                return Optional.of(result(free ? omega + next.phase() / halfSpan : omega, x, sums, normal.get(), next));
            }
            baseOmega = omega;
            baseX = x;
            baseMisfit = misfit;
            share = 1;
            step = free && count > 0 ? next.limited(LARGEST_PHASE_STEP) : next.withoutPhase();
            lastSize = count > 0 ? size : Double.POSITIVE_INFINITY;
            omega = baseOmega + step.phase() / halfSpan;
            x = moved(baseX, step, 1);
        }
        return Optional.empty();
    }

    /**
     * A Gauss–Newton step.
     *
     * @param phase δ at the record's end, rad
     * @param phaseU the standard uncertainty of the phase at the record's end, from the residuals, rad
     * @param linear what the coefficients move at fixed ω
     * @param pull what a unit of δ takes from them
     * @param freeSlopeSquares |g_c⊥|²
     */
    private record Step(double phase, double phaseU, double[][] linear, double[][] pull, double[] freeSlopeSquares) {
        Step withoutPhase() {
            return new Step(0, phaseU, linear, pull, freeSlopeSquares);
        }

        Step limited(double most) {
            return Math.abs(phase) <= most
                    ? this
                    : new Step(Math.copySign(most, phase), phaseU, linear, pull, freeSlopeSquares);
        }
    }

    private Step step(Sums sums, Cholesky factored) {
        double[][] linear = new double[Samples.CHANNELS][];
        double[][] pull = new double[Samples.CHANNELS][];
        double[] freeSlopeSquares = new double[Samples.CHANNELS];
        double numerator = 0;
        double denominator = 0;
        for (int c = 0; c < Samples.CHANNELS; c++) {
            linear[c] = factored.solve(sums.gradient()[c]);
            pull[c] = factored.solve(sums.slopes()[c]);
            double weight = samples.size() / Math.max(sums.residualSquares()[c], 1e-32 * totalSquares[c]);
            double taken = 0;
            double explained = 0;
            for (int j = 0; j < columns; j++) {
                taken += sums.slopes()[c][j] * pull[c][j];
                explained += sums.slopes()[c][j] * linear[c][j];
            }
            freeSlopeSquares[c] = Math.max(0, sums.slopeSquares()[c] - taken);
            numerator += weight * (sums.slopeGradient()[c] - explained);
            denominator += weight * freeSlopeSquares[c];
        }
        boolean determined = denominator > 0;
        return new Step(
                determined ? numerator / denominator : 0,
                determined ? 1 / Math.sqrt(denominator) : 0,
                linear,
                pull,
                freeSlopeSquares);
    }

    private double[][] moved(double[][] coefficients, Step step, double share) {
        double[][] moved = new double[Samples.CHANNELS][columns];
        for (int c = 0; c < Samples.CHANNELS; c++) {
            for (int j = 0; j < columns; j++) {
                moved[c][j] = coefficients[c][j] + share * (step.linear()[c][j] - step.pull()[c][j] * step.phase());
            }
        }
        return moved;
    }

    private Result result(double omega, double[][] coefficients, Sums sums, Cholesky factored, Step step) {
        double[][] copies = new double[Samples.CHANNELS][];
        for (int c = 0; c < Samples.CHANNELS; c++) {
            copies[c] = residuals[c].clone();
        }
        return new Result(
                omega,
                coefficients,
                copies,
                sums.residualSquares(),
                factored,
                step.pull(),
                step.freeSlopeSquares(),
                step.phase());
    }

    private double misfit(Sums sums) {
        double sum = 0;
        for (int c = 0; c < Samples.CHANNELS; c++) {
            sum += Math.log(Math.max(sums.residualSquares()[c], 1e-30 * totalSquares[c] + Double.MIN_NORMAL));
        }
        return sum;
    }

    private Sums sums(double omega, double[][] coefficients) {
        basis.at(omega);
        boolean sameGram = Math.abs(omega - gramFrequency) * samples.halfSpanS() <= SAME_GRAM;
        if (!sameGram) {
            gram = new double[columns][columns];
            gramFrequency = omega;
        }
        Sums sums = new Sums(
                new double[Samples.CHANNELS][columns],
                new double[Samples.CHANNELS][columns],
                new double[Samples.CHANNELS],
                new double[Samples.CHANNELS],
                new double[Samples.CHANNELS]);
        for (int first = 0; first < samples.size(); first += BLOCK) {
            int count = Math.min(BLOCK, samples.size() - first);
            basis.fill(first, count, block);
            for (int i = 0; i < columns && !sameGram; i++) {
                for (int j = 0; j <= i; j++) {
                    gram[i][j] += dot(block[i], 0, block[j], 0, count);
                }
            }
            for (int c = 0; c < Samples.CHANNELS; c++) {
                double[] residual = residuals[c];
                residual(first, count, samples.channels()[c], coefficients[c], residual);
                double[] slope = blockSlope[c];
                basis.phaseSlope(first, count, block, coefficients[c], slope);
                for (int j = 0; j < columns; j++) {
                    sums.gradient()[c][j] += dot(block[j], 0, residual, first, count);
                    sums.slopes()[c][j] += dot(block[j], 0, slope, 0, count);
                }
                sums.slopeSquares()[c] += dot(slope, 0, slope, 0, count);
                sums.slopeGradient()[c] += dot(slope, 0, residual, first, count);
                sums.residualSquares()[c] += dot(residual, first, residual, first, count);
            }
        }
        if (!sameGram) {
            normal = Cholesky.of(gram);
        }
        return sums;
    }

    private void residual(int first, int count, double[] values, double[] coefficients, double[] into) {
        System.arraycopy(values, first, into, first, count);
        for (int j = 0; j < columns; j++) {
            double coefficient = coefficients[j];
            if (coefficient != 0) {
                double[] column = block[j];
                for (int i = 0; i < count; i++) {
                    into[first + i] -= coefficient * column[i];
                }
            }
        }
    }

    /** A dot product in four running sums, which the processor can overlap. */
    private static double dot(double[] a, int aFirst, double[] b, int bFirst, int count) {
        double s0 = 0;
        double s1 = 0;
        double s2 = 0;
        double s3 = 0;
        int i = 0;
        for (; i + 3 < count; i += 4) {
            s0 += a[aFirst + i] * b[bFirst + i];
            s1 += a[aFirst + i + 1] * b[bFirst + i + 1];
            s2 += a[aFirst + i + 2] * b[bFirst + i + 2];
            s3 += a[aFirst + i + 3] * b[bFirst + i + 3];
        }
        for (; i < count; i++) {
            s0 += a[aFirst + i] * b[bFirst + i];
        }
        return (s0 + s1) + (s2 + s3);
    }
}
